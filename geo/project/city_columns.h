#pragma once
// The columns of the gathered tables.

#include "geo/project/record_columns.h"
#include "model/catalog/prices.h"

namespace unstring {

[[nodiscard]] const std::vector<Column<Pole>>& pole_columns();
[[nodiscard]] const std::vector<Column<SeriesString>>& string_columns();
[[nodiscard]] const std::vector<Column<Transformer>>& transformer_columns();
[[nodiscard]] const std::vector<Column<CutBack>>& cutback_columns();
[[nodiscard]] const std::vector<Column<ServicePoint>>& service_columns();
[[nodiscard]] const std::vector<Column<Street>>& street_columns();
[[nodiscard]] const std::vector<Column<CanopyArea>>& canopy_columns();
[[nodiscard]] const std::vector<Column<Obstacle>>& obstacle_columns();
[[nodiscard]] const std::vector<Column<YearBudget>>& budget_columns();
[[nodiscard]] const std::vector<Column<PriceRow>>& price_columns();

} // namespace unstring
