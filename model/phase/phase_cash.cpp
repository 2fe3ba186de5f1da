#include "model/phase/phase_cash.h"

#include "model/phase/duct_live.h"

#include <algorithm>
#include <map>
#include <numeric>

#include <tbb/parallel_for.h>

namespace unstring {

Cents YearCash::capital_sum() const { return std::accumulate(capital.begin(), capital.end(), Cents{0}); }

int ledger_last_year(const PlanSettings& settings) {
    return settings.first_year + std::max(settings.years, settings.horizon_years) - 1;
}

YearCash year_cash(const PlanSettings& settings, const std::vector<CashLine>& lines) {
    const auto years = static_cast<std::size_t>(ledger_last_year(settings) - settings.first_year + 1);
    YearCash cash{std::vector<Cents>(years, 0), std::vector<Cents>(years, 0), present_value(lines), true};
    for (const CashLine& line : lines) {
        const auto place = static_cast<std::size_t>(line.year - settings.first_year);
        (line.purse == Purse::capital ? cash.capital : cash.operating).at(place) += line.amount;
    }
    return cash;
}

CashBook::CashBook(const MoneyInput& input, const DecideResult& decide) : input_(input), decide_(decide) {
    plan_.settings = input.plan.settings;
    use(input.plan.settings);
}

void CashBook::use(const PlanSettings& settings) {
    if (settings == plan_.settings && !poles_.empty()) return;
    plan_.settings = settings;
    poles_.assign(std::max<std::size_t>(1, input_.city.poles.size()), {});
    spans_.assign(decide_.spans.size(), {});
    dug_spans_ = spans_;
    connections_.assign(input_.city.services.size(), {});
}

const YearCash* CashBook::find(const PoleAsk& ask) const {
    for (const Known& known : poles_[ask.pole.place()]) {
        if (known.choice != ask.choice) continue;
        if (ask.choice == Choice::keep || (known.year == ask.year && known.head == ask.head))
            return &known.cash;
    }
    return nullptr;
}

std::vector<CashLine> CashBook::work_out(const PoleAsk& ask) {
    OptionCost option = pole_option(input(), ask.pole, ask.choice, ask.year, ask.head);
    if (find(ask) != nullptr) return std::move(option.lines);
    YearCash cash = year_cash(plan_.settings, option.lines);
    cash.possible = option.possible;
    poles_[ask.pole.place()].push_back({ask.choice, ask.year, ask.head, std::move(cash)});
    return std::move(option.lines);
}

std::vector<std::vector<CashLine>> CashBook::lines_of(const std::vector<PoleAsk>& asks) {
    std::vector<std::vector<CashLine>> lines(asks.size());
    tbb::parallel_for(std::size_t{0}, asks.size(), [&](std::size_t i) { lines[i] = work_out(asks[i]); });
    return lines;
}

void CashBook::warm(const std::vector<PoleAsk>& asks) {
    std::map<PoleIx, std::vector<const PoleAsk*>> wanting; // one pole is worked out by one thread
    for (const PoleAsk& ask : asks)
        if (find(ask) == nullptr) wanting[ask.pole].push_back(&ask);
    std::vector<const std::vector<const PoleAsk*>*> rows;
    for (const auto& [pole, row] : wanting) rows.push_back(&row);
    tbb::parallel_for(std::size_t{0}, rows.size(), [&](std::size_t i) {
        for (const PoleAsk* ask : *rows[i])
            if (find(*ask) == nullptr) work_out(*ask);
    });
}

const YearCash& CashBook::pole(const PoleAsk& ask) {
    if (const YearCash* known = find(ask)) return *known;
    work_out(ask);
    return poles_[ask.pole.place()].back().cash;
}

const YearCash& CashBook::span(std::size_t place, int year, bool dug) {
    auto& known_years = (dug ? dug_spans_ : spans_)[place];
    for (const auto& [known, cash] : known_years)
        if (known == year) return cash;
    const CircuitSpan& span = decide_.spans[place];
    known_years.emplace_back(
        year, year_cash(plan_.settings, span_lines(input(), dug ? dug_span(span) : span, year)));
    return known_years.back().second;
}

const YearCash& CashBook::connection(ServiceIx service, int year) {
    auto& known_years = connections_[service.place()];
    for (const auto& [known, cash] : known_years)
        if (known == year) return cash;
    known_years.emplace_back(year, year_cash(plan_.settings, connection_lines(input(), service, year)));
    return known_years.back().second;
}

} // namespace unstring
