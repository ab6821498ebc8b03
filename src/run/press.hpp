#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <vector>

#include "order/order.hpp"
#include "run/report.hpp"

namespace duskleaf {

struct PressOptions {
  std::filesystem::path out = "out";
  std::optional<std::string> site;  // this one alone
  std::optional<int> month;         // files of this month alone, 1..12
  int jobs = 0;  // threads; 0: one for each core. The files are the same bytes whatever it is
  int share = 1, shares = 1;  // part `share` of `shares` of the sites, for array jobs
};

/// Told of the work as it goes, from any thread, one call at a time.
class Progress {
 public:
  virtual ~Progress() = default;
  virtual void begin(std::size_t files) = 0;
  virtual void file_done(const ReportRow&) = 0;
};

/// What would be pressed, in the report's order: every row is `skipped` with a reason, or has none
/// yet.
PressReport plan_press(const std::vector<Order>&, const PressOptions&);

/// Presses the orders' files below options.out and writes report.csv there (report-K-of-N.csv for a
/// share). A site or file that fails does not stop the rest. Throws OrderError or FileError before
/// anything is written; FileError when the report cannot be.
PressReport press_orders(const std::vector<Order>&, const PressOptions&, Progress&);

}  // namespace duskleaf
