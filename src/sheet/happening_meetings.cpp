// What the Moon and the planets meet and what the Moon covers, as the site sees it. Separations are
// the site's own (topocentric) at the moment that the line names.
#include <algorithm>
#include <cmath>

#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

constexpr double rank_covered_bright = 0.8, rank_covered = 2.6, rank_covered_faint = 3.4;
constexpr Angle least_height_of_faint = Angle::from_degrees(10);

bool is_planet(const Target& t) { return t.is_body() && !t.is_moon(); }
bool is_faint_planet(const Target& t) {
  return is_planet(t) && (t.body == Body::uranus || t.body == Body::neptune);
}
bool is_bright_star(const Target& t) { return t.sort == Target::Sort::star && t.magnitude < 1.5; }

// ---- what the Moon covers

constexpr Angle dark_enough = civil_altitude;
constexpr Angle least_height = Angle::from_degrees(3);

/// Whether a contact can be watched: a bright edge drowns all but the brightest stars, and so does
/// a sky that is not dark (common practice).
bool observable(const HappeningWriter& w, const Occultation& o, const LimbContact& contact) {
  const Target& t = target_at(o.target);
  const Horizontal place = HappeningWriter::apparent(contact.place);
  if (!contact.up || place.altitude < least_height || w.behind_skyline(place)) return false;
  const bool bright = (is_planet(t) && !is_faint_planet(t)) || is_bright_star(t);
  if (contact.sun_altitude > (bright ? Angle::from_degrees(-2) : dark_enough)) return false;
  return bright || (contact.dark_limb && (o.moon_lit < 0.95 || t.magnitude < 2.5));
}

std::string limb(const HappeningWriter& w, const LimbContact& contact) {
  return w.words(contact.dark_limb ? "dark-edge" : "bright-edge");
}

/// Pairs of a target and an evening of which an occultation tells already.
using Told = std::vector<std::pair<int, Ut>>;

Told write_occultations(HappeningWriter& w) {
  Told told;
  for (const Occultation& o : w.context().happenings.occultations) {
    const bool goes = observable(w, o, o.disappears), returns = observable(w, o, o.reappears);
    if (!goes && !returns) continue;
    const Target& t = target_at(o.target);
    const std::string name = w.target(t);
    const LimbContact& first = goes ? o.disappears : o.reappears;
    const std::string place = w.place(HappeningWriter::apparent(first.place));
    std::string text;
    if (goes && returns)
      text = w.words("covers", {{"name", name},
                                {"edge", limb(w, o.disappears)},
                                {"time", w.time(o.reappears.at)},
                                {"place", place}});
    else
      text = w.words(goes ? "covers-goes" : "covers-returns",
                     {{"name", name}, {"edge", limb(w, first)}, {"place", place}});
    if (is_faint_planet(t) || !(is_planet(t) || is_bright_star(t)))
      text += " " + w.words("with-optics");
    // Mountains of the Moon decide within a hundredth of its radius (some 17 km).
    if (o.least_distance > 0.99 * o.moon_radius) text += " " + w.words("grazes");
    const bool bright = (is_planet(t) && !is_faint_planet(t)) || is_bright_star(t);
    const double rank = bright                              ? rank_covered_bright
                        : is_planet(t) || t.magnitude < 2.6 ? rank_covered
                                                            : rank_covered_faint;
    w.by_night(first.at, rank, text, w.words("covers-brief", {{"name", name}}));
    told.emplace_back(o.target, first.at);
  }
  return told;
}

// ---- meetings

/// How many go out for it: common practice of those who invite people to look.
double rank_of(const Meeting& m) {
  const Target &a = target_at(m.closest.a), &b = target_at(m.closest.b);
  const double apart = m.separation.degrees();
  const auto by_distance = [&](double near, double middle, double far) {
    return apart < 1.5 ? near : apart < 3.5 ? middle : far;
  };
  double rank = 4;
  if (is_planet(a) && is_planet(b))
    rank = apart < 1 ? 0.5 : by_distance(1.0, 2.0, 3.0);
  else if (a.is_moon() && is_planet(b))
    rank = by_distance(1.0, 1.7, 2.3) + (b.body == Body::mercury ? 0.5 : 0.0);
  else if (a.is_moon() && b.sort == Target::Sort::cluster)
    rank = by_distance(2.0, 2.7, 3.4);
  else if (a.is_moon())
    rank = is_bright_star(b) ? by_distance(2.0, 2.8, 3.5) : 4.2;
  else if (is_planet(a))
    rank = by_distance(b.sort == Target::Sort::cluster ? 1.5 : 2.2, 2.9, 3.7);
  rank += 0.01 * apart;
  if (!m.bare_eye) rank += 1.5;
  if (m.look->above_skyline) return std::min(rank, fact_rank - 0.1);
  // Nobody sees what the hills hide; but two planets beside each other are worth a walk to a place
  // without them.
  return rank < 1 && is_planet(a) ? 3.0 : fact_rank;
}

