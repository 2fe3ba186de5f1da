#include "model/money/worth.h"

#include <cmath>

namespace unstring {

double spv(double rate, double years) { return std::exp(-years * std::log1p(rate)); }

double upv(double rate, double years) { return upv_rising(rate, 0, years); }

// With g = ln((1 + d) / (1 + e)) the closed form is (1 + e) (1 - exp(-n g)) / (d - e); expm1 keeps its digits
// as d nears e, where d - e = (1 + e) (exp(g) - 1).
double upv_rising(double rate, double rise, double years) {
    const double gap = std::log1p((rate - rise) / (1 + rise));
    if (gap == 0) return years;
    return -std::expm1(-years * gap) / std::expm1(gap);
}

double crf(double rate, double years) { return 1 / upv(rate, years); }

} // namespace unstring
