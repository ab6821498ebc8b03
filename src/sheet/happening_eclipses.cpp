// Eclipses and transits of the Sun in a line each; the panel (blocks/eclipses.cpp) tells the rest.
// Whoever is told to look at the Sun is told of the filter (ISO 12312-2) in the same line.
#include <algorithm>
#include <cmath>
#include <optional>

#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

constexpr double rank_seen = 0, rank_slight = 2, rank_not_seen = fact_rank, rank_shading = 4;

struct Stretch {
  Ut from, to;
};
/// The part of [from, to] in which the body is up. Where it sets and rises again within, the part
/// that holds the best moment.
Stretch part_up(Ut from, Ut to, const std::optional<Ut>& rise, const std::optional<Ut>& set,
                Ut best) {
  const bool twice = rise && set && *set < *rise;
  Stretch s{from, to};
  if (rise && !(twice && best <= *set)) s.from = std::max(from, *rise);
  if (set && !(twice && best > *set)) s.to = std::min(to, *set);
  return s;
}

void write_solar(HappeningWriter& w, const SiteSolarEclipse& e) {
  const auto [from, to] =
      part_up(e.partial_begins.at, e.partial_ends.at, e.sunrise, e.sunset, e.best.at);
  const Horizontal place = HappeningWriter::apparent(e.best.place);
  const bool central = e.kind != SolarEclipseKind::partial && e.central_begins &&
                       e.central_begins->visible && e.central_ends && e.central_ends->visible;
  std::string text;
  if (central) {
    text = w.words(e.kind == SolarEclipseKind::annular ? "solar-annular" : "solar-total",
                   {{"duration", w.minutes_seconds(e.central_begins->at, e.central_ends->at)},
                    {"time", w.time(e.central_begins->at)},
                    {"place", w.place(place)}});
  } else {
    text = w.words("solar-partial", {{"percent", w.percent(e.best_obscuration)},
                                     {"time", w.time(e.best.at)},
                                     {"place", w.place(place)}});
  }
  if (w.behind_skyline(place)) text += w.words("behind-skyline");
  HappeningLine* line = w.by_day(from, worth_a_panel(e) ? rank_seen : rank_slight, text, {});
  if (line == nullptr) return;
  line->sight = true;
  line->when = w.span(from, to);
  line->caution = w.words("sun-caution");
}

void write_transit(HappeningWriter& w, const SiteSunTransit& t) {
  const SunCuts cuts = sun_cuts(w.context().year, t.begins.at, t.ends.at);
  const Ut from = cuts.sunrise.value_or(t.begins.at), to = cuts.sunset.value_or(t.ends.at);
  const std::string body = w.body(t.planet);
  const Horizontal place = HappeningWriter::apparent(t.greatest.place);
  HappeningLine* line = w.by_day(
      from, rank_seen,
      t.greatest.visible
          ? w.words("sun-transit",
                    {{"body", body}, {"time", w.time(t.greatest.at)}, {"place", w.place(place)}})
          : w.words(t.begins.visible ? "sun-transit-until-sunset" : "sun-transit-from-sunrise",
                    {{"body", body}}),
      {});
  if (line == nullptr) return;
  line->sight = true;
  if (t.greatest.visible && w.behind_skyline(place)) line->text += w.words("behind-skyline");
  line->when = w.span(from, to);
  line->caution = w.words("sun-transit-caution");
}

/// The contact nearest to the drawn moment at which the Moon is up.
const Sighting* best_sighting(const SiteLunarEclipse& e) {
  const Sighting* best = nullptr;
  for (const auto& contact : e.contacts)
    if (contact.moon.visible &&
        (best == nullptr || std::abs((contact.moon.at - e.drawn_at).count()) <
                                std::abs((best->at - e.drawn_at).count())))
      best = &contact.moon;
  return best;
}

