// Coordinates that are missing, exchanged, or far outside the city.

#include <cmath>

#include <fmt/format.h>

#include "model/vet/vet_checks.h"

namespace unstring {
namespace {

std::string shown(MapPoint place) { return fmt::format("{:.1f}, {:.1f}", place.x_m, place.y_m); }

/// place-swapped or place-far where a place is not believed.
void vet_place(const VetInput& vet, const char* table, const RowRef& from, const std::string& id,
               MapPoint place) {
    if (is_believed(vet.extent, place)) return;
    if (is_swapped(vet.extent, place))
        vet.add("place-swapped", table, from, id, shown(place),
                fmt::format("near {}", shown(vet.extent.centre)), "exchange easting and northing");
    else
        vet.add("place-far", table, from, id,
                fmt::format("{}, {:.0f} km from the middle of the city", shown(place),
                            distance_m(place, vet.extent.centre) / 1000),
                fmt::format("within {:.0f} km of {}", vet.extent.reach_m / 1000, shown(vet.extent.centre)),
                "check the digits and the coordinate system; no cable is laid to it until then");
}

bool has_finite_place(bool has_place, MapPoint place) {
    return has_place && std::isfinite(place.x_m) && std::isfinite(place.y_m);
}

} // namespace

void vet_places(const VetInput& vet) {
    for (const Pole& pole : vet.city.poles) {
        if (pole.set_aside) continue;
        if (!has_finite_place(pole.has_place, pole.place))
            vet.add("place-missing", kPolesTable, pole.from, pole.id, "no coordinates",
                    "easting and northing, or lon and lat", "survey the pole, or set it aside");
        else
            vet_place(vet, kPolesTable, pole.from, pole.id, pole.place);
    }
    for (const SeriesString& string : vet.city.strings) {
        if (string.set_aside) continue;
        if (string.station)
            vet_place(vet, kCircuitsTable, string.from, string.id, *string.station);
        else if (string.kind == CircuitKind::series)
            vet.add("station-missing", kCircuitsTable, string.from, string.id, "no station coordinates",
                    "station_e and station_n",
                    "without them home legs are guessed from the first and last lamp");
    }
    for (const ServicePoint& service : vet.city.services) {
        if (service.set_aside) continue;
        if (has_finite_place(service.has_place, service.place))
            vet_place(vet, kServicesTable, service.from, service.id, service.place);
        else if (service.pole_given
                     .empty()) // a pole that is not there, or has no place, has a finding of its own
            vet.add("place-missing", kServicesTable, service.from, service.id, "no coordinates, no pole",
                    "easting and northing, or a pole that has them",
                    "survey the service point, or set it aside");
    }
}

} // namespace unstring
