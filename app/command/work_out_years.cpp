#include "app/command/work_out_years.h"

#include <algorithm>
#include <memory>

#include <fmt/format.h>

#include "app/command/work_out_input.h"
#include "model/phase/years_form.h"

namespace unstring {
namespace {

constexpr int kSearchRounds = 4000;
constexpr double kMostMoney = 1e12;

/// Branches of the exact search: all that it takes on small cases, the relaxation alone on large ones.
int branches_for(const YearsForm& form) {
    std::size_t size = 0;
    for (const YearsFormString& string : form.strings)
        size += string.load.size() * static_cast<std::size_t>(form.years);
    return size <= 200 ? 5000 : (size <= 1500 ? 40 : 1);
}

void want_count(JsonFields& fields, std::string_view key, std::size_t found, std::size_t wanted) {
    if (found != wanted)
        fields.refuse(key, fmt::format("{} values", found), fmt::format("{} values", wanted),
                      "one value each");
}

void read_owned(JsonFields& fields, YearsForm& form) {
    const nlohmann::json& rows = fields.raw("unitsOwned");
    if (!rows.is_array() || rows.size() != static_cast<std::size_t>(form.years)) {
        fields.refuse("unitsOwned", rows.is_array() ? fmt::format("{} rows", rows.size()) : "no list",
                      fmt::format("{} rows of {} numbers", form.years, form.ratings.size()),
                      "one row a year");
        return;
    }
    for (const auto& row : rows) {
        const bool fits = row.is_array() && row.size() == form.ratings.size() &&
                          std::all_of(row.begin(), row.end(), [](const auto& cell) {
                              return cell.is_number() && cell.template get<double>() >= 0 &&
                                     cell.template get<double>() <= 1e6;
                          });
        if (!fits) {
            fields.refuse("unitsOwned", row.dump().substr(0, 60),
                          fmt::format("{} numbers from 0", form.ratings.size()),
                          "one number for each rating");
            return;
        }
        form.units_owned.push_back(row.get<std::vector<double>>());
    }
}

std::optional<Fault> read_strings(JsonFields& fields, const std::string& path, YearsForm& form) {
    const nlohmann::json& rows = fields.raw("strings");
    if (!rows.is_array() || rows.empty() || rows.size() > 1000) {
        fields.refuse("strings", rows.is_array() ? fmt::format("{} strings", rows.size()) : "no list",
                      "a list of 1 to 1000 strings", "write [{..}]");
        return fields.fault();
    }
    for (std::size_t s = 0; s < rows.size(); ++s) {
        JsonFields row(rows[s], path, fmt::format("strings[{}]", s));
        row.only({"ratingIndex", "fixedKeep", "load", "capital", "hours", "keep"});
        YearsFormString string;
        string.rating_index = static_cast<int>(
            row.integer("ratingIndex", 0, std::max(0L, static_cast<long>(form.ratings.size()) - 1)));
        string.fixed_keep = row.number("fixedKeep", 0, kMostMoney);
        string.load = row.numbers("load", 0, 1e6);
        string.capital = row.numbers("capital", 0, kMostMoney);
        string.hours = row.numbers("hours", 0, 1e9);
        string.keep = row.numbers("keep", 0, kMostMoney);
        if (!row.fault()) {
            if (string.load.empty() || string.load.size() > 100)
                row.refuse("load", fmt::format("{} sections", string.load.size()), "1 to 100 sections",
                           "give each section's load");
            want_count(row, "capital", string.capital.size(), string.load.size());
            want_count(row, "hours", string.hours.size(), string.load.size());
            want_count(row, "keep", string.keep.size(), string.load.size());
        }
        if (row.fault()) return row.fault();
        form.strings.push_back(std::move(string));
    }
    return std::nullopt;
}

Expected<YearsForm> read_form(const nlohmann::json& json, const std::string& path) {
    JsonFields fields(json, path);
    fields.only({"T", "discount", "keepGrowth", "minfrac", "mobilisationCost", "mobilisationHours",
                 "swapCost", "swapHours", "buyCost", "spareFraction", "ratings", "budget", "hours",
                 "unitsOwned", "strings"});
    YearsForm form;
    form.years = static_cast<int>(fields.integer("T", 1, 60));
    form.discount = fields.number("discount", -0.5, 1);
    form.keep_growth = fields.number("keepGrowth", -0.5, 1);
    form.min_frac = fields.number("minfrac", 0, 1);
    form.mobilisation_cost = fields.number("mobilisationCost", 0, kMostMoney);
    form.mobilisation_hours = fields.number("mobilisationHours", 0, 1e9);
    form.swap_cost = fields.number("swapCost", 0, kMostMoney);
    form.swap_hours = fields.number("swapHours", 0, 1e9);
    form.buy_cost = fields.number("buyCost", 0, kMostMoney);
    form.spare_fraction = fields.number("spareFraction", 0, 100);
    form.ratings = fields.numbers("ratings", 1e-6, 1e6);
    form.budget = fields.numbers("budget", 0, kMostMoney);
    form.hours = fields.numbers("hours", 0, 1e9);
    if (!fields.fault()) {
        want_count(fields, "budget", form.budget.size(), static_cast<std::size_t>(form.years));
        want_count(fields, "hours", form.hours.size(), static_cast<std::size_t>(form.years));
        if (form.ratings.empty() || form.ratings.size() > 40)
            fields.refuse("ratings", fmt::format("{} values", form.ratings.size()), "1 to 40 ratings",
                          "list the classes");
    }
    if (!fields.fault()) read_owned(fields, form);
    if (fields.fault()) return tl::unexpected(*fields.fault());
    if (const auto fault = read_strings(fields, path, form)) return tl::unexpected(*fault);
    return form;
}

nlohmann::ordered_json plan_json(const std::vector<StringPlan>& plans) {
    auto list = nlohmann::ordered_json::array();
    for (std::size_t s = 0; s < plans.size(); ++s) {
        auto classes = nlohmann::ordered_json::array();
        for (const int cls : plans[s].cls) {
            if (cls == kNoClass)
                classes.push_back(nullptr);
            else
                classes.push_back(cls);
        }
        list.push_back({{"string", s}, {"done", plans[s].done}, {"classes", classes}});
    }
    return list;
}

std::string steps_text(const YearsForm& form, const PackageAnswer& solved, const YearsFormCheck& check) {
    std::string text =
        fmt::format("Inputs: {} strings, {} years, {} ratings; discount {}, keep cost grows {} a year.\n",
                    form.strings.size(), form.years, form.ratings.size(), form.discount, form.keep_growth);
    text += "Each string: dynamic programme over (year, sections done, class); money, hours and pool as rows "
            "of a master\n"
            "programme whose columns are whole plans (Dantzig and Wolfe, Operations Research 8, 1960), "
            "branched to proof.\n";
    text += fmt::format("Branches searched: {}. Bound {:.2f}.\n", solved.branches, solved.bound);
    if (solved.is_feasible)
        text += fmt::format("Plan keeps every limit: cost {:.2f}.\n", check.cost);
    else if (solved.is_proved_infeasible)
        text += "Proved: no plan keeps every limit.\n";
    else
        text += "No plan that keeps every limit was found; that there is none is not proved.\n";
    for (const YearsFormShort& each : check.over)
        text += fmt::format("  year {}: {} short by {:.2f}\n", each.year, each.limit, each.by);
    for (std::size_t s = 0; s < solved.plan.strings.size(); ++s)
        text +=
            fmt::format("  string {}: sections done {}\n", s, fmt::join(solved.plan.strings[s].done, " "));
    return text;
}

} // namespace

WorkOutAnswer work_out_years(const std::string& path) {
    WorkOutAnswer answer;
    const auto json = read_json_file(path);
    if (!json) {
        answer.fault = json.error();
        return answer;
    }
    const auto form = read_form(*json, path);
    if (!form) {
        answer.fault = form.error();
        return answer;
    }
    const PackageAnswer solved = solve_packages(packages_of(*form), kSearchRounds, branches_for(*form), {});
    const bool has_plan = solved.plan.strings.size() == form->strings.size();
    const YearsFormCheck check = has_plan ? check_years(*form, solved.plan.strings) : YearsFormCheck{};
    nlohmann::ordered_json& out = answer.json;
    const bool feasible = has_plan && solved.is_feasible && check.over.empty() && check.broken.empty();
    out["feasible"] = feasible;
    out["cost"] = has_plan ? nlohmann::ordered_json(check.cost) : nlohmann::ordered_json(nullptr);
    out["bound"] = has_plan ? nlohmann::ordered_json(std::min(solved.bound, check.cost))
                            : nlohmann::ordered_json(nullptr);
    out["gap_frac"] = feasible && check.cost > 0
                          ? nlohmann::ordered_json(std::max(0.0, (check.cost - solved.bound) / check.cost))
                          : nlohmann::ordered_json(nullptr);
    out["proved_infeasible"] = solved.is_proved_infeasible;
    out["plan"] = plan_json(solved.plan.strings);
    out["bought"] = check.bought;
    out["short"] = nlohmann::ordered_json::array();
    for (const YearsFormShort& each : check.over)
        out["short"].push_back({{"year", each.year}, {"limit", each.limit}, {"by", each.by}});
    answer.steps_text = steps_text(*form, solved, check);
    return answer;
}

void add_work_out_years(CLI::App& work_out, WorkOutAnswer& answer) {
    CLI::App* years = work_out.add_subcommand(
        "years", "Sections into years, within money, hours and the pool of transformers");
    auto path = std::make_shared<std::string>();
    years->add_option("file", *path, "FILE.json in the form of the phasing benchmarks")->required();
    years->footer("Example: unstring work-out years case.json --json");
    years->callback([path, &answer] { answer = work_out_years(*path); });
}

} // namespace unstring
