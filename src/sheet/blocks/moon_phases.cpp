#include <algorithm>
#include <cmath>

#include "sheet/blocks/blocks.hpp"
#include "sheet/moon_mark.hpp"
#include "sheet/setting.hpp"
#include "sheet/sky_chart_dome.hpp"

namespace duskleaf {
namespace {

struct Phase {
  const Event* event;
  std::string key;
  double lit;
};

std::vector<Phase> phases_of_month(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<Phase> phases;
  for (const Event& event : c.year.global) {
    const Date date = c.year.place.zone.civil(event.at).date();
    if (year_of(date) != year || month_of(date) != month) continue;
    switch (event.kind) {
      case EventKind::new_moon:
        phases.push_back({&event, "moon-phases.new", 0.0});
        break;
      case EventKind::first_quarter:
        phases.push_back({&event, "moon-phases.first", 0.5});
        break;
      case EventKind::full_moon:
        phases.push_back({&event, "moon-phases.full", 1.0});
        break;
      case EventKind::last_quarter:
        phases.push_back({&event, "moon-phases.last", 0.5});
        break;
      default:
        break;
    }
  }
  return phases;
}

/// The moment's night: how the Moon leans then.
Angle lean_at(const BlockContext& c, const CivilMinute& when) {
  const auto& looks = c.year.month_moons[static_cast<std::size_t>(c.month_index)];
  const auto day = static_cast<std::size_t>(day_of(when.date())) - 1;
  return day < looks.size() ? looks[day].bright_limb_from_zenith : Angle();
}

std::string when_text(const BlockContext& c, const CivilMinute& when) {
  return c.words("date.weekday-day", {{"weekday", c.words.weekday_short(weekday_of(when.date()))},
                                      {"day", std::to_string(day_of(when.date()))}}) +
         "  " + c.words.time(when);
}

/// In the two upper corners that a dome leaves free, half of them in each, from the top down. What
/// stands lower has less room: type shrinks there before it comes near the dome.
double draw_in_corners(const BlockContext& c, const std::vector<Phase>& phases, const Box& area,
                       std::vector<Mark>& out) {
  constexpr double moon_radius = 3.2, text_from = 2 * moon_radius + 1.7, clearance = 1.6;
  constexpr double first_middle = 8.0, pitch = 8.3, below_middle = 3.0;
  Setter set(c, out);
  const double radius = dome_radius(c, area) + clearance;
  const Point dome{area.x + area.width / 2, area.y + dome_radius(c, area)};
  const Style title{Face::bold, 8.5, c.theme.blue};
  set.left(area.x, area.y + 2.6, c.words("moon-phases.title"), title);
  set.left(area.x + set.width(c.words("moon-phases.title"), title) + 2, area.y + 2.6,
           c.words("moon-phases.aside"), {Face::italic, c.theme.table_pt, c.theme.soft});
  const std::size_t left_rows = (phases.size() + 1) / 2;
  const Style name{Face::bold, 8, c.theme.black}, line{Face::condensed, 8, c.theme.black};
  double bottom = 0;
  for (std::size_t i = 0; i < phases.size(); ++i) {
    const bool right = i >= left_rows;
    const double row = static_cast<double>(right ? i - left_rows : i);
    const double middle = area.y + first_middle + pitch * row;
    const double rise = std::max(0.0, dome.y - middle - below_middle);
    const double half = rise < radius ? std::sqrt(radius * radius - rise * rise) : 0.0;
    const double room = area.width / 2 - half - text_from;
    const CivilMinute when = c.year.place.zone.civil(phases[i].event->at);
    const double moon_x = right ? area.right() - moon_radius - 0.2 : area.x + moon_radius + 0.2;
    draw_moon({moon_x, middle}, moon_radius, phases[i].lit, lean_at(c, when), c.theme, out);
    const auto text = [&](double baseline, const std::string& words, const Style& style) {
      const double width = std::min(room, set.width(words, style));
      set.fitted(right ? area.right() - text_from - width : area.x + text_from, baseline, words,
                 style, room);
    };
    text(middle - 0.6, c.words(phases[i].key), name);
    text(middle + 2.7, when_text(c, when), line);
    bottom = std::max(bottom, middle + below_middle);
  }
  return bottom - area.y;
}

}  // namespace

double draw_moon_phases(const BlockContext& c, const BlockOptions& options, const Box& area,
                        std::vector<Mark>& out) {
  const std::vector<Phase> phases = phases_of_month(c);
  if (phases.empty())
    return 0;  // cannot happen in a month of 28 days or more, but a block with nothing to say
               // closes up
  if (options.get("form") == "corners") return draw_in_corners(c, phases, area, out);
  Setter set(c, out);
  // One row: its title at the left, then a cell for each phase.
  set.rule(area.x, area.right(), area.y, c.theme.blue, 0.25);
  const Style title{Face::bold, 9.5, c.theme.blue};
  set.left(area.x, area.y + 4.3, c.words("moon-phases.title"), title);
  set.left(area.x, area.y + 8.0, c.words("moon-phases.aside"),
           {Face::italic, c.theme.table_pt, c.theme.soft});
  const double from = std::max(set.width(c.words("moon-phases.title"), title), 30.0) + 3;
  const double cell = (area.width - from) / static_cast<double>(phases.size());
  const double radius = phases.size() > 4 ? 3.0 : 3.7, middle = area.y + 5.1;
  for (std::size_t i = 0; i < phases.size(); ++i) {
    const CivilMinute when = c.year.place.zone.civil(phases[i].event->at);
    const double x = area.x + from + cell * static_cast<double>(i);
    draw_moon({x + radius + 0.3, middle}, radius, phases[i].lit, lean_at(c, when), c.theme, out);
    const double text_x = x + 2 * radius + 2.4;
    set.left(text_x, middle - 1.5, c.words(phases[i].key), set.strong(set.body()));
    Style line = set.body();
    if (phases.size() > 4) line.face = Face::condensed;  // five in a month: narrow cells
    set.fitted(text_x, middle + 2.3, when_text(c, when), line, x + cell - text_x);
  }
  return 9.2;
}

}  // namespace duskleaf
