// A planet's month: the words and the time that a page prints side by side must not contradict each
// other, and its windows must be what the site's sky says minute by minute. The project's own rules
// (almanac/planet_months.hpp), tried at many sites.
#include "almanac/planet_months.hpp"

#include <cmath>
#include <gtest/gtest.h>

#include "almanac/evening_moment.hpp"
#include "almanac/planets.hpp"
#include "sites.hpp"
#include "sky/brightness.hpp"
#include "sky/planet_magnitude.hpp"

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

/// Whether the planet is visible by the conventions, without regard to the Moon's light.
bool visible(const SiteSky& sky, double limit, const PlanetMonth& p, double magnitude, Ut t) {
  const Angle sun = sky.altitude(Body::sun, t);
  const Angle altitude = apparent_place(sky, p.planet, t).altitude;
  if (sun.degrees() > -5) return false;
  if (p.optics_only) return sun.degrees() < -12 && altitude >= least_height(p.planet);
  const double faintest = faintest_star(limit, sun, Angle::from_degrees(-90), 0);
  return bare_eye_visible(p.planet, magnitude, altitude, faintest);
}

void expect_window(const SiteSky& sky, const SiteYear& site, const PlanetMonth& p,
                   const PlanetWindow& w) {
  const double limit = site.place.limiting_magnitude;
  EXPECT_EQ(month_of(w.date), month_of(p.best_date));
  const Night& night = night_of(site, year_of(w.date), month_of(w.date), day_of(w.date));
  EXPECT_GE(w.from, night.from);
  EXPECT_LE(w.to, night.to);
  EXPECT_TRUE(w.from <= w.best && w.best <= w.to);
  // All within it is visible, a minute beyond is not.
  const Days minute(1.0 / 1440);
  const double magnitude =
      planet_magnitude(p.planet, planet_aspect(sky.ephemeris(), p.planet, to_tt(night.darkest)));
  for (Ut t = w.from + minute; t < w.to - minute; t = t + 10.0 * minute)
    EXPECT_TRUE(visible(sky, limit, p, magnitude, t));
  const auto edge = [&](WindowEdge kind, Ut inside, Ut beyond, const Horizontal& place) {
    const double height = place.altitude.degrees(), least = least_height(p.planet).degrees();
    EXPECT_GE(height, least - 0.01);
    if (kind == WindowEdge::height) {
      EXPECT_NEAR(height, least, 0.05);
    } else if (kind == WindowEdge::twilight) {
      EXPECT_LT(sky.altitude(Body::sun, inside).degrees(), -5 + 1e-6);
      EXPECT_GT(sky.altitude(Body::sun, inside).degrees(), -18.3);
    } else {
      EXPECT_TRUE(inside - night.from < 3.0 * minute || night.to - inside < 3.0 * minute);
    }
    if (kind != WindowEdge::open) {
      EXPECT_FALSE(visible(sky, limit, p, magnitude, beyond));
    }
  };
  edge(w.begins, w.from, w.from - minute, w.at_from);
  edge(w.ends, w.to, w.to + minute, w.at_to);
  EXPECT_LE(w.rises.value_or(w.from), w.from);
  EXPECT_GE(w.sets.value_or(w.to), w.to);
  EXPECT_LE(w.sunset.value_or(w.from), w.from);
  EXPECT_GE(w.sunrise.value_or(w.to), w.to);
  EXPECT_EQ(w.highest.has_value(), w.at_highest.has_value());
  EXPECT_GE(w.at_highest.value_or(w.at_best).altitude.degrees(),
            w.at_best.altitude.degrees() - 0.05);
}

