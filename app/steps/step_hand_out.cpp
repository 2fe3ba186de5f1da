// hand out: work orders by year, crew and string, as tables and on paper, and the plan's layers.

#include <algorithm>
#include <filesystem>

#include <fmt/format.h>

#include "app/steps/printer.h"
#include "app/steps/project_inside.h"
#include "geo/exports/order_tables.h"
#include "geo/exports/plan_layers.h"
#include "model/orders/survey.h"
#include "model/orders/work_order.h"

namespace unstring {
namespace {

Fault bad_option(std::string option, std::string found, std::string wanted) {
    return {FaultCode::bad_usage, "", 0, std::move(option), std::move(found), std::move(wanted),
            "Give another value"};
}

Expected<void> make_folder(const std::string& folder) {
    std::error_code failed;
    std::filesystem::create_directories(folder, failed);
    if (!failed && std::filesystem::is_directory(folder)) return {};
    return tl::make_unexpected(Fault{FaultCode::write_failed, folder, 0, "--to",
                                     failed ? failed.message() : "a file of that name",
                                     "a folder that can be written", "Name another folder"});
}

Expected<const Crew*> crew_of(const std::string& name) {
    static constexpr Crew kCrews[] = {Crew::line, Crew::civil, Crew::lighting, Crew::electric};
    if (name.empty()) return nullptr;
    for (const Crew& crew : kCrews)
        if (name == text_of(crew)) return &crew;
    return tl::make_unexpected(bad_option("--crew", name, "line, civil, lighting or electric"));
}

// One PDF a year and crew: what a foreman takes along.
Expected<void> print_all(const std::vector<WorkOrder>& orders, const HandOutOptions& options,
                         Printer& printer, HandOutReport& report, const Progress& progress) {
    for (std::size_t from = 0; from < orders.size();) {
        if (progress.is_cancelled())
            return tl::make_unexpected(Fault{FaultCode::cancelled, options.to, 0, "", "cancelled", "",
                                             "Files already written stay"});
        const auto end = static_cast<std::size_t>(
            std::find_if(orders.begin() + static_cast<std::ptrdiff_t>(from), orders.end(),
                         [&](const WorkOrder& order) {
                             return order.year != orders[from].year || order.crew != orders[from].crew;
                         }) -
            orders.begin());
        const std::string path = (std::filesystem::path(options.to) /
                                  fmt::format("{}-{}.pdf", orders[from].year, text_of(orders[from].crew)))
                                     .string();
        const std::vector<WorkOrder> group(orders.begin() + static_cast<std::ptrdiff_t>(from),
                                           orders.begin() + static_cast<std::ptrdiff_t>(end));
        if (auto printed = printer.print_orders(group, path, options.paper); !printed) return printed;
        report.files.push_back(path);
        progress.at(static_cast<double>(end) / static_cast<double>(orders.size()));
        from = end;
    }
    return {};
}

template <class More>
Expected<void> take_files(HandOutReport& report, More more) {
    if (!more) return tl::make_unexpected(more.error());
    report.files.insert(report.files.end(), more->begin(), more->end());
    return {};
}

} // namespace

Expected<HandOutReport> OpenProject::run_hand_out(const HandOutOptions& options, Printer* printer,
                                                  const Progress& progress) {
    Inside& inside = *inside_;
    if (auto may = inside.may_write(); !may) return tl::make_unexpected(may.error());
    if (auto ready = inside.ready_for(options.survey ? Step::phase : Step::hand_out); !ready)
        return tl::make_unexpected(ready.error());
    const auto crew = crew_of(options.crew);
    if (!crew) return tl::make_unexpected(crew.error());
    const Plan& plan = inside.plan;
    if (options.year && (*options.year < plan.settings.first_year || *options.year > plan.last_year()))
        return tl::make_unexpected(
            bad_option("--year", std::to_string(*options.year),
                       fmt::format("{} to {}", plan.settings.first_year, plan.last_year())));
    if (auto made = make_folder(options.to); !made) return tl::make_unexpected(made.error());

    const MoneyInput input = inside.money_input(plan);
    const PhaseResult none;
    const PhaseResult& phase = inside.view->phase ? *inside.view->phase : none;
    auto orders = options.survey ? survey_orders(input, *inside.decide)
                                 : work_orders(input, *inside.decide, phase, options.year.value_or(0), *crew);
    std::stable_sort(orders.begin(), orders.end(), [](const WorkOrder& a, const WorkOrder& b) {
        return std::pair(a.year, a.crew) < std::pair(b.year, b.crew);
    });

    HandOutReport report;
    if (auto done = take_files(report, write_order_tables(options.to, inside.city, orders)); !done)
        return tl::make_unexpected(done.error());
    if (!options.survey)
        if (auto done =
                take_files(report, export_layers(options.to, inside.city, plan, *inside.decide, phase));
            !done)
            return tl::make_unexpected(done.error());
    if (printer != nullptr)
        if (auto done = print_all(orders, options, *printer, report, progress); !done)
            return tl::make_unexpected(done.error());
    for (const WorkOrder& order : orders)
        report.orders.push_back(
            {order.id, text_of(order.crew), order.year, static_cast<int>(order.poles.size()), order.hours});
    if (!options.survey) {
        const std::string hash = inside.hash_of(Step::hand_out);
        auto written = inside.database->transaction(
            [&] { write_step_run(*inside.database, Step::hand_out, plan.settings.name, hash, ""); });
        if (!written) return tl::make_unexpected(written.error());
        inside.show();
    }
    return report;
}

} // namespace unstring
