#pragma once
// The evaluation of a plan, apart from any solver: what does not depend on years is made once and kept, so
// that a boundary can be dragged. Comes in: city, prices, decide's circuits; then plans of that city. Goes
// out: PhaseResult.

#include <memory>

#include "model/decide/decide_result.h"
#include "model/money/pole_option.h"
#include "model/phase/phase_result.h"
#include "model/plan/plan.h"

namespace unstring {

class PhaseDesk {
public:
    /// All by reference; input (its plan apart) and decide outlive the desk.
    PhaseDesk(const MoneyInput& input, const DecideResult& decide);
    ~PhaseDesk();
    PhaseDesk(const PhaseDesk&) = delete;
    PhaseDesk& operator=(const PhaseDesk&) = delete;

    /// As evaluate_phase. Not from two threads at once. @param with_lines  false leaves PhaseResult::lines
    /// empty: the way while a boundary is under the hand
    [[nodiscard]] PhaseResult evaluate(const Plan& plan, bool with_lines);

private:
    struct Inside;
    std::unique_ptr<Inside> inside_;
};

} // namespace unstring
