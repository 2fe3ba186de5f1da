#include "app/command/work_out_spares.h"

#include <cmath>
#include <memory>

#include <fmt/format.h>

#include "model/series/spares.h"

namespace unstring {
namespace {

struct SparesOptions {
    double mean = 0, target = 0;
};

constexpr double kMostMean = 1e6;

void work_out(const SparesOptions& given, WorkOutAnswer& answer) {
    if (!(given.mean >= 0 && given.mean <= kMostMean)) {
        answer.fault = Fault{FaultCode::bad_usage,
                             {},
                             0,
                             "--mean",
                             fmt::format("{}", given.mean),
                             fmt::format("0 to {}", kMostMean),
                             "give the failures expected over the lead time"};
        return;
    }
    if (!(given.target >= 0 && given.target < 1)) {
        answer.fault = Fault{
            FaultCode::bad_usage,         {}, 0, "--target", fmt::format("{}", given.target), "0 to under 1",
            "give a chance: 95 % is 0.95"};
        return;
    }
    const SpareStock found = poisson_stock(given.mean, given.target);
    answer.json["stock"] = found.stock;
    answer.json["cover_frac"] = found.cover_frac;
    answer.steps_text = fmt::format("Inputs: mean demand over the lead time m = {}, target cover {}.\n"
                                    "cover of s spares = sum over k = 0..s of e^-m m^k / k!\n",
                                    given.mean, given.target);
    for (int stock = std::max(0, found.stock - 2); stock <= found.stock; ++stock)
        answer.steps_text +=
            fmt::format("s = {}: {:.6f}{}\n", stock, poisson_cover(given.mean, stock),
                        stock == found.stock ? ", the first that reaches the target" : ", too little");
    answer.steps_text += "Source: Poisson demand over a lead time, ready rate; standard Poisson tables.\n";
}

} // namespace

void add_work_out_spares(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic =
        work_out_app.add_subcommand("spares", "how many spare transformers cover the demand of a lead time");
    const auto given = std::make_shared<SparesOptions>();
    topic->add_option("--mean", given->mean, "failures expected over the lead time")->required();
    topic->add_option("--target", given->target, "chance that the demand is covered, 0.95 = 95 %")
        ->required();
    topic->footer("Example: unstring work-out spares --mean 2 --target 0.95");
    topic->callback([given, &answer] { work_out(*given, answer); });
}

} // namespace unstring
