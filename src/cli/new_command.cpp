// new: a starter order from options, from a conversation on a terminal, or with an invented place
// to be changed.
#include <chrono>
#include <cstdio>
#include <filesystem>
#include <fmt/format.h>
#include <iostream>
#include <unistd.h>

#include "cli/commands.hpp"
#include "cli/starter_order.hpp"
#include "run/whole_file.hpp"

namespace duskleaf {
namespace {

/// The year that a person who begins today means: from November on the next.
int coming_year() {
  const auto today = std::chrono::floor<std::chrono::days>(std::chrono::system_clock::now());
  return static_cast<int>(std::chrono::year_month_day(today + std::chrono::days(61)).year());
}

/// Asks until the answer stands in an order that reads well.
void ask(std::string_view question, StarterPlace& place, std::string StarterPlace::*field) {
  for (;;) {
    fmt::print(stderr, "{}: ", question);
    std::fflush(stderr);
    std::string answer;
    if (!std::getline(std::cin, answer)) throw CommandLineError("the answers ended too soon");
    StarterPlace tried = place;
    tried.*field = answer;
    const std::string trouble = answer.empty() ? "an answer is needed" : trouble_with(tried);
    if (trouble.empty()) {
      place = tried;
      return;
    }
    say("  " + trouble);
  }
}

}  // namespace

ExitCode run_new(const NewArguments& arguments) {
  if (std::filesystem::exists(arguments.file))
    throw FileError(
        fmt::format("{}: there is such a file already; new does not overwrite", arguments.file));
  const bool terminal = ::isatty(STDIN_FILENO) != 0 && ::isatty(STDERR_FILENO) != 0;
  const bool none =
      arguments.latitude.empty() && arguments.longitude.empty() && arguments.time_zone.empty();
  const bool all =
      !arguments.latitude.empty() && !arguments.longitude.empty() && !arguments.time_zone.empty();

  StarterPlace place{
      "Home garden", "52.5", "5.5", "Europe/Amsterdam", arguments.year.value_or(coming_year()),
      none};
  const std::pair<std::string StarterPlace::*, const std::string*> given[] = {
      {&StarterPlace::name, &arguments.name},
      {&StarterPlace::latitude, &arguments.latitude},
      {&StarterPlace::longitude, &arguments.longitude},
      {&StarterPlace::time_zone, &arguments.time_zone}};
  for (const auto& [field, value] : given)
    if (!value->empty()) place.*field = *value;
  if (const std::string trouble = trouble_with(place); !trouble.empty())
    throw CommandLineError(trouble);

  if (terminal && !all) {
    place.invented = false;
    constexpr std::string_view questions[] = {
        "Name of the place", "Latitude, degrees north (such as 54.18, or 43 30 S)",
        "Longitude, degrees east (such as -4.62, or 172 E)", "Time zone (such as Europe/London)"};
    for (std::size_t i = 0; i < std::size(given); ++i)
      if (given[i].second->empty()) ask(questions[i], place, given[i].first);
  } else if (!none && !all) {
    throw CommandLineError("a place needs --latitude, --longitude and --time-zone, all three");
  }
  write_whole(arguments.file, starter_order(place));
  say(fmt::format("wrote {}; see what it gives: duskleaf proof {}", arguments.file,
                  arguments.file));
  return ExitCode::done;
}

}  // namespace duskleaf
