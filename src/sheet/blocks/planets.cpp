// Each planet in a sentence and in numbers. Sizes and lit parts: sky/planet_disc.hpp.
#include <algorithm>
#include <cmath>

#include "almanac/planet_months.hpp"
#include "catalogue/constellations.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/flow_text.hpp"
#include "sheet/planet_words.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

// Right edges of the columns of numbers, from the block's right edge.
constexpr double size_back = 0, magnitude_back = 7, where_back = 14, best_back = 25;

std::string short_date(const BlockContext& c, Date d) {
  return c.words("date.day-month",
                 {{"day", std::to_string(day_of(d))}, {"month", c.words.month_short(month_of(d))}});
}

/// What a telescope adds, and where the planet stands: "in Gemini", "rings open 12°, in Pisces".
std::string remark(const BlockContext& c, const PlanetMonth& p) {
  const std::string name(constellations()[static_cast<std::size_t>(p.constellation)].name);
  if (p.planet == Body::mercury || p.planet == Body::venus || p.planet == Body::mars)
    return c.words("planets.lit-in", {{"n", c.words.number(100 * p.disc.lit, 0)}, {"name", name}});
  if (p.planet != Body::saturn) return c.words("planets.stands-in", {{"name", name}});
  const double tilt = std::abs(p.disc.ring_tilt.degrees());
  if (tilt < 1.5) return c.words("planets.rings-edge", {{"name", name}});
  return c.words("planets.rings", {{"degrees", c.words.number(tilt, 0)}, {"name", name}});
}

void draw_numbers(const BlockContext& c, Setter& set, const PlanetMonth& p, double right,
                  double baseline, const Style& cell) {
  if (p.best && p.place) {
    set.right(right - best_back, baseline, c.words.time(c.year.place.zone.civil(*p.best)), cell);
    set.right(right - where_back, baseline,
              c.words("constellations.at",
                      {{"direction", c.words.direction_short(p.place->azimuth)},
                       {"altitude", c.words.number(p.place->altitude.degrees(), 0)}}),
              cell);
  }
  set.right(right - magnitude_back, baseline, c.words.number(p.magnitude, 1), cell);
  const double size = p.disc.diameter.arcseconds();
  set.right(right - size_back, baseline,
            c.words("planets.arcseconds", {{"n", c.words.number(size, size < 9.95 ? 1 : 0)}}),
            cell);
}

}  // namespace

double draw_planets(const BlockContext& c, const BlockOptions&, const Box& area,
                    std::vector<Mark>& out) {
  Setter set(c, out);
  const std::vector<PlanetMonth> months = planet_month(c.ephemeris, c.year, c.month_index);
  const bool any_seen = std::any_of(months.begin(), months.end(), [](const PlanetMonth& p) {
    return p.sight != PlanetSight::not_visible;
  });
  double y = area.y + set.heading(area.x, area.y, area.width, c.words("planets.title"),
                                  any_seen ? c.words("planets.aside") : std::string());
  Style cell = set.table();
  cell.size_pt = c.theme.table_pt;
  Style head = cell, quiet = cell;
  head.ink = quiet.ink = c.theme.soft;
  const double pitch = cell.size_pt * mm_per_pt * 1.12, right = area.right();
  const double best_room = c.order.clock_12 ? 12 : 8.5;
  const double name_room = 12.5, text_x = area.x + name_room;
  const double text_room = right - best_back - best_room - text_x;
  if (any_seen) {
    set.right(right - best_back, y + 2.2, c.words("planets.best"), head);
    set.right(right - where_back, y + 2.2, c.words("planets.where"), head);
    set.right(right - magnitude_back, y + 2.2, c.words("planets.magnitude"), head);
    set.right(right - size_back, y + 2.2, c.words("planets.size"), head);
    y += 3.0;
  }
  // Planets in turn that are out of sight for the same reason share a row; nothing to measure of
  // them, so that it has all of its width.
  std::string names, hidden;
  const auto finish_hidden = [&] {
    if (area.x + set.width(names, set.strong(cell)) < text_x) {
      set.left(area.x, y + cell.size_pt * mm_per_pt * 0.95, names, set.strong(cell));
      y += set.paragraph(text_x, y, right - text_x, hidden, cell, 1.12) + 0.3;
    } else {
      y +=
          flow(set, area.x, y, area.width, {{names, set.strong(cell)}, {hidden, cell}}, 1.12) + 0.3;
    }
    names.clear();
    hidden.clear();
  };
  for (const PlanetMonth& p : months) {
    const bool seen = p.sight != PlanetSight::not_visible;
    const std::string name = c.words("body." + std::string(body_name(p.planet)));
    const std::string sentence = planet_sentence(c, p);
    if (!hidden.empty() && (seen || sentence != hidden)) finish_hidden();
    if (!seen) {
      names += (names.empty() ? std::string() : c.words("happening.list-comma")) + name;
      hidden = sentence;
      continue;
    }
    const double baseline = y + cell.size_pt * mm_per_pt * 0.95;
    set.left(area.x, baseline, name, set.strong(cell));
    draw_numbers(c, set, p, right, baseline, cell);
    // Under the numbers, in the room of the sentence's second line.
    std::string below = remark(c, p);
    if (p.best && day_of(p.best_date) != 15)
      below = c.words("planets.on-date", {{"date", short_date(c, p.best_date)}, {"remark", below}});
    const double room = right - (text_x + text_room) - 1.5;
    set.fitted(right - std::min(room, set.width(below, quiet)), baseline + pitch, below, quiet,
               room);
    y += std::max(set.paragraph(text_x, y, text_room, sentence, cell, 1.12), 2 * pitch) + 0.3;
  }
  if (!hidden.empty()) finish_hidden();
  return y - area.y + 0.4;
}

}  // namespace duskleaf
