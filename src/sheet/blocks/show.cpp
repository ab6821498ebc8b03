// What to show at the session's hour: rising, at its best, for the last time; each with what it
// takes. The list and its rule of openings: almanac/show_list.hpp.
#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>

#include "almanac/evening_moment.hpp"
#include "almanac/planets.hpp"
#include "almanac/show_list.hpp"
#include "catalogue/constellations.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/jupiter_column.hpp"
#include "sheet/setting.hpp"
#include "sheet/show_moment.hpp"
#include "sky/jupiter_moons.hpp"
#include "sky/planet_disc.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

using Group = std::vector<const ShowItem*>;

std::size_t number_option(const BlockOptions& options, std::string_view name) {
  const std::string& text = options.get(name);
  std::size_t value = 100;
  std::from_chars(text.data(), text.data() + text.size(), value);
  return value;
}

std::string body_text(const BlockContext& c, Body body, Ut moment) {
  const std::string name = c.words("body." + std::string(body_name(body)));
  const Tt t = to_tt(moment);
  switch (body) {
    case Body::moon: {
      const double lit = moon_lit_fraction(c.ephemeris, t);
      return c.words(lit > 0.95 ? "show.moon-full" : "show.moon",
                     {{"n", c.words.number(100 * lit, 0)}});
    }
    case Body::jupiter:
      return c.words("show.jupiter",
                     {{"moons", moons_east_to_west(jupiter_moons(c.ephemeris, t))}});
    case Body::saturn: {
      const double tilt = std::abs(planet_disc(c.ephemeris, Body::saturn, t).ring_tilt.degrees());
      if (tilt < 1.5) return c.words("show.saturn-edge");
      return c.words("show.saturn", {{"degrees", c.words.number(tilt, 0)}});
    }
    case Body::mercury:
    case Body::venus:
      return c.words(
          "show.phase",
          {{"name", name}, {"n", c.words.number(100 * planet_disc(c.ephemeris, body, t).lit, 0)}});
    default:
      return name;
  }
}

/// "Orion Nebula, M42", "M35, open cluster in Gem", "Albireo, β Cyg, double".
std::string object_text(const BlockContext& c, const ShowObject& o) {
  const std::string kind = c.words("show.kind-" + std::string(show_class_name(o.sort)));
  if (!o.name.empty()) {
    const std::string name = c.words("show-object." + std::string(o.name));
    return c.words(o.sort == ShowClass::double_star ? "show.named-double" : "show.named",
                   {{"name", name}, {"code", std::string(o.code)}, {"kind", kind}});
  }
  const std::string area(constellations()[static_cast<std::size_t>(o.constellation)].name);
  return c.words(o.sort == ShowClass::double_star ? "show.plain-double" : "show.plain",
                 {{"code", std::string(o.code)}, {"kind", kind}, {"area", area}});
}

std::string opening_text(const BlockContext& c, const ShowItem& item) {
  // Planets and the Moon are seen by the bare eye, but what is told of them takes optics.
  if (item.body == Body::moon) return c.words("show.binoculars");
  if (item.body && item.opening_mm <= 0)
    return *item.body == Body::jupiter ? c.words("show.binoculars")
           : *item.body == Body::saturn || *item.body == Body::mercury || *item.body == Body::venus
               ? c.words("show.telescope")
               : c.words("show.bare-eye");
  if (item.opening_mm <= 0) return c.words("show.bare-eye");
  if (item.opening_mm <= 50) return c.words("show.binoculars");
  return c.words("show.opening", {{"n", c.words.number(item.opening_mm, 0)}});
}

/// Whether the night bars carry Jupiter's moons this month, with their key.
bool told_beside_night_bars(const BlockContext& c) {
  const auto [year, month] = c.year.span.month(c.month_index);
  std::vector<const Night*> nights;
  for (const Night& night : c.year.nights)
    if (year_of(night.date) == year && month_of(night.date) == month) nights.push_back(&night);
  return jupiter_column(c, nights).has_value();
}

/// What everybody asks for first.
bool is_bright(const ShowItem& item) {
  return item.body && *item.body != Body::uranus && *item.body != Body::neptune;
}

