// A night's visibility of a planet from samples: this project's own rule (planet_months.hpp).
#include "almanac/planet_nights.hpp"

#include <algorithm>

#include "almanac/evening_moment.hpp"
#include "sky/brightness.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;

constexpr Days sample_step(1.0 / 288.0);
constexpr Days one_hour(1.0 / 24.0);
constexpr Days short_night(6.0 / 24.0);
constexpr Angle sun_low_enough = Angle::from_degrees(-5);
// An edge of a window is found within 5 seconds; as near as this to the night's own ends it is
// theirs.
constexpr Days end_margin(2.0 / 1440.0), beyond(20.0 / 86400.0);
constexpr Angle moon_is_down = Angle::from_degrees(-90);

/// A body's place through a night: the parabola through its beginning, middle and end.
class Track {
 public:
  Track(const YearEphemeris& ephemeris, Body body, const Night& night)
      : middle_(ephemeris.apparent(body, to_tt(night.from + (night.to - night.from) * 0.5))) {
    const Vector first = ephemeris.apparent(body, to_tt(night.from)),
                 last = ephemeris.apparent(body, to_tt(night.to));
    slope_ = 0.5 * (last - first);
    curve_ = 0.5 * (last + first) - middle_;
  }
  Vector at(double day_part) const { return middle_ + day_part * (slope_ + day_part * curve_); }

 private:
  Vector middle_, slope_, curve_;
};

double sine_of_altitude(const Vector& place, const PlanetNight::Sample& s, const Observer& site) {
  return (cos(site.latitude) * (place.x() * s.cosine + place.y() * s.sine) +
          sin(site.latitude) * place.z()) /
         place.norm();
}

/// The true altitude that refraction lifts to `apparent`.
Angle unrefracted(Angle apparent) {
  Angle h = apparent;
  for (int i = 0; i < 4; ++i) h = apparent - refraction(h);
  return h;
}

/// Whether a planet is visible in a sample of a night.
class Watch {
 public:
  Watch(const SiteSky& sky, const PlanetNight& night, Body planet, double magnitude, bool optics)
      : site_(sky.observer()),
        track_(sky.ephemeris(), planet, night.night()),
        least_(sin(unrefracted(least_height(planet)))),
        planet_(planet),
        magnitude_(magnitude),
        optics_(optics) {}
  // What can be seen at the least height can be seen higher.
  bool light_lets(const PlanetNight::Sample& s) const { return light_lets(s, s.faintest_star); }
  double sine(const PlanetNight::Sample& s) const {
    return sine_of_altitude(track_.at(s.day_part), s, site_);
  }
  bool high_enough(double sine) const { return sine >= least_; }
  bool visible_moonless(const PlanetNight::Sample& s) const {
    return light_lets(s, s.faintest_moonless) && high_enough(sine(s));
  }

 private:
  bool light_lets(const PlanetNight::Sample& s, double faintest_star) const {
    return optics_ ? s.dark
                   : bare_eye_visible(planet_, magnitude_, least_height(planet_), faintest_star);
  }

  const Observer& site_;
  Track track_;
  double least_;
  Body planet_;
  double magnitude_;
  bool optics_;
};

}  // namespace

PlanetNight::PlanetNight(const SiteSky& sky, const SiteYear& year, const Night& night)
    : night_(&night) {
  if (night.sun_down.empty()) return;
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

  const Observer& site = sky.observer();
  const Track sun(sky.ephemeris(), Body::sun, night), moon(sky.ephemeris(), Body::moon, night);
  const Vector site_at_zero = observer_vector_au(site.latitude, site.elevation_m, Angle());
  const double length = (night.to - night.from).count();
  for (const TimeSpan& span : night.sun_down)
    for (Ut t = span.from; t <= span.to; t = t + sample_step) {
      const Angle sidereal_time = sky.local_sidereal_time(t);
      Sample s{t,
               2.0 * (t - night.from).count() / length - 1.0,
               cos(sidereal_time),
               sin(sidereal_time),
               0.0,
               0.0,
               Part::evening,
               false};
      const Vector sun_place = sun.at(s.day_part), moon_place = moon.at(s.day_part);
      const Angle sun_altitude = arcsin(sine_of_altitude(sun_place, s, site));
      if (sun_altitude > sun_low_enough) continue;
      const Vector here(site_at_zero.x() * s.cosine, site_at_zero.x() * s.sine, site_at_zero.z());
      const Angle moon_altitude = arcsin(sine_of_altitude(moon_place - here, s, site));
      const Vector moon_to_sun = sun_place - moon_place;
      const double phase_cosine =
          -moon_to_sun.dot(moon_place) / (moon_to_sun.norm() * moon_place.norm());
      const double limit = year.place.limiting_magnitude;
      s.faintest_moonless = faintest_star(limit, sun_altitude, moon_is_down, 0.0);
      s.faintest_star = moon_altitude > Angle() ? faintest_star(limit, sun_altitude, moon_altitude,
                                                                0.5 * (1.0 + phase_cosine))
                                                : s.faintest_moonless;
      s.dark = sun_altitude < nautical_altitude;
      s.part = t <= evening_ends     ? Part::evening
               : t >= morning_begins ? Part::morning
               : t < night.darkest   ? Part::between_before_darkest
                                     : Part::between_after_darkest;
      samples_.push_back(s);
    }
}

