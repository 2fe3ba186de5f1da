#include "model/plan/staleness.h"

namespace unstring {

const char* text_of(Step step) {
    switch (step) {
    case Step::gather:
        return "gather";
    case Step::vet:
        return "vet";
    case Step::shade:
        return "shade";
    case Step::decide:
        return "decide";
    case Step::phase:
        return "phase";
    case Step::hand_out:
        return "hand-out";
    }
    return "";
}

} // namespace unstring
