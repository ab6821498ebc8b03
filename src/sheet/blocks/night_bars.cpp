#include <algorithm>
#include <cmath>
#include <set>

#include "sheet/blocks/blocks.hpp"
#include "sheet/moon_mark.hpp"
#include "sheet/night_columns.hpp"

// One row a night: its table (sheet/night_columns.hpp) and a bar.

namespace duskleaf {
namespace {

// mm. Rows grow with the block's room; at the least pitch their 8 pt still stand clear.
constexpr double above_heads = 0.8, heads = 6.8, key_line = 4.2, note_line = 3.2;
constexpr double least_pitch = 3.0, greatest_pitch = 4.8;

std::vector<const Night*> nights_of_month(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<const Night*> nights;
  for (const Night& night : c.year.nights)
    if (year_of(night.date) == year && month_of(night.date) == month) nights.push_back(&night);
  return nights;
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

/// What the further columns say, a line each.
std::vector<std::string> notes_of(const BlockContext& c, const std::vector<const Night*>& nights,
                                  const std::optional<JupiterColumn>& jupiter) {
  std::vector<std::string> lines;
  std::string more;
  if (jupiter) {
    lines.push_back(c.words("night-bars.jupiter-note", {{"time", jupiter->hour}}));
    // Where Jupiter stands highest in the north, east is to the right of it.
    const Tt middle = to_tt(nights[nights.size() / 2]->darkest);
    const Eigen::Vector3d place = c.ephemeris.apparent(Body::jupiter, middle);
    if (std::asin(place.z() / place.norm()) > c.year.place.observer.latitude.radians())
      more = c.words("night-bars.east-right");
  }
  if (has_skyline_times(c)) more += (more.empty() ? "" : " ") + c.words("night-bars.skyline-note");
  if (!more.empty()) lines.push_back(more);
  return lines;
}

}  // namespace

double night_bars_least_height(const BlockContext& c) {
  const std::vector<const Night*> nights = nights_of_month(c);
  const std::size_t notes = notes_of(c, nights, jupiter_column(c, nights)).size();
  return above_heads + heads + key_line + note_line * static_cast<double>(notes) +
         least_pitch * static_cast<double>(nights.size());
}

double draw_night_bars(const BlockContext& c, const BlockOptions&, const Box& area,
                       std::vector<Mark>& out) {
  Setter set(c, out);
  const std::vector<const Night*> nights = nights_of_month(c);
  const std::optional<JupiterColumn> jupiter = jupiter_column(c, nights);
  const NightColumns columns = night_columns(c, nights, area, jupiter);
  const NightAxis& axis = columns.axis;

  std::set<Date> session_nights;
  for (const Session& session : c.site.sessions)
    for (Date date : session_dates(session, c.year.span)) session_nights.insert(date);
  const std::vector<std::string> notes = notes_of(c, nights, jupiter);
  const double foot = key_line + note_line * static_cast<double>(notes.size());

  set.rule(area.x, area.right(), area.y, c.theme.blue, 0.25);
  const double rows = static_cast<double>(nights.size());
  const double pitch =
      std::clamp((area.height - above_heads - heads - foot) / rows, least_pitch, greatest_pitch);
  const Style cell = set.table();
  Style head_style = cell;
  head_style.ink = c.theme.soft;
  const double top = area.y + above_heads;
  const double bars_top = top + heads, bars_bottom = bars_top + pitch * rows;
  draw_night_heads(c, set, columns, top, head_style, jupiter.has_value());
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
      set.centre(column.centre, baseline, column.cells[i], cell);
    set.right(columns.lit_right, baseline, columns.lit[i], cell);
    const auto& looks = c.year.month_moons[static_cast<std::size_t>(c.month_index)];
    if (i < looks.size())
      draw_moon({columns.moon, y + pitch / 2}, std::min(1.45, pitch * 0.42), looks[i].lit,
                looks[i].bright_limb_from_zenith, c.theme, out);
    set.right(columns.dark_right, baseline, columns.dark[i], set.strong(cell));
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
  for (std::size_t i = 0; i < notes.size(); ++i)
    set.fitted(area.x, key_baseline + note_line * static_cast<double>(i + 1), notes[i], head_style,
               area.width);
  return bars_bottom + foot - area.y;
}

}  // namespace duskleaf