/// The best of each group: the Moon and bright planets first, then by worth; half of the lines for
/// what is at its best where the other groups can fill theirs.
std::array<Group, 3> choose(const std::vector<ShowItem>& items, std::size_t most) {
  std::array<Group, 3> all, chosen;
  for (const ShowItem& item : items) all[static_cast<std::size_t>(item.standing)].push_back(&item);
  for (Group& group : all)
    std::stable_sort(group.begin(), group.end(), [](const ShowItem* a, const ShowItem* b) {
      if (is_bright(*a) != is_bright(*b)) return is_bright(*a);
      return a->worth > b->worth;
    });
  constexpr std::size_t best = static_cast<std::size_t>(Standing::at_its_best);
  // In turns, the middle group every other time, until the lines or the things are used up.
  const std::array<std::size_t, 4> turns{best, 0, best, 2};
  std::size_t used = 0;
  for (bool any = true; any && used < most;) {
    any = false;
    for (const std::size_t g : turns)
      if (used < most && chosen[g].size() < all[g].size()) {
        chosen[g].push_back(all[g][chosen[g].size()]);
        ++used;
        any = true;
      }
  }
  return chosen;
}

double draw_group(const BlockContext& c, const Group& group, std::string_view title_key, Ut moment,
                  bool beside, const Box& room, std::vector<Mark>& out) {
  Setter set(c, out);
  const Style cell = set.table();
  Style quiet = cell;
  quiet.ink = c.theme.soft;
  const double pitch = cell.size_pt * mm_per_pt * 1.17;
  const double takes_x = room.right() - 15, where_right = takes_x - 2;
  // Above its things where the groups stand side by side, else before them.
  const double first_x = beside ? room.x : room.x + 18;
  double y = room.y;
  set.left(room.x, y + 2.7, c.words(title_key), set.strong(beside ? set.body() : cell));
  if (beside) y += 3.8;
  for (const ShowItem* item : group) {
    const std::string text =
        item->body ? body_text(c, *item->body, moment)
                   : object_text(c, show_objects()[static_cast<std::size_t>(item->object)]);
    const std::string where = c.words(
        "constellations.at", {{"direction", c.words.direction_short(item->place.azimuth)},
                              {"altitude", c.words.number(item->place.altitude.degrees(), 0)}});
    const double baseline = y + cell.size_pt * mm_per_pt * 0.95;
    set.right(where_right, baseline, where, cell);
    set.left(takes_x, baseline, opening_text(c, *item), quiet);
    const double text_room = where_right - 12 - first_x;
    y += text_room > 10 && set.width(text, cell) > text_room
             ? set.paragraph(first_x, y, text_room, text, cell, 1.1) + pitch * (1 - 1.1 / 1.17)
             : (set.left(first_x, baseline, text, cell), pitch);
  }
  return y - room.y + 0.8;
}

}  // namespace

double draw_show(const BlockContext& c, const BlockOptions& options, const Box& area,
                 std::vector<Mark>& out) {
  const ShowMoment when = show_moment(c);
  const SiteSky sky(c.ephemeris, c.year.place.observer, when.at - Days(1), when.at + Days(1));
  const std::vector<ShowItem> items = show_list(sky, c.year, when.at);
  Setter set(c, out);
  double y =
      area.y + set.heading(area.x, area.y, area.width, c.words("show.title"),
                           c.words("show.aside",
                                   {{"weekday", c.words.weekday_short(weekday_of(when.evening))},
                                    {"date", c.words.day_month(when.evening)},
                                    {"time", c.words.time(c.year.place.zone.civil(when.at))}}));
  if (items.empty())
    return y + set.paragraph(area.x, y, area.width, c.words("show.nothing"), set.body()) - area.y +
           0.8;
  const std::array<Group, 3> groups = choose(items, number_option(options, "most"));
  const std::array<std::string_view, 3> titles{"show.rising", "show.best", "show.last"};
  const auto filled =
      std::count_if(groups.begin(), groups.end(), [](const Group& g) { return !g.empty(); });
  // Side by side where the block is wide enough, else under one another.
  const double gap = 5;
  const bool beside = area.width >= 150;
  const double column =
      beside ? (area.width - gap * static_cast<double>(filled - 1)) / static_cast<double>(filled)
             : area.width;
  double x = area.x, bottom = y;
  for (std::size_t g = 0; g < groups.size(); ++g) {
    if (groups[g].empty()) continue;
    const double used = draw_group(c, groups[g], titles[g], when.at, beside,
                                   {x, y, std::min(column, 95.0), 0}, out);
    bottom = std::max(bottom, y + used);
    if (beside)
      x += column + gap;
    else
      y += used;
  }
  const bool jupiter = std::any_of(groups.begin(), groups.end(), [](const Group& group) {
    return std::any_of(group.begin(), group.end(),
                       [](const ShowItem* i) { return i->body == Body::jupiter; });
  });
  if (jupiter && !told_beside_night_bars(c))
    bottom +=
        set.paragraph(area.x, bottom, area.width, c.words("show.moons-key"), set.small(), 1.2);
  return bottom - area.y + 0.6;
}

}  // namespace duskleaf
