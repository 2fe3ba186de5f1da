#include "app/steps/gather.h"

#include <algorithm>
#include <filesystem>
#include <memory>
#include <unordered_map>

#include <fmt/format.h>

#include "geo/ground/crs.h"
#include "geo/project/city_tables.h"
#include "geo/project/lock.h"
#include "geo/project/plan_tables.h"
#include "geo/project/result_tables.h"
#include "geo/project/schema.h"
#include "model/plan/plan.h"
#include "model/plan/plan_rows.h"

namespace unstring {
namespace {

CityTables tables_of(const Gathered& gathered) {
    CityTables tables{gathered.city,          gathered.catalog,
                      gathered.prices,        gathered.climate,
                      gathered.canopy_raster, gathered.canopy_fingerprint,
                      gathered.crs_from,      {}};
    for (const auto& [name, count] : gathered.rows)
        tables.counts.push_back({name, count.read, count.kept, count.set_aside});
    return tables;
}

Gathered gathered_of(Database& database) {
    CityTables tables = read_city_tables(database);
    Gathered gathered;
    gathered.city = std::move(tables.city);
    gathered.catalog = std::move(tables.catalog);
    gathered.prices = std::move(tables.prices);
    gathered.climate = tables.climate;
    gathered.canopy_raster = tables.canopy_raster;
    gathered.canopy_fingerprint = tables.canopy_fingerprint;
    gathered.crs_from = tables.crs_from;
    for (const TableCount& count : tables.counts)
        gathered.rows[count.table] = {count.read, count.kept, count.set_aside};
    gathered.findings = read_findings(database, Step::gather, "");
    return gathered;
}

template <class Record>
bool has_same_ids(const std::vector<Record>& a, const std::vector<Record>& b) {
    return std::equal(a.begin(), a.end(), b.begin(), b.end(),
                      [](const Record& x, const Record& y) { return x.id == y.id; });
}

// Stored results address records by their place.
bool keeps_places(const City& a, const City& b) {
    return has_same_ids(a.poles, b.poles) && has_same_ids(a.strings, b.strings) &&
           has_same_ids(a.transformers, b.transformers) && has_same_ids(a.services, b.services);
}

Plan with_marks(const City& city, Plan plan, const std::vector<MarkRow>& marks) {
    std::unordered_map<std::string, std::size_t> places;
    for (std::size_t i = city.poles.size(); i-- > 0;) places[city.poles[i].id] = i;
    for (const MarkRow& row : marks) {
        const auto at = places.find(row.pole_id);
        if (at == places.end()) continue; // the reader made it a finding
        PolePlan& pole = plan.poles[at->second];
        pole.mark = row.mark;
        pole.lock = row.lock ? row.mark : Choice::undecided;
        pole.who = row.who;
        pole.note = row.note;
        if (row.year) {
            pole.year = *row.year;
            pole.year_by = YearBy::hand;
            pole.year_locked = row.lock;
        }
    }
    return plan;
}

void write_marks(Database& database, const Gathered& gathered, const std::string& file) {
    if (gathered.marks.empty()) return;
    const Plan before = read_plan(database, gathered.city, "first");
    Change change = plan_difference(gathered.city, before, with_marks(gathered.city, before, gathered.marks),
                                    fmt::format("{} marks from {}", gathered.marks.size(),
                                                std::filesystem::path(file).filename().string()));
    if (change.is_empty()) return;
    write_change(database, change);
}

void write_everything(Database& database, const Gathered& gathered, const GatherFiles& files) {
    write_city_tables(database, tables_of(gathered));
    write_findings(database, Step::gather, "", gathered.findings);
    set_meta_value(database, "gather_errors_set_aside", "no");
    write_step_run(database, Step::gather, "", "", "");
    write_marks(database, gathered, files.marks);
}

GatherReport report_of(const Gathered& gathered) {
    GatherReport report;
    const City& city = gathered.city;
    report.poles = static_cast<int>(city.poles.size());
    for (const SeriesString& string : city.strings)
        report.strings += string.kind == CircuitKind::series ? 1 : 0;
    for (const Pole& pole : city.poles)
        report.series_poles +=
            pole.string.is_valid() && city.strings[pole.string.place()].kind == CircuitKind::series ? 1 : 0;
    report.transformers = static_cast<int>(city.transformers.size());
    report.services = static_cast<int>(city.services.size());
    report.crs = city.crs;
    report.crs_from = gathered.crs_from;
    report.rows = gathered.rows;
    report.findings = gathered.findings;
    report.notes = gathered.notes;
    return report;
}

Expected<void> create_project(const std::string& path, const Gathered& gathered, const GatherFiles& files) {
    const std::string building = path + ".new";
    for (const char* suffix : {"", "-wal", "-shm", "-journal"}) {
        std::error_code ignored;
        std::filesystem::remove(building + suffix, ignored);
    }
    {
        auto database = Database::open(building, Database::Access::create);
        if (!database) return tl::make_unexpected(database.error());
        auto written = (*database)->transaction([&] {
            create_schema(**database, gathered.city.crs, crs_wkt(gathered.city.crs));
            write_everything(**database, gathered, files);
        });
        if (!written) return written;
        (*database)->close_to_one_file();
    }
    std::error_code failed;
    std::filesystem::rename(building, path, failed);
    if (failed)
        return tl::make_unexpected(Fault{FaultCode::write_failed, path, 0, "", failed.message(),
                                         "a folder that can be written", "Give permission to write there"});
    return {};
}

Expected<GatherReport> add_to_project(const std::string& path, const GatherFiles& files,
                                      const Progress& progress) {
    if (auto ready = bring_up_to_date(path); !ready) return tl::make_unexpected(ready.error());
    auto opened = Database::open(path, Database::Access::write);
    if (!opened) return tl::make_unexpected(opened.error());
    Database& database = **opened;
    if (auto good = check_schema(database, path); !good) return tl::make_unexpected(good.error());
    const Gathered earlier = gathered_of(database);
    if (database.failure()) return tl::make_unexpected(*database.failure());
    auto gathered = read_files(files, &earlier, progress);
    if (!gathered) return tl::make_unexpected(gathered.error());
    auto written = database.transaction([&] {
        if (gathered->city.crs != earlier.city.crs)
            set_project_crs(database, gathered->city.crs, crs_wkt(gathered->city.crs));
        write_everything(database, *gathered, files);
        if (!keeps_places(gathered->city, earlier.city)) forget_results(database);
    });
    if (!written) return tl::make_unexpected(written.error());
    database.close_to_one_file();
    return report_of(*gathered);
}

bool names_a_file(const GatherFiles& f) {
    for (const std::string* each :
         {&f.poles, &f.circuits, &f.transformers, &f.services, &f.streets, &f.canopy, &f.obstacles,
          &f.climate, &f.prices, &f.catalogue, &f.budget, &f.cutbacks, &f.marks, &f.asbuilt})
        if (!each->empty()) return true;
    return false;
}

} // namespace

Expected<GatherReport> gather_project(const std::string& path, const GatherFiles& files,
                                      const Progress& progress) {
    if (!names_a_file(files))
        return tl::make_unexpected(
            Fault{FaultCode::bad_usage, "", 0, "gather", "no file to read",
                  "at least one of --poles, --circuits ..",
                  "For example: unstring gather city.gpkg --poles poles.csv --circuits circuits.csv"});
    const auto folder = std::filesystem::absolute(path).parent_path();
    if (!std::filesystem::is_directory(folder))
        return tl::make_unexpected(Fault{FaultCode::file_missing, path, 0, "", "no folder " + folder.string(),
                                         "a folder that is there", "Make the folder first"});
    auto lock = WriterLock::take(path);
    if (!lock) return tl::make_unexpected(lock.error());
    if (std::filesystem::exists(path)) return add_to_project(path, files, progress);
    auto gathered = read_files(files, nullptr, progress);
    if (!gathered) return tl::make_unexpected(gathered.error());
    if (auto created = create_project(path, *gathered, files); !created)
        return tl::make_unexpected(created.error());
    return report_of(*gathered);
}

} // namespace unstring
