#pragma once
// The price book: one closed list of items (prices, paces, rates), each with low, base and high and its
// years. Comes in: rows of prices.csv. Goes out: the price of an item in a year, per metre or per piece.

#include <functional>
#include <map>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace unstring {

struct PriceItem {
    std::string_view item;
    std::string_view
        unit; ///< the book's own unit: "ft", "each", "year", "day", "kWh", "frac", "per crew-day" ..
    std::string_view what; ///< in the trade's words
};

/// The closed list, in the order of resources/prices.csv.
[[nodiscard]] std::span<const PriceItem> price_items();
/// Null for a name that is not in the list.
[[nodiscard]] const PriceItem* find_price_item(std::string_view item);
/// Whether a file may give this item in that unit: the list's own, or metres in place of feet.
[[nodiscard]] bool price_unit_fits(const PriceItem& item, std::string_view unit);
/// The wire item of a conductor size: "wire_awg8", "wire_awg1_0".
[[nodiscard]] std::string wire_item(int awg);

struct PriceRow {
    std::string item, unit, note, date;
    double low = 0, base = 0, high = 0; ///< in dollars per `unit` as given in the file
    std::optional<int> from_year, to_year;
    double change_frac_year = 0;
    long row = 0;
};

class PriceBook {
public:
    PriceBook() = default;
    explicit PriceBook(std::vector<PriceRow> rows);

    [[nodiscard]] const std::vector<PriceRow>& rows() const { return rows_; }

    /// Base price in a calendar year: the last row with from_year <= year, times (1 + change)^(year -
    /// from_year). No row reaches the year: the last that had begun, as in its last year, else the first to
    /// come. A row without from_year holds from the start and never changes. Items priced per foot or per
    /// metre come back per metre, paces in feet in metres per crew-day. Throws std::logic_error for an item
    /// that is not in the closed list, or that neither this book nor its defaults (with_defaults) give.
    [[nodiscard]] double at(std::string_view item, int year) const;

    /// Fills the items that this book lacks from another (the default) book.
    [[nodiscard]] PriceBook with_defaults(const PriceBook& defaults) const;
    [[nodiscard]] bool has(std::string_view item) const;

private:
    std::vector<PriceRow> rows_;
    std::map<std::string, std::vector<std::size_t>, std::less<>> places_; ///< item -> rows, by from_year
};

} // namespace unstring
