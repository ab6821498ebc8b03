// How high and how close a pair must stand to be worth a look: the rule of meetings.cpp by brute
// force, printed pages that an astronomer found wanting, and magnitudes (each named).
#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>

#include "almanac/planets.hpp"
#include "almanac/site_meetings.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

// Named by an astronomer who checked printed pages: the pairs stood near the horizon at the moment
// given, though high in the same evening (facts that the altitudes here bear out).
TEST(Meetings, AreShownWhileTheyStandHigh) {
  struct Row {
    double latitude, longitude;
    const char *zone, *pair;
    int year, month, day;
    double at_least, apart;
  };
  const Row rows[] = {
      {-33.9, 151.2, "Australia/Sydney", "venus+regulus", 2026, 7, 10, 25.0, 1.5},
      {42.6, -5.6, "Europe/Madrid", "saturn+neptune", 2026, 2, 20, 13.0, 1.0},
      {41.3, -73.9, "America/New_York", "venus+neptune", 2028, 2, 10, 25.0, 1.5},
  };
  for (const Row& row : rows) {
    const Made m = make(test_place(row.latitude, row.longitude, row.zone), row.year);
    const Meeting* x = m.find(row.pair, row.month, row.day);
    ASSERT_NE(x, nullptr) << row.pair;
    ASSERT_TRUE(x->look.has_value()) << row.pair;
    EXPECT_FALSE(x->look->morning) << row.pair;
    EXPECT_GE(lower_of(m, *x, x->look->at), row.at_least) << row.pair;
    EXPECT_LE(x->separation.degrees(), row.apart) << row.pair;
    EXPECT_LE(sun_altitude(m, x->look->at).degrees(), -7.99) << row.pair;
  }
}

// By brute force: who is sent out for a low pair could not have seen it higher in the same evening
// or morning and as close together.
TEST(Meetings, LowPairsCouldNotBeSeenHigher) {
  const Place sites[] = {northern(), test_place(-33.9, 151.2, "Australia/Sydney"),
                         test_place(0.5, 36.8, "Africa/Nairobi", 19 * 60 + 30)};
  int evenings = 0, mornings = 0;
  for (const Place& place : sites) {
    const Made m = make(place, 2028);
    for (const Meeting& x : m.all) {
      if (!x.look || is_faint(target_at(x.closest.a)) || is_faint(target_at(x.closest.b))) continue;
      const Ut at = x.look->at;
      const double lower = lower_of(m, x, at);
      if (lower >= 15.0) continue;
      const Night& night =
          night_of(m.year, year_of(x.look->night), month_of(x.look->night), day_of(x.look->night));
      const auto dark = [&](Ut t) { return sun_altitude(m, t).degrees() <= -8.0; };
      const Days step(5.0 / 1440);
      Ut dusk = night.darkest, dawn = night.darkest;
      while (dark(dusk - step)) dusk = dusk - step;
      while (dark(dawn + step)) dawn = dawn + step;
      const Ut chart =
          place.zone.instant(night.date, *place.chart_hours[0].after_midnight);  // all alike
      const Ut evening_end = std::max(chart, dusk) + Days(1.0 / 24);
      Ut from = dusk, to = std::min(evening_end, dawn);
      if (at > to) {
        if (at < dawn - Days(2.0 / 24)) continue;  // the middle of the night
        from = std::max(to, dawn - Days(115.0 / 1440));
        to = dawn;
        ++mornings;
      } else {
        ++evenings;
      }
      for (Ut t = from; t <= to; t = t + step) {
        if (std::abs((t - x.closest.at).count()) > (with_moon(x) ? 1.0 : 3.0)) continue;
        const PairSight sight =
            pair_sight(SiteSky(m.ephemeris(), place.observer, t - Days(1), t + Days(1)),
                       x.closest.a, x.closest.b, t);
        if (sight.separation > x.separation) continue;
        EXPECT_LT(std::min(sight.a.altitude, sight.b.altitude).degrees(), lower + 1.5)
            << pair_name(x.closest.a, x.closest.b) << ' ' << m.clock(*x.look) << ' '
            << place.zone.civil(t).iso();
      }
    }
  }
  EXPECT_GT(evenings, 10);
  EXPECT_GT(mornings, 5);
}

