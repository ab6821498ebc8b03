#include "almanac/planet_months.hpp"
#include "catalogue/constellations.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

std::string when_seen(const BlockContext& c, const PlanetMonth& planet) {
  const auto [year, month] = c.year.span.month(c.month_index);
  const Date first = make_date(year, month, 1),
             last = make_date(year, month, days_in_month(year, month));
  PlanetSight sight = planet.sight;
  if (sight == PlanetSight::not_visible && planet.first_evening)
    sight = PlanetSight::evening;  // on other evenings than the 15th
  std::string text;
  switch (sight) {
    case PlanetSight::not_visible:
      return c.words(planet.optics_only ? "planets.too-faint" : "planets.not-visible");
    case PlanetSight::morning:
      text = c.words("planets.morning");
      break;
    case PlanetSight::all_night:
      text = c.words("planets.all-night");
      break;
    case PlanetSight::evening_and_morning:
      text = c.words("planets.evening-and-morning");
      break;
    case PlanetSight::evening:
      text = c.words("planets.evening");
      break;
  }
  if (sight == PlanetSight::evening && planet.first_evening && planet.last_evening) {
    const bool late = *planet.first_evening > first, early = *planet.last_evening < last;
    const auto day = [&](Date d) {
      return c.words("date.day-month", {{"day", std::to_string(day_of(d))},
                                        {"month", c.words.month_short(month_of(d))}});
    };
    if (late && early)
      text = c.words("planets.evening-between",
                     {{"from", day(*planet.first_evening)}, {"to", day(*planet.last_evening)}});
    else if (late)
      text = c.words("planets.evening-from", {{"from", day(*planet.first_evening)}});
    else if (early)
      text = c.words("planets.evening-until", {{"to", day(*planet.last_evening)}});
  }
  return planet.optics_only ? c.words("planets.with-optics", {{"when", text}}) : text;
}

}  // namespace

double draw_planets(const BlockContext& c, const BlockOptions&, const Box& area,
                    std::vector<Mark>& out) {
  Setter set(c, out);
  const Zone& zone = c.year.place.zone;
  double y = area.y + set.heading(area.x, area.y, area.width, c.words("planets.title"),
                                  c.words("planets.aside"));
  const Style cell = set.table();
  Style head = cell;
  head.ink = c.theme.soft;
  const double when_x = area.x + 13, in_x = area.right() - 17, magnitude_x = in_x - 2.5,
               where_x = magnitude_x - 8, best_x = where_x - 11.5;
  set.left(when_x, y + 2.4, c.words("planets.when"), head);
  set.right(best_x, y + 2.4, c.words("planets.best"), head);
  set.right(where_x, y + 2.4, c.words("planets.where"), head);
  set.right(magnitude_x, y + 2.4, c.words("planets.magnitude"), head);
  set.left(in_x, y + 2.4, c.words("planets.in"), head);
  y += 3.6;
  for (const PlanetMonth& planet : planet_month(c.ephemeris, c.year, c.month_index)) {
    const double baseline = y + 2.6;
    set.left(area.x, baseline, c.words("body." + std::string(body_name(planet.planet))),
             set.strong(cell));
    set.fitted(when_x, baseline, when_seen(c, planet), cell,
               best_x - (c.order.clock_12 ? 11.5 : 9) - when_x);
    if (planet.best && planet.place) {
      set.right(best_x, baseline, c.words.time(zone.civil(*planet.best)), cell);
      set.right(where_x, baseline,
                c.words("constellations.at",
                        {{"direction", c.words.direction_short(planet.place->azimuth)},
                         {"altitude", c.words.number(planet.place->altitude.degrees(), 0)}}),
                cell);
    } else {
      set.right(best_x, baseline, "–", cell);
      set.right(where_x, baseline, "–", cell);
    }
    set.right(magnitude_x, baseline, c.words.number(planet.magnitude, 1), cell);
    set.fitted(in_x, baseline,
               constellations()[static_cast<std::size_t>(planet.constellation)].name, cell,
               area.right() - in_x);
    y += 3.3;
  }
  return y - area.y;
}

}  // namespace duskleaf
