// Writes a sample city: `quillhaven_maker --to DIR [--size N] [--seed S] [--dirty]`.

#include <cstdio>
#include <string>

#include <CLI/CLI.hpp>
#include <fmt/format.h>

#include "sampledata/dirty.h"
#include "sampledata/write_city.h"

namespace {

int failed(const unstring::Fault& fault) {
    fmt::print(stderr, "{}\n", unstring::fault_text(fault));
    return unstring::fault_exit_code(fault.code);
}

} // namespace

int main(int argc, char** argv) {
    CLI::App app("Makes the invented city Quillhaven, of any size, in the files that unstring gather reads.");
    app.footer("Example: quillhaven_maker --size 20000 --seed 7 --to /tmp/big-city");
    unstring::sample::CityOrder order;
    app.add_option("--size", order.poles, "poles")->capture_default_str();
    app.add_option("--seed", order.seed, "another seed, another city")->capture_default_str();
    app.add_option("--to", order.folder, "folder to write")->required();
    bool is_dirty = false;
    app.add_flag("--dirty", is_dirty, "the deliberately dirty set instead, always the same");
    CLI11_PARSE(app, argc, argv);
    if (is_dirty) {
        if (const auto written = unstring::sample::write_dirty(order.folder); !written)
            return failed(written.error());
        fmt::print("the dirty set, in {}\n", order.folder);
        return 0;
    }
    const auto count = unstring::sample::write_city(order);
    if (!count) return failed(count.error());
    fmt::print("{} poles, {} of them on {} series strings, in {}\n", count->poles, count->series_poles,
               count->strings, order.folder);
    return 0;
}
