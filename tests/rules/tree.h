#pragma once
// The source tree as text, for the rules that no compiler checks.

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <regex>
#include <sstream>
#include <string>
#include <vector>

namespace rules_test {

struct SourceFile {
    std::string path; ///< from the root of the tree
    std::string text;
};

struct Include {
    std::string path, header;
    bool is_system = false; ///< <..>
};

inline std::string text_of(const std::filesystem::path& path) {
    std::ifstream file(path, std::ios::binary);
    std::ostringstream text;
    text << file.rdbuf();
    return text.str();
}

inline bool ends_with(const std::string& text, const std::string& end) {
    return text.size() >= end.size() && text.compare(text.size() - end.size(), std::string::npos, end) == 0;
}
inline bool starts_with(const std::string& text, const std::string& start) {
    return text.rfind(start, 0) == 0;
}

/// Every file that people write: what is built, and git's own, left out. In the order of their paths.
inline const std::vector<SourceFile>& tree() {
    static const std::vector<SourceFile> kTree = [] {
        const std::filesystem::path root = UNSTRING_SOURCE;
        std::vector<SourceFile> files;
        for (auto at = std::filesystem::recursive_directory_iterator(root);
             at != std::filesystem::recursive_directory_iterator(); ++at) {
            const std::string path = std::filesystem::relative(at->path(), root).string();
            if (path == "build" || path == ".git") {
                at.disable_recursion_pending();
                continue;
            }
            if (at->is_regular_file()) files.push_back({path, text_of(at->path())});
        }
        std::sort(files.begin(), files.end(),
                  [](const SourceFile& a, const SourceFile& b) { return a.path < b.path; });
        return files;
    }();
    return kTree;
}

inline bool is_code(const SourceFile& file) {
    return ends_with(file.path, ".cpp") || ends_with(file.path, ".h");
}

inline std::vector<Include> includes_under(const std::string& folder) {
    static const std::regex kInclude(R"re(^[ \t]*#[ \t]*include[ \t]*([<"])([^>"]+)[>"])re",
                                     std::regex::multiline);
    std::vector<Include> includes;
    for (const SourceFile& file : tree()) {
        if (!is_code(file) || !starts_with(file.path, folder)) continue;
        for (auto at = std::sregex_iterator(file.text.begin(), file.text.end(), kInclude);
             at != std::sregex_iterator(); ++at)
            includes.push_back({file.path, (*at)[2], (*at)[1] == "<"});
    }
    return includes;
}

} // namespace rules_test
