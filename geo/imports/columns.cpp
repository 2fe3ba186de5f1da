#include "geo/imports/columns.h"

#include <algorithm>
#include <array>
#include <stdexcept>
#include <utility>

#include <fmt/format.h>
#include <fmt/ranges.h>
#include <nlohmann/json.hpp>

#include "geo/imports/local_file.h"
#include "model/quantities.h"

namespace unstring {
namespace {

constexpr std::uintmax_t kMaxMapFile = 1U << 20U;
constexpr double kSquareFoot_m2 = kMetresPerFoot * kMetresPerFoot;

std::string normalised(std::string_view name) {
    std::string out;
    for (const char c : name) {
        if (c >= 'A' && c <= 'Z')
            out += static_cast<char>(c + 32);
        else if ((c >= 'a' && c <= 'z') || (c >= '0' && c <= '9'))
            out += c;
    }
    return out;
}

struct UnitWord {
    std::string_view word;
    FieldKind kind; ///< of a field that it may convert; number: the unit is the field's own
    double to_si;
};

// The last word of a column's name. Longer words stand before those that they end with.
constexpr std::array kUnitWords = {UnitWord{"ftus", FieldKind::length_m, kMetresPerSurveyFoot},
                                   UnitWord{"usft", FieldKind::length_m, kMetresPerSurveyFoot},
                                   UnitWord{"feet", FieldKind::length_m, kMetresPerFoot},
                                   UnitWord{"sqft", FieldKind::area_m2, kSquareFoot_m2},
                                   UnitWord{"ft2", FieldKind::area_m2, kSquareFoot_m2},
                                   UnitWord{"ft", FieldKind::length_m, kMetresPerFoot},
                                   UnitWord{"metres", FieldKind::length_m, 1},
                                   UnitWord{"meters", FieldKind::length_m, 1},
                                   UnitWord{"sqm", FieldKind::area_m2, 1},
                                   UnitWord{"m2", FieldKind::area_m2, 1},
                                   UnitWord{"m", FieldKind::length_m, 1},
                                   UnitWord{"watts", FieldKind::number, 1},
                                   UnitWord{"kva", FieldKind::number, 1},
                                   UnitWord{"kw", FieldKind::number, 1},
                                   UnitWord{"kv", FieldKind::number, 1},
                                   UnitWord{"amps", FieldKind::number, 1},
                                   UnitWord{"volts", FieldKind::number, 1},
                                   UnitWord{"mohm", FieldKind::number, 1},
                                   UnitWord{"deg", FieldKind::number, 1},
                                   UnitWord{"lm", FieldKind::number, 1},
                                   UnitWord{"hours", FieldKind::number, 1},
                                   UnitWord{"w", FieldKind::number, 1},
                                   UnitWord{"a", FieldKind::number, 1},
                                   UnitWord{"v", FieldKind::number, 1},
                                   UnitWord{"h", FieldKind::number, 1},
                                   UnitWord{"c", FieldKind::number, 1}};

bool takes(FieldKind field, FieldKind unit) {
    if (field == FieldKind::coordinate) return unit == FieldKind::length_m;
    return field == unit;
}

/// The unit that a column's name ends with, set off by a blank, a stroke or a bracket ("X_ft", "Mount Ht
/// (ft)").
const UnitWord* unit_of(std::string_view column) {
    const std::size_t last = column.find_last_not_of(" _-()[].");
    if (last == std::string_view::npos) return nullptr;
    const std::size_t before = column.find_last_of(" _-([.", last);
    if (before == std::string_view::npos) return nullptr;
    const std::string word = normalised(column.substr(before + 1, last - before));
    const auto unit = std::find_if(kUnitWords.begin(), kUnitWords.end(),
                                   [&](const UnitWord& each) { return each.word == word; });
    return unit == kUnitWords.end() ? nullptr : &*unit;
}

std::string without_unit(std::string_view column, const UnitWord& unit) {
    std::string name = normalised(column);
    name.resize(name.size() - unit.word.size());
    return name;
}

bool has_word(std::string_view words, std::string_view word) {
    for (std::size_t at = words.find(word); at != std::string_view::npos; at = words.find(word, at + 1)) {
        const bool begins = at == 0 || words[at - 1] == ' ';
        const bool ends = at + word.size() == words.size() || words[at + word.size()] == ' ';
        if (begins && ends && !word.empty()) return true;
    }
    return false;
}

constexpr std::size_t kShapefileName = 10; ///< letters that a Shapefile keeps of a column's name

bool sounds_like(const Field& field, std::string_view column) {
    const std::string name = normalised(column);
    if (column.size() == kShapefileName && normalised(field.name.substr(0, kShapefileName)) == name)
        return true;
    if (name == normalised(field.name) || has_word(field.synonyms, name)) return true;
    const UnitWord* unit = unit_of(column);
    if (unit == nullptr || field.kind == FieldKind::text ||
        !(takes(field.kind, unit->kind) || unit->kind == FieldKind::number))
        return false;
    const std::string bare = without_unit(column, *unit);
    std::string field_bare = normalised(field.name);
    if (const UnitWord* own = unit_of(field.name)) field_bare = without_unit(field.name, *own);
    return bare == field_bare || has_word(field.synonyms, bare);
}

FieldColumn with_unit(const Field& field, std::size_t column, std::string_view name, const ColumnMap& map) {
    const bool is_length = field.kind == FieldKind::length_m || field.kind == FieldKind::coordinate;
    FieldColumn found{column, 1, false, is_length && map.length_m.has_value()};
    const UnitWord* unit = unit_of(name);
    if (unit != nullptr && takes(field.kind, unit->kind)) {
        found.to_si = unit->to_si;
        found.says_unit = true;
        found.is_told = true;
    } else if (map.length_m && is_length) {
        found.to_si = *map.length_m;
    }
    return found;
}

std::optional<std::size_t> column_named(const Table& table, std::string_view name) {
    const auto at = std::find(table.columns.begin(), table.columns.end(), name);
    if (name.empty() || at == table.columns.end()) return std::nullopt;
    return static_cast<std::size_t>(at - table.columns.begin());
}

class Matcher {
public:
    Matcher(const Table& table, const ColumnMap& map)
        : table_(table), map_(map), fields_(fields_of(table.name)), is_taken_(table.columns.size(), false) {}

