#include "app/paper/pdf_printer.h"

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>

#include <catch2/catch.hpp>
#include <unistd.h>

using namespace unstring;

namespace {

Printer& printer() {
    static int argc = 1;
    static char name[] = "test";
    static char* argv[] = {name, nullptr};
    static const std::unique_ptr<Printer> kPrinter = make_pdf_printer(argc, argv);
    return *kPrinter;
}

std::string folder() {
    const auto path = std::filesystem::temp_directory_path() / ("unstring-paper-" + std::to_string(getpid()));
    std::filesystem::create_directories(path);
    return path;
}

const std::string kStep = "Test dead at the transformer and at the pole";

WorkOrder long_order(int poles) {
    WorkOrder order;
    order.id = "2029-S-04-line";
    order.year = 2029;
    order.string_id = "S-04";
    order.title = "Series circuit (string) S-04: " + std::to_string(poles) + " lamps off, 20 stay";
    order.hours = 35.2;
    order.switch_on_time = "17:14";
    for (int i = 0; i < poles; ++i) {
        OrderPole pole;
        pole.id = "04-" + std::to_string(200 + i);
        pole.street = "Cooper Street";
        pole.task = "lamp off: jumper at the base, cable stays live";
        if (i % 3 == 0) pole.warning = "live series cable in base: line crew opens";
        order.poles.push_back(pole);
        LoopBead bead;
        bead.id = pole.id;
        bead.place = {40.0 * i, i % 2 == 0 ? 8.0 : -8.0};
        bead.leaves_now = i % 2 == 0;
        bead.burns_after = i % 2 != 0;
        bead.cable_live_after = i > 5;
        order.loop.push_back(bead);
    }
    for (int i = 0; i < 19; ++i) {
        OrderStep step;
        step.text = kStep;
        step.hold_point = i % 3 == 0;
        step.caution = i % 7 == 0;
        order.steps.push_back(step);
    }
    order.cautions = {"Never open a live string.", "A dark lamp is not a dead pole."};
    order.facts = {{"open-circuit kV", "6.3 (estimate)"},
                   {"approach distance, gloves", "0.68 m, glove class 1"},
                   {"traffic", "12 at local street (poles by road)"},
                   {"permit, valid to", ""}};
    order.as_found = {{"current before", "A"}, {"volts before", "V"}, {"insulation", "Mohm"}};
    order.materials = {{"splice kit, 5 kV", "each", 4}, {"series cable, AWG 8, 5 kV", "m", 62}};
    order.after = {"2028-S-07-line"};
    return order;
}

/// Text of the PDF by an independent reader.
std::string text_in(const std::string& path) {
    const std::string out = path + ".txt";
    if (std::system(("pdftotext -layout '" + path + "' '" + out + "'").c_str()) != 0) return {};
    std::stringstream content;
    content << std::ifstream(out).rdbuf();
    return content.str();
}

std::size_t count(const std::string& text, const std::string& words) {
    std::size_t found = 0;
    for (std::size_t at = text.find(words); at != std::string::npos; at = text.find(words, at + 1)) ++found;
    return found;
}

} // namespace

TEST_CASE("paper: every pole, every step and every page number of an order is in the PDF, once where it "
          "should be") {
    const std::string path = folder() + "/orders.pdf";
    REQUIRE(printer().print_orders({long_order(60)}, path, "a4").has_value());
    const std::string text = text_in(path);
    REQUIRE_FALSE(text.empty());
    for (int i = 0; i < 60; ++i) CHECK(text.find("04-" + std::to_string(200 + i)) != std::string::npos);
    CHECK(count(text, kStep) == 19);
    CHECK(count(text, "(hold)") == 7);
    const std::size_t pages = count(text, "\f");
    REQUIRE(pages >= 3);
    for (std::size_t page = 1; page <= pages; ++page) {
        INFO(page);
        CHECK(text.find("page " + std::to_string(page) + " of " + std::to_string(pages)) !=
              std::string::npos);
    }
    CHECK(text.find("page " + std::to_string(pages + 1) + " of") == std::string::npos);
    CHECK(text.find("splice kit, 5 kV") != std::string::npos);
    CHECK(text.find("2028-S-07-line") != std::string::npos);
    CHECK(text.find("6.3 (estimate)") != std::string::npos);
}

TEST_CASE("paper: each order begins its own page and counts its own pages; letter is another sheet") {
    const std::string path = folder() + "/two.pdf";
    WorkOrder second = long_order(2);
    second.id = "2029-S-05-line";
    REQUIRE(printer().print_orders({long_order(3), second}, path, "letter").has_value());
    const std::string text = text_in(path);
    CHECK(count(text, "Work order 2029-S-04-line") >= 1);
    CHECK(count(text, "Work order 2029-S-05-line") >= 1);
    std::size_t pages_of_first = 0;
    const std::size_t second_at = text.find("Work order 2029-S-05-line");
    pages_of_first = count(text.substr(0, second_at), "\f");
    CHECK(text.find("page 1 of " + std::to_string(pages_of_first)) != std::string::npos);
    const std::string info = path + ".info";
    REQUIRE(std::system(("pdfinfo '" + path + "' > '" + info + "'").c_str()) == 0);
    std::stringstream content;
    content << std::ifstream(info).rdbuf();
    CHECK(content.str().find("612 x 792") != std::string::npos);
}

TEST_CASE("paper: names of 200 characters, other scripts and control characters do not stop a page") {
    WorkOrder order = long_order(4);
    order.poles[0].street = std::string(200, 'W');
    order.poles[1].street = "\xD8\xB4\xD8\xA7\xD8\xB1\xD8\xB9 \xD7\xA8\xD7\x97\xD7\x95\xD7\x91";
    order.poles[2].id = std::string(200, '8');
    order.poles[3].task = "=HYPERLINK(\"x\")\t\x01 done";
    const std::string path = folder() + "/odd.pdf";
    REQUIRE(printer().print_orders({order}, path, "a4").has_value());
    CHECK(count(text_in(path), "W") >= 200);
}

TEST_CASE("paper: an unknown sheet or a folder that is not there is a fault, and no file is left") {
    CHECK(printer().print_orders({long_order(1)}, folder() + "/x.pdf", "a5").error().code ==
          FaultCode::bad_usage);
    CHECK(printer().print_orders({long_order(1)}, "/no/such/folder/x.pdf", "a4").error().code ==
          FaultCode::write_failed);
    CHECK_FALSE(std::filesystem::exists(folder() + "/x.pdf"));
}