// A pair that the dark sky shows only when it has drifted apart is none to look at.
TEST(Meetings, PairsFarApartAreNoSight) {
  const Made m = make(northern(), 2027);
  const Ut first = m.year.nights.front().from, last = m.year.nights.back().to;
  const SiteSky sky(m.ephemeris(), m.year.place.observer, first - Days(2), last + Days(1));
  int only_wide = 0;
  for (const Meeting& x : m.all) {
    if (x.look || is_faint(target_at(x.closest.b))) continue;
    bool shown = false;
    for (int k = -92; k <= 92; ++k) {  // a quarter of an hour's steps, within the Moon's day
      const Ut t = x.closest.at + Days(k / 96.0);
      if (t < first || last < t || sky.altitude(Body::sun, t).degrees() > -9.0) continue;
      const PairSight sight = pair_sight(sky, x.closest.a, x.closest.b, t);
      if (std::min(sight.a.altitude, sight.b.altitude).degrees() < 6.0) continue;
      shown = true;
      // Every stretch of the night offers its quarters; the ends of the year are not all there.
      EXPECT_GT(sight.separation.degrees(), std::min(6.9, x.closest.separation.degrees() + 3.9))
          << pair_name(x.closest.a, x.closest.b) << ' ' << m.year.place.zone.civil(t).iso();
    }
    only_wide += shown;
  }
  EXPECT_GE(only_wide, 3);
}

// Neptune is never brighter than 7.6 (its published magnitudes): binoculars under a limit of 3,
// which reach 7.3, do not show it, nor do they low down under a dark sky.
TEST(Meetings, WhatIsFaintMustBeWithinReachOfBinoculars) {
  Place town = northern(), dark = northern();
  town.limiting_magnitude = 3.0;
  dark.limiting_magnitude = 6.5;
  const auto has = [](const Meeting& x, const char* name) {
    return target_at(x.closest.a).name == name || target_at(x.closest.b).name == name;
  };
  int neptune = 0, faint = 0;
  for (const int year : {2026, 2027, 2028}) {
    const Made in_town = make(town, year);
    for (const Meeting& x : in_town.all)
      EXPECT_FALSE(x.look && has(x, "neptune")) << in_town.clock(*x.look);
    const Made m = make(dark, year);
    const SiteSky sky(m.ephemeris(), dark.observer, m.year.nights.front().from - Days(1),
                      m.year.nights.back().to + Days(1));
    for (const Meeting& x : m.all) {
      if (!x.look) continue;
      const double faintest = sky_light(sky, 6.5, x.look->at).faintest_star;
      for (const Target* t : {&target_at(x.closest.a), &target_at(x.closest.b)}) {
        if (!is_faint(*t)) continue;
        const double height = refracted_place(m, *t, x.look->at).altitude.radians();
        double magnitude = t->magnitude + 1.5;
        if (t->is_body())
          magnitude = 0.5 + planet_magnitude(
                                t->body, planet_aspect(m.ephemeris(), t->body, to_tt(x.look->at)));
        magnitude += 0.25 * (1.0 / std::sin(height) - 1.0);
        EXPECT_LT(magnitude, faintest + 5.0 * std::log10(50.0 / 7.0) + 0.01)
            << t->name << ' ' << m.clock(*x.look);
        // Clusters count for the bare eye by the same light, without binoculars.
        if (t->sort == Target::Sort::cluster && x.bare_eye) {
          EXPECT_LT(magnitude, faintest) << m.clock(*x.look);
        }
        ++faint;
        if (t->name == "neptune") {
          ++neptune;
          EXPECT_FALSE(x.bare_eye) << m.clock(*x.look);
          EXPECT_GT(height, 0.12) << m.clock(*x.look);
        }
      }
    }
  }
  EXPECT_GT(neptune, 10);
  EXPECT_GT(faint, 60);
}

}  // namespace
}  // namespace duskleaf
