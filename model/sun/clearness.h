#pragma once
// How the clearness of single days spreads around a month's mean.
// Source: P. Bendt, M. Collares-Pereira, A. Rabl, Solar Energy 27 (1981) 1-5; largest clearness: K.G.T.
// Hollands, R.G. Huget, Solar Energy 30 (1983) 195-209; both as in Duffie & Beckman section 2.9 (from
// memory).

namespace unstring {

inline constexpr double kClearnessFloor = 0.05; ///< the darkest day
inline constexpr double kClearnessMeanMin = 0.06,
                        kClearnessMeanMax = 0.84; ///< monthly means with a distribution

class ClearnessDistribution {
public:
    /// @param mean  of the month, kClearnessMeanMin..kClearnessMeanMax; throws std::logic_error outside
    explicit ClearnessDistribution(double mean);

    [[nodiscard]] double largest() const { return floor_ + width_; }
    /// Exponent of the distribution, the exact root (not the fit by Herzog, which misses the mean by up to
    /// 0.002).
    [[nodiscard]] double exponent() const { return shape_ / width_; }
    /// Share of days at or below a clearness.
    [[nodiscard]] double share_below(double clearness) const;
    /// The clearness that a share of the days stays at or below.
    [[nodiscard]] double at_share(double share) const;

private:
    double floor_ = kClearnessFloor, width_ = 0;
    double shape_ = 0; ///< exponent times width
};

} // namespace unstring
