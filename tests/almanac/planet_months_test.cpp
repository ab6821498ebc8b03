// A planet's month: the words and the time that a page prints side by side must not contradict each
// other. The project's own rules (almanac/planet_months.hpp), tried at many sites.
#include "almanac/planet_months.hpp"

#include <cmath>
#include <gtest/gtest.h>

#include "almanac/evening_moment.hpp"
#include "almanac/planets.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

struct Site {
  const char* label;
  double latitude, longitude;
  const char* zone;
  int chart_minutes;
  double limit;
};
void PrintTo(const Site& site, std::ostream* out) { *out << site.label; }

class PlanetMonthAt : public testing::TestWithParam<Site> {
 protected:
  static SiteYear year() {
    const Site& site = GetParam();
    Place place = test_place(site.latitude, site.longitude, site.zone, site.chart_minutes);
    place.limiting_magnitude = site.limit;
    return make_site_year(ephemeris_of({2027, 1}), place, {2027, 1}, {false});
  }
};

// Mars, an evening planet in June at 52 N, was said to be seen before sunrise, best at 22:07; Venus
// was best in the minute of sunset; Uranus was an evening sight without a time.
TEST_P(PlanetMonthAt, WordsAndTimesAgree) {
  const SiteYear site = year();
  const YearEphemeris& ephemeris = ephemeris_of({2027, 1});
  const SiteSky sky(ephemeris, site.place.observer, site.nights.front().from,
                    site.nights.back().to);
  int seen = 0;
  for (int month = 0; month < 12; ++month)
    for (const PlanetMonth& p : planet_month(ephemeris, site, month)) {
      SCOPED_TRACE(testing::Message()
                   << GetParam().label << ' ' << month + 1 << ' ' << body_name(p.planet));
      EXPECT_EQ(month_of(p.best_date), month + 1);
      const bool visible = p.sight != PlanetSight::not_visible;
      EXPECT_EQ(p.best.has_value(), visible);
      EXPECT_EQ(p.place.has_value(), visible);
      EXPECT_EQ(p.first_evening.has_value() || p.first_morning.has_value(), visible);
      EXPECT_EQ(p.first_evening.has_value(), p.last_evening.has_value());
      EXPECT_EQ(p.first_morning.has_value(), p.last_morning.has_value());
      if (!visible) {
        EXPECT_EQ(day_of(p.best_date), 15);
        for (const auto& s : p.sights) EXPECT_EQ(s.second, PlanetSight::not_visible);
        continue;
      }
      ++seen;
      const bool evening = p.sight != PlanetSight::morning,
                 morning = p.sight != PlanetSight::evening;
      if (evening) {
        ASSERT_TRUE(p.first_evening);
        EXPECT_TRUE(*p.first_evening <= p.best_date && p.best_date <= *p.last_evening);
      }
      if (morning) {
        ASSERT_TRUE(p.first_morning);
        EXPECT_TRUE(*p.first_morning <= p.best_date && p.best_date <= *p.last_morning);
      }
      const Night& night = night_of(site, 2027, month + 1, day_of(p.best_date));
      const ChartHour hour = site.place.chart_hours[static_cast<std::size_t>(month)];
      const Ut drawn = evening_moment(sky, site.place.zone, hour, night).moment;
      if (evening)
        EXPECT_LE(*p.best, std::max(night.darkest, drawn + Days(1.0 / 24)));
      else
        EXPECT_GE(*p.best, night.darkest);
      EXPECT_LE(sky.altitude(Body::sun, *p.best).degrees(), -5.0);
      EXPECT_GE(p.place->altitude, least_height(p.planet));
      EXPECT_NEAR(p.place->altitude.degrees(),
                  apparent_place(sky, p.planet, *p.best).altitude.degrees(), 1e-6);
      if (p.optics_only) {
        EXPECT_TRUE(p.planet == Body::uranus || p.planet == Body::neptune);
        EXPECT_LT(sky.altitude(Body::sun, *p.best).degrees(), -12.0);
      } else {
        const double margin = p.planet == Body::uranus ? 0.5 : 0.0;
        EXPECT_LT(p.magnitude + margin,
                  0.02 + sky_light(sky, site.place.limiting_magnitude, *p.best).faintest_star);
      }
    }
  EXPECT_GT(seen, 20);
}

INSTANTIATE_TEST_SUITE_P(
    Sites, PlanetMonthAt,
    testing::Values(Site{"52 N", 52.0, -0.5, "Europe/London", 20 * 60, 5.0},
                    Site{"52 N late", 52.0, -0.5, "Europe/London", 22 * 60 + 30, 5.0},
                    Site{"43 S", -43.4, 171.6, "Pacific/Auckland", 21 * 60, 6.0},
                    Site{"equator", -0.2, 36.5, "Africa/Nairobi", 19 * 60 + 30, 6.5},
                    Site{"69.6 N", 69.6, 18.9, "Europe/Oslo", 20 * 60, 5.5},
                    Site{"60 N at dusk", 60.1, 24.9, "Europe/Helsinki", -1, 4.0},
                    Site{"35 N after midnight", 35.0, 139.7, "Asia/Tokyo", 30, 4.5}));

const PlanetMonth planet_of(const SiteYear& site, int month, Body planet) {
  for (const PlanetMonth& p : planet_month(ephemeris_of({2027, 1}), site, month - 1))
    if (p.planet == planet) return p;
  return {};
}

TEST(PlanetMonth, MarsInJuneIsAnEveningSight) {
  const SiteYear site = year_of_site(test_place(52.0, -0.5, "Europe/London", 20 * 60), 2027);
  const PlanetMonth mars = planet_of(site, 6, Body::mars);
  EXPECT_EQ(mars.sight, PlanetSight::evening);
  EXPECT_LT(mars.best.value(), night_of(site, 2027, 6, 15).darkest);
}

TEST(PlanetMonth, UranusAndNeptuneInTheSouthsBrightDecemberAreEveningSights) {
  Place place = test_place(-43.4, 171.6, "Pacific/Auckland", 21 * 60);
  place.limiting_magnitude = 6.0;
  const SiteYear site = make_site_year(ephemeris_of({2027, 1}), place, {2027, 1}, {false});
  for (Body planet : {Body::uranus, Body::neptune}) {
    const PlanetMonth p = planet_of(site, 12, planet);
    EXPECT_TRUE(p.optics_only) << body_name(planet);
    EXPECT_NE(p.sight, PlanetSight::morning) << body_name(planet);
    EXPECT_LT(p.best.value(), night_of(site, 2027, 12, 15).darkest);
  }
}

TEST(PlanetMonth, WhatIsHiddenOnThe15thHasTheNearestDateOnWhichItIsSeen) {
  const SiteYear site = year_of_site(test_place(40.0, -3.7, "Europe/Madrid"), 2027);
  int moved = 0;
  for (int month = 1; month <= 12; ++month) {
    const PlanetMonth mercury = planet_of(site, month, Body::mercury);
    if (day_of(mercury.best_date) == 15) continue;
    ++moved;
    EXPECT_TRUE(mercury.best && mercury.place);
    // Mercury is in sight for weeks on end: the nearest date is where such a stretch begins or
    // ends.
    EXPECT_TRUE(
        mercury.best_date == mercury.first_evening || mercury.best_date == mercury.last_evening ||
        mercury.best_date == mercury.first_morning || mercury.best_date == mercury.last_morning)
        << month;
  }
  EXPECT_GE(moved, 2);
}

}  // namespace
}  // namespace duskleaf
