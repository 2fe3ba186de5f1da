#include "model/vet/set_aside.h"

#include <algorithm>
#include <string>
#include <unordered_map>
#include <utility>

#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

/// The row first: of two records with one id only the one in that row is meant. A record without its row is named by id.
template <class Record> bool is_named(const Record& record, const std::string& id, const Finding& finding) {
    if (finding.row > 0 && record.from.row > 0)
        return record.from.row == finding.row && record.from.file == finding.file && (finding.record.empty() || id == finding.record);
    return !finding.record.empty() && id == finding.record;
}

/// A cut-back has no id of its own: its findings name its string, and it by its row.
std::string cutback_id(const CutBack& cutback) { return cutback.string_given; }

template <class Table, class IdOf, class Visit> void visit_named(Table& table, IdOf id_of, const Finding& finding, Visit visit) {
    for (auto& record : table)
        if (is_named(record, id_of(record), finding)) visit(record);
}

/// Calls visit on each record that the finding names.
template <class AnyCity, class Visit> void visit_records(AnyCity& city, const Finding& finding, Visit visit) {
    const auto own_id = [](const auto& record) { return record.id; };
    if (finding.table == kPolesTable) visit_named(city.poles, own_id, finding, visit);
    if (finding.table == kCircuitsTable) visit_named(city.strings, own_id, finding, visit);
    if (finding.table == kTransformersTable) visit_named(city.transformers, own_id, finding, visit);
    if (finding.table == kServicesTable) visit_named(city.services, own_id, finding, visit);
    if (finding.table == kCutbacksTable) visit_named(city.cutbacks, cutback_id, finding, visit);
}

}  // namespace

City set_aside_errors(City city, const std::vector<Finding>& findings) {
    for (const Finding& finding : findings)
        if (finding.severity == Severity::error) visit_records(city, finding, [](auto& record) { record.set_aside = true; });
    for (Pole& pole : city.poles)
        if (pole.string.is_valid() && city.strings[pole.string.place()].set_aside) pole.set_aside = true;
    return city;
}

bool is_set_aside(const City& city, const Finding& finding) {
    bool any = false, all = true;
    visit_records(city, finding, [&](const auto& record) {
        any = true;
        all = all && record.set_aside;
    });
    return any && all;
}

City with_wiring(City city, const std::vector<VetString>& strings) {
    for (const VetString& string : strings) {
        city.strings[string.string.place()].order_confidence_frac = string.order_confidence_frac;
        for (std::size_t i = 0; i < string.wiring.size(); ++i) {
            Pole& pole = city.poles[string.wiring[i].place()];
            pole.order_is_inferred = pole.order_is_inferred || !pole.order.has_value();
            pole.order = static_cast<int>(i) + 1;
        }
    }
    return city;
}

}  // namespace unstring
