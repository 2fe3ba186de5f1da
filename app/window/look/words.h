#pragma once
// What the window says: numbers and states in the user's units and plain words.

#include <QString>

#include "app/steps/open_project.h"

namespace unstring {

[[nodiscard]] inline QString to_q(const std::string& text) { return QString::fromStdString(text); }
[[nodiscard]] inline QString to_q(const char* text) { return QString::fromUtf8(text); }

[[nodiscard]] QString money_text(double dollars);     ///< "$9,840", "-$120"
[[nodiscard]] QString thousands_text(double dollars); ///< "241" for 241 000 dollars, "0.8" under ten
[[nodiscard]] QString number_text(double value, int decimals = 0); ///< grouped: "1,234.5"; "-" for NaN
[[nodiscard]] QString percent_text(double fraction);               ///< "97 %"
[[nodiscard]] QString count_text(long count, const QString& one,
                                 const QString& many); ///< "1 lamp", "3 lamps"

[[nodiscard]] QString choice_word(Choice choice);    ///< "not decided", "keep", "rewire", "solar"
[[nodiscard]] QString verdict_word(Verdict verdict); ///< "good" .. ; none = "ends"
[[nodiscard]] QString step_word(Step step);          ///< "hand out"
/// The state under a step's word: "up to date", "3 warnings", "stopped by 2 errors".
[[nodiscard]] QString standing_text(Step step, const StepState& state);
[[nodiscard]] QString service_word(ServiceKind kind);
[[nodiscard]] QString severity_word(Severity severity);

[[nodiscard]] bool is_trouble(Verdict verdict); ///< open, over, low

/// "S-04, lamp 18 of 27"; the circuit alone where there is no wiring order; "no circuit" without one.
[[nodiscard]] QString lamp_text(const ProjectView& view, PoleIx pole);
/// "String S-04 in 2029: 41 lamps, 2.21 kV, 14.6 kVA on a 15 kW transformer (97 %, tight)."
[[nodiscard]] QString string_sentence(const ProjectView& view, const StringYear& state);
/// One finding as a line: what was found, what was wanted, what to do.
[[nodiscard]] QString finding_text(const Finding& finding);
/// The cautions that stand wherever orders are opened.
[[nodiscard]] QString standing_cautions();

} // namespace unstring
