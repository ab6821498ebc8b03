// The command line. Option forms follow the POSIX utility conventions with GNU long options, as
// CLI11 reads them.
#include "cli/cli.hpp"

#include <CLI/CLI.hpp>
#include <fmt/format.h>

#include "base/civil.hpp"
#include "cli/commands.hpp"
#include "order/nearest_name.hpp"

namespace duskleaf {
namespace {

constexpr const char* version = "0.1.0";

/// All options of all commands, filled in by CLI11 while it reads the line.
struct Arguments {
  NewArguments create;
  ProofArguments proof;
  PressArguments press;
  DataArguments data;
  BlocksArguments blocks;
};

const CLI::Range months(1, 12), years(1900, 2100);

CLI::App* add_new(CLI::App& app, NewArguments& a) {
  CLI::App* command = app.add_subcommand("new", "Write a commented starter order");
  command->add_option("FILE", a.file, "The order to write; never one that is there")
      ->capture_default_str();
  command->add_option("--name", a.name, "Name of the place, as the page shall print it");
  command->add_option("--latitude", a.latitude,
                      "Degrees, north positive, or such as \"54 10 48 N\"");
  command->add_option("--longitude", a.longitude,
                      "Degrees, east positive, or such as \"4 37 12 W\"");
  command->add_option("--time-zone", a.time_zone, "IANA name, such as Europe/London");
  command->add_option("--year", a.year, "Year to print")->check(years);
  return command;
}

CLI::App* add_proof(CLI::App& app, ProofArguments& a) {
  CLI::App* command =
      app.add_subcommand("proof", "Check orders, show what would be printed; write nothing");
  command->add_option("FILE", a.files, "Orders")->required();
  return command;
}

CLI::App* add_press(CLI::App& app, PressArguments& a) {
  CLI::App* command = app.add_subcommand("press", "Compute and write the PDFs");
  command->add_option("FILE", a.files, "Orders")->required();
  command->add_option("-o,--out", a.out, "Folder to write into")->capture_default_str();
  command->add_option("--site", a.site, "This site alone, by its id");
  command->add_option("--month", a.month, "This month alone, 1 to 12")->check(months);
  command->add_option("--year", a.year, "Another year than the order's")->check(years);
  command->add_option("--jobs", a.jobs, "Threads (default: one for each core)")
      ->check(CLI::Range(1, 1024));
  command->add_option("--share", a.share, "K/N: part K of N of the sites, for array jobs");
  command->add_flag("--again", a.again, "Press what is already there; this version always does");
  command->add_flag("--verbose", a.verbose,
                    "Tell of every file, and what found no room on its pages");
  return command;
}

CLI::App* add_data(CLI::App& app, DataArguments& a) {
  CLI::App* command = app.add_subcommand("data", "The computed almanac as data");
  command->add_option("FILE", a.file, "Order")->required();
  command
      ->add_option("--table", a.table,
                   "instants, nights, constellations, planets, showers or eclipses")
      ->required();
  command->add_option("--as", a.form, "csv or json")->capture_default_str();
  command->add_option("-o,--out", a.out, "File to write (default: standard output)");
  command->add_option("--site", a.site, "This site alone, by its id");
  command->add_option("--year", a.year, "Another year than the order's")->check(years);
  return command;
}

CLI::App* add_blocks(CLI::App& app, BlocksArguments& a) {
  CLI::App* command =
      app.add_subcommand("blocks", "The blocks that templates can use, with their options");
  command->add_option("NAME", a.name, "This block alone");
  return command;
}

/// CLI11 would only say that a command is missing.
void check_command(int argc, char** argv) {
  static const std::vector<std::string_view> names = {"new", "proof", "press", "data", "blocks"};
  if (argc < 2)
    throw CommandLineError("a command is needed: " + listed(names) + "\nSee: duskleaf --help");
  const std::string_view given = argv[1];
  if (given.starts_with('-') || std::find(names.begin(), names.end(), given) != names.end()) return;
  const std::string near = nearest_name(given, names);
  throw CommandLineError(fmt::format(
      "there is no command '{}'; {}", given,
      near.empty() ? "expected " + listed(names) : fmt::format("did you mean '{}'?", near)));
}

ExitCode dispatch(int argc, char** argv) {
  check_command(argc, argv);
  Arguments a;
  CLI::App app("A year of the night sky, from an order file to printed sheets.", "duskleaf");
  app.set_version_flag("--version", fmt::format("duskleaf {} (time-zone data {})", version,
                                                time_zone_data_version()));
  app.require_subcommand(1);
  const CLI::App* create = add_new(app, a.create);
  const CLI::App* proof = add_proof(app, a.proof);
  const CLI::App* press = add_press(app, a.press);
  const CLI::App* data = add_data(app, a.data);
  const CLI::App* blocks = add_blocks(app, a.blocks);
  try {
    app.parse(argc, argv);
  } catch (const CLI::Success& asked) {  // --help, --version
    app.exit(asked);
    return ExitCode::done;
  } catch (const CLI::ParseError& error) {
    const auto used = app.get_subcommands();
    throw CommandLineError(fmt::format("{}\nSee: duskleaf {}--help", error.what(),
                                       used.empty() ? "" : used[0]->get_name() + " "));
  }
  if (*create) return run_new(a.create);
  if (*proof) return run_proof(a.proof);
  if (*press) return run_press(a.press);
  if (*data) return run_data(a.data);
  if (*blocks) return run_blocks(a.blocks);
  return ExitCode::internal_error;
}

}  // namespace

ExitCode run_command_line(int argc, char** argv) {
  try {
    return dispatch(argc, argv);
  } catch (const CommandLineError& error) {
    say(fmt::format("duskleaf: {}", error.what()));
    return ExitCode::bad_command_line;
  } catch (const OrderError& error) {
    say(error.what());
    return ExitCode::bad_order;
  } catch (const FileError& error) {
    say(error.what());
    return ExitCode::file_trouble;
  } catch (const std::exception& error) {
    say(fmt::format("duskleaf: internal error: {}", error.what()));
    return ExitCode::internal_error;
  }
}

}  // namespace duskleaf
