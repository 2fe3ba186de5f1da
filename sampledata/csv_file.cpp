#include "sampledata/csv_file.h"

#include <fmt/format.h>

namespace unstring::sample {
namespace {

std::string quoted(const std::string& text) {
    if (text.find_first_of(",\"\n") == std::string::npos) return text;
    std::string answer = "\"";
    for (const char letter : text) answer += letter == '"' ? std::string("\"\"") : std::string(1, letter);
    return answer + "\"";
}

} // namespace

CsvFile::CsvFile(std::string path, const std::string& header)
    : path_(std::move(path)), file_(std::fopen(path_.c_str(), "wb")) {
    if (file_) std::fputs((header + "\n").c_str(), file_.get());
}

void CsvFile::row(std::initializer_list<std::string> cells) {
    if (!file_) return;
    std::string line;
    for (const std::string& each : cells)
        line += (line.empty() && &each == cells.begin() ? "" : ",") + quoted(each);
    std::fputs((line + "\n").c_str(), file_.get());
}

Expected<void> CsvFile::close() {
    bool is_good = file_ != nullptr && std::ferror(file_.get()) == 0;
    if (file_) is_good = std::fclose(file_.release()) == 0 && is_good;
    if (is_good) return {};
    return tl::unexpected(Fault{FaultCode::write_failed, path_, 0, "", "the file could not be written",
                                "room and permission to write", "choose another folder with --to"});
}

std::string cell(double value, int decimals) {
    return value < 0 ? "" : fmt::format("{:.{}f}", value, decimals);
}

std::string yes_no(bool value) { return value ? "yes" : "no"; }

} // namespace unstring::sample
