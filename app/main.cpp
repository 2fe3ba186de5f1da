#include "app/command/run.h"

int main(int argc, char** argv) { return unstring::run_command_line(argc, argv); }
