#pragma once
// Dates as records give them: a year, a year and month, or a day.

#include <optional>
#include <string_view>

namespace unstring {

struct Date {
    int year = 0;
    int month = 0, day = 0; ///< 0 = not given
    auto operator<=>(const Date&) const = default;
};

/// "1962", "1962-05", "1962-05-17"; nothing for another form or a day that the calendar does not have.
[[nodiscard]] std::optional<Date> date_of(std::string_view text);

} // namespace unstring
