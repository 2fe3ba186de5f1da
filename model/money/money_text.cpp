#include "model/money/money_text.h"

#include <cmath>

#include <fmt/format.h>

namespace unstring {
namespace {

std::string grouped(long long whole) {
    const std::string digits = std::to_string(whole);
    std::string text;
    for (std::size_t i = 0; i < digits.size(); ++i) {
        if (i > 0 && (digits.size() - i) % 3 == 0) text += ',';
        text += digits[i];
    }
    return text;
}

std::string text_with(const char* sign, double dollars, bool with_cents) {
    const long long cents = std::llround(std::abs(dollars) * 100);
    const long long whole = with_cents ? cents / 100 : std::llround(std::abs(dollars));
    const bool is_negative = dollars < 0 && (with_cents ? cents : whole) != 0;
    std::string text = (is_negative ? "-" : "") + std::string(sign) + grouped(whole);
    return with_cents ? text + fmt::format(".{:02}", cents % 100) : text;
}

} // namespace

std::string amount_text(double dollars, bool with_cents) { return text_with("", dollars, with_cents); }
std::string dollars_text(double dollars, bool with_cents) { return text_with("$", dollars, with_cents); }

} // namespace unstring
