#include "model/plan/plan_rows.h"

#include <algorithm>
#include <cstdlib>

namespace unstring {
namespace {

std::string text_at(const Cells& cells, const char* column) {
    const auto at = cells.find(column);
    if (at == cells.end()) return {};
    const auto* text = std::get_if<std::string>(&at->second);
    return text != nullptr ? *text : std::string();
}

std::int64_t integer_at(const Cells& cells, const char* column, std::int64_t fallback) {
    const auto at = cells.find(column);
    if (at == cells.end()) return fallback;
    if (const auto* integer = std::get_if<std::int64_t>(&at->second)) return *integer;
    if (const auto* real = std::get_if<double>(&at->second)) return static_cast<std::int64_t>(*real);
    return fallback;
}

double real_at(const Cells& cells, const char* column, double fallback) {
    const auto at = cells.find(column);
    if (at == cells.end()) return fallback;
    if (const auto* real = std::get_if<double>(&at->second)) return *real;
    if (const auto* integer = std::get_if<std::int64_t>(&at->second)) return static_cast<double>(*integer);
    return fallback;
}

// Ids may hold any character but a line break, which no table of text carries inside an id.
std::string joined(const std::vector<std::string>& ids) {
    std::string text;
    for (const std::string& id : ids) text += (text.empty() ? "" : "\n") + id;
    return text;
}

std::vector<std::string> split(const std::string& text) {
    std::vector<std::string> ids;
    std::size_t start = 0;
    while (start < text.size()) {
        const std::size_t end = std::min(text.find('\n', start), text.size());
        if (end > start) ids.push_back(text.substr(start, end - start));
        start = end + 1;
    }
    return ids;
}

CellValue integer(std::int64_t value) { return value; }

} // namespace

Cells settings_cells(const PlanSettings& settings) {
    return {{"first_year", integer(settings.first_year)},
            {"years", integer(settings.years)},
            {"horizon_years", integer(settings.horizon_years)},
            {"rate", settings.rate},
            {"policy", std::string(text_of(settings.policy))},
            {"must_stay", joined(settings.must_stay)},
            {"nights_goal", settings.nights_goal},
            {"decide_year", integer(settings.decide_year)},
            {"services_anywhere", integer(settings.services_anywhere ? 1 : 0)},
            {"block_poles", integer(settings.block_poles)}};
}

PlanSettings settings_from(const Cells& cells) {
    PlanSettings settings;
    settings.first_year = static_cast<int>(integer_at(cells, "first_year", settings.first_year));
    settings.years = static_cast<int>(integer_at(cells, "years", settings.years));
    settings.horizon_years = static_cast<int>(integer_at(cells, "horizon_years", settings.horizon_years));
    settings.rate = real_at(cells, "rate", settings.rate);
    settings.policy = read_word<Policy>(text_at(cells, "policy")).value_or(Policy::end);
    settings.must_stay = split(text_at(cells, "must_stay"));
    settings.nights_goal = real_at(cells, "nights_goal", settings.nights_goal);
    settings.decide_year = static_cast<int>(integer_at(cells, "decide_year", 0));
    settings.services_anywhere = integer_at(cells, "services_anywhere", 0) != 0;
    settings.block_poles = static_cast<int>(integer_at(cells, "block_poles", settings.block_poles));
    return settings;
}

Cells pole_cells(const PolePlan& pole) {
    if (pole == PolePlan{}) return {};
    return {{"choice", std::string(text_of(pole.choice))},
            {"head", pole.head},
            {"year", integer(pole.year)},
            {"year_by", std::string(text_of(pole.year_by))},
            {"year_locked", integer(pole.year_locked ? 1 : 0)},
            {"mark", std::string(text_of(pole.mark))},
            {"choice_lock", std::string(text_of(pole.lock))},
            {"who", pole.who},
            {"note", pole.note}};
}

PolePlan pole_from(const Cells& cells) {
    PolePlan pole;
    pole.choice = read_word<Choice>(text_at(cells, "choice")).value_or(Choice::undecided);
    pole.head = text_at(cells, "head");
    pole.year = static_cast<int>(integer_at(cells, "year", 0));
    pole.year_by = read_word<YearBy>(text_at(cells, "year_by")).value_or(YearBy::none);
    pole.year_locked = integer_at(cells, "year_locked", 0) != 0;
    pole.mark = read_word<Choice>(text_at(cells, "mark")).value_or(Choice::undecided);
    pole.lock = read_word<Choice>(text_at(cells, "choice_lock")).value_or(Choice::undecided);
    pole.who = text_at(cells, "who");
    pole.note = text_at(cells, "note");
    return pole;
}

Cells unit_cells(const City& city, const StringUnit& unit) {
    return {{"transformer_id",
             unit.transformer.is_valid() ? city.transformers[unit.transformer.place()].id : std::string()},
            {"tap", unit.tap}};
}

std::string unit_row_id(const City& city, const StringUnit& unit) {
    return city.strings[unit.string.place()].id + "|" + std::to_string(unit.year);
}

StringUnit unit_from(const City& city, std::string_view row_id, const Cells& cells) {
    StringUnit unit;
    const std::size_t bar = row_id.rfind('|');
    if (bar == std::string_view::npos) return unit;
    unit.string = find_string(city, row_id.substr(0, bar));
    unit.year = std::atoi(std::string(row_id.substr(bar + 1)).c_str());
    unit.tap = real_at(cells, "tap", 1);
    const std::string id = text_at(cells, "transformer_id");
    for (std::size_t i = 0; i < city.transformers.size(); ++i)
        if (city.transformers[i].id == id) unit.transformer = TransformerIx(i);
    return unit;
}

} // namespace unstring