void write_lunar(HappeningWriter& w, const SiteLunarEclipse& e) {
  const LunarEclipse& eclipse = e.eclipse;
  const bool total = eclipse.kind == LunarEclipseKind::total;
  const bool penumbral = eclipse.kind == LunarEclipseKind::penumbral;
  if (penumbral ? !e.visible : !e.umbra_visible) {
    if (penumbral) return;  // nobody hears of it
    w.fact(eclipse.greatest, rank_not_seen,
           w.words(total ? "lunar-total-not-seen" : "lunar-partial-not-seen"),
           w.words("lunar-not-seen-brief"));
    return;
  }
  const Sighting* best = best_sighting(e);
  const std::string where =
      best == nullptr ? std::string() : w.place(HappeningWriter::apparent(best->place));
  const auto [from, to] = part_up(eclipse.partial_begins.value_or(eclipse.penumbral_begins),
                                  eclipse.partial_ends.value_or(eclipse.penumbral_ends), e.moonrise,
                                  e.moonset, e.drawn_at);
  std::string text;
  if (penumbral) {
    text = w.words("lunar-penumbral", {{"time", w.time(e.drawn_at)}, {"place", where}});
  } else if (total && *eclipse.total_begins >= from && *eclipse.total_ends <= to) {
    text = w.words("lunar-total", {{"from", w.time(*eclipse.total_begins)},
                                   {"to", w.time(*eclipse.total_ends)},
                                   {"place", where}});
  } else if (total) {
    text = w.words("lunar-total-cut", {{"time", w.time(e.drawn_at)}, {"place", where}});
  } else {
    text = w.words(e.drawn_at == eclipse.greatest ? "lunar-partial" : "lunar-partial-cut",
                   {{"percent", w.percent(eclipse.umbral_magnitude)},
                    {"time", w.time(e.drawn_at)},
                    {"place", where}});
  }
  if (e.moonrise && from == *e.moonrise) text += " " + w.words("lunar-moonrise");
  if (e.moonset && to == *e.moonset) text += " " + w.words("lunar-moonset");
  HappeningLine* line = w.by_night(from,
                                   penumbral          ? rank_shading
                                   : worth_a_panel(e) ? rank_seen
                                                      : rank_slight,
                                   text, penumbral ? w.words("lunar-brief") : std::string());
  if (line == nullptr) return;
  line->when = w.span(from, to);
  if (best != nullptr && w.behind_skyline(HappeningWriter::apparent(best->place)))
    line->text += w.words("behind-skyline");
}

/// Greatest phases of one eclipse at a site and for the Earth's centre are within this.
bool same_time(Ut a, Ut b) { return std::abs((a - b).count()) < 0.3; }

constexpr double slight = 0.05;
constexpr Angle high_enough = Angle::from_degrees(5);

bool stands_high(const Sighting& s) {
  return s.visible && HappeningWriter::apparent(s.place).altitude >= high_enough;
}

}  // namespace

SunCuts sun_cuts(const SiteYear& year, Ut from, Ut to) {
  SunCuts cuts;
  for (const Event& e : year.local) {
    if (e.at <= from || e.at >= to) continue;
    if (e.kind == EventKind::sunrise && !cuts.sunrise) cuts.sunrise = e.at;
    if (e.kind == EventKind::sunset) cuts.sunset = e.at;
  }
  return cuts;
}

bool worth_a_panel(const SiteSolarEclipse& e) {
  if (e.central_begins && e.central_begins->visible) return true;
  return e.best_obscuration >= slight &&
         (stands_high(e.partial_begins) || stands_high(e.best) || stands_high(e.partial_ends));
}

bool worth_a_panel(const SiteLunarEclipse& e) {
  return e.umbra_visible && e.eclipse.kind != LunarEclipseKind::penumbral &&
         e.eclipse.umbral_magnitude >= slight &&
         std::any_of(e.contacts.begin(), e.contacts.end(), [&](const auto& contact) {
           return contact.moon.at >= *e.eclipse.partial_begins &&
                  contact.moon.at <= *e.eclipse.partial_ends && stands_high(contact.moon);
         });
}

void write_eclipses(HappeningWriter& w) {
  const BlockContext& c = w.context();
  for (const SiteSolarEclipse& e : c.happenings.solar_eclipses) write_solar(w, e);
  for (const SolarEclipse& e : c.sky_year.solar_eclipses) {
    const auto& seen = c.happenings.solar_eclipses;
    if (std::any_of(seen.begin(), seen.end(), [&](const SiteSolarEclipse& s) {
          return same_time(s.greatest.at, e.greatest);
        }))
      continue;
    HappeningLine* line = w.on_date(
        w.civil_date(e.greatest), rank_not_seen,
        w.words("solar-not-seen", {{"kind", w.words("kind-" + std::string(eclipse_name(e.kind)))}}),
        w.words("solar-brief"));
    if (line != nullptr) line->at = e.greatest;
  }
  for (const SiteSunTransit& t : c.happenings.sun_transits) write_transit(w, t);
  for (const SunTransit& t : c.sky_year.sun_transits) {
    const auto& seen = c.happenings.sun_transits;
    if (std::any_of(seen.begin(), seen.end(),
                    [&](const SiteSunTransit& s) { return same_time(s.greatest.at, t.greatest); }))
      continue;
    w.on_date(w.civil_date(t.greatest), rank_not_seen,
              w.words("sun-transit-not-seen", {{"body", w.body(t.planet)}}),
              w.words("near-sun-brief", {{"body", w.body(t.planet)}}));
  }
  for (const SiteLunarEclipse& e : c.happenings.lunar_eclipses) write_lunar(w, e);
}

}  // namespace duskleaf