PlanetSeen see_planet(const SiteSky& sky, const PlanetNight& night, Body planet, double magnitude,
                      bool optics) {
  struct Best {
    std::optional<std::size_t> sample;
    double altitude = 0.0;
    void offer(std::size_t i, double height) {
      if (sample && height <= altitude) return;
      sample = i;
      altitude = height;
    }
  };
  const std::vector<PlanetNight::Sample>& samples = night.samples();
  if (samples.empty()) return {};
  using Part = PlanetNight::Part;
  const Watch watch(sky, night, planet, magnitude, optics);
  int dark = 0, dark_seen = 0;
  Best evening, between, morning;
  Ut last_light = samples.front().at, last_seen = last_light;
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const PlanetNight::Sample& s = samples[i];
    dark += s.dark;
    if (!watch.light_lets(s)) continue;
    last_light = s.at;
    const double altitude = watch.sine(s);
    if (!watch.high_enough(altitude)) continue;
    last_seen = s.at;
    dark_seen += s.dark;
    (s.part == Part::evening   ? evening
     : s.part == Part::morning ? morning
                               : between)
        .offer(i, altitude);
  }
  const bool all_night = evening.sample && morning.sample && dark > 0 && 10 * dark_seen >= 9 * dark;
  // What has set long before the day breaks is no sight of the morning.
  if (morning.sample && !all_night && last_light - last_seen > one_hour) {
    between.offer(*morning.sample, morning.altitude);
    morning.sample.reset();
  }
  PlanetSeen seen;
  seen.evening = evening.sample;
  seen.morning = morning.sample;
  // What is seen between the two alone goes by the side of the darkest moment.
  if (!seen.evening && !seen.morning && between.sample)
    (samples[*between.sample].at < night.night().darkest ? seen.evening : seen.morning) =
        between.sample;
  // The word and the time come from the same part of the night.
  seen.best = seen.evening ? seen.evening : seen.morning;
  if (seen.evening && seen.morning)
    seen.sight = all_night ? PlanetSight::all_night : PlanetSight::evening_and_morning;
  else if (seen.best)
    seen.sight = seen.evening ? PlanetSight::evening : PlanetSight::morning;
  return seen;
}

PlanetWindow planet_window(const SiteSky& sky, double site_limit, const PlanetNight& night,
                           Body planet, double magnitude, bool optics, std::size_t best) {
  const std::vector<PlanetNight::Sample>& samples = night.samples();
  const Watch watch(sky, night, planet, magnitude, optics);
  const auto follow = [&](std::size_t a, std::size_t b) {
    return samples[b].at - samples[a].at < 1.5 * sample_step &&
           watch.visible_moonless(samples[b]) && watch.visible_moonless(samples[a]);
  };
  std::size_t first = best, last = best;
  while (first > 0 && follow(first - 1, first)) --first;
  while (last + 1 < samples.size() && follow(last, last + 1)) ++last;

  const auto visible = [&](Ut t) {
    const Angle sun_altitude = sky.altitude(Body::sun, t);
    if (sun_altitude > sun_low_enough) return false;
    const Angle altitude = apparent_place(sky, planet, t).altitude;
    return optics ? sun_altitude < nautical_altitude && altitude >= least_height(planet)
                  : bare_eye_visible(planet, magnitude, altitude,
                                     faintest_star(site_limit, sun_altitude, moon_is_down, 0.0));
  };
  // Halving to 5 seconds between the last sample that shows it and where the next would be.
  const auto edge = [&](Ut inside, Ut outside) {
    for (int i = 0; i < 6; ++i) {
      const Ut middle = inside + (outside - inside) * 0.5;
      (visible(middle) ? inside : outside) = middle;
    }
    return inside;
  };
  // What stops it is seen a little beyond the edge.
  const auto kind = [&](Ut t, Days outward) {
    if (t - night.night().from < end_margin || night.night().to - t < end_margin)
      return WindowEdge::open;
    return apparent_place(sky, planet, t + outward).altitude < least_height(planet)
               ? WindowEdge::height
               : WindowEdge::twilight;
  };
  PlanetWindow window{};
  window.date = night.night().date;
  window.from =
      edge(samples[first].at, std::max(samples[first].at - sample_step, night.night().from));
  window.to = edge(samples[last].at, std::min(samples[last].at + sample_step, night.night().to));
  window.best = samples[best].at;
  window.at_from = apparent_place(sky, planet, window.from);
  window.at_best = apparent_place(sky, planet, window.best);
  window.at_to = apparent_place(sky, planet, window.to);
  window.begins = kind(window.from, -1.0 * beyond);
  window.ends = kind(window.to, beyond);
  const RiseSet times = planet_rise_set(sky, planet, night.night().from, night.night().to);
  for (Ut t : times.rises)
    if (t <= window.from) window.rises = t;
  for (Ut t : times.transits)
    if (t >= window.from && t <= window.to) {
      window.highest = t;
      window.at_highest = apparent_place(sky, planet, t);
    }
  for (auto t = times.sets.rbegin(); t != times.sets.rend(); ++t)
    if (*t >= window.to) window.sets = *t;
  for (const TimeSpan& down : night.night().sun_down)
    if (down.from <= window.best && window.best <= down.to) {
      if (down.from > night.night().from) window.sunset = down.from;
      if (down.to < night.night().to) window.sunrise = down.to;
    }
  return window;
}

}  // namespace duskleaf
