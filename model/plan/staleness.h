#pragma once
// The six steps, and what the project knows of each one.

#include <array>
#include <string>

namespace unstring {

enum class Step { gather, vet, shade, decide, phase, hand_out };
inline constexpr std::array<Step, 6> kSteps = {Step::gather, Step::vet,   Step::shade,
                                               Step::decide, Step::phase, Step::hand_out};

enum class StepStanding { not_yet, up_to_date, stale, stopped, by_hand };

struct StepState {
    StepStanding standing = StepStanding::not_yet;
    int errors = 0, warnings = 0; ///< findings of its last run
    std::string at;               ///< local time of its last run, ISO 8601
};

[[nodiscard]] const char* text_of(Step step); ///< "gather" .. "hand-out"

} // namespace unstring
