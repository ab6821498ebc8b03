// What the night bars' table says, and how wide. A row runs from one evening to the next morning,
// and so do its columns: what is said of the Sun's rise is of the date that follows.
#include "sheet/night_columns.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <utility>
#include <variant>

namespace duskleaf {
namespace {

// mm
constexpr double dates_width = 12.4, moon_radius = 1.45, before_bars = 3.4;
constexpr double most_between = 2.1, least_between = 1.2, wanted_bars = 50;

/// A time, or a word in its place.
using Cell = std::variant<CivilMinute, std::string>;
using Cells = std::vector<Cell>;

Cell time_or_dash(const BlockContext& c, const std::optional<Ut>& t) {
  if (!t) return "–";
  return c.year.place.zone.civil(*t);
}

/// When the night's darkness begins or ends, by the limit that the month uses.
const std::optional<Ut>& dark_end(const Night& night, bool dusk) {
  const double limit = night.dark_limit.degrees();
  if (limit < -15) return dusk ? night.astronomical_dusk : night.astronomical_dawn;
  if (limit < -9) return dusk ? night.nautical_dusk : night.nautical_dawn;
  return dusk ? night.civil_dusk : night.civil_dawn;
}

/// When the Sun goes behind the site's skyline in the evening, or clears it in the morning.
Cell skyline_cell(const BlockContext& c, const Night& night, bool gone) {
  for (const SkylineDay& day : c.happenings.skyline) {
    if (day.date < night.date) continue;
    if (day.date > night.date + std::chrono::days(1)) break;
    const std::optional<Ut>& at = gone ? day.gone : day.clears;
    if (at && *at >= night.from && *at < night.to) return time_or_dash(c, at);
  }
  return "–";
}

std::string dark_hours(const BlockContext& c, const Night& night) {
  double total = 0;
  for (const TimeSpan& span : night.dark_or_darkest)
    total += (span.to - span.from).count() * 1440.0;
  return total < 0.5 ? std::string("–") : c.words.duration(total);
}

/// Moon cells: a time where it happens between sunset and sunrise, else whether the Moon is up at
/// that end of the night.
Cell moon_cell(const BlockContext& c, const Night& night, bool rise) {
  if (night.from == night.to) return "–";  // a date that the zone skipped
  const Ut begin = night.sunset.value_or(night.from), end = night.sunrise.value_or(night.to);
  for (Ut t : rise ? night.moonrises : night.moonsets)
    if (t >= begin && t <= end) return c.year.place.zone.civil(t);
  bool up_at_end = night.moon_up_at_dusk;
  for (const Event& event : night.events) {
    if (event.at < begin || event.at > end) continue;
    if (event.kind == EventKind::moonrise) up_at_end = true;
    if (event.kind == EventKind::moonset) up_at_end = false;
  }
  return (rise ? night.moon_up_at_dusk : up_at_end) ? c.words("night-bars.up") : "–";
}

/// The half of the day that all of a column's times are of: "am", "pm", or empty.
std::string_view half_of_day(const Cells& cells) {
  bool am = false, pm = false;
  for (const Cell& cell : cells)
    if (const auto* time = std::get_if<CivilMinute>(&cell)) (time->hour() < 12 ? am : pm) = true;
  return am == pm ? "" : am ? "am" : "pm";
}

TimeColumn column_of(const BlockContext& c, std::array<std::string, 2> head, const Cells& cells) {
  const std::string_view half = c.order.clock_12 ? half_of_day(cells) : "";
  TimeColumn column{std::move(head), {}, 0};
  if (!half.empty())
    column.head[1] = c.words("night-bars.head-" + std::string(half), {{"head", column.head[1]}});
  for (const Cell& cell : cells) {
    if (const auto* word = std::get_if<std::string>(&cell)) {
      column.cells.push_back(*word);
      continue;
    }
    const CivilMinute& time = std::get<CivilMinute>(cell);
    column.cells.push_back(
        half.empty() ? c.words.time(time)
                     : fmt::format("{}:{:02}", (time.hour() + 11) % 12 + 1, time.minute()));
  }
  return column;
}

std::vector<TimeColumn> time_columns(const BlockContext& c,
                                     const std::vector<const Night*>& nights) {
  std::vector<TimeColumn> columns;
  const bool darkest = counts_darkest(nights);
  const auto add = [&](std::string_view key, auto&& cell) {
    Cells cells;
    for (const Night* night : nights) cells.push_back(cell(*night));
    const bool of_dark = key.starts_with("dark");
    columns.push_back(column_of(
        c,
        {c.words(of_dark && darkest ? "night-bars.darkest" : fmt::format("night-bars.{}-1", key)),
         c.words(fmt::format("night-bars.{}-2", key))},
        cells));
  };
  // In the order in which they happen: behind the hills, then below the sea's horizon.
  const bool hills = has_skyline_times(c);
  if (hills) add("behind", [&](const Night& n) { return skyline_cell(c, n, true); });
  add("sunset", [&](const Night& n) { return time_or_dash(c, n.sunset); });
  add("dark-from", [&](const Night& n) { return time_or_dash(c, dark_end(n, true)); });
  add("dark-to", [&](const Night& n) { return time_or_dash(c, dark_end(n, false)); });
  add("sunrise", [&](const Night& n) { return time_or_dash(c, n.sunrise); });
  if (hills) add("clears", [&](const Night& n) { return skyline_cell(c, n, false); });
  add("moonrise", [&](const Night& n) { return moon_cell(c, n, true); });
  add("moonset", [&](const Night& n) { return moon_cell(c, n, false); });
  return columns;
}

}  // namespace

bool counts_darkest(const std::vector<const Night*>& nights) {
  return !nights.empty() && nights.front()->dark_limit.degrees() > -15;
}

bool has_skyline_times(const BlockContext& c) {
  const std::pair<int, int> month = c.year.span.month(c.month_index);
  for (const SkylineDay& day : c.happenings.skyline)
    if (std::pair(year_of(day.date), month_of(day.date)) == month && (day.clears || day.gone))
      return true;
  return false;
}

NightColumns night_columns(const BlockContext& c, const std::vector<const Night*>& nights,
                           const Box& area, const std::optional<JupiterColumn>& jupiter) {
  std::vector<Mark> unused;
  const Setter set(c, unused);
  const Style cell = set.table(), strong = set.strong(cell);
  const auto widest = [&](const auto& texts, const Style& style) {
    double width = 0;
    for (const std::string& text : texts) width = std::max(width, set.width(text, style));
    return width;
  };
  NightColumns columns;
  columns.times = time_columns(c, nights);
  columns.axis = night_axis(c, nights);
  for (const Night* night : nights) {
    columns.lit.push_back(
        c.words("night-bars.percent", {{"n", c.words.number(100 * night->moon_lit, 0)}}));
    columns.dark.push_back(dark_hours(c, *night));
  }
  columns.dark_head = {
      c.words(counts_darkest(nights) ? "night-bars.darkest-hours" : "night-bars.hours-1"),
      c.words("night-bars.hours-2")};

  // Columns close up before the bars get short.
  double between = most_between;
  const auto place = [&] {
    double x = area.x + dates_width;
    for (TimeColumn& column : columns.times) {
      const double width = std::max(widest(column.cells, cell), widest(column.head, cell));
      column.centre = x + width / 2;
      x += width + between;
    }
    columns.lit_right = x + widest(columns.lit, cell);
    columns.moon = columns.lit_right + 1.2 + moon_radius;
    x = columns.moon + moon_radius + between;
    columns.dark_right =
        x + std::max(widest(columns.dark, strong), widest(columns.dark_head, cell));
    x = columns.dark_right;
    if (jupiter) {
      double half = std::max(set.width(c.words("night-bars.jupiter-1"), cell),
                             set.width(c.words("night-bars.jupiter-2"), cell)) /
                    2;
      double left = half, right = half;
      for (const std::string& order : jupiter->order) {
        const std::size_t planet = order.find('J');
        if (planet == std::string::npos) continue;
        left = std::max(left, set.width(order.substr(0, planet), cell) + 1.4);
        right = std::max(right, set.width(order.substr(planet + 1), cell) + 1.4);
      }
      columns.jupiter = x + between + 0.6 + left;
      x = columns.jupiter + right;
    }
    columns.axis.x = x + before_bars;
    columns.axis.width = area.right() - columns.axis.x;
  };
  place();
  if (const double missing = wanted_bars - columns.axis.width; missing > 0) {
    const auto gaps = static_cast<double>(columns.times.size() + (jupiter ? 3 : 2));
    between = std::max(least_between, between - missing / gaps);
    place();
  }
  return columns;
}

void draw_night_heads(const BlockContext& c, Setter& set, const NightColumns& columns, double top,
                      const Style& style, bool jupiter) {
  const std::array baselines{top + 2.7, top + 5.7};
  for (std::size_t i = 0; i < 2; ++i) {
    const double y = baselines[i];
    const std::string n = std::to_string(i + 1);
    for (const TimeColumn& column : columns.times)
      set.centre(column.centre, y, column.head[i], style);
    set.right(columns.moon + moon_radius, y, c.words("night-bars.lit-" + n), style);
    set.right(columns.dark_right, y, columns.dark_head[i], style);
    if (jupiter) set.centre(columns.jupiter, y, c.words("night-bars.jupiter-" + n), style);
  }
}

}  // namespace duskleaf
