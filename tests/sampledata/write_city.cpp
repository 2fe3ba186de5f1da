#include "sampledata/write_city.h"

#include <filesystem>
#include <set>

#include <catch2/catch.hpp>

#include "tests/sampledata/read_csv.h"

using namespace sampledata_test;
using unstring::sample::CityOrder;
using unstring::sample::write_city;

namespace {

std::string fresh_folder(const std::string& name) {
    const auto folder = std::filesystem::temp_directory_path() / ("unstring_sampledata_" + name);
    std::filesystem::remove_all(folder);
    return folder.string();
}

std::set<std::string> ids(const std::vector<Row>& rows, const std::string& column) {
    std::set<std::string> answer;
    for (const Row& row : rows) answer.insert(row.at(column));
    return answer;
}

} // namespace

TEST_CASE("sample city: made again it is the committed one, byte for byte") {
    const std::string folder = fresh_folder("again");
    REQUIRE(write_city({1400, CityOrder{}.seed, folder, true}));
    for (const char* file : {"poles.csv", "circuits.csv", "transformers.csv", "cutbacks.csv", "services.csv",
                             "climate.csv", "prices.csv", "budget.csv", "marks.csv"}) {
        INFO(file);
        CHECK(text_of_file(folder + "/" + file) == text_of_file(committed(file)));
    }
    std::filesystem::remove_all(folder);
}

TEST_CASE("sample city: another seed is another city") {
    const std::string folder = fresh_folder("other");
    REQUIRE(write_city({1400, 7, folder, false}));
    CHECK(text_of_file(folder + "/poles.csv") != text_of_file(committed("poles.csv")));
    std::filesystem::remove_all(folder);
}

TEST_CASE("sample city: any size has exactly the poles asked for, and every id once") {
    for (const long size : {1L, 333L, 5000L, 60000L}) {
        const std::string folder = fresh_folder("size" + std::to_string(size));
        const auto count = write_city({size, 5, folder, false});
        REQUIRE(count);
        const auto poles = read_csv(folder + "/poles.csv"), circuits = read_csv(folder + "/circuits.csv"),
                   services = read_csv(folder + "/services.csv"),
                   units = read_csv(folder + "/transformers.csv");
        CHECK(static_cast<long>(poles.size()) == size);
        CHECK(count->poles == size);
        CHECK(ids(poles, "pole_id").size() == poles.size());
        CHECK(ids(circuits, "string_id").size() == circuits.size());
        CHECK(ids(services, "service_id").size() == services.size());
        std::set<std::string> seats; // a unit twice only as the two loops of one unit
        for (const Row& unit : units) seats.insert(unit.at("transformer_id") + "|" + unit.at("string_id"));
        CHECK(seats.size() == units.size());
        const std::set<std::string> known = ids(circuits, "string_id");
        for (const Row& pole : poles) REQUIRE(known.count(pole.at("string_id")) == 1);
        std::filesystem::remove_all(folder);
    }
}

TEST_CASE("sample city: a size that cannot be is refused") {
    const auto refused = write_city({0, 1, fresh_folder("none"), false});
    REQUIRE(!refused);
    CHECK(refused.error().code == unstring::FaultCode::bad_usage);
    CHECK(refused.error().field == "--size");
}

TEST_CASE("sample city: a folder that cannot be made is said, not ignored") {
    const auto refused = write_city({10, 1, "/proc/no-such-folder", false});
    REQUIRE(!refused);
    CHECK(refused.error().code == unstring::FaultCode::write_failed);
}

TEST_CASE("sample city: committed data stay under 8 MB") {
    std::uintmax_t bytes = 0;
    for (const char* folder : {"quillhaven", "dirty"})
        for (const auto& entry : std::filesystem::recursive_directory_iterator(std::string(UNSTRING_SOURCE) +
                                                                               "/sampledata/" + folder))
            if (entry.is_regular_file()) bytes += entry.file_size();
    CHECK(bytes > 100'000);
    CHECK(bytes < 8'000'000);
}