    Expected<Columns> match() {
        for (const Field& field : fields_) result_.fields[std::string(field.name)] = {};
        if (auto told = match_told(); !told) return tl::unexpected(told.error());
        for (const Field& field : fields_)
            if (is_open(field))
                if (const auto column = column_named(table_, field.name); column && !is_taken_[*column])
                    take(field, *column);
        match_guessed();
        for (std::size_t i = 0; i < table_.columns.size(); ++i)
            if (!is_taken_[i] && !table_.columns[i].empty()) result_.unused.push_back(table_.columns[i]);
        return std::move(result_);
    }

private:
    Expected<void> match_told() {
        const auto told = map_.columns.find(table_.name);
        if (told == map_.columns.end()) return {};
        for (const Field& field : fields_) {
            const auto name = told->second.find(std::string(field.name));
            if (name == told->second.end()) continue;
            closed_.push_back(field.name);
            if (name->second.empty()) continue;
            const auto column = column_named(table_, name->second);
            if (!column)
                return tl::unexpected(Fault{FaultCode::column_missing, table_.file, 1,
                                            std::string(field.name),
                                            fmt::format("no column \"{}\"", name->second),
                                            fmt::format("one of: {}", fmt::join(table_.columns, ", ")),
                                            "mend the map given with --columns"});
            take(field, *column);
        }
        return {};
    }

    void match_guessed() {
        for (const Field& field : fields_) {
            if (!is_open(field)) continue;
            for (std::size_t i = 0; i < table_.columns.size(); ++i) {
                if (is_taken_[i] || !sounds_like(field, table_.columns[i])) continue;
                take(field, i);
                result_.guessed.push_back(fmt::format("{} from \"{}\"", field.name, table_.columns[i]));
                break;
            }
        }
    }

    [[nodiscard]] bool is_open(const Field& field) const {
        return !result_.at(field.name).column &&
               std::find(closed_.begin(), closed_.end(), field.name) == closed_.end();
    }

