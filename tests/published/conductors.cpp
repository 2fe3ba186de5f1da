// NFPA 70 (NEC) chapter 9 table 8 as printed, held against conductor physics: AWG geometry (ASTM B258), IACS
// resistivity, temperature coefficient, class-B stranding. Two independent ways to the same figures.

#include "model/catalog/cables.h"

#include <cmath>

#include <catch2/catch.hpp>

using namespace unstring;

namespace {

double circular_mils(int awg) {
    const double inches = 0.005 * std::pow(92.0, (36.0 - awg) / 39.0);
    return std::pow(1000 * inches, 2);
}

/// DC resistance at a temperature [ohm/km]: resistivity at 20 C of 100 % IACS copper, 61 % IACS aluminium.
double physics_ohm_per_km(const Cable& cable, double temp_c) {
    const bool is_copper = cable.metal == Metal::copper;
    const double ohm_cmil_ft = is_copper ? 10.371 : 17.002;
    const double a20 = is_copper ? 0.00393 : 0.00403;
    return ohm_per_km(ohm_cmil_ft / circular_mils(cable.awg) * 1000 * 1.02 * (1 + a20 * (temp_c - 20)));
}

const Cable& copper(const Catalog& catalog, int awg) { return *find_cable(catalog, awg, Metal::copper); }

Catalog with_default_cables() {
    Catalog catalog;
    catalog.cables = default_cables();
    return catalog;
}

} // namespace

TEST_CASE("conductors: every table 8 entry lies within 0.6 % of geometry times resistivity") {
    // Printed to three digits: 0.5 % of rounding at 1.24 and 1.98, and the table's nominal areas.
    const auto cables = default_cables();
    REQUIRE(cables.size() == 26);
    for (const Cable& cable : cables) {
        INFO("AWG " << awg_text(cable.awg));
        CHECK(cable.ohm_per_km == Approx(physics_ohm_per_km(cable, 75)).epsilon(0.006));
    }
}

TEST_CASE("conductors: resistance at 25 C by the table's rule agrees with physics and with a public manual") {
    const Catalog catalog = with_default_cables();
    CHECK(cable_ohm_per_km_at(copper(catalog, 8), 75) == copper(catalog, 8).ohm_per_km);
    CHECK(cable_ohm_per_km_at(copper(catalog, 8), 25) ==
          Approx(physics_ohm_per_km(copper(catalog, 8), 25)).epsilon(0.006));
    // TxDOT Highway Illumination Manual: loop ohm per ft, uncoated copper in conduit, 25 C. Sizes 8 and
    // larger: the printed values of 12 and 10 mix solid and stranded wire.
    const std::pair<int, double> loop_ohm_per_ft[] = {{8, .001308}, {6, .000820}, {4, .000518},
                                                      {2, .000324}, {0, .000204}, {-1, .000162}};
    for (const auto& [awg, loop] : loop_ohm_per_ft) {
        INFO("AWG " << awg_text(awg));
        CHECK(2 * cable_ohm_per_km_at(copper(catalog, awg), 25) ==
              Approx(ohm_per_km(loop * 1000)).epsilon(0.006));
    }
}

TEST_CASE("conductors: 6.6 A loses 28 to 34 W in 1000 ft of AWG 8, 18 to 21 W of AWG 6") {
    const Catalog catalog = with_default_cables();
    const auto watts = [&](int awg, double temp_c) {
        return 6.6 * 6.6 * cable_ohm_per_km_at(copper(catalog, awg), temp_c) * 0.3048;
    };
    CHECK(watts(8, 25) == Approx(28).margin(0.6));
    CHECK(watts(8, 75) == Approx(34).margin(0.6));
    CHECK(watts(6, 25) == Approx(18).margin(0.6));
    CHECK(watts(6, 75) == Approx(21).margin(0.6));
}

TEST_CASE("conductors: areas are those of the printed insulated diameters") {
    // NFPA 70 ch. 9 table 5, THHN/THWN-2: approximate diameters in inches.
    const std::pair<int, double> diameter_in[] = {{14, .111}, {12, .130}, {10, .164}, {8, .216},
                                                  {6, .254},  {4, .324},  {2, .384}};
    const Catalog catalog = with_default_cables();
    for (const auto& [awg, inches] : diameter_in) {
        INFO("AWG " << awg);
        CHECK(copper(catalog, awg).area_mm2 == Approx(0.785398163 * inches * inches * 645.16).epsilon(0.005));
    }
}
