#include "geo/imports/stp_file.h"

#include <algorithm>
#include <cctype>
#include <charconv>
#include <cmath>
#include <fstream>
#include <optional>
#include <vector>

#include <fmt/format.h>

namespace unstring {
namespace {

constexpr int kMostVertices = 5'000'000;
constexpr double kMostUnits = 4e18; ///< 64-bit integers with room for one addition

std::string lower(std::string text) {
    std::transform(text.begin(), text.end(), text.begin(),
                   [](unsigned char c) { return static_cast<char>(std::tolower(c)); });
    return text;
}

std::vector<std::string> words_of(const std::string& line) {
    std::vector<std::string> words;
    for (std::size_t at = 0; at < line.size();) {
        while (at < line.size() && std::isspace(static_cast<unsigned char>(line[at]))) ++at;
        const std::size_t from = at;
        while (at < line.size() && !std::isspace(static_cast<unsigned char>(line[at]))) ++at;
        if (at > from) words.push_back(line.substr(from, at - from));
    }
    return words;
}

class StpReader {
public:
    explicit StpReader(std::string path) : path_(std::move(path)) {}

    Expected<StpFile> read() {
        std::ifstream stream(path_, std::ios::binary);
        if (!stream)
            return tl::unexpected(
                fault(FaultCode::file_missing, {}, "no readable file", "an STP file", "check the path"));
        std::string line;
        while (std::getline(stream, line) && !fault_) {
            ++row_;
            const std::vector<std::string> words = words_of(line);
            if (!words.empty() && !read_line(words)) break;
        }
        if (fault_) return tl::unexpected(*fault_);
        finish();
        if (fault_) return tl::unexpected(*fault_);
        return std::move(out_);
    }

private:
    Fault fault(FaultCode code, std::string field, std::string found, std::string wanted,
                std::string remedy) const {
        return {code, path_, row_, std::move(field), std::move(found), std::move(wanted), std::move(remedy)};
    }
    void refuse(const std::string& field, const std::string& found, const std::string& wanted,
                const std::string& remedy) {
        if (!fault_) fault_ = fault(FaultCode::value_unreadable, field, found.substr(0, 60), wanted, remedy);
    }

    /// False at the end of the file.
    bool read_line(const std::vector<std::string>& words) {
        const std::string key = lower(words[0]);
        if (row_ == 1 && key.find("33d32945") == std::string::npos) {
            fault_ = fault(FaultCode::file_broken, {}, words[0].substr(0, 40), "33D32945 STP File",
                           "give a file in STP format");
            return false;
        }
        if (key == "eof") return false;
        if (key == "section")
            section_ = words.size() > 1 ? lower(words[1]) : std::string{};
        else if (key == "end")
            section_.clear();
        else if (section_ == "graph")
            graph_line(key, words);
        else if (section_ == "terminals")
            terminal_line(key, words);
        return true;
    }
    void graph_line(const std::string& key, const std::vector<std::string>& words) {
        if (key == "nodes") {
            const std::optional<double> n = number(words, 1, "Nodes");
            if (n && (*n < 1 || *n > kMostVertices || std::floor(*n) != *n || out_.vertices_given != 0))
                refuse("Nodes", words[1], fmt::format("one whole number from 1 to {}", kMostVertices),
                       "check the file");
            else if (n)
                set_size(static_cast<int>(*n));
        } else if (key == "e") {
            const std::optional<int> u = vertex(words, 1), v = vertex(words, 2);
            const std::optional<double> cost = number(words, 3, "cost");
            if (!u || !v || !cost) return;
            if (*cost * kStpScale >= kMostUnits)
                refuse("cost", words[3], "less than 4e12", "choose a larger unit");
            else
                out_.problem.edges.push_back({*u, *v, std::llround(*cost * kStpScale)});
        } else if (key == "a") {
            refuse("A", "an arc with a direction", "edges (E u v cost)", "give an undirected problem");
        }
    }
    void terminal_line(const std::string& key, const std::vector<std::string>& words) {
        const bool is_root = key == "rootp" || key == "root", is_prize = key == "tp";
        if (!is_root && !is_prize && key != "t") return;
        const std::optional<int> v = vertex(words, 1);
        if (!v) return;
        const auto place = static_cast<std::size_t>(*v);
        if (is_root) {
            if (out_.has_root && out_.problem.root != *v)
                refuse("RootP", words[1], "one root", "keep one of them");
            out_.problem.root = *v;
            out_.has_root = true;
        } else if (is_prize) {
            const std::optional<double> prize = number(words, 2, "prize");
            if (!prize) return;
            ++out_.prizes;
            if (*prize * kStpScale >= kMostUnits)
                out_.problem.must[place] = 1;
            else
                out_.problem.prize[place] = std::llround(*prize * kStpScale);
        } else {
            ++out_.terminals;
            out_.problem.must[place] = 1;
        }
    }
    void set_size(int n) {
        out_.vertices_given = n;
        out_.problem.prize.assign(static_cast<std::size_t>(n), 0);
        out_.problem.must.assign(static_cast<std::size_t>(n), 0);
    }
    /// A finite number >= 0.
    std::optional<double> number(const std::vector<std::string>& words, std::size_t at, const char* field) {
        if (at >= words.size()) {
            refuse(field, "nothing", "a number", "complete the line");
            return std::nullopt;
        }
        double value = 0;
        const std::string& word = words[at];
        const auto [end, error] = std::from_chars(word.data(), word.data() + word.size(), value);
        if (error == std::errc{} && end == word.data() + word.size() && std::isfinite(value) && value >= 0)
            return value;
        refuse(field, word, "a number >= 0", "write it with a decimal point, without unit");
        return std::nullopt;
    }
    std::optional<int> vertex(const std::vector<std::string>& words, std::size_t at) {
        const std::optional<double> value = number(words, at, "vertex");
        if (!value) return std::nullopt;
        if (out_.vertices_given == 0) {
            refuse("Nodes", "a vertex before `Nodes n`", "`Nodes n` first",
                   "put section Graph before section Terminals");
            return std::nullopt;
        }
        if (*value < 1 || *value > out_.vertices_given || std::floor(*value) != *value) {
            refuse("vertex", words[at], fmt::format("a whole number from 1 to {}", out_.vertices_given),
                   "check the vertex");
            return std::nullopt;
        }
        return static_cast<int>(*value) - 1;
    }
    void finish() {
        if (row_ == 0)
            fault_ = fault(FaultCode::file_broken, {}, "an empty file", "an STP file",
                           "give a file in STP format");
        else if (out_.vertices_given == 0)
            fault_ = fault(FaultCode::file_broken, "Nodes", "no section Graph with `Nodes n`",
                           "SECTION Graph", "check the file");
        if (fault_) return;
        out_.edges_given = static_cast<int>(out_.problem.edges.size());
        double edges = 0, prizes = 0, musts = 2;
        for (const SteinerEdge& edge : out_.problem.edges) edges += static_cast<double>(edge.cost);
        for (const std::int64_t prize : out_.problem.prize) prizes += static_cast<double>(prize);
        for (const char must : out_.problem.must) musts += must;
        if (edges * musts + prizes >= kMostUnits)
            fault_ = fault(FaultCode::value_unreadable, {}, "sums beyond 64 bits", "smaller numbers",
                           "choose a larger unit");
    }

    std::string path_, section_;
    long row_ = 0;
    StpFile out_;
    std::optional<Fault> fault_;
};

} // namespace

Expected<StpFile> read_stp_file(const std::string& path) { return StpReader(path).read(); }

} // namespace unstring
