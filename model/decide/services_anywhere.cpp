#include "model/decide/services_anywhere.h"

#include "model/decide/near_points.h"

namespace unstring {
namespace {

constexpr double kApartM = 150;

} // namespace

City with_services_anywhere(City city) {
    NearPoints near(kApartM);
    for (const ServicePoint& service : city.services) {
        const PoleIx pole = service.has_place ? PoleIx() : find_pole(city, service.pole_given);
        if (service.has_place)
            near.add(service.place, 0);
        else if (pole.is_valid())
            near.add(city.poles[pole.place()].place, 0);
    }
    for (const Pole& pole : city.poles) {
        if (!is_candidate(city, pole)) continue;
        bool is_free = true;
        near.visit_near(pole.place, kApartM, [&](int, MapPoint other) {
            is_free = is_free && distance_m(pole.place, other) >= kApartM;
        });
        if (!is_free) continue;
        ServicePoint service;
        service.id = "anywhere-" + pole.id;
        service.kind = ServiceKind::candidate;
        service.place = pole.place;
        service.has_place = true;
        service.pole_given = pole.id;
        service.free_kva = 25;
        service.lead_weeks = 26;
        near.add(pole.place, 0);
        city.services.push_back(std::move(service));
    }
    return city;
}

} // namespace unstring
