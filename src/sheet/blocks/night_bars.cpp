#include <algorithm>
#include <functional>
#include <set>

#include "sheet/blocks/blocks.hpp"
#include "sheet/jupiter_column.hpp"
#include "sheet/moon_mark.hpp"
#include "sheet/night_bar_drawing.hpp"

// One row a night. A row runs from one evening to the next morning, and so do its columns: what is
// said of the Sun's rise is of the date that follows.

namespace duskleaf {
namespace {

// mm. Rows grow with the block's room; at the least pitch their 8 pt still stand clear.
constexpr double above_heads = 0.8, heads = 6.8, key_line = 4.2, note_line = 3.2;
constexpr double least_pitch = 3.0, greatest_pitch = 4.4;

std::vector<const Night*> nights_of_month(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<const Night*> nights;
  for (const Night& night : c.year.nights)
    if (year_of(night.date) == year && month_of(night.date) == month) nights.push_back(&night);
  return nights;
}

std::string time_or_dash(const BlockContext& c, const std::optional<Ut>& t) {
  return t ? c.words.time(c.year.place.zone.civil(*t)) : std::string("–");
}

/// When the night's darkness begins or ends, by the limit that the month uses.
const std::optional<Ut>& dark_end(const Night& night, bool dusk) {
  const double limit = night.dark_limit.degrees();
  if (limit < -15) return dusk ? night.astronomical_dusk : night.astronomical_dawn;
  if (limit < -9) return dusk ? night.nautical_dusk : night.nautical_dawn;
  return dusk ? night.civil_dusk : night.civil_dawn;
}

/// When the Sun goes behind the site's skyline in the evening, or clears it in the morning.
std::string skyline_cell(const BlockContext& c, const Night& night, bool gone) {
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
std::string moon_cell(const BlockContext& c, const Night& night, bool rise) {
  if (night.from == night.to) return "–";  // a date that the zone skipped
  const Ut begin = night.sunset.value_or(night.from), end = night.sunrise.value_or(night.to);
  for (Ut t : rise ? night.moonrises : night.moonsets)
    if (t >= begin && t <= end) return c.words.time(c.year.place.zone.civil(t));
  bool up_at_end = night.moon_up_at_dusk;
  for (const Event& event : night.events) {
    if (event.at < begin || event.at > end) continue;
    if (event.kind == EventKind::moonrise) up_at_end = true;
    if (event.kind == EventKind::moonset) up_at_end = false;
  }
  return (rise ? night.moon_up_at_dusk : up_at_end) ? c.words("night-bars.up") : "–";
}

/// A column of clock times; its head is the two words night-bars.KEY-1 and -2.
struct TimeColumn {
  std::string key;
  std::function<std::string(const Night&)> cell;
  double centre = 0;
};

/// Whether the site has a skyline that the Sun clears or goes behind in the month.
bool has_skyline_times(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  return std::any_of(
      c.happenings.skyline.begin(), c.happenings.skyline.end(), [&](const SkylineDay& day) {
        return year_of(day.date) == year && month_of(day.date) == month && (day.clears || day.gone);
      });
}

std::vector<TimeColumn> time_columns(const BlockContext& c) {
  std::vector<TimeColumn> columns{
      {"sunset", [&c](const Night& n) { return time_or_dash(c, n.sunset); }},
      {"dark-from", [&c](const Night& n) { return time_or_dash(c, dark_end(n, true)); }},
      {"dark-to", [&c](const Night& n) { return time_or_dash(c, dark_end(n, false)); }},
      {"sunrise", [&c](const Night& n) { return time_or_dash(c, n.sunrise); }},
      {"moonrise", [&c](const Night& n) { return moon_cell(c, n, true); }},
      {"moonset", [&c](const Night& n) { return moon_cell(c, n, false); }}};
  if (has_skyline_times(c)) {
    // In the order in which they happen: behind the hills, then below the sea's horizon.
    columns.insert(columns.begin() + 4,
                   {"clears", [&c](const Night& n) { return skyline_cell(c, n, false); }});
    columns.insert(columns.begin(),
                   {"behind", [&c](const Night& n) { return skyline_cell(c, n, true); }});
  }
  return columns;
}

/// Where a row's parts stand, mm.
struct Columns {
  std::vector<TimeColumn> times;
  double lit_right, moon, dark_right, jupiter;  // jupiter: the planet's place
  NightAxis axis;
};

Columns place_columns(const BlockContext& c, const std::vector<const Night*>& nights,
                      const Box& area, bool with_jupiter) {
  Columns columns{time_columns(c), 0, 0, 0, 0, night_axis(c, nights)};
  const double width = c.order.clock_12 ? (columns.times.size() > 6 ? 11.5 : 12.6)
                                        : (columns.times.size() > 6 ? 9.6 : 10.2);
  double x = area.x + 12.0;
  for (TimeColumn& column : columns.times) {
    column.centre = x + width / 2;
    x += width;
  }
  columns.lit_right = x + 6.6;
  columns.moon = x + 9.4;
  x += 12.0;
  columns.dark_right = x + 8.0;
  x += 11.0;
  if (with_jupiter) {
    columns.jupiter = x + 8.2;
    x += 17.4;
  }
  columns.axis.x = x;
  columns.axis.width = area.right() - x;
  return columns;
}

void draw_heads(const BlockContext& c, Setter& set, const Columns& columns, double top,
                const Style& style, bool jupiter) {
  const double first = top + 2.7, second = top + 5.7;
  for (const TimeColumn& column : columns.times) {
    set.centre(column.centre, first, c.words("night-bars." + column.key + "-1"), style);
    set.centre(column.centre, second, c.words("night-bars." + column.key + "-2"), style);
  }
  const double lit = (columns.lit_right + columns.moon) / 2 - 0.8;
  set.centre(lit, first, c.words("night-bars.lit-1"), style);
  set.centre(lit, second, c.words("night-bars.lit-2"), style);
  set.right(columns.dark_right, first, c.words("night-bars.hours-1"), style);
  set.right(columns.dark_right, second, c.words("night-bars.hours-2"), style);
  if (!jupiter) return;
  set.centre(columns.jupiter, first, c.words("night-bars.jupiter-1"), style);
  set.centre(columns.jupiter, second, c.words("night-bars.jupiter-2"), style);
}

/// The planet's letter under that of the night before, its moons to both sides.
void draw_jupiter(Setter& set, double x, double baseline, const std::string& order,
                  const Style& cell) {
  const std::size_t planet = order.find('J');
  if (planet == std::string::npos) return;
  const double half = set.width("J", set.strong(cell)) / 2;
  set.centre(x, baseline, "J", set.strong(cell));
  if (planet > 1) set.right(x - half - 0.7, baseline, order.substr(0, planet - 1), cell);
  if (planet + 2 < order.size()) set.left(x + half + 0.7, baseline, order.substr(planet + 2), cell);
}

/// Under the times: what "dark" means this month, and the "up" of the Moon's columns.
std::string foot_note(const BlockContext& c, const std::vector<const Night*>& nights) {
  const bool always_day = std::all_of(nights.begin(), nights.end(), [](const Night* n) {
    return n->sun == Presence::up_throughout;
  });
  if (always_day) return c.words("night-bars.no-night");
  const double limit = nights.front()->dark_limit.degrees();
  return c.words(limit < -15 ? "night-bars.limit" : "night-bars.limit-shallow",
                 {{"degrees", c.words.number(-limit, 0)}});
}

}  // namespace

double night_bars_least_height(const BlockContext& c) {
  const std::vector<const Night*> nights = nights_of_month(c);
  const bool notes = has_skyline_times(c) || jupiter_column(c, nights).has_value();
  return above_heads + heads + key_line + (notes ? note_line : 0.0) +
         least_pitch * static_cast<double>(nights.size());
}

double draw_night_bars(const BlockContext& c, const BlockOptions&, const Box& area,
                       std::vector<Mark>& out) {
  Setter set(c, out);
  const std::vector<const Night*> nights = nights_of_month(c);
  const std::optional<JupiterColumn> jupiter = jupiter_column(c, nights);
  const Columns columns = place_columns(c, nights, area, jupiter.has_value());
  const NightAxis& axis = columns.axis;

  std::set<Date> session_nights;
  for (const Session& session : c.site.sessions)
    for (Date date : session_dates(session, c.year.span)) session_nights.insert(date);
  std::string notes;
  if (jupiter) notes += c.words("night-bars.jupiter-note", {{"time", jupiter->hour}});
  if (has_skyline_times(c))
    notes += (notes.empty() ? "" : " ") + c.words("night-bars.skyline-note");
  const double foot = key_line + (notes.empty() ? 0.0 : note_line);

  set.rule(area.x, area.right(), area.y, c.theme.blue, 0.25);
  const double rows = static_cast<double>(nights.size());
  const double pitch =
      std::clamp((area.height - above_heads - heads - foot) / rows, least_pitch, greatest_pitch);
  const Style cell = set.table();
  Style head_style = cell;
  head_style.ink = c.theme.soft;
  const double top = area.y + above_heads;
  const double bars_top = top + heads, bars_bottom = bars_top + pitch * rows;
  draw_heads(c, set, columns, top, head_style, jupiter.has_value());
  draw_hour_lines(c, set, axis, head_style, top + 5.2, bars_top, bars_bottom, out);

  double y = bars_top;
  for (std::size_t i = 0; i < nights.size(); ++i, y += pitch) {
    const Night& night = *nights[i];
    const NightRow row{night, y, pitch};
    const double baseline = y + pitch / 2 + c.type.cap_height(cell.face, cell.size_pt) / 2;
    const bool session = session_nights.contains(night.date);
    const auto weekday = weekday_of(night.date);
    if (i > 0 && weekday == std::chrono::Monday)
      set.rule(area.x, axis.x - 1.5, y, c.theme.faint, c.theme.hairline_mm);
    const bool weekend = weekday == std::chrono::Friday || weekday == std::chrono::Saturday;
    const Style date_style = weekend || session ? set.strong(cell) : cell;
    set.left(area.x, baseline, c.words.weekday_short(weekday), date_style);
    set.right(area.x + 9.6, baseline, std::to_string(day_of(night.date)), date_style);
    if (session) {
      const double h = 0.95;  // a filled lozenge: the group's own night
      const Point p{area.x + 10.9, y + pitch / 2};
      out.push_back(Fill{
          Path::polyline({{p.x, p.y - h}, {p.x + h, p.y}, {p.x, p.y + h}, {p.x - h, p.y}}, true),
          c.theme.blue});
    }
    for (const TimeColumn& column : columns.times)
      set.centre(column.centre, baseline, column.cell(night), cell);
    set.right(columns.lit_right, baseline,
              c.words("night-bars.percent", {{"n", c.words.number(100 * night.moon_lit, 0)}}),
              cell);
    const auto& looks = c.year.month_moons[static_cast<std::size_t>(c.month_index)];
    if (i < looks.size())
      draw_moon({columns.moon, y + pitch / 2}, std::min(1.45, pitch * 0.42), looks[i].lit,
                looks[i].bright_limb_from_zenith, c.theme, out);
    set.right(columns.dark_right, baseline, dark_hours(c, night), set.strong(cell));
    if (jupiter) draw_jupiter(set, columns.jupiter, baseline, jupiter->order[i], cell);
    draw_night_bar(c, axis, row, out);
    mark_clock_change(c, set, axis, row, out);
  }
  label_night_bars(c, set, axis, nights, bars_top, pitch, out);

  // The key under the bars, what the dark hours count, and what the further columns say.
  const double key_y = bars_bottom + 1.2, key_baseline = key_y + 2.5;
  const double key_width = draw_night_key(c, set, head_style, area.right(), key_y, out);
  std::string foot_words = foot_note(c, nights);
  if (!session_nights.empty()) foot_words.append(" ").append(c.words("night-bars.own"));
  set.fitted(area.x, key_baseline, foot_words, head_style, area.width - key_width - 3);
  if (!notes.empty()) set.fitted(area.x, key_baseline + note_line, notes, head_style, area.width);
  return bars_bottom + foot - area.y;
}

}  // namespace duskleaf
