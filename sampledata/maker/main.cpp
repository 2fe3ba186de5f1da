// Writes a sample city: `quillhaven_maker --to DIR [--size N] [--seed S]`.

#include <cstdio>
#include <string>

#include <CLI/CLI.hpp>
#include <fmt/format.h>

#include "sampledata/write_city.h"

int main(int argc, char** argv) {
    CLI::App app("Makes the invented city Quillhaven, of any size, in the files that unstring gather reads.");
    app.footer("Example: quillhaven_maker --size 20000 --seed 7 --to /tmp/big-city");
    unstring::sample::CityOrder order;
    app.add_option("--size", order.poles, "poles")->capture_default_str();
    app.add_option("--seed", order.seed, "another seed, another city")->capture_default_str();
    app.add_option("--to", order.folder, "folder to write")->required();
    CLI11_PARSE(app, argc, argv);
    const auto count = unstring::sample::write_city(order);
    if (!count) {
        fmt::print(stderr, "{}\n", unstring::fault_text(count.error()));
        return unstring::fault_exit_code(count.error().code);
    }
    fmt::print("{} poles, {} of them on {} series strings, in {}\n", count->poles, count->series_poles,
               count->strings, order.folder);
    return 0;
}
