#include "almanac/planet_months.hpp"
#include "catalogue/constellations.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

std::string short_date(const BlockContext& c, Date d) {
  return c.words("date.day-month",
                 {{"day", std::to_string(day_of(d))}, {"month", c.words.month_short(month_of(d))}});
}

/// "evenings, until 22 Mar": the part of the night, and the dates where it does not last all month.
std::string with_dates(const BlockContext& c, const std::string& key,
                       const std::optional<Date>& first_seen,
                       const std::optional<Date>& last_seen) {
  const auto [year, month] = c.year.span.month(c.month_index);
  const bool late = first_seen && day_of(*first_seen) > 1;
  const bool early = last_seen && day_of(*last_seen) < days_in_month(year, month);
  const std::string& part = c.words(key);
  if (late && early)
    return c.words(
        "planets.between",
        {{"part", part}, {"from", short_date(c, *first_seen)}, {"to", short_date(c, *last_seen)}});
  if (late) return c.words("planets.from", {{"part", part}, {"from", short_date(c, *first_seen)}});
  if (early) return c.words("planets.until", {{"part", part}, {"to", short_date(c, *last_seen)}});
  return part;
}

std::string when_seen(const BlockContext& c, const PlanetMonth& planet) {
  std::string text;
  switch (planet.sight) {
    case PlanetSight::not_visible:
      return c.words(planet.optics_only ? "planets.too-faint" : "planets.not-visible");
    case PlanetSight::morning:
      text = with_dates(c, "planets.morning", planet.first_morning, planet.last_morning);
      break;
    case PlanetSight::evening:
      text = with_dates(c, "planets.evening", planet.first_evening, planet.last_evening);
      break;
    case PlanetSight::all_night:
      text = c.words("planets.all-night");
      break;
    case PlanetSight::evening_and_morning:
      text = c.words("planets.evening-and-morning");
      break;
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
    const double best_room =
        (c.order.clock_12 ? 11.5 : 9) + (planet.best && day_of(planet.best_date) != 15 ? 9.5 : 0);
    set.fitted(when_x, baseline, when_seen(c, planet), cell, best_x - best_room - when_x);
    if (planet.best && planet.place) {
      // Where the 15th does not show it, the nearest date that does stands with the time.
      std::string best = c.words.time(zone.civil(*planet.best));
      if (day_of(planet.best_date) != 15) best = short_date(c, planet.best_date) + ", " + best;
      set.right(best_x, baseline, best, cell);
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
