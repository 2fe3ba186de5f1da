#include "model/series/verdict.h"

namespace unstring {

Verdict verdict_of(bool has_transformer, int lamps, double loading_frac, double min_frac) {
    if (lamps <= 0) return Verdict::none;
    if (!has_transformer) return Verdict::open;
    if (loading_frac > 1) return Verdict::over;
    if (loading_frac > 0.9) return Verdict::tight;
    if (loading_frac < min_frac) return Verdict::low;
    return loading_frac >= 0.5 ? Verdict::good : Verdict::light;
}

const char* text_of(Verdict verdict) {
    switch (verdict) {
    case Verdict::open:
        return "open";
    case Verdict::over:
        return "over";
    case Verdict::tight:
        return "tight";
    case Verdict::good:
        return "good";
    case Verdict::light:
        return "light";
    case Verdict::low:
        return "low";
    case Verdict::none:
        return "none";
    }
    return "none";
}

} // namespace unstring
