// A planet's month in words and numbers, from samples of its nights 5 minutes apart: this
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

constexpr Days sample_step(1.0 / 288.0);
constexpr Days one_hour(1.0 / 24.0);
constexpr Days short_night(6.0 / 24.0);
constexpr Angle sun_low_enough = Angle::from_degrees(-5);

enum class Part { evening, between_before_darkest, between_after_darkest, morning };

// One night's sky in samples while the Sun is low enough, shared by the planets.
struct Sample {
  Ut at;
  SkyLight light;
  Part part;
  bool dark;
};

std::vector<Sample> sample_night(const SiteSky& sky, const SiteYear& year, const Night& night) {
  std::vector<Sample> samples;
  if (night.sun_down.empty()) return samples;
  const ChartHour& hour =
      year.place.chart_hours[static_cast<std::size_t>(month_of(night.date) - 1)];
  const Ut down = night.sun_down.front().from, up = night.sun_down.back().to;
  Ut evening_ends = evening_moment(sky, year.place.zone, hour, night).moment + one_hour;
  if (up - down < short_night) evening_ends = std::max(evening_ends, night.darkest);
  Ut morning_begins = up - 2 * one_hour;
  if (night.nautical_dawn)
    morning_begins = std::min(morning_begins, *night.nautical_dawn - one_hour);
  morning_begins = std::max(morning_begins, night.darkest);
  evening_ends = std::min(evening_ends, morning_begins);
  for (const TimeSpan& span : night.sun_down)
    for (Ut t = span.from; t <= span.to; t = t + sample_step) {
      const SkyLight light = sky_light(sky, year.place.limiting_magnitude, t);
      if (light.sun_altitude > sun_low_enough) continue;
      const Part part = t <= evening_ends     ? Part::evening
                        : t >= morning_begins ? Part::morning
                        : t < night.darkest   ? Part::between_before_darkest
                                              : Part::between_after_darkest;
      samples.push_back({t, light, part, light.sun_altitude < nautical_altitude});
    }
  return samples;
}

struct Seen {
  PlanetSight sight = PlanetSight::not_visible;
  std::optional<Ut> best;
};

// `optics`: binoculars show what the bare eye does not, in a dark sky.
Seen see(const SiteSky& sky, const std::vector<Sample>& night, Body planet, double magnitude,
         bool optics) {
  struct Best {
    const Sample* sample = nullptr;
    Angle altitude;
    void offer(const Sample& s, Angle height) {
      if (sample && height <= altitude) return;
      sample = &s;
      altitude = height;
    }
  };
  int dark = 0, dark_seen = 0;
  Best evening, between, morning;
  for (const Sample& s : night) {
    dark += s.dark;
    if (optics ? !s.dark : magnitude >= s.light.faintest_star) continue;
    const Angle altitude = apparent_place(sky, planet, s.at).altitude;
    const bool seen = optics ? altitude >= least_height(planet)
                             : bare_eye_visible(planet, magnitude, altitude, s.light.faintest_star);
    if (!seen) continue;
    dark_seen += s.dark;
    (s.part == Part::evening   ? evening
     : s.part == Part::morning ? morning
                               : between)
        .offer(s, altitude);
  }
  // The word and the time come from the same part of the night.
  const auto told = [](PlanetSight sight, const Best& best) {
    return Seen{sight, best.sample->at};
  };
  if (evening.sample && morning.sample)
    return told(dark > 0 && 10 * dark_seen >= 9 * dark ? PlanetSight::all_night
                                                       : PlanetSight::evening_and_morning,
                evening);
  if (evening.sample) return told(PlanetSight::evening, evening);
  if (morning.sample) return told(PlanetSight::morning, morning);
  if (between.sample)
    return told(between.sample->part == Part::between_before_darkest ? PlanetSight::evening
                                                                     : PlanetSight::morning,
                between);
  return {};
}

bool in_evening(PlanetSight sight) {
  return sight != PlanetSight::not_visible && sight != PlanetSight::morning;
}
bool in_morning(PlanetSight sight) {
  return sight != PlanetSight::not_visible && sight != PlanetSight::evening;
}

// The day of the month (1 to its last) nearest to the 15th on which the planet is seen.
int best_day(const std::vector<Seen>& seen) {
  const auto is_seen = [&](int day) {
    return day >= 1 && day <= static_cast<int>(seen.size()) &&
           seen[static_cast<std::size_t>(day - 1)].sight != PlanetSight::not_visible;
  };
  for (int away = 0; away <= 16; ++away)
    for (int day : {15 - away, 15 + away})
      if (is_seen(day)) return day;
  return 15;
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
  std::vector<std::vector<Sample>> samples;
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
      if (in_evening(s.sight)) {
        if (!row.first_evening) row.first_evening = date;
        row.last_evening = date;
      }
      if (in_morning(s.sight)) {
        if (!row.first_morning) row.first_morning = date;
        row.last_morning = date;
      }
    }
    const int day = best_day(seen);
    const Night& night = year.nights[first_night + static_cast<std::size_t>(day - 1)];
    row.best_date = make_date(y, m, day);
    row.sight = seen[static_cast<std::size_t>(day - 1)].sight;
    row.best = seen[static_cast<std::size_t>(day - 1)].best;
    const Ut moment = row.best.value_or(night.darkest);
    const PlanetEvening p = planet_evening(sky, planet, moment, 0.0, {night.from, night.to});
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
