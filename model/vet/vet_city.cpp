#include <utility>

#include "model/vet/vet_checks.h"
#include "model/vet/vet_result.h"

namespace unstring {

void VetInput::add(std::string code, const char* table, const RowRef& from, std::string record,
                   std::string found, std::string wanted, std::string remedy) const {
    findings.push_back(make_finding(std::move(code), from.file, from.row, std::move(record), std::move(found),
                                    std::move(wanted), std::move(remedy), table));
}

VetResult vet_city(const City& city, const Catalog& catalog) {
    VetResult result;
    const VetInput vet{city, catalog, extent_of(city), year_of_records(city), result.findings};
    vet_ids(vet);
    vet_places(vet);
    vet_references(vet);
    vet_lamps(vet);
    vet_people(vet);
    vet_dates(vet);
    vet_units(vet);
    vet_orders(vet);
    vet_cutbacks(vet);
    // A record in error must not bend the strings' loads: they are judged without it, as the next step would
    // see them.
    const City believed = set_aside_errors(city, result.findings);
    result.strings = vet_strings({believed, catalog, vet.extent, vet.year, result.findings});
    return result;
}

} // namespace unstring
