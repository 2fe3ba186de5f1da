#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {

Expected<void> read_marks(const ReadyTable& from, Gathered& out) {
    if (auto has_id = need_column(from, "pole_id"); !has_id) return has_id;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const TextField id(in, "pole_id"), who(in, "who"), note(in, "note");
    const WordField<Choice> mark(in, "mark", "keep, rewire, solar or blank");
    const YesNoField lock(in, "lock");
    const NumberField year(in, "year", 1900, 2300);
    out.marks.clear();
    read_rows(in, "pole_id", out, [&] {
        out.marks.push_back({id(), mark().value_or(Choice::undecided), lock().value_or(false), year.whole(),
                             who.unless_blank(), note(), in.from()});
        return true;
    });
    return {};
}

} // namespace unstring
