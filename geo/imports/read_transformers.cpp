#include <algorithm>
#include <functional>

#include "geo/imports/read_records.h"
#include "geo/imports/table_reader.h"

namespace unstring {
namespace {

struct UnitFields {
    explicit UnitFields(TableReader& in)
        : id(in, "transformer_id"), taps(in, "taps"), made(in, "made"), tested(in, "tested"),
          string(in, "string_id"), rated_kw(in, "rated_kw", 0.1, 1000), output_a(in, "output_a", 0.1, 100),
          min_frac(in, "min_frac", 0, 1), open_v(in, "open_v", 0, 1e5), primary_v(in, "primary_v", 0, 1e5),
          build(in, "build", "moving-coil or static",
                "movingcoil=moving-coil mc=moving-coil solid-state=static resonant=static"),
          mount(in, "mount", "pole, pad or vault",
                "polemount=pole pole-mount=pole padmount=pad pad-mount=pad underground=vault"),
          oil(in, "oil", "none, mineral, pcb or unknown", "dry=none askarel=pcb"),
          state(in, "state", "in-service, spare or scrapped",
                "inservice=in-service active=in-service in-use=in-service scrap=scrapped") {}

    TextField id, taps, made, tested, string;
    NumberField rated_kw, output_a, min_frac, open_v, primary_v;
    WordField<Build> build;
    WordField<Mount> mount;
    WordField<Oil> oil;
    WordField<UnitState> state;
};

constexpr double kSmallestTap = 0.1;

/// "1;.9;.75" or "100/90/75"; commas part the values only where nothing else does.
std::optional<std::vector<double>> taps_of(std::string cell) {
    std::vector<double> taps;
    const bool has_other = cell.find_first_of(";/|") != std::string::npos;
    for (char& c : cell)
        if (c == '/' || c == '|' || c == ' ' || (c == ',' && !has_other)) c = ';';
    for (std::size_t at = 0; at <= cell.size();) {
        const std::size_t end = std::min(cell.find(';', at), cell.size());
        const std::string word = cell.substr(at, end - at);
        at = end + 1;
        if (word.empty() || word == "%") continue;
        const std::string_view digits = std::string_view(word).substr(0, word.find('%'));
        const auto value = read_number(
            digits, digits.find(',') == std::string_view::npos ? DecimalMark::point : DecimalMark::comma);
        if (!value) return std::nullopt;
        const double tap = *value > 1 ? *value / 100 : *value;
        if (tap < kSmallestTap || tap > 1) return std::nullopt;
        taps.push_back(tap);
    }
    taps.push_back(1);
    std::sort(taps.begin(), taps.end(), std::greater<>());
    taps.erase(std::unique(taps.begin(), taps.end()), taps.end());
    return taps;
}

std::vector<double> read_taps(TableReader& in, const std::string& cell) {
    if (is_blank_cell(cell)) return {1};
    if (auto taps = taps_of(cell)) return *taps;
    in.add_finding("number-unreadable", in.shown("taps") + " \"" + cell.substr(0, 40) + "\"",
                   "fractions such as 1;.9;.75", "mend the cell; only the full tap is taken until then");
    return {1};
}

Transformer read_unit(TableReader& in, const UnitFields& fields) {
    Transformer unit;
    unit.id = fields.id();
    unit.rated_kw = fields.rated_kw().value_or(0);
    unit.output_a = fields.output_a();
    unit.min_frac = fields.min_frac();
    unit.taps = read_taps(in, fields.taps());
    unit.build = fields.build().value_or(Build::moving_coil);
    unit.open_v = fields.open_v();
    unit.primary_v = fields.primary_v();
    unit.mount = fields.mount();
    unit.made = read_date(fields.made());
    unit.tested = read_date(fields.tested());
    unit.oil = fields.oil().value_or(Oil::unknown);
    const std::string string = fields.string.unless_blank();
    if (!string.empty()) unit.strings_given.push_back(string);
    unit.state = fields.state().value_or(string.empty() ? UnitState::spare : UnitState::in_service);
    unit.from = in.from();
    return unit;
}

/// A second row of one unit that names another string: the unit has two loops.
bool is_second_loop(const Transformer& first, const Transformer& row) {
    return first.id == row.id && first.strings_given.size() == 1 && row.strings_given.size() == 1 &&
           first.strings_given != row.strings_given && first.rated_kw == row.rated_kw &&
           first.output_a == row.output_a;
}

} // namespace

Expected<void> read_transformers(const ReadyTable& from, Gathered& out) {
    if (auto has_id = need_column(from, "transformer_id"); !has_id) return has_id;
    TableReader in(from.table, from.columns, out.findings, out.notes);
    const UnitFields fields(in);
    auto& units = out.city.transformers;
    units.clear();
    read_rows(in, "transformer_id", out, [&] {
        Transformer row = read_unit(in, fields);
        const auto first = std::find_if(units.begin(), units.end(),
                                        [&](const Transformer& unit) { return is_second_loop(unit, row); });
        if (first != units.end())
            first->strings_given.push_back(row.strings_given.front());
        else
            units.push_back(std::move(row));
        return true;
    });
    return {};
}

} // namespace unstring
