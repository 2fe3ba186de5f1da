#pragma once
// An instant as people write it by ISO 8601.

#include <optional>
#include <string_view>

namespace unstring {

struct Instant {
    int year = 2000, month = 1, day = 1;
    double hour_utc = 0; ///< of that day; the offset is taken off, so it may be below 0 or above 24
    bool has_zone = false;
};

/// "2003-10-17T12:30:30-07:00", also with a blank for the T, without seconds, with a fraction of them, with Z
/// or without a zone (read as UTC). Nothing for what is no such instant, the 30th of February included.
[[nodiscard]] std::optional<Instant> read_iso_time(std::string_view text);

} // namespace unstring
