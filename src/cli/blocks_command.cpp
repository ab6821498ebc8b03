// blocks: the table that templates are checked against, as text.
#include <fmt/format.h>

#include "cli/commands.hpp"
#include "order/nearest_name.hpp"
#include "sheet/block.hpp"

namespace duskleaf {

ExitCode run_blocks(const BlocksArguments& arguments) {
  std::string text;
  std::vector<std::string_view> names;
  for (const BlockSpec& block : block_table()) {
    names.push_back(block.name);
    if (!arguments.name.empty() && arguments.name != block.name) continue;
    text += fmt::format("{}\n  {}\n", block.name, block.help);
    for (const OptionSpec& option : block.options)
      text += fmt::format("  {}: {} (default: {})\n      {}\n", option.name, option.allowed,
                          option.fallback.empty() ? "none" : option.fallback, option.help);
  }
  if (text.empty()) {
    const std::string near = nearest_name(arguments.name, names);
    throw CommandLineError(fmt::format(
        "there is no block '{}'; {}", arguments.name,
        near.empty() ? "expected " + listed(names) : fmt::format("did you mean '{}'?", near)));
  }
  print(text);
  return ExitCode::done;
}

}  // namespace duskleaf
