#include "geo/project/input_hash.h"

#include <algorithm>
#include <memory>
#include <numeric>

#include <fmt/format.h>
#include <xxhash.h>

#include "geo/project/catalog_json.h"
#include "geo/project/city_columns.h"
#include "model/plan/plan_rows.h"

namespace unstring {
namespace {

class Hash {
public:
    Hash() : state_(XXH3_createState(), XXH3_freeState) { XXH3_128bits_reset(state_.get()); }

    // Each value goes in with its kind and length, so that no two lists of values make the same bytes.
    void add(std::string_view text) { tagged('t', text.data(), text.size()); }
    void add(double value) {
        if (value == 0) value = 0; // one zero
        tagged('r', &value, sizeof value);
    }
    void add(std::int64_t value) { tagged('i', &value, sizeof value); }
    void add(const CellValue& cell) {
        if (const auto* text = std::get_if<std::string>(&cell))
            add(std::string_view(*text));
        else if (const auto* real = std::get_if<double>(&cell))
            add(*real);
        else if (const auto* integer = std::get_if<std::int64_t>(&cell))
            add(*integer);
        else
            tagged('n', "", 0);
    }
    void add(MapPoint point) {
        add(point.x_m);
        add(point.y_m);
    }
    void add(const Cells& cells) {
        for (const auto& [name, value] : cells) {
            add(std::string_view(name));
            add(value);
        }
    }
    [[nodiscard]] std::string text() const {
        const XXH128_hash_t hash = XXH3_128bits_digest(state_.get());
        return fmt::format("{:016x}{:016x}", hash.high64, hash.low64);
    }

private:
    void tagged(char kind, const void* data, std::size_t size) {
        const std::uint64_t head = (std::uint64_t{size} << 8U) | static_cast<unsigned char>(kind);
        XXH3_128bits_update(state_.get(), &head, sizeof head);
        if (size > 0) XXH3_128bits_update(state_.get(), data, size);
    }
    std::unique_ptr<XXH3_state_t, decltype(&XXH3_freeState)> state_;
};

template <class Record>
std::vector<std::size_t> by_id(const std::vector<Record>& records) {
    std::vector<std::size_t> order(records.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    if constexpr (requires { records.front().id; })
        std::stable_sort(order.begin(), order.end(),
                         [&](std::size_t a, std::size_t b) { return records[a].id < records[b].id; });
    return order;
}

template <class Record>
void add_place(Hash& hash, const Record& record) {
    if constexpr (requires { record.has_place; }) {
        hash.add(std::int64_t{record.has_place ? 1 : 0});
        if (record.has_place) hash.add(record.place);
    } else if constexpr (requires { record.station; }) {
        if (record.station) hash.add(*record.station);
    } else if constexpr (requires { record.line; }) {
        for (const MapPoint& point : record.line) hash.add(point);
    } else if constexpr (requires { record.ring; }) {
        const bool is_closed = record.ring.size() > 1 && record.ring.front() == record.ring.back();
        for (std::size_t i = 0; i + (is_closed ? 1 : 0) < record.ring.size(); ++i) hash.add(record.ring[i]);
    }
}

using Names = std::vector<std::string_view>;

template <class Record>
void add_table(Hash& hash, const City& city, std::string_view name, const std::vector<Record>& records,
               const std::vector<Column<Record>>& columns, const Names& only = {}) {
    hash.add(name);
    hash.add(static_cast<std::int64_t>(records.size()));
    for (std::size_t place : by_id(records)) {
        add_place(hash, records[place]);
        for (const auto& column : columns) {
            const bool is_wanted = only.empty()
                                       ? column.is_hashed
                                       : std::find(only.begin(), only.end(), column.name) != only.end();
            if (is_wanted) hash.add(column.get(city, records[place]));
        }
    }
}

void add_city(Hash& hash, const City& city) {
    add_table(hash, city, "strings", city.strings, string_columns());
    add_table(hash, city, "poles", city.poles, pole_columns());
    add_table(hash, city, "transformers", city.transformers, transformer_columns());
    add_table(hash, city, "cutbacks", city.cutbacks, cutback_columns());
    add_table(hash, city, "services", city.services, service_columns());
    add_table(hash, city, "streets", city.streets, street_columns());
    hash.add(std::string_view(city.crs));
}

void add_wiring(Hash& hash, const City& city, const std::vector<VetString>& wiring) {
    hash.add(std::string_view("wiring"));
    for (const VetString& string : wiring)
        for (PoleIx pole : string.wiring) hash.add(std::string_view(city.poles[pole.place()].id));
}

void add_settings(Hash& hash, const PlanSettings& settings) {
    Cells cells = settings_cells(settings);
    cells.erase("years"); // what decide sees of the two is the year it prices at
    cells.erase("decide_year");
    hash.add(cells);
}

template <class Each>
void for_each_planned_pole(const City& city, const Plan& plan, Each each) {
    for (std::size_t place : by_id(city.poles))
        if (place < plan.poles.size() && plan.poles[place] != PolePlan{})
            each(city.poles[place], plan.poles[place]);
}

void add_prices(Hash& hash, const CityTables& tables) {
    add_table(hash, tables.city, "prices", tables.prices.rows(), price_columns());
}

} // namespace

std::string vet_input_hash(const CityTables& tables) {
    Hash hash;
    add_city(hash, tables.city);
    hash.add(std::string_view(catalog_text(tables.catalog)));
    return hash.text();
}

std::string shade_input_hash(const CityTables& tables, double nights_goal,
                             const std::vector<std::string>& heads) {
    Hash hash;
    const City& city = tables.city;
    add_table(hash, city, "poles", city.poles, pole_columns(),
              {"pole_id", "string_id", "status", "mount_m", "arm_m", "arm_deg", "epa_allow_m2", "need_lm",
               "critical", "street", "side", "solar_ok", "owner", "consent", "set_aside", "road_class",
               "fixture", "lamp_w", "pole_kind"});
    add_table(hash, city, "strings", city.strings, string_columns(), {"string_id", "kind", "set_aside"});
    add_table(hash, city, "streets", city.streets, street_columns());
    add_table(hash, city, "canopy", city.canopy, canopy_columns());
    add_table(hash, city, "obstacles", city.obstacles, obstacle_columns());
    hash.add(std::string_view(tables.canopy_fingerprint));
    if (tables.climate)
        for (std::size_t m = 0; m < 12; ++m) {
            hash.add(tables.climate->ghi_kwh_m2_day[m]);
            hash.add(tables.climate->temp_c[m]);
            hash.add(tables.climate->albedo[m]);
        }
    hash.add(std::string_view(catalog_text(tables.catalog)));
    hash.add(nights_goal);
    for (const std::string& head : heads) hash.add(std::string_view(head));
    return hash.text();
}

std::string decide_input_hash(const CityTables& tables, const std::vector<VetString>& wiring,
                              const Plan& plan, const std::string& shade_hash) {
    Hash hash;
    hash.add(std::string_view(shade_hash));
    add_city(hash, tables.city);
    add_wiring(hash, tables.city, wiring);
    add_prices(hash, tables);
    add_settings(hash, plan.settings);
    hash.add(std::int64_t{plan.decide_year()});
    for_each_planned_pole(tables.city, plan, [&](const Pole& pole, const PolePlan& row) {
        if (row.mark == Choice::undecided && row.lock == Choice::undecided) return;
        hash.add(std::string_view(pole.id));
        hash.add(std::string_view(text_of(row.mark)));
        hash.add(std::string_view(text_of(row.lock)));
    });
    return hash.text();
}

std::string phase_input_hash(const CityTables& tables, const std::vector<VetString>& wiring, const Plan& plan,
                             const std::string& decide_hash) {
    Hash hash;
    hash.add(std::string_view(decide_hash));
    add_table(hash, tables.city, "transformers", tables.city.transformers, transformer_columns());
    add_table(hash, tables.city, "budget", tables.city.budget, budget_columns());
    add_wiring(hash, tables.city, wiring);
    add_prices(hash, tables);
    add_settings(hash, plan.settings);
    hash.add(std::int64_t{plan.settings.years});
    for_each_planned_pole(tables.city, plan, [&](const Pole& pole, const PolePlan& row) {
        hash.add(std::string_view(pole.id));
        hash.add(std::string_view(text_of(row.choice)));
        hash.add(std::string_view(row.head));
        hash.add(std::int64_t{row.year_locked ? row.year : 0});
    });
    return hash.text();
}

std::string hand_out_input_hash(const CityTables& tables, const Plan& plan, const std::string& phase_hash) {
    Hash hash;
    hash.add(std::string_view(phase_hash));
    for_each_planned_pole(tables.city, plan, [&](const Pole& pole, const PolePlan& row) {
        hash.add(std::string_view(pole.id));
        hash.add(std::string_view(text_of(row.choice)));
        hash.add(std::string_view(row.head));
        hash.add(std::int64_t{row.year});
    });
    for (const StringUnit& unit : plan.units) {
        hash.add(std::string_view(unit_row_id(tables.city, unit)));
        hash.add(unit_cells(tables.city, unit));
    }
    return hash.text();
}

} // namespace unstring
