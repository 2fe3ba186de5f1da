#pragma once
// Work orders on paper, as PDF.

#include <memory>

#include "app/steps/printer.h"

namespace unstring {

/// Fonts need Qt's application object: where there is none yet, one is made here on the offscreen platform
/// and lives as long as the printer.
[[nodiscard]] std::unique_ptr<Printer> make_pdf_printer(int& argc, char** argv);

} // namespace unstring
