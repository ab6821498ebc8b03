// A ranking that people can check with the table of nights: this project's own rule (header).
#include "almanac/best_nights.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>

#include "almanac/evening_moment.hpp"
#include "almanac/happenings.hpp"
#include "almanac/nights.hpp"
#include "almanac/planets.hpp"
#include "almanac/time_spans.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

double minutes(const std::vector<TimeSpan>& spans) { return length(spans).count() * 1440.0; }

int rounded(double minutes) { return static_cast<int>(std::lround(minutes)); }

// See NightRank. What decides next stays within a step of one minute, 0.0167 h.
double score_of(const NightRank& rank, Aim aim, bool moon_down) {
  const double lit = std::round(100.0 * rank.moon_lit) / 100.0;
  switch (aim) {
    case Aim::dark: {
      const double base = rank.dark_rounded > 0 ? rank.dark_rounded / 60.0
                          : moon_down           ? -0.1
                                                : -0.2;
      return base - 0.01 * lit;
    }
    case Aim::moon:
      return (rank.moon_rounded * (1.0 - 0.8 * std::abs(2.0 * lit - 1.0)) + rank.happens_minutes) /
             60.0;
    case Aim::any:
      break;
  }
  return (rank.dark_rounded + rank.happens_minutes) / 60.0 + 0.002 * rank.planets_visible;
}

std::vector<Body> visible_planets(const SiteSky& sky, double site_limit, Ut t) {
  std::vector<Body> visible;
  const SkyLight light = sky_light(sky, site_limit, t);
  if (light.sun_altitude > planets_visible_below) return visible;
  const Tt tt = to_tt(t);
  std::copy_if(planets.begin(), planets.end(), std::back_inserter(visible), [&](Body planet) {
    const double magnitude = planet_magnitude(planet, planet_aspect(sky.ephemeris(), planet, tt));
    return bare_eye_visible(planet, magnitude, apparent_place(sky, planet, t).altitude,
                            light.faintest_star);
  });
  return visible;
}

// Something of a night, and whether the Moon takes part.
struct Found {
  NightHappening happening;
  std::size_t index;
  int minutes;
  Ut at;
  bool of_moon;
};

// A shower that gives less is no ground to choose a night (common practice).
constexpr double least_meteors_per_hour = 10.0;
constexpr Angle close_meeting = Angle::from_degrees(2.0);

bool overlap(const TimeSpan& a, const TimeSpan& b) { return a.from < b.to && b.from < a.to; }
bool within(Ut t, const TimeSpan& span) { return span.from <= t && t < span.to; }

std::vector<Found> find_happenings(const SiteHappenings& all, const Night& night,
                                   const std::optional<TimeSpan>& window, const TimeSpan& judged) {
  const TimeSpan span = window.value_or(TimeSpan{night.from, night.to});
  std::vector<Found> found;
  for (std::size_t i = 0; i < all.lunar_eclipses.size(); ++i) {
    const SiteLunarEclipse& seen = all.lunar_eclipses[i];
    const LunarEclipse& e = seen.eclipse;
    if (!seen.umbra_visible || !e.partial_begins || !e.partial_ends) continue;
    const std::vector<TimeSpan> umbra = {{*e.partial_begins, *e.partial_ends}};
    if (length(intersection(intersection(umbra, moon_up_spans(night)), {span})) > Days(0))
      found.push_back({NightHappening::lunar_eclipse, i,
                       rounded(std::min(1.0, e.umbral_magnitude) * minutes({judged})), e.greatest,
                       true});
  }
  for (std::size_t i = 0; i < all.showers.size(); ++i) {
    const SiteShower& shower = all.showers[i];
    if (shower.night != night.date || !shower.best) continue;
    if (shower.verdict != Verdict::good && shower.verdict != Verdict::fair) continue;
    if (shower.expected_per_hour < least_meteors_per_hour) continue;
    if (window && !(shower.best_from && shower.best_to &&
                    overlap({*shower.best_from, *shower.best_to}, *window)))
      continue;
    found.push_back({NightHappening::shower, i, shower.verdict == Verdict::good ? 60 : 30,
                     *shower.best, false});
  }
  constexpr Days margin(2.0 / 24.0);  // two bodies stay together for longer than that
  for (std::size_t i = 0; i < all.meetings.size(); ++i) {
    const Meeting& meeting = all.meetings[i];
    if (!meeting.look || !meeting.bare_eye || meeting.look->night != night.date) continue;
    if (meeting.separation > close_meeting) continue;
    if (window && !within(meeting.look->at, {window->from - margin, window->to + margin})) continue;
    const int moon = target_index(Body::moon);
    found.push_back({NightHappening::meeting, i, 30, meeting.look->at,
                     meeting.closest.a == moon || meeting.closest.b == moon});
  }
  for (std::size_t i = 0; i < all.occultations.size(); ++i) {
    const Occultation& o = all.occultations[i];
    const Target& target = target_at(o.target);
    if (!target.is_body() && target.magnitude > 2.5) continue;
    const auto seen = [&](const LimbContact& c) {
      return c.up && c.sun_altitude < civil_altitude && within(c.at, span);
    };
    if (seen(o.disappears) || seen(o.reappears))
      found.push_back({NightHappening::occultation, i, 30,
                       seen(o.disappears) ? o.disappears.at : o.reappears.at, true});
  }
  return found;
}

