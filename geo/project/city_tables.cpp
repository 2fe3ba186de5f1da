#include "geo/project/city_tables.h"

#include <cmath>
#include <utility>

#include <fmt/format.h>

#include "geo/project/catalog_json.h"
#include "geo/project/city_columns.h"
#include "geo/project/geometry_blob.h"
#include "geo/project/schema.h"

namespace unstring {
namespace {

template <class Record>
struct Table {
    const char* name;
    const char* geometry; ///< "" = no places
    const char* what;
    const std::vector<Column<Record>>& columns;
    std::function<Bytes(const Record&, int srs_id)> blob; ///< null geometry when empty
    std::function<void(Record&, std::vector<MapPoint>)> take_points;
};

template <class Record>
void write_table(Database& database, const City& city, const std::vector<Record>& records,
                 const Table<Record>& table) {
    const bool has_place = *table.geometry != '\0';
    std::string columns, names, marks;
    int place = has_place ? 2 : 1;
    for (const auto& column : table.columns) {
        columns += fmt::format("{}\"{}\" {}", columns.empty() ? "" : ", ", column.name, column.type);
        names += fmt::format(", \"{}\"", column.name);
        marks += fmt::format(", ?{}", ++place);
    }
    make_layer(database, {table.name, table.geometry, columns, table.what});
    Statement insert =
        database.prepare(fmt::format("INSERT INTO \"{}\" (fid{}{}) VALUES (?1{}{})", table.name,
                                     has_place ? ", geom" : "", names, has_place ? ", ?2" : "", marks));
    const int srs_id = srs_id_of(database);
    std::int64_t fid = 0;
    for (const Record& record : records) {
        insert.bind(1, ++fid);
        if (has_place) insert.bind(2, table.blob(record, srs_id));
        place = has_place ? 2 : 1;
        for (const auto& column : table.columns) insert.bind(++place, column.get(city, record));
        insert.run();
        if (database.is_failed()) return;
    }
    if (has_place) finish_layer(database, table.name);
}

template <class Record>
std::vector<Record> read_table(Database& database, const City& city, const Table<Record>& table) {
    const bool has_place = *table.geometry != '\0';
    std::string names;
    for (const auto& column : table.columns) names += fmt::format(", \"{}\"", column.name);
    Statement select = database.prepare(
        fmt::format("SELECT {}{} FROM \"{}\" ORDER BY fid", has_place ? "geom" : "fid", names, table.name));
    std::vector<Record> records;
    while (select.step()) {
        Record record;
        int place = 0;
        for (const auto& column : table.columns) column.set(city, record, select.cell(++place));
        if (has_place)
            if (auto points = points_of_blob(select.bytes(0))) table.take_points(record, std::move(*points));
        records.push_back(std::move(record));
    }
    return records;
}

bool is_finite(MapPoint point) { return std::isfinite(point.x_m) && std::isfinite(point.y_m); }

template <class Record>
void take_place(Record& record, std::vector<MapPoint> points) {
    if (points.empty()) return;
    record.place = points.front();
    record.has_place = true;
}

template <class Record>
Bytes place_blob(const Record& record, int srs_id) {
    return record.has_place && is_finite(record.place) ? point_blob(record.place, srs_id) : Bytes();
}

const Table<SeriesString> kStrings = {
    "strings",
    "POINT",
    "Circuits: series strings and parallel lighting circuits, at their stations",
    string_columns(),
    [](const SeriesString& s, int srs_id) {
        return s.station && is_finite(*s.station) ? point_blob(*s.station, srs_id) : Bytes();
    },
    [](SeriesString& s, std::vector<MapPoint> points) {
        if (!points.empty()) s.station = points.front();
    }};
const Table<Pole> kPoles = {"poles", "POINT", "Poles", pole_columns(), place_blob<Pole>, take_place<Pole>};
const Table<Transformer> kTransformers = {
    "transformers", "", "Regulated-output transformers, in service and spare", transformer_columns(), {}, {}};
const Table<CutBack> kCutBacks = {"cutbacks",        "", "Places where a string can be spliced across",
                                  cutback_columns(), {}, {}};
const Table<ServicePoint> kServices = {"services",
                                       "POINT",
                                       "Service points, ends of lighting circuits, candidates",
                                       service_columns(),
                                       place_blob<ServicePoint>,
                                       take_place<ServicePoint>};
const Table<Street> kStreets = {"streets",
                                "LINESTRING",
                                "Streets",
                                street_columns(),
                                [](const Street& s, int srs_id) { return line_blob(s.line, srs_id); },
                                [](Street& s, std::vector<MapPoint> points) { s.line = std::move(points); }};
const Table<CanopyArea> kCanopy = {
    "canopy_areas",
    "POLYGON",
    "Tree crowns",
    canopy_columns(),
    [](const CanopyArea& a, int srs_id) { return polygon_blob(a.ring, srs_id); },
    [](CanopyArea& a, std::vector<MapPoint> points) { a.ring = std::move(points); }};
const Table<Obstacle> kObstacles = {
    "obstacles",
    "POLYGON",
    "Buildings",
    obstacle_columns(),
    [](const Obstacle& o, int srs_id) { return polygon_blob(o.ring, srs_id); },
    [](Obstacle& o, std::vector<MapPoint> points) { o.ring = std::move(points); }};
const Table<YearBudget> kBudget = {"budget", "", "Money and crew hours by year", budget_columns(), {}, {}};
const Table<PriceRow> kPrices = {"prices", "", "Price book", price_columns(), {}, {}};

void write_climate(Database& database, const std::optional<Climate>& climate) {
    database.run("DELETE FROM climate");
    if (!climate) return;
    Statement insert = database.prepare("INSERT INTO climate VALUES (?1,?2,?3,?4)");
    for (std::size_t m = 0; m < 12; ++m)
        insert.bind(1, static_cast<std::int64_t>(m + 1))
            .bind(2, climate->ghi_kwh_m2_day[m])
            .bind(3, climate->temp_c[m])
            .bind(4, climate->albedo[m])
            .run();
}

std::optional<Climate> read_climate(Database& database) {
    Statement select = database.prepare("SELECT month, ghi_kwh_m2_day, temp_c, albedo FROM climate");
    Climate climate;
    int months = 0;
    while (select.step()) {
        const std::int64_t month = select.integer(0);
        if (month < 1 || month > 12) continue;
        const auto m = static_cast<std::size_t>(month - 1);
        climate.ghi_kwh_m2_day[m] = select.real(1);
        climate.temp_c[m] = select.real(2);
        climate.albedo[m] = select.real(3);
        ++months;
    }
    return months == 12 ? std::optional<Climate>(climate) : std::nullopt;
}

void write_counts(Database& database, const std::vector<TableCount>& counts) {
    database.run("DELETE FROM row_counts");
    Statement insert = database.prepare("INSERT INTO row_counts VALUES (?1,?2,?3,?4)");
    for (const TableCount& count : counts)
        insert.bind(1, std::string_view(count.table))
            .bind(2, std::int64_t{count.read})
            .bind(3, std::int64_t{count.kept})
            .bind(4, std::int64_t{count.set_aside})
            .run();
}

std::string number_text(double value) { return fmt::format("{}", value); }

template <class Record>
void write_flags(Database& database, const char* table, const std::vector<Record>& records) {
    Statement update =
        database.prepare(fmt::format("UPDATE \"{}\" SET set_aside=?2 WHERE fid=?1 AND set_aside<>?2", table));
    std::int64_t fid = 0;
    for (const Record& record : records)
        update.bind(1, ++fid).bind(2, std::int64_t{record.set_aside ? 1 : 0}).run();
}

} // namespace

void write_city_tables(Database& database, const CityTables& tables) {
    const City& city = tables.city;
    write_table(database, city, city.strings, kStrings);
    write_table(database, city, city.poles, kPoles);
    write_table(database, city, city.transformers, kTransformers);
    write_table(database, city, city.cutbacks, kCutBacks);
    write_table(database, city, city.services, kServices);
    write_table(database, city, city.streets, kStreets);
    write_table(database, city, city.canopy, kCanopy);
    write_table(database, city, city.obstacles, kObstacles);
    write_table(database, city, city.budget, kBudget);
    write_table(database, city, tables.prices.rows(), kPrices);
    write_catalog(database, tables.catalog);
    write_climate(database, tables.climate);
    write_counts(database, tables.counts);
    set_meta_value(database, "crs", city.crs);
    set_meta_value(database, "crs_from", tables.crs_from);
    set_meta_value(database, "centre_lon_deg", number_text(city.centre.lon_deg));
    set_meta_value(database, "centre_lat_deg", number_text(city.centre.lat_deg));
    set_meta_value(database, "convergence_deg", number_text(city.convergence_deg));
    set_meta_value(database, "canopy_raster", tables.canopy_raster);
    set_meta_value(database, "canopy_fingerprint", tables.canopy_fingerprint);
}

CityTables read_city_tables(Database& database) {
    CityTables tables;
    City& city = tables.city;
    city.strings = read_table(database, city, kStrings);
    city.poles = read_table(database, city, kPoles);
    city.transformers = read_table(database, city, kTransformers);
    city.cutbacks = read_table(database, city, kCutBacks);
    city.services = read_table(database, city, kServices);
    city.streets = read_table(database, city, kStreets);
    city.canopy = read_table(database, city, kCanopy);
    city.obstacles = read_table(database, city, kObstacles);
    city.budget = read_table(database, city, kBudget);
    tables.prices = PriceBook(read_table(database, city, kPrices));
    tables.catalog = read_catalog(database);
    tables.climate = read_climate(database);
    Statement counts = database.prepare("SELECT name, read, kept, set_aside FROM row_counts ORDER BY name");
    while (counts.step())
        tables.counts.push_back({counts.text(0), counts.integer(1), counts.integer(2), counts.integer(3)});
    city.crs = meta_value(database, "crs");
    tables.crs_from = meta_value(database, "crs_from");
    city.centre = {std::atof(meta_value(database, "centre_lon_deg").c_str()),
                   std::atof(meta_value(database, "centre_lat_deg").c_str())};
    city.convergence_deg = std::atof(meta_value(database, "convergence_deg").c_str());
    tables.canopy_raster = meta_value(database, "canopy_raster");
    tables.canopy_fingerprint = meta_value(database, "canopy_fingerprint");
    return tables;
}

void write_set_aside(Database& database, const City& city) {
    write_flags(database, "strings", city.strings);
    write_flags(database, "poles", city.poles);
    write_flags(database, "transformers", city.transformers);
    write_flags(database, "cutbacks", city.cutbacks);
    write_flags(database, "services", city.services);
}

} // namespace unstring
