#pragma once
// The checks behind vet_city, one subject a file. Each adds findings; records set aside are passed over.

#include <string>
#include <vector>

#include "model/catalog/catalog.h"
#include "model/city/city.h"
#include "model/finding.h"
#include "model/series/extent.h"
#include "model/vet/vet_result.h"

namespace unstring {

inline constexpr const char* kPolesTable = "poles";
inline constexpr const char* kCircuitsTable = "circuits";
inline constexpr const char* kTransformersTable = "transformers";
inline constexpr const char* kServicesTable = "services";
inline constexpr const char* kCutbacksTable = "cutbacks";

struct VetInput {
    const City& city;
    const Catalog& catalog;
    Extent extent;
    int year = 0; ///< the records are judged as of this year; 0 = not known
    std::vector<Finding>& findings;

    void add(std::string code, const char* table, const RowRef& from, std::string record, std::string found,
             std::string wanted, std::string remedy) const;
};

/// First year of the budget, else the latest year that a test or reading bears.
[[nodiscard]] int year_of_records(const City& city);

void vet_ids(const VetInput& vet);        ///< pole-id-twice, pole-near-twin, transformer-twice
void vet_places(const VetInput& vet);     ///< place-missing, place-swapped, place-far, station-missing
void vet_references(const VetInput& vet); ///< string-unknown, pole-unknown, control-unknown
void vet_lamps(const VetInput& vet);      ///< lamp-unknown, led-on-string
void vet_people(const VetInput& vet);     ///< owner-consent, attachments, critical-down
void vet_dates(const VetInput& vet);      ///< date-odd
void vet_units(const VetInput& vet);      ///< current-mixed, transformer-twice, untested-spare, unit-state
void vet_orders(const VetInput& vet);     ///< order-missing, order-gap, order-twice
void vet_cutbacks(const VetInput& vet);   ///< cutback-unconfirmed
/// The city with its errors set aside and its wiring settled: transformer-missing, load-over, load-low,
/// volts-over, volts-open, span-long, length-odd, reading-differs, pulsing-light, order-inferred.
[[nodiscard]] std::vector<VetString> vet_strings(const VetInput& vet);

} // namespace unstring