int happens_minutes(const std::vector<Found>& found, Aim aim) {
  if (aim == Aim::dark) return 0;
  int eclipse = 0, others = 0;
  for (const Found& f : found)
    if (aim == Aim::any || f.of_moon)
      (f.happening == NightHappening::lunar_eclipse ? eclipse : others) += f.minutes;
  return eclipse + std::min(others, 120);
}

void add_reasons(NightRank& rank, const Night& night, const TimeSpan& window, Days moon_up) {
  const auto add = [&](const char* key, std::optional<double> number = {},
                       std::optional<Ut> at = {}) {
    rank.reasons.push_back({key, number, at});
  };
  if (rank.dark_rounded > 0)
    add("dark-hours", rank.dark_rounded / 60.0);
  else
    add("not-dark");
  if (night.dark_limit != astronomical_altitude)
    add("darkest-limit", std::round(night.dark_limit.degrees()));
  add("moon-lit", 100.0 * rank.moon_lit);
  const Days whole = window.to - window.from;
  if (moon_up <= Days(0)) add("moon-down");
  if (moon_up >= whole - Days(1e-6)) add("moon-up");
  for (const Event& e : night.events) {
    if (!(window.from < e.at && e.at < window.to)) continue;
    if (e.kind == EventKind::moonrise) add("moon-rises-at", {}, e.at);
    if (e.kind == EventKind::moonset) add("moon-sets-at", {}, e.at);
  }
  add("planets-visible", rank.planets_visible);
}

}  // namespace

TimeSpan window_span(const Zone& zone, Date date, const ClockWindow& window) {
  const auto noon = std::chrono::hours(12);
  const auto day = std::chrono::days(1);
  const auto late = [&](std::chrono::minutes m) { return m <= noon; };
  const Date from_date = date + (late(window.from) ? day : day * 0);
  const Date to_date = from_date + (window.to <= window.from ? day : day * 0);
  return {zone.instant(from_date, window.from), zone.instant(to_date, window.to)};
}

std::string_view night_happening_name(NightHappening happening) {
  constexpr std::array<std::string_view, 4> names = {"lunar-eclipse", "shower", "meeting",
                                                     "occultation"};
  return names[static_cast<std::size_t>(happening)];
}

std::vector<NightRank> rank_nights(const YearEphemeris& ephemeris, const SiteYear& year,
                                   const std::vector<Date>& candidates,
                                   std::optional<ClockWindow> window, Aim aim,
                                   const SiteHappenings* happenings) {
  std::vector<NightRank> ranks;
  if (year.nights.empty()) return ranks;
  const SiteSky sky(ephemeris, year.place.observer, year.nights.front().from,
                    year.nights.back().to);
  for (const Date date : candidates) {
    const auto index = (date - year.nights.front().date).count();
    if (index < 0 || index >= static_cast<std::ptrdiff_t>(year.nights.size())) continue;
    const Night& night = year.nights[static_cast<std::size_t>(index)];
    if (night.from == night.to) continue;
    TimeSpan span{night.from, night.to};
    if (window) span = window_span(year.place.zone, date, *window);
    if (!(span.from < span.to)) continue;  // clocks skip it
    const std::vector<TimeSpan> part = {span}, moon_up = moon_up_spans(night);
    const std::vector<TimeSpan> sun_below =
        spans_below(night.events, EventKind::civil_dawn, EventKind::civil_dusk, night.from,
                    night.to, night.darkest_sun_altitude < civil_altitude);
    const ChartHour& hour = year.place.chart_hours[static_cast<std::size_t>(month_of(date) - 1)];
    const Ut middle = window ? span.from + (span.to - span.from) / 2
                             : chart_moment(sky, year.place.zone, hour, night);
    NightRank rank{};
    rank.date = date;
    rank.dark_minutes = minutes(intersection(night.dark_or_darkest, part));
    rank.dark_limit = night.dark_limit;
    rank.moon_minutes = minutes(intersection(intersection(moon_up, sun_below), part));
    rank.dark_rounded = rounded(rank.dark_minutes);
    rank.moon_rounded = rounded(rank.moon_minutes);
    rank.moon_lit = night.moon_lit;
    rank.planets = visible_planets(sky, year.place.limiting_magnitude, middle);
    rank.planets_visible = static_cast<int>(rank.planets.size());
    // Without a window the Moon and an eclipse are judged from sunset to sunrise.
    const TimeSpan judged = window || night.sun_down.empty()
                                ? span
                                : TimeSpan{night.sun_down.front().from, night.sun_down.back().to};
    std::vector<Found> found;
    if (happenings != nullptr)
      found =
          find_happenings(*happenings, night, window ? std::optional(span) : std::nullopt, judged);
    rank.happens_minutes = happens_minutes(found, aim);
    const Days up = length(intersection(moon_up, {judged}));
    rank.score = score_of(rank, aim, up <= Days(0));
    add_reasons(rank, night, judged, up);
    for (const Found& f : found)
      rank.reasons.push_back({"happens", f.minutes, f.at, f.happening, f.index});
    ranks.push_back(std::move(rank));
  }
  std::stable_sort(ranks.begin(), ranks.end(), [](const NightRank& a, const NightRank& b) {
    return a.score != b.score ? a.score > b.score : a.date < b.date;
  });
  return ranks;
}

}  // namespace duskleaf
