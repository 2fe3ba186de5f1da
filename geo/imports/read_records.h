#pragma once
// One function a table: its rows into records. Each keeps every row that has an id, counts the rest, and
// leaves what is wrong with the records to vet; only what could not be read is a finding here.

#include "geo/imports/columns.h"
#include "geo/imports/gathered.h"
#include "geo/imports/places.h"
#include "geo/imports/table.h"

namespace unstring {

struct ReadyTable { ///< a table whose columns and coordinates are understood
    Table table;
    Columns columns;
    Placed placed;
};

// Each replaces its table in `out` and adds its findings, notes and row count.
// @fault crs_unknown, column_missing (the id), file_broken
Expected<void> read_poles(const ReadyTable& from, const Progress& progress, Gathered& out);
Expected<void> read_circuits(const ReadyTable& from, Gathered& out);
Expected<void> read_transformers(const ReadyTable& from, Gathered& out);
Expected<void> read_cutbacks(const ReadyTable& from, Gathered& out);
Expected<void> read_services(const ReadyTable& from, Gathered& out);
Expected<void> read_streets(const ReadyTable& from, Gathered& out);
Expected<void> read_canopy_areas(const ReadyTable& from, Gathered& out);
Expected<void> read_obstacles(const ReadyTable& from, Gathered& out);
Expected<void> read_climate(const ReadyTable& from, Gathered& out);
Expected<void> read_budget(const ReadyTable& from, Gathered& out);
Expected<void> read_prices(const ReadyTable& from, Gathered& out);
Expected<void> read_marks(const ReadyTable& from, Gathered& out);

/// Walks the rows of a table: for each row with a text in its id field `take` makes and keeps a record; rows
/// without are `row-broken`. Sets the row count.
template <class Take>
void read_rows(TableReader& in, std::string_view id_field, Gathered& out, const Take& take) {
    const Table& table = in.table();
    RowCount& count = out.rows[table.name];
    count = {table.read, 0, 0};
    for (std::size_t row = 0; row < table.rows(); ++row) {
        in.go_to(row);
        in.set_record({});
        const std::string_view id = id_field.empty() ? std::string_view("row") : in.cell(id_field);
        if (id.empty()) {
            in.add_finding("row-broken", in.shown(id_field) + " blank", "an id",
                           "give the record its id; the row is left out until then");
            continue;
        }
        if (!id_field.empty()) in.set_record(id);
        if (take()) ++count.kept;
    }
    count.set_aside = count.read - count.kept;
}

/// @fault column_missing naming the columns that there are
[[nodiscard]] Expected<void> need_column(const ReadyTable& from, std::string_view field);

} // namespace unstring
