#include <array>

#include <fmt/format.h>
#include <fmt/ranges.h>

#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {
namespace {

constexpr double kUsualAlbedo = 0.2;
constexpr double kUsualTemp_c = 15;

Fault broken(const Table& table, long row, std::string field, std::string found, std::string wanted) {
    return {FaultCode::file_broken,
            table.file,
            row,
            std::move(field),
            std::move(found),
            std::move(wanted),
            "give climate.csv with month, ghi_kwh_m2_day, temp_c, albedo, 12 rows"};
}

/// 1..12 from a number, an English month name or its first three letters; 0 for anything else.
int month_of(std::string_view cell) {
    constexpr std::array<std::string_view, 12> kMonths = {"jan", "feb", "mar", "apr", "may", "jun",
                                                          "jul", "aug", "sep", "oct", "nov", "dec"};
    if (const auto number = read_number(cell, DecimalMark::point))
        return *number >= 1 && *number <= 12 && *number == static_cast<int>(*number)
                   ? static_cast<int>(*number)
                   : 0;
    const std::string word = list_word(cell).substr(0, 3);
    for (std::size_t i = 0; i < kMonths.size(); ++i)
        if (word == kMonths[i]) return static_cast<int>(i) + 1;
    return 0;
}

bool is_hourly(const Table& table) {
    if (!table.columns.empty() && table.columns.front() == "LOCATION") return true; // EPW
    for (const std::string& column : table.columns)
        if (list_word(column) == "time" || list_word(column).starts_with("ghi-w")) return true;
    return false;
}

} // namespace

Expected<void> read_climate(const ReadyTable& from, Gathered& out) {
    const Table& table = from.table;
    if (is_hourly(table))
        return tl::unexpected(broken(table, 1, "time", "an hourly weather file",
                                     "the 12 months of a mean year: this version reads monthly files"));
    for (const char* field : {"month", "ghi_kwh_m2_day"})
        if (auto has = need_column(from, field); !has) return has;
    TableReader in(table, from.columns, out.findings, out.notes);
    const NumberField ghi(in, "ghi_kwh_m2_day", 0, 15), temp_c(in, "temp_c", -80, 60),
        albedo(in, "albedo", 0, 1);
    Climate climate;
    std::array<bool, 12> is_read{};
    std::vector<int> without_temp, without_albedo;
    std::optional<Fault> fault;
    read_rows(in, "month", out, [&] {
        const int month = month_of(in.cell("month"));
        const auto irradiation = ghi();
        const auto place = static_cast<std::size_t>(month - 1);
        if (fault) return false;
        if (month == 0)
            fault =
                broken(table, in.from().row, "month", std::string(in.cell("month").substr(0, 40)), "1 to 12");
        else if (is_read[place])
            fault = broken(table, in.from().row, "month", fmt::format("month {} twice", month),
                           "each month once");
        else if (!irradiation)
            fault = broken(table, in.from().row, "ghi_kwh_m2_day",
                           std::string(in.cell("ghi_kwh_m2_day").substr(0, 40)), "0 to 15 kWh/m2 a day");
        if (fault) return false;
        const auto temperature = temp_c();
        const auto ground = albedo();
        if (!temperature) without_temp.push_back(month);
        if (!ground) without_albedo.push_back(month);
        is_read[place] = true;
        climate.ghi_kwh_m2_day[place] = *irradiation;
        climate.temp_c[place] = temperature.value_or(kUsualTemp_c);
        climate.albedo[place] = ground.value_or(kUsualAlbedo);
        return true;
    });
    if (fault) return tl::unexpected(*fault);
    for (std::size_t month = 0; month < is_read.size(); ++month)
        if (!is_read[month])
            return tl::unexpected(
                broken(table, 0, "month", fmt::format("no month {}", month + 1), "12 months"));
    if (!without_temp.empty())
        in.note(fmt::format("climate: no temp_c in months {}: {} C taken (assumption)",
                            fmt::join(without_temp, ", "), kUsualTemp_c));
    if (!without_albedo.empty())
        in.note(fmt::format("climate: no albedo in months {}: {} taken (assumption)",
                            fmt::join(without_albedo, ", "), kUsualAlbedo));
    out.climate = climate;
    return {};
}

} // namespace unstring