// Wider pairs are no sight (about a binocular's field, common practice).
constexpr Angle widest = Angle::from_degrees(6.0);

/// As the planets' own block has it; and of those that need optics at the moment itself.
bool shows_planets(const HappeningWriter& w, const Meeting& m) {
  for (const int index : {m.closest.a, m.closest.b}) {
    const Target& t = target_at(index);
    if (!is_planet(t)) continue;
    if (w.planet_sight(t.body, w.evening_of(m.look->at)) == PlanetSight::not_visible) return false;
    if (is_faint_planet(t) && (w.sky().altitude(Body::sun, m.look->at) > nautical_altitude ||
                               m.look->place.altitude < least_height_of_faint - m.separation))
      return false;
  }
  return true;
}

/// What a meeting's line says after its time, and the rest that goes by its first one.
struct Group {
  std::vector<const Meeting*> meetings;
};

std::string degrees(const HappeningWriter& w, Angle separation) {
  const double d = separation.degrees();
  return w.words("degrees", {{"n", w.context().words.number(d, d < 10 ? 1 : 0)}});
}

void write_group(HappeningWriter& w, Group group) {
  std::stable_sort(group.meetings.begin(), group.meetings.end(),
                   [](const Meeting* a, const Meeting* b) { return rank_of(*a) < rank_of(*b); });
  const Meeting& first = *group.meetings.front();
  const std::string a = w.target(target_at(first.closest.a));
  const std::string place = w.place(first.look->place);
  std::string text;
  std::string brief_names;
  if (group.meetings.size() == 1) {
    brief_names = w.target(target_at(first.closest.b));
    text = w.words(
        "meeting",
        {{"a", a}, {"b", brief_names}, {"apart", degrees(w, first.separation)}, {"place", place}});
  } else {
    std::string list;
    for (std::size_t i = 0; i < group.meetings.size(); ++i) {
      const Meeting& m = *group.meetings[i];
      const std::string name = w.target(target_at(m.closest.b));
      const std::string piece =
          w.words("meeting-piece", {{"apart", degrees(w, m.separation)}, {"name", name}});
      if (i > 0) {
        list += w.words(i + 1 == group.meetings.size() ? "list-and" : "list-comma");
        brief_names += w.words(i + 1 == group.meetings.size() ? "list-and" : "list-comma");
      }
      list += piece;
      brief_names += name;
    }
    text = w.words("meeting-many", {{"a", a}, {"list", list}, {"place", place}});
  }
  const bool optics = std::none_of(group.meetings.begin(), group.meetings.end(),
                                   [](const Meeting* m) { return m->bare_eye; });
  if (optics) text += " " + w.words("with-optics");
  // Several at once are rarer than the nearest of them.
  const double rank =
      rank_of(first) - (group.meetings.size() > 1 && first.look->above_skyline ? 0.3 : 0.0);
  HappeningLine* line = w.by_night(first.look->at, rank, text,
                                   w.words("meeting-brief", {{"a", a}, {"b", brief_names}}));
  if (line != nullptr && !first.look->above_skyline) line->text += w.words("behind-skyline");
}

/// One line for what the Moon (or a planet) meets at about the same time.
bool belong_together(const Meeting& a, const Meeting& b) {
  return a.closest.a == b.closest.a && a.look->night == b.look->night &&
         a.look->morning == b.look->morning &&
         std::abs((a.look->at - b.look->at).count()) < 45.0 / 1440;
}

}  // namespace

void write_meetings(HappeningWriter& w) {
  const Told told = write_occultations(w);
  std::vector<Group> groups;
  for (const Meeting& m : w.context().happenings.meetings) {
    if (!m.look || m.separation > widest || !w.in_month(w.evening_of(m.look->at))) continue;
    const Target &a = target_at(m.closest.a), &b = target_at(m.closest.b);
    // The Moon drowns what needs optics, and two that need them are no sight for beginners.
    if (!m.bare_eye && (a.is_moon() || is_faint_planet(a) || b.sort != Target::Sort::body))
      continue;
    if (a.is_moon() && std::any_of(told.begin(), told.end(), [&](const auto& t) {
          return t.first == m.closest.b && std::abs((t.second - m.look->at).count()) < 1.0;
        }))
      continue;
    if (!shows_planets(w, m)) continue;
    const auto fits = std::find_if(groups.begin(), groups.end(), [&](const Group& g) {
      return belong_together(*g.meetings.front(), m);
    });
    if (fits != groups.end())
      fits->meetings.push_back(&m);
    else
      groups.push_back({{&m}});
  }
  for (Group& group : groups) write_group(w, std::move(group));
}

}  // namespace duskleaf
