#include "model/series/units.h"

#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "model/series/dates.h"

namespace unstring {
namespace {

constexpr double kSameCurrent_a = 0.05;
constexpr double kSameVoltsFrac = 0.01;
constexpr double kOpenTopFrac = 1.4;
constexpr int kTestGoodYears = 5;
/// A load this little over a rating is rounding, not an over-load.
constexpr double kRounding = 1e-9;

bool is_same_volts(double a, double b) { return std::abs(a - b) <= kSameVoltsFrac * std::max(a, b); }

/// The smallest tap that carries the load; none where the full rating does not.
std::optional<double> smallest_tap(const Transformer& unit, double load_kva) {
    std::optional<double> smallest;
    const auto consider = [&](double tap) {
        if (load_kva <= loop_rating_kw(unit) * tap * (1 + kRounding) && (!smallest || tap < *smallest))
            smallest = tap;
    };
    consider(1);
    for (const double tap : unit.taps)
        if (tap > 0 && tap <= 1) consider(tap);
    return smallest;
}

std::string why_wrong_kind(const Transformer& unit, const UnitNeed& need) {
    if (unit.set_aside) return "its row is set aside";
    if (unit.state == UnitState::scrapped) return "scrapped";
    if (!unit.output_a) return fmt::format("output current not known, need {:g} A", need.current_a);
    if (std::abs(*unit.output_a - need.current_a) > kSameCurrent_a)
        return fmt::format("output {:g} A, need {:g} A", *unit.output_a, need.current_a);
    if (need.primary_v && !unit.primary_v)
        return fmt::format("primary volts not known, need {:g} V", *need.primary_v);
    if (need.primary_v && !is_same_volts(*unit.primary_v, *need.primary_v))
        return fmt::format("primary {:g} V, need {:g} V", *unit.primary_v, *need.primary_v);
    if (need.mount && !unit.mount) return fmt::format("mounting not known, need {}", text_of(*need.mount));
    if (need.mount && *unit.mount != *need.mount)
        return fmt::format("mounted on {}, need {}", text_of(*unit.mount), text_of(*need.mount));
    return {};
}

} // namespace

TransformerIx unit_today(const City& city, StringIx string) {
    for (std::size_t i = 0; i < city.transformers.size(); ++i) {
        const Transformer& unit = city.transformers[i];
        if (unit.set_aside || unit.state != UnitState::in_service) continue;
        if (std::find(unit.strings.begin(), unit.strings.end(), string) != unit.strings.end())
            return TransformerIx(i);
    }
    return {};
}

double loop_rating_kw(const Transformer& unit) {
    return unit.strings.size() >= 2 ? unit.rated_kw / 2 : unit.rated_kw;
}

double min_frac_of(const Transformer& unit) { return unit.min_frac.value_or(kUsualMinFrac); }

OpenVolts open_volts(const Transformer& unit, double current_a) {
    if (unit.open_v) return {*unit.open_v, false};
    return {kOpenTopFrac * loop_rating_kw(unit) * 1000 / current_a, true};
}

double tap_for(const Transformer& unit, double load_kva) { return smallest_tap(unit, load_kva).value_or(1); }

UnitNeed unit_need(const City& city, const StringLoop& loop, double load_kva) {
    UnitNeed need{loop.current_a, load_kva, loop.cable_kv, {}, {}};
    if (const TransformerIx today = unit_today(city, loop.string); today.is_valid()) {
        need.primary_v = city.transformers[today.place()].primary_v;
        need.mount = city.transformers[today.place()].mount;
    }
    return need;
}

std::string why_unit_refused(const Transformer& unit, const UnitNeed& need) {
    if (std::string why = why_wrong_kind(unit, need); !why.empty()) return why;
    const double rating_kw = loop_rating_kw(unit);
    const std::optional<double> tap = smallest_tap(unit, need.load_kva);
    if (!tap) return fmt::format("load {:.2f} kVA over its rating of {:g} kW", need.load_kva, rating_kw);
    const double class_v = need.cable_kv * 1000;
    if (const double running_v = need.load_kva * 1000 / need.current_a; running_v > class_v)
        return fmt::format("{:.0f} V on cable of {:g} kV class", running_v, need.cable_kv);
    if (unit.open_v && *unit.open_v > class_v)
        return fmt::format("open-circuit {:.0f} V (nameplate) over the cable's {:g} kV class", *unit.open_v,
                           need.cable_kv);
    const double loading_frac = need.load_kva / (rating_kw * *tap);
    if (unit.build == Build::static_unit && loading_frac < min_frac_of(unit))
        return fmt::format("load {:.0f} % of rating, a static unit holds its current from {:.0f} %",
                           100 * loading_frac, 100 * min_frac_of(unit));
    return {};
}

std::vector<UnitFit> units_that_fit(const City& city, const std::vector<TransformerIx>& pool,
                                    const UnitNeed& need) {
    std::vector<UnitFit> fits;
    for (const TransformerIx ix : pool) {
        const Transformer& unit = city.transformers[ix.place()];
        if (!why_unit_refused(unit, need).empty()) continue;
        const double tap = *smallest_tap(unit, need.load_kva);
        fits.push_back({ix, tap, need.load_kva / (loop_rating_kw(unit) * tap)});
    }
    const auto carried_kw = [&](const UnitFit& fit) {
        return loop_rating_kw(city.transformers[fit.unit.place()]) * fit.tap;
    };
    std::sort(fits.begin(), fits.end(), [&](const UnitFit& a, const UnitFit& b) {
        if (carried_kw(a) != carried_kw(b)) return carried_kw(a) < carried_kw(b);
        return a.unit < b.unit;
    });
    return fits;
}

bool is_untested(const Transformer& unit, int year) {
    const std::optional<Date> tested = date_of(unit.tested);
    if (!tested) return true;
    return year > 0 && year - tested->year > kTestGoodYears;
}

} // namespace unstring