TEST_P(PlanetMonthAt, WindowsAreWhatTheSkySays) {
  const SiteYear site = year();
  const YearEphemeris& ephemeris = ephemeris_of({2027, 1});
  const SiteSky sky(ephemeris, site.place.observer, site.nights.front().from,
                    site.nights.back().to);
  int windows = 0;
  for (int month = 0; month < 12; ++month)
    for (const PlanetMonth& p : planet_month(ephemeris, site, month)) {
      SCOPED_TRACE(testing::Message()
                   << GetParam().label << ' ' << month + 1 << ' ' << body_name(p.planet));
      EXPECT_EQ(p.evening_window.has_value(), p.first_evening.has_value());
      EXPECT_EQ(p.morning_window.has_value(), p.first_morning.has_value());
      for (const auto& w : {p.evening_window, p.morning_window})
        if (w) {
          expect_window(sky, site, p, *w);
          ++windows;
        }
      // The window of best_date's part of the night holds the month's best time.
      if (p.best) {
        const PlanetWindow& w =
            p.sight == PlanetSight::morning ? *p.morning_window : *p.evening_window;
        EXPECT_EQ(w.date, p.best_date);
        EXPECT_EQ(w.best, *p.best);
      }
    }
  EXPECT_GT(windows, 20);
}

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

// Both were said to be seen "evenings, before sunrise" and had set more than an hour before the day
// broke.
TEST(PlanetMonth, WhatHasSetBeforeTheDayBreaksIsAnEveningSightAlone) {
  const SiteYear north = year_of_site(test_place(60.1, 24.9, "Europe/Helsinki", -1), 2027);
  const PlanetMonth mars = planet_of(north, 5, Body::mars);
  EXPECT_EQ(mars.sight, PlanetSight::evening);
  EXPECT_EQ(mars.evening_window.value().ends, WindowEdge::height);
  EXPECT_LT(mars.evening_window->sets.value(),
            night_of(north, 2027, 5, 15).sunrise.value() - Days(1.0 / 24));

  const SiteYear south = year_of_site(test_place(-43.4, 171.6, "Pacific/Auckland", 21 * 60), 2026);
  for (const PlanetMonth& p : planet_month(ephemeris_of({2026, 1}), south, 10))
    if (p.planet == Body::saturn) {
      EXPECT_EQ(p.sight, PlanetSight::evening);
      EXPECT_LT(p.evening_window.value().to,
                night_of(south, 2026, 11, 15).sunrise.value() - Days(1.0 / 24));
    }
}

// Mercury passes between Earth and Sun in February 2027: east of it before, west of it after.
TEST(PlanetMonth, MercuryChangesFromEveningToMorningWithinAMonth) {
  const SiteYear site = year_of_site(test_place(-0.2, 36.5, "Africa/Nairobi", 1170), 2027);
  const YearEphemeris& ephemeris = ephemeris_of({2027, 1});
  const PlanetMonth mercury = planet_of(site, 2, Body::mercury);
  ASSERT_TRUE(mercury.evening_window && mercury.morning_window);
  const PlanetWindow &evening = *mercury.evening_window, &morning = *mercury.morning_window;
  EXPECT_EQ(evening.date, mercury.last_evening);
  EXPECT_EQ(morning.date, mercury.first_morning);
  EXPECT_GT(signed_elongation(ephemeris, Body::mercury, to_tt(evening.best)), Angle());
  EXPECT_LT(signed_elongation(ephemeris, Body::mercury, to_tt(morning.best)), Angle());
  EXPECT_EQ(evening.begins, WindowEdge::twilight);
  EXPECT_EQ(evening.ends, WindowEdge::height);
  EXPECT_EQ(morning.begins, WindowEdge::height);
  EXPECT_EQ(morning.ends, WindowEdge::twilight);
  EXPECT_NEAR(evening.at_best.azimuth.degrees(), 270, 30);
  EXPECT_NEAR(morning.at_best.azimuth.degrees(), 90, 30);
}

