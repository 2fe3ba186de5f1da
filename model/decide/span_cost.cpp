#include "model/decide/span_cost.h"

#include "model/catalog/prices.h"
#include "model/money/works.h"

namespace unstring {
namespace {

/// Lines of one piece of work, with the design share at the end.
class Lines {
public:
    Lines(const MoneyInput& input, int year) : input_(input), year_(year) {}

    void add(const char* what, double quantity, double unit_price) {
        if (quantity > 0)
            lines_.push_back(cash_line(input_.plan, what, year_, quantity, unit_price, Purse::capital));
    }
    void add(const char* what, double quantity, std::string_view item) { add(what, quantity, at(item)); }
    [[nodiscard]] double at(std::string_view item) const { return input_.prices.at(item, year_); }
    void add_dig(Surface surface, double metres, const char* verge, const char* paved) {
        if (surface == Surface::paved)
            add(paved, metres, "trench_paved");
        else
            add(verge, metres, "trench_soft");
    }
    std::vector<CashLine> with_design() {
        Cents sum = 0;
        for (const CashLine& line : lines_) sum += line.amount;
        if (sum != 0) add("design and supervision", at("design_frac"), to_dollars(sum));
        return std::move(lines_);
    }

private:
    const MoneyInput& input_;
    int year_;
    std::vector<CashLine> lines_;
};

/// Where the conduit is sound it is pulled (wire of AWG 8 in the price), where it is bad it is dug: each at
/// its chance.
void add_conduit(const MoneyInput& input, const CircuitSpan& span, int year, Lines& lines) {
    const double sound = duct_sound_frac(input.prices, input.city.poles[span.duct_to.place()].duct, year);
    const double wire = lines.at(wire_item(span.awg));
    lines.add("pull in old conduit, m, chance that it is sound", sound * span.length_m, "pull");
    lines.add("larger wire in old conduit, m", sound * span.length_m, wire - lines.at(wire_item(8)));
    lines.add_dig(span.surface, (1 - sound) * span.length_m,
                  "trench in verge, m, chance that the conduit is bad",
                  "trench in pavement, m, chance that the conduit is bad");
    lines.add("wire, m, chance that the conduit is bad", (1 - sound) * span.length_m, wire);
}

} // namespace

std::vector<CashLine> span_lines(const MoneyInput& input, const CircuitSpan& span, int year) {
    Lines lines(input, year);
    switch (span.kind) {
    case SpanKind::trench_verge:
    case SpanKind::trench_paved:
        lines.add_dig(span.kind == SpanKind::trench_paved ? Surface::paved : Surface::verge, span.length_m,
                      "trench in verge, m", "trench in pavement, m");
        lines.add("wire, m", span.length_m, wire_item(span.awg));
        break;
    case SpanKind::bore:
        lines.add("bore, m", span.length_m, "bore");
        lines.add("bore, set-up", 1, "bore_setup");
        lines.add("wire, m", span.length_m, wire_item(span.awg));
        break;
    case SpanKind::conduit:
        add_conduit(input, span, year, lines);
        break;
    case SpanKind::aerial:
        lines.add("aerial span, m", span.length_m, "aerial_span");
        lines.add("larger aerial wire, m", span.length_m,
                  lines.at(wire_item(span.awg)) - lines.at(wire_item(8)));
        break;
    case SpanKind::tap:
        lines.add("tap of the secondary", 1, "tap");
        break;
    case SpanKind::service:
        break;
    }
    lines.add("pull box", span.boxes, "pull_box");
    return lines.with_design();
}

std::vector<CashLine> connection_lines(const MoneyInput& input, ServiceIx service, int year) {
    if (!service.is_valid()) return {};
    const bool is_new = input.city.services[service.place()].kind == ServiceKind::candidate;
    Lines capital(input, year);
    if (is_new)
        capital.add("new service", 1, "service_new");
    else
        capital.add("connection to an existing circuit or service", 1, "circuit_end");
    std::vector<CashLine> lines = capital.with_design();
    const int last = input.plan.settings.first_year + input.plan.settings.horizon_years - 1;
    for (int y = year; is_new && y <= last; ++y)
        lines.push_back(cash_line(input.plan, "customer charge, months", y, 12,
                                  input.prices.at("service_charge", y), Purse::operating));
    return lines;
}

} // namespace unstring
