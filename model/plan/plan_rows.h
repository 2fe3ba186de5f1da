#pragma once
// The rows of a plan as they stand in tables and changes: column names and values, both ways.

#include <string>
#include <string_view>

#include "model/plan/plan.h"

namespace unstring {

inline constexpr const char* kPlansTable = "plans";
inline constexpr const char* kPlanPolesTable = "plan_poles";
inline constexpr const char* kPlanUnitsTable = "plan_units";

[[nodiscard]] Cells settings_cells(const PlanSettings& settings);
[[nodiscard]] PlanSettings settings_from(const Cells& cells);

/// A pole's row; empty when nothing was decided, marked or locked there (such a row does not exist).
[[nodiscard]] Cells pole_cells(const PolePlan& pole);
[[nodiscard]] PolePlan pole_from(const Cells& cells);

[[nodiscard]] Cells unit_cells(const City& city, const StringUnit& unit);
/// The row's id within its plan: "string id|year".
[[nodiscard]] std::string unit_row_id(const City& city, const StringUnit& unit);
/// string and transformer stay not valid where the city no longer has them.
[[nodiscard]] StringUnit unit_from(const City& city, std::string_view row_id, const Cells& cells);

} // namespace unstring
