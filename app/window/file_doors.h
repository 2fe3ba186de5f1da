#pragma once
// The doors to real files: projects opened and gathered by app/steps.

#include <memory>

#include "app/steps/printer.h"
#include "app/window/main_window.h"

namespace unstring {

[[nodiscard]] Doors file_doors(std::shared_ptr<Printer> printer);

} // namespace unstring
