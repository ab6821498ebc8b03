// What to show at the session's hour: rising, at its best, for the last time; each with what it
// takes. The list and its rule of openings: almanac/show_list.hpp.
#include <algorithm>
#include <array>
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

std::string body_text(const BlockContext& c, Body body, Ut moment) {
  std::string name = c.words("body." + std::string(body_name(body)));
  const Tt t = to_tt(moment);
  switch (body) {
    case Body::moon: {
      // Shadows along the terminator fail towards full Moon; the rays come out (common practice).
      const double lit = moon_lit_fraction(c.ephemeris, t);
      if (lit > 0.985) return c.words("show.moon-full");
      if (lit < 0.05) return c.words("show.moon-thin");
      return c.words(lit > 0.93 ? "show.moon-nearly-full" : "show.moon",
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

/// "Albireo in Cygnus, double: gold and blue", "η in Cassiopeia, double".
std::string double_text(const BlockContext& c, const ShowObject& o, const std::string& area) {
  const std::string letter(o.code.substr(0, o.code.rfind(' ')));
  std::string text =
      o.name.empty()
          ? c.words("show.plain-double", {{"letter", letter}, {"area", area}})
          : c.words("show.named-double",
                    {{"name", c.words("show-object." + std::string(o.name))}, {"area", area}});
  if (o.look.empty()) return text;
  return c.words("show.looks",
                 {{"double", text}, {"look", c.words("show.look-" + std::string(o.look))}});
}

/// "Orion Nebula, M42", "M35, open cluster in Gemini", and doubles.
std::string object_text(const BlockContext& c, const ShowObject& o) {
  const std::string area(constellations()[static_cast<std::size_t>(o.constellation)].name);
  if (o.sort == ShowClass::double_star) return double_text(c, o, area);
  if (!o.name.empty())
    return c.words("show.named", {{"name", c.words("show-object." + std::string(o.name))},
                                  {"code", std::string(o.code)}});
  const std::string kind = c.words("show.kind-" + std::string(show_class_name(o.sort)));
  return c.words("show.plain", {{"code", std::string(o.code)}, {"kind", kind}, {"area", area}});
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
  if (item.opening_mm <= 100) return c.words("show.telescope");
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

/// What the row of Jupiter's moons leaves unsaid: their numbers where the night bars have no column
/// of them, which side is east where the planet stands north, and where a missing one is.
std::string moons_key(const BlockContext& c, const Horizontal& jupiter, Ut moment) {
  std::string text;
  const auto add = [&](const char* key) { text += (text.empty() ? "" : " ") + c.words(key); };
  const bool told = told_beside_night_bars(c);
  if (!told) add("show.moons-key");
  if (jupiter.azimuth.degrees() < 70 || jupiter.azimuth.degrees() > 290) add("show.moons-north");
  const auto moons = jupiter_moons(c.ephemeris, to_tt(moment));
  if (!told && std::any_of(moons.begin(), moons.end(),
                           [](const JupiterMoon& m) { return m.hidden || m.in_front; }))
    add("show.moons-missing");
  return text;
}

/// What everybody asks for first.
bool is_bright(const ShowItem& item) {
  return item.body && *item.body != Body::uranus && *item.body != Body::neptune;
}

/// The Moon and bright planets of all groups, then the best of each by worth; half of the lines
/// for what is at its best where the other groups can fill theirs.
std::array<Group, 3> choose(const std::vector<ShowItem>& items, std::size_t most) {
  std::array<Group, 3> all, chosen;
  Group bright;
  const auto by_worth = [](const ShowItem* a, const ShowItem* b) { return a->worth > b->worth; };
  for (const ShowItem& item : items)
    (is_bright(item) ? bright : all[static_cast<std::size_t>(item.standing)]).push_back(&item);
  std::stable_sort(bright.begin(), bright.end(), by_worth);
  if (bright.size() > most) bright.resize(most);
  for (const ShowItem* item : bright)
    chosen[static_cast<std::size_t>(item->standing)].push_back(item);
  std::array<std::size_t, 3> next{};
  for (Group& group : all) std::stable_sort(group.begin(), group.end(), by_worth);
  constexpr std::size_t best = static_cast<std::size_t>(Standing::at_its_best);
  // In turns, the middle group every other time, until the lines or the things are used up.
  const std::array<std::size_t, 4> turns{best, 0, best, 2};
  std::size_t used = bright.size();
  for (bool any = true; any && used < most;) {
    any = false;
    for (const std::size_t g : turns)
      if (used < most && next[g] < all[g].size()) {
        chosen[g].push_back(all[g][next[g]++]);
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
  double takes_width = 18.5;
  for (const ShowItem* item : group)
    takes_width = std::max(takes_width, set.width(opening_text(c, *item), quiet));
  const double takes_x = room.right() - takes_width, where_right = takes_x - 1.5;
  // Above its things where the groups stand side by side, else before them.
  const double first_x = beside ? room.x : room.x + 16.5;
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
    const double text_room = where_right - set.width(where, cell) - 1.5 - first_x;
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
  const CivilMinute moment = c.year.place.zone.civil(when.at);
  const SiteSky sky(c.ephemeris, c.year.place.observer, when.at - Days(1), when.at + Days(1));
  const std::vector<ShowItem> items = show_list(sky, c.year, when.at);
  Setter set(c, out);
  double y =
      area.y + set.heading(area.x, area.y, area.width, c.words("show.title"),
                           c.words(when.dark ? "show.aside-best" : "show.aside",
                                   {{"weekday", c.words.weekday_short(weekday_of(when.evening))},
                                    {"date", c.words.day_month(when.evening)},
                                    {"time", moment.date() == when.evening
                                                 ? c.words.time(moment)
                                                 : c.words("show.after-midnight",
                                                           {{"time", c.words.time(moment)}})}}));
  if (items.empty())
    return y + set.paragraph(area.x, y, area.width, c.words("show.nothing"), set.body()) - area.y +
           0.8;
  const std::array<Group, 3> groups =
      choose(items, static_cast<std::size_t>(options.number("most")));
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
  for (const Group& group : groups)
    for (const ShowItem* item : group) {
      if (item->body != Body::jupiter) continue;
      const std::string key = moons_key(c, item->place, when.at);
      if (!key.empty()) bottom += set.paragraph(area.x, bottom, area.width, key, set.small(), 1.2);
    }
  return bottom - area.y + 0.6;
}

}  // namespace duskleaf
