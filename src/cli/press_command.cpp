// press: orders to PDFs. On a terminal a line of progress is kept; in a pipe only what went wrong
// is told.
#include <algorithm>
#include <csignal>
#include <fmt/format.h>
#include <unistd.h>

#include "cli/commands.hpp"
#include "run/characters.hpp"
#include "run/press.hpp"
#include "run/workers.hpp"

namespace duskleaf {
namespace {

extern "C" void stop_at_signal(int number) {
  request_stop();
  std::signal(number, SIG_DFL);  // a second one ends the program at once
}

class TerminalProgress : public Progress {
 public:
  explicit TerminalProgress(bool verbose)
      : verbose_(verbose), terminal_(::isatty(STDERR_FILENO) != 0) {}

  void begin(std::size_t files) override {
    files_ = files;
    show();
  }
  void file_done(const ReportRow& row) override {
    ++done_;
    if (row.status == ReportRow::Status::failed)
      tell(fmt::format("{}: {}", row.file, row.reason));
    else if (verbose_)
      tell_of(row);
    show();
  }
  void end() const {
    if (terminal_) std::fputs("\r\033[K", stderr);
  }
  bool terminal() const { return terminal_; }

 private:
  void tell(const std::string& line) const {
    end();
    say(line);
  }
  void tell_of(const ReportRow& row) const {
    std::string line = row.file;
    if (row.status == ReportRow::Status::skipped) line += ": skipped, " + row.reason;
    if (row.labels_left_out > 0)
      line += fmt::format(": {} labels found no room", row.labels_left_out);
    tell(line);
    for (const std::string& note : row.notes) tell("  " + note);
  }
  void show() const {
    if (terminal_) {
      fmt::print(stderr, "\r{} of {} files", done_, files_);
      std::fflush(stderr);
    }
  }

  bool verbose_, terminal_;
  std::size_t files_ = 0, done_ = 0;
};

/// Options that leave nothing to press are no mistake of form, and yet a surprise.
std::string why_nothing(const PressReport& report) {
  if (report.rows.empty()) return "nothing to press: no site falls to this part";
  const bool one_reason =
      std::all_of(report.rows.begin(), report.rows.end(),
                  [&](const ReportRow& row) { return row.reason == report.rows[0].reason; });
  return "nothing to press: " +
         (one_reason ? report.rows[0].reason : "the order has no file for what was asked");
}

}  // namespace

ExitCode run_press(const PressArguments& arguments) {
  if (arguments.out.empty())  // an unset variable of a script, not the folder one stands in
    throw CommandLineError("--out: expected the name of a folder");
  PressOptions options;
  options.out = arguments.out;
  options.site = arguments.site;
  options.month = arguments.month;
  options.jobs = arguments.jobs;
  if (!arguments.share.empty())
    std::tie(options.share, options.shares) = parse_share(arguments.share);

  std::vector<Order> orders;
  for (const std::string& file : arguments.files) {
    orders.push_back(read_order(file));
    if (arguments.year) change_year(orders.back(), *arguments.year);
  }
  if (options.site) check_site(orders, *options.site);
  for (const Order& order : orders) {
    say_doubts(doubts(order), false);
    say_doubts(missing_characters(order), false);
  }

  std::signal(SIGINT, stop_at_signal);
  std::signal(SIGTERM, stop_at_signal);
  TerminalProgress progress(arguments.verbose);
  const PressReport report = press_orders(orders, options, progress);
  progress.end();

  const int pressed = report.count(ReportRow::Status::pressed),
            failed = report.count(ReportRow::Status::failed);
  if (progress.terminal() || arguments.verbose)
    say(fmt::format("{} {} written below {}", pressed, pressed == 1 ? "file" : "files",
                    options.out.string()));
  if (pressed + failed == 0 && !stop_requested()) say(why_nothing(report));
  if (const int crowded = report.with_notes(); crowded > 0)
    say(fmt::format("{} {} a page whose words hardly fit; see the report in {}", crowded,
                    crowded == 1 ? "file has" : "files have", arguments.out));
  if (failed > 0)
    say(fmt::format("{} {} failed; see the report in {}", failed, failed == 1 ? "file" : "files",
                    arguments.out));
  if (stop_requested()) say("stopped; the report tells what is missing");
  return failed > 0 || stop_requested() ? ExitCode::some_sites_failed : ExitCode::done;
}

}  // namespace duskleaf
