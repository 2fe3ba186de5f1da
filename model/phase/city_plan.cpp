#include <algorithm>

#include "model/phase/city_packages.h"
#include "model/phase/package_plan.h"

namespace unstring {
namespace {

/// Units of the pool by name, year by year: who holds one of the class asked keeps it, the others take a free
/// one.
class Hands {
public:
    Hands(const CityYears& city, const std::vector<StringPlan>& plans) : city_(city), plans_(plans) {
        for (const CityString& string : city.strings)
            held_.push_back(unit_today(city.input.city, string.string));
    }

    void year(std::size_t t, std::vector<StringUnit>& out) {
        std::vector<char> keeps(held_.size(), 0);
        for (std::size_t s = 0; s < held_.size(); ++s) {
            keeps[s] = held_[s].is_valid() && is_of_class(held_[s], class_at(s, t)) ? 1 : 0;
            if (keeps[s] == 0) held_[s] = {};
        }
        for (std::size_t s = 0; s < held_.size(); ++s)
            if (keeps[s] == 0) held_[s] = free_unit(s, class_at(s, t));
        for (std::size_t s = 0; s < held_.size(); ++s) {
            if (!held_[s].is_valid()) continue;
            const double load_kva = city_.states[s][t][static_cast<std::size_t>(plans_[s].done[t])].load_kva;
            const auto fit = city_.kinds->fit(city_.strings[s].string, held_[s], load_kva);
            out.push_back({city_.strings[s].string, city_.year(t), held_[s], fit ? fit->tap : 1});
        }
    }

private:
    int class_at(std::size_t s, std::size_t t) const {
        const int local = plans_[s].cls[t];
        return local == kNoClass ? kNoClass : city_.local_classes[s][static_cast<std::size_t>(local)];
    }
    bool is_of_class(TransformerIx unit, int cls) const {
        if (cls == kNoClass) return false;
        const auto& units = city_.classes[static_cast<std::size_t>(cls)];
        return std::find(units.begin(), units.end(), unit) != units.end();
    }
    TransformerIx free_unit(std::size_t s, int cls) const {
        if (cls == kNoClass) return {};
        for (const TransformerIx unit : city_.classes[static_cast<std::size_t>(cls)]) {
            const auto& own = city_.input.city.transformers[unit.place()].strings;
            const bool is_shared =
                own.size() >= 2 && std::find(own.begin(), own.end(), city_.strings[s].string) != own.end();
            if (is_shared || std::find(held_.begin(), held_.end(), unit) == held_.end()) return unit;
        }
        return {};
    }

    const CityYears& city_;
    const std::vector<StringPlan>& plans_;
    std::vector<TransformerIx> held_;
};

} // namespace

Plan with_years(const CityYears& city, const PackageCase& packages, const std::vector<StringPlan>& plans) {
    Plan plan = city.input.plan;
    for (std::size_t s = 0; s < city.strings.size(); ++s)
        for (std::size_t k = 0; k < city.strings[s].sections.size(); ++k) {
            const int t = year_done(plans[s], static_cast<int>(k));
            for (const PoleIx pole : city.strings[s].sections[k].poles) {
                PolePlan& row = plan.poles[pole.place()];
                row.year = t < 0 ? 0 : city.year(static_cast<std::size_t>(t));
                row.year_by = t < 0 ? YearBy::none : YearBy::solver;
            }
        }
    for (PolePlan& row : plan.poles)
        if (row.choice != Choice::rewire && row.choice != Choice::solar && !row.year_locked) {
            row.year = 0;
            row.year_by = YearBy::none;
        }
    plan.units.clear();
    Hands hands(city, plans);
    for (std::size_t t = 0; t < static_cast<std::size_t>(packages.years); ++t) hands.year(t, plan.units);
    std::sort(plan.units.begin(), plan.units.end(), [](const StringUnit& a, const StringUnit& b) {
        return std::pair(a.string, a.year) < std::pair(b.string, b.year);
    });
    return plan;
}

} // namespace unstring
