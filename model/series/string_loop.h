#pragma once
// One series string as its electrics see it: lamps in wiring order, cable legs, cut-backs. Comes in: City and
// Catalog (poles carry the wiring order that vet settled). Goes out: StringLoop, and its state for any set of
// live lamps.
//
//   station out (0) --leg 0-- lamp 1 --leg 1-- lamp 2 .. lamp n --leg n-- station return (n+1)

#include <vector>

#include "model/catalog/catalog.h"
#include "model/city/city.h"

namespace unstring {

enum class OrderFrom { given, inferred, partial };
[[nodiscard]] const char* text_of(OrderFrom value);

struct LoopCutBack {
    int a = 0, b = 0; ///< positions, 0 <= a < b <= n+1
    double new_cable_m = 0;
    int place = -1; ///< in City.cutbacks; -1 = a candidate found by geometry
    bool confirmed = false;
    CutBackKind kind = CutBackKind::pullbox;
};

struct StringLoop {
    StringIx string;
    std::vector<PoleIx> lamps;           ///< position p is lamps[p - 1]
    std::vector<double> lamp_w, lamp_pf; ///< one per lamp; 0 W where the pole is down (jumpered)
    std::vector<char> burns;             ///< 1 where a lamp burns today
    std::vector<double> legs_m;          ///< n + 1 conductor metres
    std::vector<LoopCutBack> cutbacks;
    int far_position = 0; ///< 1..n, the far end
    /// Lamps whose records are set aside: they burn on the string as long as any lamp of the plan does, so
    /// their watts count, but they have no position, no section and no leg of their own. A second record of
    /// one lamp is left out.
    std::vector<PoleIx> aside;
    std::vector<double> aside_w, aside_pf;
    double current_a = 6.6;
    const Cable* cable = nullptr; ///< never null
    double cable_kv = 5;
    OrderFrom order_from = OrderFrom::given;
    double order_confidence_frac = 1;
};

/// One loop per string of the city, in the city's order (empty loops for parallel circuits and strings set
/// aside). Legs: straight distance from lamp to lamp and to the station, scaled to length_m where the file
/// gives it. Without a station the closing run from the last lamp to the first is halved between the two home
/// legs. Poles down: 0 W, jumpered, still in the loop. A lamp of unknown watts takes the median of its
/// string's known ones.
[[nodiscard]] std::vector<StringLoop> string_loops(const City& city, const Catalog& catalog);

struct StringState {
    int lamps = 0; ///< live
    double load_kw = 0, load_kva = 0, volts = 0, pf = 0, cable_w = 0;
    double cable_m = 0, new_cable_m = 0;
    std::vector<int> used; ///< places in StringLoop.cutbacks
};

/// State with the lamps for which live[i] != 0 (i = position - 1): energised loop by the cut-backs, phasor
/// sum; cable at 25 C. Poles down count neither as lamps nor as a reason to keep the loop; a cut-back is used
/// only where a lamp that burnt has left between its ends. Nothing left that burns: all zero.
/// @param ageing_frac  multiplies each lamp's watts and volts by 1 + ageing_frac
[[nodiscard]] StringState string_state(const StringLoop& loop, const std::vector<char>& live,
                                       double ageing_frac = 0);

} // namespace unstring
