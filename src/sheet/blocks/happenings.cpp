#include <algorithm>
#include <cmath>
#include <fmt/format.h>

#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

struct Line {
  Date date;
  std::string when, text;
  bool own = false;
};

/// Kilometres to the nearest hundred, with a thin space between thousands.
std::string thousands(double km) {
  const long value = std::lround(km / 100) * 100;
  return fmt::format("{}\u202F{:03}", value / 1000, value % 1000);
}

/// A line for each instant that people notice; phases have their own block.
std::vector<Line> lines_of_month(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  const Zone& zone = c.year.place.zone;
  std::vector<Line> lines;
  const auto in_month = [&](Date d) { return year_of(d) == year && month_of(d) == month; };
  for (const Event& event : c.year.global) {
    const std::string key = "happening." + event_name(event.kind);
    if (!c.words.has(key)) continue;
    const CivilMinute at = zone.civil(event.at);
    if (!in_month(at.date())) continue;
    std::string value;
    if (event.value)
      value = event_unit(event.kind) == "km" ? thousands(*event.value)
                                             : c.words.number(*event.value, 4);
    lines.push_back({at.date(), c.words.time(at), c.words(key, {{"value", value}})});
  }
  for (const ClockChange& change : c.year.clock_changes) {
    const CivilMinute at = zone.civil(change.at);
    if (!in_month(at.date())) continue;
    const double hours =
        std::chrono::duration<double, std::ratio<3600>>(change.after - change.before).count();
    const double size = std::abs(hours);
    const std::string amount =
        size == 1 ? c.words("happening.one-hour")
                  : c.words("happening.hours",
                            {{"n", c.words.number(size, size == std::floor(size) ? 0 : 1)}});
    lines.push_back({at.date(), c.words.time(at),
                     c.words(hours > 0 ? "happening.clocks-forward" : "happening.clocks-back",
                             {{"amount", amount}})});
  }
  for (const OwnDate& own : c.site.dates) {
    if (!in_month(own.from) && !in_month(own.to) &&
        !(own.from < make_date(year, month, 1) && own.to > make_date(year, month, 1)))
      continue;
    const std::string when =
        own.from == own.to ? "" : c.words("happening.until", {{"date", c.words.day_month(own.to)}});
    lines.push_back({std::max(own.from, make_date(year, month, 1)), when, own.text, true});
  }
  std::stable_sort(lines.begin(), lines.end(),
                   [](const Line& a, const Line& b) { return a.date < b.date; });
  return lines;
}

}  // namespace

double draw_happenings(const BlockContext& c, const BlockOptions&, const Box& area,
                       std::vector<Mark>& out) {
  const std::vector<Line> lines = lines_of_month(c);
  if (lines.empty()) return 0;
  Setter set(c, out);
  double y = area.y + set.heading(area.x, area.y, area.width, c.words("happenings.title"));
  const Style body = set.body();
  const double text_x = area.x + 14.5;
  for (const Line& line : lines) {
    const double baseline = y + body.size_pt * mm_per_pt * 0.95;
    set.left(area.x, baseline, c.words.weekday_short(weekday_of(line.date)), body);
    set.right(area.x + 11.5, baseline, std::to_string(day_of(line.date)), set.strong(body));
    y += set.lead_in(text_x, y, area.right() - text_x, line.when, line.text, body);
  }
  return y - area.y + 0.8;
}

}  // namespace duskleaf