// Jupiter, a month before it stands opposite the Sun, rises in the evening and stays.
TEST(PlanetMonth, WhatIsSeenFromEveningToMorningHasOneStretchInBothWindows) {
  const SiteYear site = year_of_site(test_place(52.0, -0.5, "Europe/London", 20 * 60), 2027);
  const PlanetMonth jupiter = planet_of(site, 1, Body::jupiter);
  EXPECT_EQ(jupiter.sight, PlanetSight::evening_and_morning);
  const PlanetWindow &evening = jupiter.evening_window.value(),
                     &morning = jupiter.morning_window.value();
  EXPECT_EQ(evening.date, morning.date);
  EXPECT_EQ(evening.from, morning.from);
  EXPECT_EQ(evening.to, morning.to);
  EXPECT_LT(evening.best, morning.best);
  EXPECT_EQ(evening.begins, WindowEdge::height);
  EXPECT_EQ(evening.ends, WindowEdge::twilight);
  EXPECT_TRUE(evening.highest && evening.at_highest);
}

TEST(PlanetMonth, TheSeasonWithoutNightHasNoWindows) {
  const SiteYear site = year_of_site(test_place(78.2, 15.6, "Arctic/Longyearbyen"), 2027);
  for (const PlanetMonth& p : planet_month(ephemeris_of({2027, 1}), site, 5)) {
    EXPECT_FALSE(p.evening_window || p.morning_window) << body_name(p.planet);
    EXPECT_FALSE(p.first_evening || p.first_morning) << body_name(p.planet);
    EXPECT_GT(p.disc.diameter.arcseconds(), 2) << body_name(p.planet);
  }
}

// Where the Sun stays down a planet may stand above the horizon around the clock.
TEST(PlanetMonth, ThePolarNightHasWindowsWithoutDuskOrDawn) {
  const SiteYear site = year_of_site(test_place(85.0, 0.0, "UTC"), 2027);
  const PlanetMonth mars = planet_of(site, 1, Body::mars);
  ASSERT_TRUE(mars.evening_window);
  EXPECT_EQ(mars.evening_window->begins, WindowEdge::open);
  EXPECT_EQ(mars.evening_window->ends, WindowEdge::open);
  EXPECT_FALSE(mars.evening_window->sunset || mars.evening_window->sunrise);
}

TEST(PlanetMonth, NeptuneIsNeverForTheBareEye) {
  Place place = test_place(-30.0, 20.0, "Africa/Johannesburg");
  place.limiting_magnitude = 7.5;
  const SiteYear site = make_site_year(ephemeris_of({2027, 1}), place, {2027, 1}, {false});
  int seen = 0;
  for (int month = 1; month <= 12; ++month) {
    const PlanetMonth neptune = planet_of(site, month, Body::neptune);
    EXPECT_TRUE(neptune.optics_only);
    for (const auto& w : {neptune.evening_window, neptune.morning_window})
      if (w) {
        ++seen;
        EXPECT_GE(w->at_best.altitude.degrees(), 10);
      }
  }
  EXPECT_GT(seen, 8);
}

TEST(PlanetMonth, LengthsAndHeightsInWords) {
  const auto spoken = [](double minutes) { return spoken_length(Days(minutes / 1440)).count(); };
  struct Row {
    double minutes;
    int spoken;
  };
  for (const Row& row : {Row{8, 30}, Row{37, 30}, Row{38, 45}, Row{61, 60}, Row{70, 75},
                         Row{84, 90}, Row{104, 90}, Row{106, 120}, Row{170, 180}})
    EXPECT_EQ(spoken(row.minutes), row.spoken) << row.minutes;
  EXPECT_EQ(height_word(Angle::from_degrees(14.9)), HeightWord::low);
  EXPECT_EQ(height_word(Angle::from_degrees(15.1)), HeightWord::fairly_low);
  EXPECT_EQ(height_word(Angle::from_degrees(30.1)), HeightWord::halfway);
  EXPECT_EQ(height_word(Angle::from_degrees(60.1)), HeightWord::high);
  EXPECT_EQ(height_word(Angle::from_degrees(75)), HeightWord::overhead);
}

}  // namespace
}  // namespace duskleaf
