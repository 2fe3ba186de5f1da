#pragma once
// The word for how a string's load sits on its transformer.

namespace unstring {

enum class Verdict { open, over, tight, good, light, low, none };

/// open: no transformer; none: no lamps; over > 1; tight > .9; good .5 to .9; light min_frac to .5; low <
/// min_frac.
[[nodiscard]] Verdict verdict_of(bool has_transformer, int lamps, double loading_frac, double min_frac);
[[nodiscard]] const char* text_of(Verdict verdict);

} // namespace unstring
