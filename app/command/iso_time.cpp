#include "app/command/iso_time.h"

#include <charconv>

namespace unstring {
namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

/// Takes so many digits off the front.
bool take_number(std::string_view& text, std::size_t digits, int& value) {
    if (text.size() < digits) return false;
    for (std::size_t i = 0; i < digits; ++i)
        if (!is_digit(text[i])) return false;
    std::from_chars(text.data(), text.data() + digits, value);
    text.remove_prefix(digits);
    return true;
}

bool take(std::string_view& text, char wanted) {
    if (text.empty() || text.front() != wanted) return false;
    text.remove_prefix(1);
    return true;
}

int days_of(int year, int month) {
    if (month == 2) return (year % 4 == 0 && year % 100 != 0) || year % 400 == 0 ? 29 : 28;
    return month == 4 || month == 6 || month == 9 || month == 11 ? 30 : 31;
}

bool take_date(std::string_view& text, Instant& at) {
    return take_number(text, 4, at.year) && take(text, '-') && take_number(text, 2, at.month) &&
           take(text, '-') && take_number(text, 2, at.day) && at.month >= 1 && at.month <= 12 &&
           at.day >= 1 && at.day <= days_of(at.year, at.month);
}

bool take_fraction(std::string_view& text, double& second) {
    if (!take(text, '.') && !take(text, ',')) return true;
    double place = 0.1;
    bool has_digit = false;
    for (; !text.empty() && is_digit(text.front()); text.remove_prefix(1), place /= 10) {
        second += place * (text.front() - '0');
        has_digit = true;
    }
    return has_digit;
}

bool take_clock(std::string_view& text, Instant& at) {
    int hour = 0;
    int minute = 0;
    int whole_second = 0;
    if (!take_number(text, 2, hour) || !take(text, ':') || !take_number(text, 2, minute)) return false;
    if (hour > 23 || minute > 59) return false;
    double second = 0;
    if (take(text, ':')) {
        if (!take_number(text, 2, whole_second) || whole_second > 59) return false;
        second = whole_second;
        if (!take_fraction(text, second)) return false;
    }
    at.hour_utc = hour + minute / 60.0 + second / 3600.0;
    return true;
}

bool take_zone(std::string_view& text, Instant& at) {
    if (text.empty()) return true;
    at.has_zone = true;
    if (take(text, 'Z') || take(text, 'z')) return true;
    const double sign = text.front() == '-' ? 1 : -1; // a clock that is behind is added to
    if (!take(text, '+') && !take(text, '-')) return false;
    int hour = 0;
    int minute = 0;
    if (!take_number(text, 2, hour)) return false;
    const bool has_colon = take(text, ':');
    if ((has_colon || !text.empty()) && !take_number(text, 2, minute)) return false;
    if (hour > 14 || minute > 59) return false;
    at.hour_utc += sign * (hour + minute / 60.0);
    return true;
}

} // namespace

std::optional<Instant> read_iso_time(std::string_view text) {
    Instant at;
    if (!take_date(text, at)) return std::nullopt;
    if (!take(text, 'T') && !take(text, 't') && !take(text, ' ')) return std::nullopt;
    if (!take_clock(text, at) || !take_zone(text, at) || !text.empty()) return std::nullopt;
    return at;
}

} // namespace unstring
