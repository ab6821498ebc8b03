#include <algorithm>

#include "sheet/blocks/blocks.hpp"
#include "sheet/moon_mark.hpp"
#include "sheet/setting.hpp"

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

}  // namespace

double draw_moon_phases(const BlockContext& c, const BlockOptions&, const Box& area,
                        std::vector<Mark>& out) {
  const std::vector<Phase> phases = phases_of_month(c);
  if (phases.empty())
    return 0;  // cannot happen in a month of 28 days or more, but a block with nothing to say
               // closes up
  Setter set(c, out);
  // One row: its title at the left, then a cell for each phase.
  set.rule(area.x, area.right(), area.y, c.theme.blue, 0.25);
  const Style title{Face::bold, 9.5, c.theme.blue};
  set.left(area.x, area.y + 4.3, c.words("moon-phases.title"), title);
  set.left(area.x, area.y + 8.0, c.words("moon-phases.aside"),
           {Face::italic, c.theme.table_pt, c.theme.soft});
  const double from = std::max(set.width(c.words("moon-phases.title"), title), 30.0) + 3;
  const auto& looks = c.year.month_moons[static_cast<std::size_t>(c.month_index)];
  const double cell = (area.width - from) / static_cast<double>(phases.size());
  const double radius = phases.size() > 4 ? 3.0 : 3.7, middle = area.y + 5.1;
  for (std::size_t i = 0; i < phases.size(); ++i) {
    const CivilMinute when = c.year.place.zone.civil(phases[i].event->at);
    const auto day = static_cast<std::size_t>(day_of(when.date())) - 1;
    const Angle lean = day < looks.size() ? looks[day].bright_limb_from_zenith : Angle();
    const double x = area.x + from + cell * static_cast<double>(i);
    draw_moon({x + radius + 0.3, middle}, radius, phases[i].lit, lean, c.theme, out);
    const double text_x = x + 2 * radius + 2.4;
    set.left(text_x, middle - 1.5, c.words(phases[i].key), set.strong(set.body()));
    const std::string day_name =
        c.words("date.weekday-day", {{"weekday", c.words.weekday_short(weekday_of(when.date()))},
                                     {"day", std::to_string(day_of(when.date()))}});
    Style line = set.body();
    if (phases.size() > 4) line.face = Face::condensed;  // five in a month: narrow cells
    set.fitted(text_x, middle + 2.3, day_name + "  " + c.words.time(when), line, x + cell - text_x);
  }
  return 9.2;
}

}  // namespace duskleaf
