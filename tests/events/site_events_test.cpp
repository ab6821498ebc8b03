// What follows from the definitions (conventions of the project; Explanatory Supplement 1992, ch.
// 9) without outside values: altitudes at the instants, order, alternation, and what must not
// happen in polar day and night.
#include <cmath>
#include <gtest/gtest.h>
#include <map>

#include "base/civil.hpp"
#include "events/events.hpp"
#include "events/site_sky.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {
namespace {

const Ut start = ut_midnight(make_date(2027, 1, 1)), end = ut_midnight(make_date(2028, 1, 1));
const YearEphemeris& year_2027() {
  static const YearEphemeris ephemeris(to_tt(start - Days(3)), to_tt(end + Days(3)));
  return ephemeris;
}
Observer at(double latitude, double longitude) {
  return {Angle::from_degrees(latitude), Angle::from_degrees(longitude), 0};
}
std::map<EventKind, int> count(const std::vector<Event>& events) {
  std::map<EventKind, int> n;
  for (const Event& e : events) ++n[e.kind];
  return n;
}

TEST(SiteEvents, AltitudesAtTheInstantsAreThoseOfTheDefinitions) {
  const Observer observer = at(54.18, -4.62);
  const auto events = site_events(year_2027(), observer, start, end);
  const auto altitude = [&](Body body, Ut t) {
    const Angle lst = year_2027().apparent_sidereal_time(t) + observer.longitude;
    return to_horizontal(year_2027().apparent(body, to_tt(t)), lst, observer.latitude)
        .altitude.degrees();
  };
  for (const Event& e : events) {
    const double h = altitude(e.body, e.at);
    switch (e.kind) {
      case EventKind::sunrise:
      case EventKind::sunset:
        EXPECT_NEAR(h, -50.0 / 60, 2e-5);
        break;
      case EventKind::civil_dawn:
      case EventKind::civil_dusk:
        EXPECT_NEAR(h, -6, 2e-5);
        break;
      case EventKind::nautical_dawn:
      case EventKind::nautical_dusk:
        EXPECT_NEAR(h, -12, 2e-5);
        break;
      case EventKind::astronomical_dawn:
      case EventKind::astronomical_dusk:
        EXPECT_NEAR(h, -18, 2e-5);
        break;
      case EventKind::moonrise:
      case EventKind::moonset: {
        const double distance_km =
            year_2027().place(Body::moon, to_tt(e.at)).distance_au * 149597870.7;
        EXPECT_NEAR(h, 0.7275 * arcsin(6378.1366 / distance_km).degrees() - 34.0 / 60, 2e-5);
        break;
      }
      default: {
        const Angle lst = year_2027().apparent_sidereal_time(e.at) + observer.longitude;
        EXPECT_NEAR(hour_angle(year_2027().apparent(e.body, to_tt(e.at)), lst).degrees(), 0, 5e-5);
      }
    }
  }
  const auto n = count(events);
  EXPECT_EQ(n.at(EventKind::sunrise), 365);
  EXPECT_EQ(n.at(EventKind::sunset), 365);
  EXPECT_EQ(n.at(EventKind::sun_transit), 365);
  EXPECT_TRUE(n.at(EventKind::moon_transit) == 352 || n.at(EventKind::moon_transit) == 353);
  // Above latitude 48.6 degrees the Sun stays above -18 degrees about the June solstice (90 - 54.18
  // - 23.44 < 18).
  EXPECT_LT(n.at(EventKind::astronomical_dusk), 300);
}

TEST(SiteEvents, RisesAndSetsTakeTurnsAtEveryLatitude) {
  for (double latitude :
       {-90.0, -89.9, -78.2, -66.0, -33.0, 0.0, 51.0, 60.5, 65.8, 66.9, 71.0, 84.9, 89.99, 90.0}) {
    const auto events = site_events(year_2027(), at(latitude, 17.0), start, end);
    const std::pair<EventKind, EventKind> pairs[] = {
        {EventKind::sunrise, EventKind::sunset},
        {EventKind::civil_dawn, EventKind::civil_dusk},
        {EventKind::nautical_dawn, EventKind::nautical_dusk},
        {EventKind::astronomical_dawn, EventKind::astronomical_dusk},
        {EventKind::moonrise, EventKind::moonset}};
    for (const auto& [up, down] : pairs) {
      EventKind last = EventKind::clock_change;
      for (const Event& e : events) {
        if (e.kind != up && e.kind != down) continue;
        EXPECT_NE(e.kind, last) << latitude << ' ' << event_name(e.kind);
        last = e.kind;
      }
    }
    for (std::size_t i = 1; i < events.size(); ++i) EXPECT_LE(events[i - 1].at, events[i].at);
  }
}

TEST(SiteEvents, AtThePolesTheSunRisesAndSetsOnce) {
  for (double latitude : {90.0, -90.0}) {
    const auto n = count(site_events(year_2027(), at(latitude, 0), start, end));
    for (EventKind kind :
         {EventKind::sunrise, EventKind::sunset, EventKind::civil_dawn, EventKind::civil_dusk,
          EventKind::nautical_dawn, EventKind::nautical_dusk, EventKind::astronomical_dawn,
          EventKind::astronomical_dusk}) {
      ASSERT_EQ(n.count(kind), 1u) << latitude << ' ' << event_name(kind);
      EXPECT_EQ(n.at(kind), 1) << latitude << ' ' << event_name(kind);
    }
    // The Moon is up for half of each tropical month of 27.3 days.
    EXPECT_TRUE(n.at(EventKind::moonrise) == 13 || n.at(EventKind::moonrise) == 14) << latitude;
  }
}

// A graze is met by moving the site until the Sun just fails to set: both sides of it must be told
// apart, and the two instants be found however close they are.
TEST(SiteEvents, GrazesAreNotMissed) {
  const Ut from = ut_midnight(make_date(2027, 6, 21)) + Days(0.5), to = from + Days(1);
  double sets = 65.0, stays_up = 67.0;
  for (int i = 0; i < 40; ++i) {
    const double middle = 0.5 * (sets + stays_up);
    const auto n = count(site_events(year_2027(), at(middle, 20), from, to));
    const bool both = n.contains(EventKind::sunset) && n.contains(EventKind::sunrise);
    EXPECT_EQ(n.contains(EventKind::sunset), n.contains(EventKind::sunrise)) << middle;
    (both ? sets : stays_up) = middle;
  }
  // 90 degrees - 23.44 - 50/60: the declination of the solstice.
  EXPECT_NEAR(sets, 90 - 23.437 - 50.0 / 60, 0.003);
  const auto events = site_events(year_2027(), at(sets - 1e-7, 20), from, to);
  std::vector<Ut> instants;
  for (const Event& e : events)
    if (e.kind == EventKind::sunset || e.kind == EventKind::sunrise) instants.push_back(e.at);
  ASSERT_EQ(instants.size(), 2u);
  EXPECT_LT((instants[1] - instants[0]).count() * 1440, 2.0);
}

TEST(SiteEvents, PartsOfAYearAddUpToIt) {
  const Observer observer = at(69.65, 18.96);
  std::size_t parts = 0;
  for (int i = 0; i < 73; ++i)
    parts +=
        site_events(year_2027(), observer, start + Days(5 * i), start + Days(5 * (i + 1))).size();
  EXPECT_EQ(parts, site_events(year_2027(), observer, start, end).size());
}

TEST(SiderealClock, StaysWithTheEphemerisBetweenLookUps) {
  const SiderealClock clock(year_2027(), start, end);
  double worst = 0;
  for (double d = 0.01; d < 365; d += 0.377) {
    const Ut t = start + Days(d);
    worst = std::max(
        worst,
        std::abs(
            (clock.greenwich(t) - year_2027().apparent_sidereal_time(t)).centred().arcseconds()));
  }
  EXPECT_LT(worst, 0.01);
}

TEST(PlanetRiseSet, AltitudesAreMinus34Minutes) {
  const SiteSky sky(year_2027(), at(-33.9, 18.4), start, start + Days(2));
  for (Body planet : planets) {
    const RiseSet r = planet_rise_set(sky, planet, start, start + Days(1));
    ASSERT_EQ(r.rises.size(), 1u) << body_name(planet);
    ASSERT_EQ(r.sets.size(), 1u) << body_name(planet);
    ASSERT_GE(r.transits.size(), 1u) << body_name(planet);
    EXPECT_NEAR(sky.altitude(planet, r.rises[0]).arcminutes(), -34, 0.005);
    EXPECT_NEAR(sky.altitude(planet, r.sets[0]).arcminutes(), -34, 0.005);
    EXPECT_GT(sky.sight(planet, r.transits[0]).south, 0) << body_name(planet);
  }
}

}  // namespace
}  // namespace duskleaf
