#pragma once
// The whole flow on one page: the steps in order, each taking what the one before it gives. Reading files
// (gather) and writing them (hand out) are geo's; app/steps runs each step over a project file.
//
//   gather     files                                -> City, Catalog, PriceBook, Climate
//   geo/imports/gathered.h vet        City, Catalog                        -> findings, wiring order
//   vet_city, with_wiring shade      City, Catalog, Climate, heights      -> nights dark by pole and head
//   shade_city decide     City .. prices, Plan's marks, shade  -> a choice per pole, circuits, bound
//   decide_city phase      choices, units, budget               -> a year per pole, units, bound phase_plan
//              any plan, by hand or solver          -> states, ledger, checks              evaluate_phase
//   hand out   the phased plan                      -> work orders                         work_orders,
//   survey_orders

#include "model/decide/decide_city.h"
#include "model/orders/survey.h"
#include "model/orders/work_order.h"
#include "model/phase/phase_plan.h"
#include "model/solar/shade_city.h"
#include "model/vet/vet_result.h"
