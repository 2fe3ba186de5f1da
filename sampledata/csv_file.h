#pragma once
// One csv file, written row by row.

#include <cstdio>
#include <initializer_list>
#include <memory>
#include <string>

#include "model/fault.h"

namespace unstring::sample {

class CsvFile {
public:
    CsvFile(std::string path, const std::string& header);

    void row(std::initializer_list<std::string> cells);
    /// Empties the buffers to disk. @fault write_failed
    [[nodiscard]] Expected<void> close();

private:
    struct Closer {
        void operator()(std::FILE* file) const { std::fclose(file); }
    };
    std::string path_;
    std::unique_ptr<std::FILE, Closer> file_;
};

/// Fixed decimals; a negative number is a blank cell.
[[nodiscard]] std::string cell(double value, int decimals);
[[nodiscard]] std::string yes_no(bool value);

} // namespace unstring::sample
