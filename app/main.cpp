#include "app/command/run.h"
#include "app/paper/pdf_printer.h"
#include "app/window/run_window.h"

int main(int argc, char** argv) {
    return unstring::run_command_line(argc, argv, {unstring::run_window, unstring::make_pdf_printer});
}
