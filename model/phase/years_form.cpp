#include "model/phase/years_form.h"

#include <algorithm>
#include <cmath>
#include <numeric>

#include <fmt/format.h>

namespace unstring {
namespace {

constexpr double kLoadSlack = 1e-9; ///< sums of loads printed with two decimals

double rest_of(const std::vector<double>& values, std::size_t from) {
    return std::accumulate(values.begin() + static_cast<long>(from), values.end(), 0.0);
}

bool carries(const YearsForm& form, double load, std::size_t rating) {
    const double rated = form.ratings[rating];
    return load <= rated + kLoadSlack && load >= form.min_frac * rated - kLoadSlack;
}

PackageString string_of(const YearsForm& form, const YearsFormString& given) {
    PackageString string;
    const std::size_t sections = given.load.size();
    string.sections = static_cast<int>(sections);
    string.start_class = given.rating_index;
    for (std::size_t r = 0; r < form.ratings.size(); ++r) string.classes.push_back(static_cast<int>(r));
    for (int t = 1; t <= form.years; ++t) {
        const double factor = std::pow(1 + form.discount, -t);
        const double growth = std::pow(1 + form.keep_growth, t);
        string.least.push_back(t == form.years ? string.sections : 0);
        string.most.push_back(string.sections);
        string.ends.push_back(1);
        string.done_cost.push_back(0);
        string.finish_cost.push_back(0);
        string.mobilise_cost.push_back(form.mobilisation_cost * factor);
        string.mobilise_use.push_back({form.mobilisation_cost, form.mobilisation_hours});
        string.swap_cost.push_back(form.swap_cost * factor);
        string.swap_use.push_back({form.swap_cost, form.swap_hours});
        std::vector<double> work;
        std::vector<Use> use;
        for (std::size_t k = 0; k < sections; ++k) {
            work.push_back(given.capital[k] * factor);
            use.push_back({given.capital[k], given.hours[k]});
        }
        string.work_cost.push_back(work);
        string.work_use.push_back(use);
        std::vector<std::vector<double>> states;
        for (std::size_t n = 0; n <= sections; ++n) {
            const double cost = (given.fixed_keep + rest_of(given.keep, n) * growth) * factor;
            std::vector<double> by_class;
            for (std::size_t r = 0; r < form.ratings.size(); ++r)
                by_class.push_back(n < sections && carries(form, rest_of(given.load, n), r) ? cost : kNever);
            states.push_back(by_class);
        }
        string.state_cost.push_back(states);
    }
    return string;
}

} // namespace

PackageCase packages_of(const YearsForm& form) {
    PackageCase packages;
    packages.years = form.years;
    packages.classes = static_cast<int>(form.ratings.size());
    packages.pool_factor = 1 + form.spare_fraction;
    packages.owned = form.units_owned;
    for (int t = 1; t <= form.years; ++t) {
        packages.buy_cost.push_back(form.buy_cost * std::pow(1 + form.discount, -t));
        Use limit;
        limit.fill(kNever);
        limit[0] = form.budget[static_cast<std::size_t>(t - 1)];
        limit[1] = form.hours[static_cast<std::size_t>(t - 1)];
        packages.limit.push_back(limit);
    }
    for (const YearsFormString& each : form.strings) packages.strings.push_back(string_of(form, each));
    return packages;
}

YearsFormCheck check_years(const YearsForm& form, const std::vector<StringPlan>& plans) {
    YearsFormCheck check;
    const auto years = static_cast<std::size_t>(form.years);
    std::vector<double> money(years, 0), hours(years, 0);
    std::vector<std::vector<int>> in_service(years, std::vector<int>(form.ratings.size(), 0));
    for (std::size_t s = 0; s < plans.size(); ++s) {
        const YearsFormString& string = form.strings[s];
        const std::size_t sections = string.load.size();
        std::size_t done = 0;
        int rating = string.rating_index;
        for (std::size_t t = 0; t < years; ++t) {
            const double factor = std::pow(1 + form.discount, -static_cast<double>(t + 1));
            const auto next = static_cast<std::size_t>(plans[s].done[t]);
            if (next < done || next > sections) {
                check.broken.push_back(fmt::format("string {} year {}: sections done fall", s, t + 1));
                break;
            }
            if (next > done) {
                money[t] += form.mobilisation_cost;
                hours[t] += form.mobilisation_hours;
                check.cost += form.mobilisation_cost * factor;
            }
            for (std::size_t k = done; k < next; ++k) {
                money[t] += string.capital[k];
                hours[t] += string.hours[k];
                check.cost += string.capital[k] * factor;
            }
            done = next;
            if (done == sections) continue;
            check.cost += string.fixed_keep * factor;
            for (std::size_t k = done; k < sections; ++k)
                check.cost +=
                    string.keep[k] * std::pow(1 + form.keep_growth, static_cast<double>(t + 1)) * factor;
            const auto cls = static_cast<std::size_t>(plans[s].cls[t]);
            if (cls >= form.ratings.size() || !carries(form, rest_of(string.load, done), cls)) {
                check.broken.push_back(fmt::format("string {} year {}: no class carries {:.2f}", s, t + 1,
                                                   rest_of(string.load, done)));
                break;
            }
            if (plans[s].cls[t] != rating) {
                money[t] += form.swap_cost;
                hours[t] += form.swap_hours;
                check.cost += form.swap_cost * factor;
            }
            rating = plans[s].cls[t];
            ++in_service[t][cls];
        }
        if (done != sections)
            check.broken.push_back(fmt::format("string {}: {} sections left", s, sections - done));
    }
    check.bought.assign(years, std::vector<int>(form.ratings.size(), 0));
    for (std::size_t r = 0; r < form.ratings.size(); ++r) {
        int held = 0;
        for (std::size_t t = 0; t < years; ++t) {
            if (in_service[t][r] == 0) continue;
            const double want = (1 + form.spare_fraction) * in_service[t][r] - form.units_owned[t][r];
            const int more = static_cast<int>(std::ceil(want - 1e-9)) - held;
            if (more <= 0) continue;
            held += more;
            check.bought[t][r] = more;
            check.cost += more * form.buy_cost * std::pow(1 + form.discount, -static_cast<double>(t + 1));
        }
    }
    for (std::size_t t = 0; t < years; ++t) {
        if (money[t] > form.budget[t] + 1e-6)
            check.over.push_back({static_cast<int>(t + 1), "money", money[t] - form.budget[t]});
        if (hours[t] > form.hours[t] + 1e-6)
            check.over.push_back({static_cast<int>(t + 1), "hours", hours[t] - form.hours[t]});
    }
    return check;
}

} // namespace unstring
