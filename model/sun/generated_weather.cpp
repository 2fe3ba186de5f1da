#include "model/sun/generated_weather.h"

#include <cmath>
#include <random>

#include "model/quantities.h"
#include "model/sun/clearness.h"
#include "model/sun/daily_sun.h"

namespace unstring {
namespace {

/// Normal variates from a stream that the language fixes; std::normal_distribution differs between libraries.
class NormalStream {
public:
    explicit NormalStream(std::uint64_t seed) : bits_(seed) {}
    double next() {
        const double radius = std::sqrt(-2.0 * std::log(uniform()));
        return radius * std::cos(2.0 * std::numbers::pi * uniform());
    }

private:
    double uniform() { return (static_cast<double>(bits_() >> 11) + 0.5) * 0x1p-53; }
    std::mt19937_64 bits_;
};

double normal_share_below(double z) { return 0.5 * std::erfc(-z / std::numbers::sqrt2); }

} // namespace

std::vector<double> generate_clearness(const std::array<double, 12>& monthly_clearness, int years,
                                       std::uint64_t seed, double day_to_day) {
    std::vector<ClearnessDistribution> months;
    for (const double mean : monthly_clearness) months.emplace_back(mean);
    NormalStream normal(seed);
    const double fresh = std::sqrt(1.0 - day_to_day * day_to_day);
    double state = normal.next();
    std::vector<double> days;
    days.reserve(static_cast<std::size_t>(years) * 365);
    for (int year = 0; year < years; ++year)
        for (int day = 1; day <= 365; ++day) {
            state = day_to_day * state + fresh * normal.next();
            days.push_back(
                months[static_cast<std::size_t>(month_of_day(day) - 1)].at_share(normal_share_below(state)));
        }
    return days;
}

} // namespace unstring
