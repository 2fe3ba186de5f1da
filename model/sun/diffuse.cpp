#include "model/sun/diffuse.h"

namespace unstring {
namespace {

constexpr double kWinterSunset_deg = 81.4;

} // namespace

double erbs_hour_frac(double k) {
    if (k <= 0.22) return 1.0 - 0.09 * k;
    if (k > 0.80) return 0.165;
    return 0.9511 + k * (-0.1604 + k * (4.388 + k * (-16.638 + k * 12.336)));
}

double erbs_day_frac(double k, double sunset_deg) {
    if (sunset_deg <= kWinterSunset_deg)
        return k < 0.715 ? 1.0 + k * (-0.2727 + k * (2.4495 + k * (-11.9514 + k * 9.3879))) : 0.143;
    return k < 0.722 ? 1.0 + k * (0.2832 + k * (-2.5557 + k * 0.8448)) : 0.175;
}

double erbs_month_frac(double k, double sunset_deg) {
    if (sunset_deg <= kWinterSunset_deg) return 1.391 + k * (-3.560 + k * (4.189 + k * -2.137));
    return 1.311 + k * (-3.022 + k * (3.427 + k * -1.821));
}

} // namespace unstring
