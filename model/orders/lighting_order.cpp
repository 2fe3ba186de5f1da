#include <algorithm>
#include <cmath>

#include <fmt/format.h>

#include "model/money/hours.h"
#include "model/money/new_light.h"
#include "model/orders/crew_orders.h"
#include "model/orders/step_texts.h"

namespace unstring {
namespace {

/// "solar head SOL-M, facing 192 deg, tilt 15 deg": what goes on the pole, bearings against true north.
std::string solar_task(const OrderFacts& facts, PoleIx pole, const std::string& head_name) {
    std::string text = "solar head " + head_name;
    const PoleShade* shade = facts.input.shade.find(pole);
    if (shade != nullptr) {
        const double bearing = std::fmod(shade->bearing_deg + facts.input.city.convergence_deg + 720, 360);
        text += fmt::format(", panel facing {:.0f} deg true", bearing);
    }
    if (const Head* head = find_head(facts.input.catalog, head_name))
        text += fmt::format(", tilt {:.0f} deg", head->tilt_deg);
    return text;
}

/// Head of the plan, else the one that the shade step found best.
std::string head_of(const OrderFacts& facts, PoleIx pole) {
    if (!facts.plan(pole).head.empty()) return facts.plan(pole).head;
    const PoleShade* shade = facts.input.shade.find(pole);
    return shade == nullptr || shade->best < 0 ? std::string("not chosen")
                                               : shade->heads[static_cast<std::size_t>(shade->best)].head;
}

} // namespace

std::optional<WorkOrder> lighting_order(const OrderFacts& facts, const YearJob& job) {
    if (job.poles.empty()) return std::nullopt;
    WorkOrder order = order_head(facts, job, Crew::lighting);
    int solar = 0, led = 0;
    for (const PoleIx pole : job.poles) {
        const Choice choice = facts.plan(pole).choice;
        order.hours += pole_hours(facts.input.prices, facts.pole(pole), choice, job.year).lighting;
        if (choice == Choice::solar) {
            const std::string head = head_of(facts, pole);
            order.poles.push_back(order_pole(facts, job, pole, solar_task(facts, pole, head)));
            order.poles.back().head = head;
            add_material(order, "solar head " + head, "each", 1);
            ++solar;
        } else {
            const NewLight light = new_light(facts.input.catalog, facts.pole(pole));
            order.poles.push_back(order_pole(
                facts, job, pole, fmt::format("LED luminaire {}, {:.0f} W", light.name, light.led_w)));
            add_material(order, "LED luminaire " + light.name, "each", 1);
            ++led;
        }
    }
    order.title = fmt::format("New lights on string {}: {} solar, {} LED", order.string_id, solar, led);
    order.steps = lighting_steps(solar > 0, led > 0);
    const bool live = std::any_of(order.poles.begin(), order.poles.end(), [](const OrderPole& row) {
        return row.warning.find(kLiveBase) != std::string::npos;
    });
    order.cautions = cautions_for(Crew::lighting, false, live);
    order.as_found = {{"poles that failed the look-over", ""}, {"torque", "Nm"}};
    return order;
}

} // namespace unstring
