#include <string>
#include <string_view>
#include <unordered_map>
#include <unordered_set>
#include <utility>

#include "model/vet/vet_checks.h"
#include "model/vet/vet_result.h"

namespace unstring {
namespace {

/// The records that the errors of one table name: by row where a finding has one (of two records with one id
/// only that in the row is meant), else by id.
struct NamedRecords {
    std::unordered_multimap<long, const Finding*> by_row;
    std::unordered_set<std::string_view> by_id;

    [[nodiscard]] bool has(const std::string& id, const RowRef& from) const {
        const auto [first, last] = by_row.equal_range(from.row);
        for (auto at = first; at != last; ++at) {
            const Finding& finding = *at->second;
            if (finding.file == from.file && (finding.record.empty() || finding.record == id)) return true;
        }
        return by_id.contains(id);
    }
};

NamedRecords records_of(const std::vector<Finding>& findings, std::string_view table) {
    NamedRecords named;
    for (const Finding& finding : findings) {
        if (finding.severity != Severity::error || finding.table != table) continue;
        if (finding.row > 0)
            named.by_row.emplace(finding.row, &finding);
        else if (!finding.record.empty())
            named.by_id.insert(finding.record);
    }
    return named;
}

template <class Table, class IdOf>
void set_aside_named(Table& records, std::string_view table, const std::vector<Finding>& findings,
                     IdOf id_of) {
    const NamedRecords named = records_of(findings, table);
    for (auto& record : records)
        if (named.has(id_of(record), record.from)) record.set_aside = true;
}

} // namespace

City set_aside_errors(City city, const std::vector<Finding>& findings) {
    const auto own_id = [](const auto& record) -> const std::string& { return record.id; };
    set_aside_named(city.poles, kPolesTable, findings, own_id);
    set_aside_named(city.strings, kCircuitsTable, findings, own_id);
    set_aside_named(city.transformers, kTransformersTable, findings, own_id);
    set_aside_named(city.services, kServicesTable, findings, own_id);
    // A cut-back has no id of its own: its findings name its string, and it by its row.
    set_aside_named(city.cutbacks, kCutbacksTable, findings,
                    [](const CutBack& row) -> const std::string& { return row.string_given; });
    for (Pole& pole : city.poles)
        if (pole.string.is_valid() && city.strings[pole.string.place()].set_aside) pole.set_aside = true;
    return city;
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

} // namespace unstring