    void take(const Field& field, std::size_t column) {
        result_.fields[std::string(field.name)] = with_unit(field, column, table_.columns[column], map_);
        is_taken_[column] = true;
    }

    const Table& table_;
    const ColumnMap& map_;
    std::span<const Field> fields_;
    std::vector<bool> is_taken_;
    std::vector<std::string_view> closed_; ///< fields that the map speaks of
    Columns result_;
};

Fault map_fault(const std::string& path, std::string field, std::string found, std::string wanted) {
    return {
        FaultCode::value_unknown,           path, 0, std::move(field), std::move(found), std::move(wanted),
        "mend the map given with --columns"};
}

std::string names_of(std::span<const Field> fields) {
    std::string names;
    for (const Field& field : fields) names += fmt::format("{}{}", names.empty() ? "" : ", ", field.name);
    return names;
}

Expected<void> read_units(const nlohmann::json& units, const std::string& path, ColumnMap& map) {
    if (!units.is_object())
        return tl::unexpected(map_fault(path, "units", units.dump().substr(0, 60), "{\"length\": \"ft\"}"));
    for (const auto& [kind, unit] : units.items()) {
        const std::string word = unit.is_string() ? unit.get<std::string>() : unit.dump().substr(0, 60);
        if (kind != "length") return tl::unexpected(map_fault(path, "units", kind, "length"));
        if (word == "m")
            map.length_m = 1;
        else if (word == "ft")
            map.length_m = kMetresPerFoot;
        else if (word == "ftUS")
            map.length_m = kMetresPerSurveyFoot;
        else
            return tl::unexpected(map_fault(path, "units.length", word, "m, ft or ftUS"));
    }
    return {};
}

Expected<void> read_table_map(const nlohmann::json& entries, const std::string& table,
                              const std::string& path, ColumnMap& map) {
    const auto fields = fields_of(table);
    if (fields.empty())
        return tl::unexpected(
            map_fault(path, table, table, "a table such as poles or circuits, or \"units\""));
    if (!entries.is_object())
        return tl::unexpected(
            map_fault(path, table, entries.dump().substr(0, 60), "{\"field\": \"column\"}"));
    for (const auto& [field, column] : entries.items()) {
        const bool is_known = std::any_of(fields.begin(), fields.end(),
                                          [&name = field](const Field& each) { return each.name == name; });
        if (!is_known) return tl::unexpected(map_fault(path, table + "." + field, field, names_of(fields)));
        if (!column.is_string() && !column.is_null())
            return tl::unexpected(
                map_fault(path, table + "." + field, column.dump().substr(0, 60), "the name of a column"));
        map.columns[table][field] = column.is_null() ? std::string() : column.get<std::string>();
    }
    return {};
}

} // namespace

const FieldColumn& Columns::at(std::string_view field) const {
    const auto found = fields.find(field);
    if (found == fields.end()) throw std::logic_error(fmt::format("no field {} in this table", field));
    return found->second;
}

Expected<ColumnMap> read_column_map(const std::string& path) {
    const auto text = read_local_file(path, kMaxMapFile);
    if (!text) return tl::unexpected(text.error());
    const std::string_view body =
        text->starts_with("\xEF\xBB\xBF") ? std::string_view(*text).substr(3) : *text;
    const nlohmann::json json = nlohmann::json::parse(body, nullptr, false);
    if (!json.is_object())
        return tl::unexpected(Fault{FaultCode::file_broken,
                                    path,
                                    0,
                                    {},
                                    json.is_discarded() ? "no JSON" : "no JSON object",
                                    R"({"poles": {"pole_id": "PoleNum"}, "units": {"length": "ft"}})",
                                    "mend the map given with --columns"});
    ColumnMap map;
    for (const auto& [key, value] : json.items()) {
        auto done = key == "units" ? read_units(value, path, map) : read_table_map(value, key, path, map);
        if (!done) return tl::unexpected(done.error());
    }
    return map;
}

Expected<Columns> match_columns(const Table& table, const ColumnMap& map) {
    return Matcher(table, map).match();
}

} // namespace unstring
