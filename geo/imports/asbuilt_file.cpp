#include "geo/imports/asbuilt_file.h"

#include <cmath>
#include <unordered_map>

#include <fmt/format.h>

#include "geo/imports/table_reader.h"

namespace unstring {
namespace {

constexpr double kReadingTolerance =
    0.03; ///< of the reading; about the current band of a regulated output, 6.40-6.70 A

void compare(TableReader& in, const char* what, std::optional<double> read, std::optional<double> known) {
    if (!read || !known || std::abs(*read - *known) <= kReadingTolerance * std::abs(*known)) return;
    in.add_finding("reading-differs", fmt::format("{} {:g}", what, *read),
                   fmt::format("as found before: {:g}", *known),
                   "find the reason before the next work on this string");
}

} // namespace

Expected<void> read_asbuilt(const ReadyTable& from, Gathered& out) {
    if (auto has_id = need_column(from, "pole_id"); !has_id) return has_id;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const YesNoField done(in, "done");
    const NumberField order(in, "order", 1, 1e6), amps(in, "amps", 0, 1000), volts(in, "volts", 0, 1e5),
        insulation(in, "insulation_mohm", 0, 1e7);
    const WordField<Duct> duct_found(in, "duct_found",
                                     "proven, inspected, assumed, unknown, bad or direct-buried");
    std::unordered_map<std::string_view, const Pole*> poles;
    for (const Pole& pole : out.city.poles) poles.emplace(pole.id, &pole);
    long finished = 0;
    read_rows(in, "pole_id", out, [&] {
        const auto at = poles.find(in.cell("pole_id"));
        if (at == poles.end()) {
            in.add_finding("pole-unknown", fmt::format("pole \"{}\"", in.cell("pole_id")),
                           "a pole of the poles file", "mend the id; the row is left out");
            return false;
        }
        const Pole& pole = *at->second;
        if (done().value_or(false)) ++finished;
        [[maybe_unused]] const auto read_mohm = insulation(); // only checked to be a number
        if (const auto found = order.whole(); found && pole.order && *found != *pole.order)
            in.add_finding("reading-differs", fmt::format("wiring order {}", *found),
                           fmt::format("{} in the records", *pole.order),
                           "set the new order in the poles file");
        if (const auto found = duct_found(); found && pole.duct != Duct::unknown && *found != pole.duct)
            in.add_finding("reading-differs", fmt::format("duct {}", text_of(*found)),
                           fmt::format("{} in the records", text_of(pole.duct)),
                           "set the duct in the poles file");
        const auto read_a = amps();
        const auto read_v = volts();
        if (pole.string.is_valid()) {
            const SeriesString& string = out.city.strings[pole.string.place()];
            compare(in, "amperes", read_a, string.asfound_a ? string.asfound_a : string.current_a);
            compare(in, "volts", read_v, string.asfound_v);
        }
        return true;
    });
    const RowCount& count = out.rows["asbuilt"];
    in.note(fmt::format(
        "asbuilt: {} rows read and compared, {} of them done; the records are not changed by them",
        count.read, finished));
    return {};
}

} // namespace unstring
