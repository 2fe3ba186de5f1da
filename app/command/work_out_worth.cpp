#include "app/command/work_out_worth.h"

#include <cmath>
#include <memory>

#include <fmt/format.h>

#include "model/money/worth.h"

namespace unstring {
namespace {

struct WorthOptions {
    double rate = 0, years = 0, rise = 0;
};

std::optional<Fault> refuse(const char* option, double value, double low, double high, const char* remedy) {
    if (std::isfinite(value) && value >= low && value <= high) return std::nullopt;
    return Fault{FaultCode::bad_usage,
                 {},
                 0,
                 option,
                 fmt::format("{}", value),
                 fmt::format("{} to {}", low, high),
                 remedy};
}

void work_out(const WorthOptions& given, WorkOutAnswer& answer) {
    answer.fault = refuse("--rate", given.rate, -0.5, 1, "give a share: 3 % is 0.03");
    if (!answer.fault) answer.fault = refuse("--years", given.years, 1, 1000, "give a number of years");
    if (!answer.fault) answer.fault = refuse("--rise", given.rise, -0.5, 1, "give a share: 1 % is 0.01");
    if (answer.fault) return;
    const double single = spv(given.rate, given.years), uniform = upv(given.rate, given.years);
    const double rising = upv_rising(given.rate, given.rise, given.years),
                 recovery = crf(given.rate, given.years);
    answer.json["spv"] = single;
    answer.json["upv"] = uniform;
    answer.json["upv_rising"] = rising;
    answer.json["crf"] = recovery;
    answer.steps_text = fmt::format(
        "Inputs: real discount rate d = {}, n = {} years, real rise e = {}; flows at year ends, constant "
        "money.\n"
        "single present value    (1 + d)^-n = {:.6f}\n"
        "uniform present value   (1 - (1 + d)^-n) / d = {:.6f} (n where d = 0)\n"
        "rising flows            (1 + e) / (d - e) (1 - ((1 + e) / (1 + d))^n) = {:.6f} (n where d = e)\n"
        "capital recovery        1 / uniform present value = {:.6f}\n"
        "Source: NIST Handbook 135; ASTM E917.\n",
        given.rate, given.years, given.rise, single, uniform, rising, recovery);
}

} // namespace

void add_work_out_worth(CLI::App& work_out_app, WorkOutAnswer& answer) {
    CLI::App* topic =
        work_out_app.add_subcommand("worth", "present-worth factors of a rate and a number of years");
    const auto given = std::make_shared<WorthOptions>();
    topic->add_option("--rate", given->rate, "real discount rate, 0.03 = 3 %")->required();
    topic->add_option("--years", given->years, "years")->required();
    topic->add_option("--rise", given->rise, "real rise of the yearly flow, 0.01 = 1 %");
    topic->footer("Example: unstring work-out worth --rate 0.03 --years 20 --rise 0.01");
    topic->callback([given, &answer] { work_out(*given, answer); });
}

} // namespace unstring
