#include "model/series/string_load.h"

#include <complex>
#include <stdexcept>

#include "model/catalog/cables.h"

namespace unstring {

StringLoad string_load(double current_a, const Cable& cable, double cable_m, double cable_c,
                       std::span<const double> lamp_w, std::span<const double> lamp_pf, double ageing_frac) {
    if (!(current_a > 0) || lamp_w.size() != lamp_pf.size())
        throw std::logic_error("string_load: a current over 0 and one power factor per lamp are wanted");
    const double km = cable_m / 1000;
    const double cable_ohm = cable_ohm_per_km_at(cable, cable_c) * km;
    std::complex<double> lamps_v;
    for (std::size_t i = 0; i < lamp_w.size(); ++i) {
        const double pf = lamp_pf[i];
        if (!(pf > 0) || pf > 1) throw std::logic_error("string_load: a power factor outside (0, 1]");
        const double real_v = lamp_w[i] / current_a;
        lamps_v += std::complex<double>(real_v, real_v * std::sqrt(1 - pf * pf) / pf);
    }
    const std::complex<double> volts =
        current_a * std::complex<double>(cable_ohm, cable.x_ohm_per_km * km) + lamps_v * (1 + ageing_frac);

    StringLoad load;
    load.volts = std::abs(volts);
    load.load_kw = current_a * volts.real() / 1000;
    load.load_kva = current_a * load.volts / 1000;
    load.pf = load.load_kva > 0 ? load.load_kw / load.load_kva : 1;
    load.cable_w = current_a * current_a * cable_ohm;
    return load;
}

const Cable& usual_string_cable() {
    static const Cable kCable = [] {
        Catalog catalog;
        catalog.cables = default_cables();
        return *find_cable(catalog, 8, Metal::copper);
    }();
    return kCable;
}

PrimarySide primary_side(double rated_kw, double load_kw) {
    constexpr double kFixedLossFrac = 0.04;
    constexpr double kFullLoadPf = 0.78;
    PrimarySide primary;
    primary.kva = (1 + kFixedLossFrac) * rated_kw / kFullLoadPf;
    primary.kw = load_kw + kFixedLossFrac * rated_kw;
    primary.pf = primary.kva > 0 ? primary.kw / primary.kva : 0;
    return primary;
}

} // namespace unstring
