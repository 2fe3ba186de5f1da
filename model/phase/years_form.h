#pragma once
// The form of the phasing benchmarks (shared/benchmarks/README.md): one crew, loads that add up, keep cost
// that grows. Comes in: plain numbers as the file gives them. Goes out: a PackageCase, and an evaluation that
// uses no solver code.

#include <string>
#include <vector>

#include "model/phase/package_exact.h"

namespace unstring {

struct YearsFormString {
    int rating_index = 0;                           ///< class in service at the start
    double fixed_keep = 0;                          ///< dollars a year while it lives; does not grow
    std::vector<double> load, capital, hours, keep; ///< one per section, from the far end inward
};

struct YearsForm {
    int years = 0;
    double discount = 0, keep_growth = 0, min_frac = 0;
    double mobilisation_cost = 0, mobilisation_hours = 0, swap_cost = 0, swap_hours = 0, buy_cost = 0,
           spare_fraction = 0;
    std::vector<double> ratings, budget, hours;
    std::vector<std::vector<double>> units_owned; ///< [year][rating]
    std::vector<YearsFormString> strings;
};

struct YearsFormShort {
    int year = 0; ///< 1-based
    std::string limit;
    double by = 0;
};

struct YearsFormCheck {
    double cost = 0;
    std::vector<std::vector<int>> bought;
    std::vector<YearsFormShort> over;
    std::vector<std::string>
        broken; ///< what is not a plan at all: order, load outside the class, a section left
};

[[nodiscard]] PackageCase packages_of(const YearsForm& form);

/// Cost, purchases and over-runs of an answer, straight from the form.
[[nodiscard]] YearsFormCheck check_years(const YearsForm& form, const std::vector<StringPlan>& plans);

} // namespace unstring
