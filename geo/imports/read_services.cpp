#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {

Expected<void> read_services(const ReadyTable& from, Gathered& out) {
    if (auto has_id = need_column(from, "service_id"); !has_id) return has_id;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const auto place_of = PlaceReader::make(in, from.placed, out.city.crs);
    if (!place_of) return tl::unexpected(place_of.error());
    const TextField id(in, "service_id"), pole(in, "pole_id");
    const WordField<ServiceKind> kind(
        in, "kind", "service, circuit-end or candidate",
        "existing=service end=circuit-end circuitend=circuit-end proposed=candidate");
    const NumberField volts(in, "volts", 1, 1000), free_kva(in, "free_kva", 0, 1e5),
        lead_weeks(in, "lead_weeks", 0, 1000);
    out.city.services.clear();
    read_rows(in, "service_id", out, [&] {
        ServicePoint service;
        service.id = id();
        service.kind = kind().value_or(ServiceKind::service);
        service.pole_given = pole.unless_blank();
        if (const auto place = (*place_of)()) {
            service.place = *place;
            service.has_place = true;
        }
        service.volts = volts().value_or(service.volts);
        service.free_kva = free_kva();
        service.lead_weeks = lead_weeks();
        service.from = in.from();
        out.city.services.push_back(std::move(service));
        return true;
    });
    return {};
}

Expected<void> read_cutbacks(const ReadyTable& from, Gathered& out) {
    for (const char* field : {"string_id", "pole_a", "pole_b"})
        if (auto has = need_column(from, field); !has) return has;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const TextField string(in, "string_id"), pole_a(in, "pole_a"), pole_b(in, "pole_b");
    const WordField<CutBackKind> kind(in, "kind", "pullbox, trench or crossing",
                                      "pull-box=pullbox box=pullbox bore=crossing");
    const YesNoField confirmed(in, "confirmed");
    const NumberField new_cable_m(in, "new_cable_m", 0, 1e5);
    out.city.cutbacks.clear();
    read_rows(in, "string_id", out, [&] {
        CutBack cutback;
        cutback.string_given = string();
        cutback.pole_a = pole_a.unless_blank();
        cutback.pole_b = pole_b.unless_blank();
        cutback.kind = kind().value_or(CutBackKind::pullbox);
        cutback.confirmed = confirmed().value_or(false);
        cutback.new_cable_m = new_cable_m();
        cutback.from = in.from();
        out.city.cutbacks.push_back(std::move(cutback));
        return true;
    });
    return {};
}

} // namespace unstring
