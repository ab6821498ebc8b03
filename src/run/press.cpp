// From orders to files. One YearEphemeris for each span of months, and what happens in it
// everywhere, are shared by all sites as const data; a site is one task, so that its almanac is
// made once for all of its publications.
#include "run/press.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <map>
#include <memory>
#include <mutex>
#include <set>

#include "almanac/happenings.hpp"
#include "ink/pdf.hpp"
#include "order/outputs.hpp"
#include "run/characters.hpp"
#include "run/printable.hpp"
#include "run/whole_file.hpp"
#include "run/workers.hpp"
#include "sheet/publication.hpp"

namespace duskleaf {
namespace {

/// One file to make.
struct Job {
  const Publication* publication;
  std::vector<int> months;
  std::size_t row;  // of the report
};
/// One site's files.
struct SiteTask {
  const Order* order;
  const Site* site;
  std::vector<Job> jobs;
};
struct Plan {
  PressReport report;
  std::vector<SiteTask> tasks;
};

std::string reason_to_skip(const Order& order, const Publication& publication,
                           const OutputFile& file, const PressOptions& options) {
  if (!options.month) return "";
  if (publication.files == FileSplit::year)
    return "one file holds the whole year; press it without --month";
  return order.span.month(file.months.at(0)).second == *options.month
             ? ""
             : "another month was asked for";
}

Plan make_plan(const std::vector<Order>& orders, const PressOptions& options) {
  Plan plan;
  std::size_t number = 0;
  for (const Order& order : orders) {
    for (const Site& site : order.sites) {
      const bool ours = static_cast<int>(number++ % static_cast<std::size_t>(options.shares)) ==
                        options.share - 1;
      if (!ours || (options.site && site.place.id != *options.site)) continue;
      SiteTask task{&order, &site, {}};
      for (const Publication& publication : order.publications) {
        for (const OutputFile& file : output_files(order, publication)) {
          if (!file.in_site_folder) continue;
          ReportRow row{order.path,
                        site.place.id,
                        publication.name,
                        site.place.id + "/" + file.path,
                        ReportRow::Status::skipped,
                        reason_to_skip(order, publication, file, options),
                        0,
                        {}};
          if (row.reason.empty())
            task.jobs.push_back({&publication, file.months, plan.report.rows.size()});
          plan.report.rows.push_back(std::move(row));
        }
      }
      if (!task.jobs.empty()) plan.tasks.push_back(std::move(task));
    }
  }
  return plan;
}

/// Two orders pressed together may not write the same file.
void check_apart(const PressReport& report, const std::vector<Order>& orders) {
  std::map<std::string, const ReportRow*> written;
  for (const ReportRow& row : report.rows) {
    const auto [first, is_new] = written.emplace(row.file, &row);
    if (is_new) continue;
    for (const Order& order : orders)
      for (const Site& site : order.sites)
        if (order.path == row.order && site.place.id == row.site)
          throw OrderError(
              site.where,
              fmt::format("{} would also be written by {}", row.file, first->second->order),
              "press the two orders into different folders, or give the site another id");
  }
}

/// What all sites of one span share.
struct Sky {
  explicit Sky(const Span& span)
      : ephemeris(ephemeris_span(span).first, ephemeris_span(span).second),
        year(make_sky_year(ephemeris, span)) {}
  YearEphemeris ephemeris;
  SkyYear year;
};

class Press {
 public:
  Press(const std::vector<Order>& orders, const PressOptions& options, Progress& progress,
        Plan& plan)
      : options_(options), progress_(progress), plan_(plan) {
    for (const Order& order : orders) {
      const std::pair key{order.span.first_year, order.span.first_month};
      if (!skies_.contains(key)) skies_.emplace(key, std::make_unique<Sky>(order.span));
      types_.emplace(&order, load_type(order.fonts));
    }
  }

  void press_site(const SiteTask& task) {
    const Order& order = *task.order;
    const Sky& sky = *skies_.at({order.span.first_year, order.span.first_month});
    std::optional<SiteYear> year;
    std::optional<SiteHappenings> happenings;
    std::string trouble;
    if (!stop_requested()) {
      try {
        year = make_site_year(sky.ephemeris, task.site->place, order.span);
        happenings = make_site_happenings(sky.ephemeris, *year, sky.year);
      } catch (const std::exception& error) {
        trouble = error.what();
      }
    }
    for (const Job& job : task.jobs) {
      ReportRow& row = plan_.report.rows[job.row];
      if (!trouble.empty()) {
        row.status = ReportRow::Status::failed;
        row.reason = trouble;
      } else if (!year || !happenings || stop_requested()) {
        row.reason = "stopped before it";
      } else {
        press_file(task, job, *year, *happenings, sky, row);
      }
      const std::lock_guard lock(mutex_);
      progress_.file_done(row);
    }
  }

 private:
  void press_file(const SiteTask& task, const Job& job, const SiteYear& year,
                  const SiteHappenings& happenings, const Sky& sky, ReportRow& row) const {
    try {
      const TypeSet& type = *types_.at(task.order);
      Tally tally;
      const SheetDocument document =
          make_handout(*task.order, *task.site, *job.publication, year, sky.year, happenings,
                       sky.ephemeris, job.months, type, tally);
      write_whole(options_.out / row.file, make_pdf(document, type));
      row.status = ReportRow::Status::pressed;
      row.labels_left_out = tally.labels_left_out;
      row.notes = std::move(tally.notes);
    } catch (const std::exception& error) {
      row.status = ReportRow::Status::failed;
      row.reason = error.what();
    }
  }

  const PressOptions& options_;
  Progress& progress_;
  Plan& plan_;
  std::mutex mutex_;
  std::map<std::pair<int, int>, std::unique_ptr<Sky>> skies_;  // by first year and month
  std::map<const Order*, std::unique_ptr<TypeSet>> types_;
};

}  // namespace

PressReport plan_press(const std::vector<Order>& orders, const PressOptions& options) {
  return make_plan(orders, options).report;
}

PressReport press_orders(const std::vector<Order>& orders, const PressOptions& options,
                         Progress& progress) {
  for (const Order& order : orders) check_printable(order);
  Plan plan = make_plan(orders, options);
  check_apart(plan.report, orders);
  std::size_t files = 0;
  for (const SiteTask& task : plan.tasks) files += task.jobs.size();

  Press press(orders, options, progress, plan);  // throws for a font that cannot be set
  check_writable_folder(options.out);
  progress.begin(files);
  run_tasks(plan.tasks.size(), options.jobs,
            [&](std::size_t i) { press.press_site(plan.tasks[i]); });

  const std::string name = options.shares > 1
                               ? fmt::format("report-{}-of-{}.csv", options.share, options.shares)
                               : "report.csv";
  write_whole(options.out / name, report_csv(plan.report));
  return std::move(plan.report);
}

}  // namespace duskleaf
