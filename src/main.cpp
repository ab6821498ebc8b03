#include "cli/cli.hpp"

int main(int argc, char** argv) { return static_cast<int>(duskleaf::run_command_line(argc, argv)); }
