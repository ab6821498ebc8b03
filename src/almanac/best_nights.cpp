// A ranking that people can check with the table of nights: this project's own rule (header).
#include "almanac/best_nights.hpp"

#include <algorithm>
#include <cmath>

#include "almanac/evening_moment.hpp"
#include "almanac/nights.hpp"
#include "almanac/planets.hpp"
#include "almanac/time_spans.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

TimeSpan window_span(const Zone& zone, Date date, const ClockWindow& window) {
  const auto noon = std::chrono::hours(12);
  const auto day = std::chrono::days(1);
  const auto late = [&](std::chrono::minutes m) { return m <= noon; };
  const Date from_date = date + (late(window.from) ? day : day * 0);
  const Date to_date = from_date + (window.to <= window.from ? day : day * 0);
  return {zone.instant(from_date, window.from), zone.instant(to_date, window.to)};
}

double minutes(const std::vector<TimeSpan>& spans) { return length(spans).count() * 1440.0; }

// To five minutes; what there is of a minute or more does not vanish.
int rounded(double minutes) {
  return minutes < 1.0 ? 0 : std::max(5, 5 * static_cast<int>(std::lround(minutes / 5.0)));
}

// See NightRank. What decides next stays within a step of five minutes, 0.083 h.
double score_of(const NightRank& rank, Aim aim, bool moon_down) {
  const double hours = rank.dark_rounded / 60.0;
  const double lit = std::round(100.0 * rank.moon_lit) / 100.0;
  switch (aim) {
    case Aim::dark: {
      const double base = rank.dark_rounded > 0 ? hours : moon_down ? -0.1 : -0.2;
      return base - 0.08 * lit;
    }
    case Aim::moon:
      return rank.moon_rounded / 60.0 * (1.0 - 0.8 * std::abs(2.0 * lit - 1.0));
    case Aim::any:
      break;
  }
  return hours + 0.01 * rank.planets_visible;
}

int count_visible_planets(const SiteSky& sky, double site_limit, Ut t) {
  const SkyLight light = sky_light(sky, site_limit, t);
  if (light.sun_altitude > planets_visible_below) return 0;
  const Tt tt = to_tt(t);
  return static_cast<int>(std::count_if(planets.begin(), planets.end(), [&](Body planet) {
    const double magnitude = planet_magnitude(planet, planet_aspect(sky.ephemeris(), planet, tt));
    return bare_eye_visible(planet, magnitude, apparent_place(sky, planet, t).altitude,
                            light.faintest_star);
  }));
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

std::vector<NightRank> rank_nights(const YearEphemeris& ephemeris, const SiteYear& year,
                                   const std::vector<Date>& candidates,
                                   std::optional<ClockWindow> window, Aim aim) {
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
    rank.planets_visible = count_visible_planets(sky, year.place.limiting_magnitude, middle);
    // Without a window the Moon is judged from sunset to sunrise.
    const TimeSpan judged = window || night.sun_down.empty()
                                ? span
                                : TimeSpan{night.sun_down.front().from, night.sun_down.back().to};
    const Days up = length(intersection(moon_up, {judged}));
    rank.score = score_of(rank, aim, up <= Days(0));
    add_reasons(rank, night, judged, up);
    ranks.push_back(std::move(rank));
  }
  std::stable_sort(ranks.begin(), ranks.end(), [](const NightRank& a, const NightRank& b) {
    return a.score != b.score ? a.score > b.score : a.date < b.date;
  });
  return ranks;
}

}  // namespace duskleaf
