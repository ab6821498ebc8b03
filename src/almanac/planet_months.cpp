// A planet's month in words and numbers, from samples of its nights 15 minutes apart: this
// project's own rule (header).
#include "almanac/planet_months.hpp"

#include <algorithm>
#include <array>
#include <chrono>

#include "almanac/evening_moment.hpp"
#include "almanac/planets.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

constexpr Days sample_step(1.0 / 96.0);
constexpr Days one_hour(1.0 / 24.0);
constexpr Days short_night(6.0 / 24.0);

// One night's sky in samples while the Sun is down, shared by the planets.
struct NightSamples {
  struct Sample {
    Ut at;
    SkyLight light;
    bool evening, morning, dark;
  };
  std::vector<Sample> samples;
};

NightSamples sample_night(const SiteSky& sky, const SiteYear& year, const Night& night) {
  NightSamples result;
  const ChartHour& hour =
      year.place.chart_hours[static_cast<std::size_t>(month_of(night.date) - 1)];
  if (night.sun_down.empty()) return result;
  const Ut down = night.sun_down.front().from, up = night.sun_down.back().to;
  Ut evening_ends = chart_moment(sky, year.place.zone, hour, night) + one_hour;
  if (up - down < short_night) evening_ends = std::max(evening_ends, night.darkest);
  const Ut morning_begins = std::max(night.darkest, up - 2 * one_hour);
  for (const TimeSpan& span : night.sun_down)
    for (Ut t = span.from; t <= span.to; t = t + sample_step) {
      const SkyLight light = sky_light(sky, year.place.limiting_magnitude, t);
      result.samples.push_back({t, light, t <= evening_ends, t >= morning_begins,
                                light.sun_altitude < nautical_altitude});
    }
  return result;
}

struct Seen {
  PlanetSight sight = PlanetSight::not_visible;
  std::optional<Ut> best;
};

// `optics`: binoculars show what the bare eye does not, in a dark sky.
Seen see(const SiteSky& sky, const NightSamples& night, Body planet, double magnitude,
         bool optics) {
  bool evening = false, morning = false;
  int dark = 0, dark_seen = 0;
  std::optional<Ut> best, best_evening;
  Angle highest, highest_evening;
  for (const auto& s : night.samples) {
    dark += s.dark;
    if (!optics && magnitude >= s.light.faintest_star) continue;
    if (optics && !s.dark) continue;
    const Angle altitude = apparent_place(sky, planet, s.at).altitude;
    const bool seen = optics ? altitude >= least_height(planet)
                             : bare_eye_visible(planet, magnitude, altitude, s.light.faintest_star);
    if (!seen) continue;
    dark_seen += s.dark;
    evening |= s.evening;
    morning |= s.morning;
    if (!best || altitude > highest) {
      best = s.at;
      highest = altitude;
    }
    if (s.evening && (!best_evening || altitude > highest_evening)) {
      best_evening = s.at;
      highest_evening = altitude;
    }
  }
  Seen result;
  result.best = best_evening ? best_evening : best;
  if (dark > 0 && 10 * dark_seen >= 9 * dark)
    result.sight = PlanetSight::all_night;
  else if (evening && morning)
    result.sight = PlanetSight::evening_and_morning;
  else if (evening)
    result.sight = PlanetSight::evening;
  else if (best)
    result.sight = PlanetSight::morning;  // what rises after the evening stays until morning
  return result;
}

bool in_evening(PlanetSight sight) {
  return sight != PlanetSight::not_visible && sight != PlanetSight::morning;
}

}  // namespace

std::vector<PlanetMonth> planet_month(const YearEphemeris& ephemeris, const SiteYear& year,
                                      int index) {
  const auto [y, m] = year.span.month(index);
  const int last = days_in_month(y, m);
  const auto first_night =
      static_cast<std::size_t>((make_date(y, m, 1) - year.span.first_day()).count());
  const SiteSky sky(ephemeris, year.place.observer, year.nights.front().from,
                    year.nights.back().to);
  std::vector<NightSamples> samples;
  for (int day = 1; day <= last; ++day)
    samples.push_back(
        sample_night(sky, year, year.nights[first_night + static_cast<std::size_t>(day - 1)]));

  std::vector<PlanetMonth> rows;
  for (Body planet : planets) {
    PlanetMonth row{};
    row.planet = planet;
    const auto seen_on = [&](int day) {
      const Night& night = year.nights[first_night + static_cast<std::size_t>(day - 1)];
      const double magnitude =
          planet_magnitude(planet, planet_aspect(ephemeris, planet, to_tt(night.darkest)));
      return see(sky, samples[static_cast<std::size_t>(day - 1)], planet, magnitude,
                 row.optics_only);
    };
    std::vector<Seen> seen;
    const auto see_month = [&] {
      seen.clear();
      for (int day = 1; day <= last; ++day) seen.push_back(seen_on(day));
    };
    see_month();
    const bool faint = planet == Body::uranus || planet == Body::neptune;
    if (faint && std::all_of(seen.begin(), seen.end(),
                             [](const Seen& s) { return s.sight == PlanetSight::not_visible; })) {
      row.optics_only = true;
      see_month();
    }
    for (int day = 1; day <= last; ++day) {
      const Seen& s = seen[static_cast<std::size_t>(day - 1)];
      const Date date = make_date(y, m, day);
      if (day == 1 || day == 11 || day == 21 || day == last) row.sights.emplace_back(date, s.sight);
      if (!in_evening(s.sight)) continue;
      if (!row.first_evening) row.first_evening = date;
      row.last_evening = date;
    }
    const Night& middle = year.nights[first_night + 14];
    const Seen& on_15th = seen[14];
    row.sight = on_15th.sight;
    row.best = on_15th.best;
    const Ut moment = row.best.value_or(middle.darkest);
    const PlanetEvening p = planet_evening(sky, planet, moment, 0.0, {middle.from, middle.to});
    if (row.best) row.place = p.place;
    row.magnitude = p.magnitude;
    row.elongation = p.elongation;
    row.constellation = p.constellation;
    row.rises = p.rises;
    row.highest = p.highest;
    row.sets = p.sets;
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace duskleaf
