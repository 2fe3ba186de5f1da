// vet: findings over the records, wiring order settled; with set_aside, what an error names is left out of
// planning.

#include "app/steps/project_inside.h"
#include "geo/project/input_hash.h"
#include "geo/project/schema.h"

namespace unstring {

Expected<void> OpenProject::run_vet(bool set_aside, const Progress& progress) {
    Inside& inside = *inside_;
    if (auto may = inside.may_write(); !may) return may;
    CityTables tables = inside.tables;
    VetResult result = vet_city(tables.city, tables.catalog);
    bool acknowledged = inside.gather_errors_set_aside;
    // Leaving one record out can bring another to light (a string whose last lamp went), so this goes on
    // until none is new.
    for (int round = 0; set_aside && round < 8; ++round) {
        std::vector<Finding> errors = result.findings;
        if (!acknowledged)
            errors.insert(errors.end(), inside.gather_findings.begin(), inside.gather_findings.end());
        acknowledged = true;
        tables.city = set_aside_errors(std::move(tables.city), errors);
        result = vet_city(tables.city, tables.catalog);
        if (count_of(result.findings, Severity::error) == 0) break;
    }
    if (progress.is_cancelled())
        return tl::make_unexpected(
            Fault{FaultCode::cancelled, inside.path, 0, "", "cancelled", "", "The file is as it was"});
    const std::string hash = vet_input_hash(tables);
    auto written = inside.database->transaction([&] {
        write_set_aside(*inside.database, tables.city);
        set_meta_value(*inside.database, "gather_errors_set_aside", acknowledged ? "yes" : "no");
        write_vet(*inside.database, tables.city, result, hash);
    });
    if (!written) return written;
    progress.at(1);
    if (auto loaded = inside.load(inside.plan.settings.name); !loaded) return loaded;
    inside.show();
    return {};
}

} // namespace unstring
