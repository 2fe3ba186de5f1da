#pragma once
// Files for one test case, gone afterwards.

#include <filesystem>
#include <fstream>
#include <string>
#include <string_view>

#include <unistd.h>

namespace unstring::test {

class TempFolder {
public:
    TempFolder() {
        static int number = 0;
        path_ = std::filesystem::temp_directory_path() /
                ("unstring-test-" + std::to_string(::getpid()) + "-" + std::to_string(++number));
        std::filesystem::create_directories(path_);
    }
    ~TempFolder() {
        std::error_code ignored;
        std::filesystem::remove_all(path_, ignored);
    }
    TempFolder(const TempFolder&) = delete;
    TempFolder& operator=(const TempFolder&) = delete;

    /// Writes a file and returns its path.
    [[nodiscard]] std::string write(const std::string& name, std::string_view content) const {
        std::ofstream(path_ / name, std::ios::binary) << content;
        return (path_ / name).string();
    }
    [[nodiscard]] std::string path(const std::string& name) const { return (path_ / name).string(); }

private:
    std::filesystem::path path_;
};

} // namespace unstring::test
