#include "model/catalog/cables.h"

#include <array>

#include <fmt/format.h>

namespace unstring {
namespace {

struct TableRow {
    int awg;
    double copper_ohm_kft, aluminium_ohm_kft; // table 8, stranded, uncoated
    double x_ohm_kft;                         // table 9, PVC
    double area_in2;                          // table 5, THHN/THWN-2 (3, 1 and thicker from memory)
    double copper_a, aluminium_a; // table 310.16, 75 C (aluminium, and copper above 1, from memory)
};

constexpr std::array<TableRow, 13> kRows = {{
    {14, 3.14, 5.17, .058, .0097, 20, 0},
    {12, 1.98, 3.25, .054, .0133, 25, 20},
    {10, 1.24, 2.04, .050, .0211, 35, 30},
    {8, .778, 1.28, .052, .0366, 50, 40},
    {6, .491, .808, .051, .0507, 65, 50},
    {4, .308, .508, .048, .0824, 85, 65},
    {3, .245, .403, .047, .0973, 100, 75},
    {2, .194, .319, .045, .1158, 115, 90},
    {1, .154, .253, .046, .1562, 130, 100},
    {0, .122, .201, .044, .1855, 150, 120},
    {-1, .0967, .159, .043, .2223, 175, 135},
    {-2, .0766, .126, .042, .2679, 200, 155},
    {-3, .0608, .100, .041, .3237, 230, 180},
}};

constexpr double kMm2PerIn2 = 25.4 * 25.4;

} // namespace

std::vector<Cable> default_cables() {
    std::vector<Cable> cables;
    cables.reserve(2 * kRows.size());
    for (const TableRow& row : kRows)
        cables.push_back({row.awg, Metal::copper, ohm_per_km(row.copper_ohm_kft), ohm_per_km(row.x_ohm_kft),
                          row.area_in2 * kMm2PerIn2, row.copper_a});
    for (const TableRow& row : kRows)
        cables.push_back({row.awg, Metal::aluminium, ohm_per_km(row.aluminium_ohm_kft),
                          ohm_per_km(row.x_ohm_kft), row.area_in2 * kMm2PerIn2, row.aluminium_a});
    return cables;
}

double cable_ohm_per_km_at(const Cable& cable, double temp_c) {
    const double per_kelvin = cable.metal == Metal::copper ? 0.00323 : 0.00330;
    return cable.ohm_per_km * (1 + per_kelvin * (temp_c - 75));
}

std::string awg_text(int awg) { return awg > 0 ? fmt::format("{}", awg) : fmt::format("{}/0", 1 - awg); }

} // namespace unstring
