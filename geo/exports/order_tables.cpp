#include "geo/exports/order_tables.h"

#include <filesystem>
#include <fstream>

#include <fmt/format.h>

#include "geo/exports/csv_cell.h"

namespace unstring {
namespace {

/// Written beside its place and moved there, so that no reader meets half a table.
Expected<void> write_whole(const std::string& path, const std::string& content) {
    const std::string part = path + ".part";
    const auto failed = [&](std::string found) {
        std::error_code ignored;
        std::filesystem::remove(part, ignored);
        return tl::make_unexpected(Fault{FaultCode::write_failed,
                                         path,
                                         0,
                                         {},
                                         std::move(found),
                                         "a file that can be written",
                                         "check the folder and the space left"});
    };
    std::ofstream stream(part, std::ios::binary | std::ios::trunc);
    stream << content;
    stream.close();
    if (!stream) return failed("a write that stopped");
    std::error_code error;
    std::filesystem::rename(part, path, error);
    if (error) return failed(error.message());
    return {};
}

std::string joined(const std::vector<std::string>& words) {
    std::string text;
    for (const std::string& word : words) text += (text.empty() ? "" : " ") + word;
    return text;
}

std::string orders_table(const std::vector<WorkOrder>& orders) {
    std::string text = csv_row({"order_id",
                                "year",
                                "crew",
                                "string_id",
                                "place",
                                "pole_id",
                                "street",
                                "task",
                                "head",
                                "warning",
                                "planned_v",
                                "order_hours",
                                "transformer_id",
                                "planned_volts_before",
                                "planned_volts_after",
                                "lamp_volts",
                                "open_circuit_v",
                                "open_circuit_from",
                                "lights_due_on",
                                "after_orders",
                                "done",
                                "date",
                                "order",
                                "amps",
                                "volts",
                                "insulation_mohm",
                                "duct_found",
                                "head_fitted",
                                "serial",
                                "battery_date",
                                "note"});
    for (const WorkOrder& order : orders) {
        const bool has_open = order.open_circuit_v > 0, is_line = has_open && order.crew == Crew::line;
        const auto volts = [&](double value) {
            return is_line ? fmt::format("{:.1f}", value) : std::string();
        };
        const auto row = [&](std::size_t place, const OrderPole& pole) {
            text += csv_row({order.id,
                             fmt::format("{}", order.year),
                             text_of(order.crew),
                             order.string_id,
                             place == 0 ? "" : fmt::format("{}", place),
                             pole.id,
                             pole.street,
                             pole.task,
                             pole.head,
                             pole.warning,
                             pole.volts > 0 ? fmt::format("{:.2f}", pole.volts) : "",
                             fmt::format("{:.2f}", order.hours),
                             order.unit_id,
                             volts(order.planned_volts_before),
                             volts(order.planned_volts_after),
                             volts(order.lamp_volts),
                             has_open ? fmt::format("{:.0f}", order.open_circuit_v) : "",
                             !has_open                        ? ""
                             : order.open_circuit_is_estimate ? "estimate"
                                                              : "nameplate",
                             order.switch_on_time,
                             joined(order.after),
                             "",
                             "",
                             "",
                             "",
                             "",
                             "",
                             "",
                             "",
                             "",
                             "",
                             ""});
        };
        if (order.poles.empty()) {
            OrderPole none;
            none.task = order.title;
            row(0, none);
        }
        for (std::size_t i = 0; i < order.poles.size(); ++i) row(i + 1, order.poles[i]);
    }
    return text;
}

std::string steps_table(const std::vector<WorkOrder>& orders) {
    std::string text = csv_row({"order_id", "step", "text", "hold_point", "caution"});
    for (const WorkOrder& order : orders)
        for (std::size_t i = 0; i < order.steps.size(); ++i)
            text +=
                csv_row({order.id, fmt::format("{}", i + 1), order.steps[i].text,
                         order.steps[i].hold_point ? "yes" : "no", order.steps[i].caution ? "yes" : "no"});
    return text;
}

std::string materials_table(const std::vector<WorkOrder>& orders) {
    std::string text = csv_row({"order_id", "year", "crew", "material", "unit", "quantity"});
    for (const WorkOrder& order : orders)
        for (const Material& material : order.materials)
            text += csv_row({order.id, fmt::format("{}", order.year), text_of(order.crew), material.what,
                             material.unit, fmt::format("{:.10g}", material.quantity)});
    return text;
}

} // namespace

Expected<std::vector<std::string>> write_order_tables(const std::string& folder, const City& /*city*/,
                                                      const std::vector<WorkOrder>& orders) {
    std::vector<std::string> files;
    const std::pair<const char*, std::string> tables[] = {{"orders.csv", orders_table(orders)},
                                                          {"order-steps.csv", steps_table(orders)},
                                                          {"materials.csv", materials_table(orders)}};
    for (const auto& [name, content] : tables) {
        const std::string path = (std::filesystem::path(folder) / name).string();
        if (auto written = write_whole(path, content); !written) return tl::make_unexpected(written.error());
        files.push_back(path);
    }
    return files;
}

} // namespace unstring
