#include "model/series/dates.h"

#include <charconv>
#include <chrono>

namespace unstring {
namespace {

std::optional<int> read_digits(std::string_view text, std::size_t digits) {
    int value = 0;
    if (text.size() != digits) return std::nullopt;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
    if (error != std::errc() || end != text.data() + text.size() || value < 1) return std::nullopt;
    return value;
}

} // namespace

std::optional<Date> date_of(std::string_view text) {
    const bool has_month = text.size() >= 7;
    const bool has_day = text.size() == 10;
    if (text.size() != 4 && text.size() != 7 && text.size() != 10) return std::nullopt;
    if ((has_month && text[4] != '-') || (has_day && text[7] != '-')) return std::nullopt;
    const std::optional<int> year = read_digits(text.substr(0, 4), 4);
    const std::optional<int> month = has_month ? read_digits(text.substr(5, 2), 2) : 0;
    const std::optional<int> day = has_day ? read_digits(text.substr(8, 2), 2) : 0;
    if (!year || !month || !day || *month > 12) return std::nullopt;
    if (has_day && !std::chrono::year_month_day(std::chrono::year(*year),
                                                std::chrono::month(static_cast<unsigned>(*month)),
                                                std::chrono::day(static_cast<unsigned>(*day)))
                        .ok())
        return std::nullopt;
    return Date{*year, *month, *day};
}

} // namespace unstring
