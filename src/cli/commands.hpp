#pragma once

#include <optional>
#include <stdexcept>
#include <string>
#include <utility>
#include <vector>

#include "cli/cli.hpp"
#include "order/order.hpp"

namespace duskleaf {

/// A command line that cannot be obeyed, found after its words were read.
class CommandLineError : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

struct NewArguments {
  std::string file = "order.yaml";
  std::string name, latitude, longitude, time_zone;  // empty: not given
  std::optional<int> year;
};
struct ProofArguments {
  std::vector<std::string> files;
};
struct PressArguments {
  std::vector<std::string> files;
  std::string out = "out";
  std::optional<std::string> site;
  std::optional<int> month, year;
  int jobs = 0;
  std::string share;
  bool again = false, verbose = false;
};
struct DataArguments {
  std::string file, table, form = "csv", out;
  std::optional<std::string> site;
  std::optional<int> year;
};
struct BlocksArguments {
  std::string name;
};

/// The commands. They throw CommandLineError, OrderError and FileError, which the caller turns into
/// messages and codes.
ExitCode run_new(const NewArguments&);
ExitCode run_proof(const ProofArguments&);
ExitCode run_press(const PressArguments&);
ExitCode run_data(const DataArguments&);
ExitCode run_blocks(const BlocksArguments&);

/// One line on standard error.
void say(const std::string& line);
/// Doubts as "FILE:LINE:COLUMN: warning: ..." on standard error; those of keys that nothing prints
/// yet where asked for.
void say_doubts(const std::vector<Doubt>&, bool with_not_printed);
/// To standard output; throws FileError when it cannot be written.
void print(const std::string& text);

/// The order with another year in place of its own. Throws CommandLineError past 2100.
void change_year(Order&, int year);
/// Throws CommandLineError, with the nearest id, when no order has such a site.
void check_site(const std::vector<Order>&, const std::string& id);
/// "K/N" -> {K, N}. Throws CommandLineError.
std::pair<int, int> parse_share(const std::string&);

}  // namespace duskleaf
