#pragma once

namespace duskleaf {

/// What the process answers.
enum class ExitCode {
  done = 0,
  some_sites_failed = 1,
  bad_command_line = 2,
  bad_order = 3,
  file_trouble = 4,
  internal_error = 5,
};

/// Reads the command line, runs one command, and maps every failure to a message on standard error
/// and an exit code.
ExitCode run_command_line(int argc, char** argv);

}  // namespace duskleaf
