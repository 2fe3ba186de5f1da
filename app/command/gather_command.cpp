#include <memory>

#include <fmt/format.h>

#include "app/command/answer_json.h"
#include "app/command/answer_text.h"
#include "app/command/commands.h"
#include "app/steps/gather.h"
#include "model/catalog/prices.h"

namespace unstring {
namespace {

struct GatherCall {
    std::string project;
    GatherFiles files;
    bool help_prices = false;
};

void print_price_items(const Console& console) {
    Json items = Json::array();
    for (const PriceItem& item : price_items()) {
        items.push_back({{"item", item.item}, {"unit", item.unit}, {"what", item.what}});
        console.say(fmt::format("  {:<28} {:<14} {}", item.item, item.unit, item.what));
    }
    console.answer({{"items", items}});
}

int run_gather(const GatherCall& call, const Console& console) {
    if (call.help_prices) {
        print_price_items(console);
        return 0;
    }
    if (call.project.empty())
        return console.fail({FaultCode::bad_usage, "", 0, "PROJECT", "no project",
                             "the path of a project file",
                             "For example: unstring gather city.gpkg --poles poles.csv"});
    auto report = gather_project(call.project, call.files, console.progress("gather"));
    if (!report) return console.fail(report.error());
    console.say(gather_text(*report));
    console.answer(gather_json(*report));
    return 0;
}

} // namespace

void add_gather(CLI::App& app, CommandLine& line) {
    auto call = std::make_shared<GatherCall>();
    CLI::App* gather =
        app.add_subcommand("gather", "Reads a city's files into a project, new or already there");
    gather->add_option("project", call->project, "The project file (GeoPackage)");
    GatherFiles& f = call->files;
    gather->add_option("--poles", f.poles, "Poles: CSV or any vector file");
    gather->add_option("--circuits", f.circuits, "Series strings and parallel circuits");
    gather->add_option("--transformers", f.transformers,
                       "RO transformers in service and spare; says which one feeds which string");
    gather->add_option("--services", f.services, "Service points, ends of lighting circuits, candidates");
    gather->add_option("--streets", f.streets, "Street centre lines: a vector file");
    gather->add_option("--canopy", f.canopy, "Height above ground: a raster in metres, or crown polygons");
    gather->add_option("--obstacles", f.obstacles, "Building polygons with height_m");
    gather->add_option("--climate", f.climate, "Twelve monthly means");
    gather->add_option("--prices", f.prices, "Price book; items it lacks come from the default book");
    gather->add_option("--catalogue", f.catalogue, "Lamps, solar heads, luminaires, cables: JSON");
    gather->add_option("--budget", f.budget, "Money and crew hours by year");
    gather->add_option("--cutbacks", f.cutbacks, "Places where a string can be spliced across");
    gather->add_option("--marks", f.marks, "Wishes of the staff, and locks");
    gather->add_option("--asbuilt", f.asbuilt, "What the crews wrote down");
    gather->add_option("--crs", f.crs, "Coordinate system of tables without one: EPSG:n");
    gather->add_option("--columns", f.columns, "JSON that says which of your columns is which of ours");
    gather->add_option("--encoding", f.encoding, "Character set of tables that are not UTF-8");
    gather->add_flag("--help-prices", call->help_prices, "Prints the closed list of price items");
    gather->footer("Example: unstring gather city.gpkg --poles poles.csv --circuits circuits.csv "
                   "--transformers transformers.csv --crs EPSG:32609");
    gather->callback([call, &line] { line.exit_status = run_gather(*call, line.console()); });
}

} // namespace unstring
