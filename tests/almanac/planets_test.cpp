// Planets of a site: the project's rules, and oppositions and conjunctions as facts of geometry.
#include "almanac/planets.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>
#include <set>

#include "almanac/evening_moment.hpp"
#include "almanac/planet_months.hpp"
#include "catalogue/constellations.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

TEST(BareEye, BrighterThanTheFaintestStarAndHighEnough) {
  struct Row {
    const char* label;
    Body planet;
    double magnitude, altitude, faintest;
    bool visible;
  };
  for (const Row& row : {Row{"Jupiter", Body::jupiter, -2, 5.0, 5, true},
                         Row{"too low", Body::jupiter, -2, 4.9, 5, false},
                         Row{"too faint", Body::saturn, 1, 30, 0.9, false},
                         Row{"Uranus under a mountain sky", Body::uranus, 5.7, 10.1, 6.3, true},
                         Row{"Uranus in the country", Body::uranus, 5.7, 40, 6, false},
                         Row{"Uranus too low", Body::uranus, 5.7, 9.9, 6.5, false},
                         Row{"Uranus from a town", Body::uranus, 5.7, 40, 5, false},
                         Row{"Neptune never", Body::neptune, 7.7, 60, 8, false}})
    EXPECT_EQ(bare_eye_visible(row.planet, row.magnitude, Angle::from_degrees(row.altitude),
                               row.faintest),
              row.visible)
        << row.label;
}

TEST(PlanetDays, ThreeDaysAMonthAndSevenPlanets) {
  const SiteYear year = year_of_site(test_place(54.18, -4.62, "Europe/London"), 2027);
  const auto rows = planet_days(ephemeris_of({2027, 1}), year);
  ASSERT_EQ(rows.size(), 36u * 7u);
  std::set<int> days;
  for (const PlanetDay& p : rows) {
    days.insert(day_of(p.date));
    EXPECT_LE(std::abs(p.elongation.degrees()), 180);
    EXPECT_TRUE(p.rises && p.highest && p.sets) << iso_date(p.date) << ' ' << body_name(p.planet);
    // Planets keep to the zodiac and its neighbours.
    const std::string_view c =
        constellations()[static_cast<std::size_t>(p.constellation)].abbreviation;
    static const std::set<std::string_view> allowed = {
        "Ari", "Tau", "Gem", "Cnc", "Leo", "Vir", "Lib", "Sco", "Oph", "Sgr", "Cap",
        "Aqr", "Psc", "Cet", "Ori", "Sex", "Crv", "Crt", "Aur", "Sct", "Peg", "Hya"};
    EXPECT_TRUE(allowed.contains(c)) << c;
    if (p.planet == Body::venus) {
      EXPECT_LT(std::abs(p.elongation.degrees()), 47.9);
    }
    if (p.planet == Body::mercury) {
      EXPECT_LT(std::abs(p.elongation.degrees()), 28.6);
    }
  }
  EXPECT_EQ(days, (std::set<int>{1, 11, 21}));
}

// The table of planets lifted what had set long ago by refraction that nobody sees.
TEST(PlanetDays, AltitudesBelowTheHorizonAreTrue) {
  const SiteYear year = year_of_site(test_place(40.0, -3.7, "Europe/Madrid"), 2027);
  const YearEphemeris& ephemeris = ephemeris_of({2027, 1});
  const SiteSky sky(ephemeris, year.place.observer, year.nights.front().from,
                    year.nights.back().to);
  int below = 0, above = 0;
  for (const PlanetDay& day : planet_days(ephemeris, year)) {
    const Night& night = night_of(year, year_of(day.date), month_of(day.date), day_of(day.date));
    const ChartHour& hour =
        year.place.chart_hours[static_cast<std::size_t>(month_of(day.date) - 1)];
    const Ut moment = chart_moment(sky, year.place.zone, hour, night);
    const double true_altitude = sky.altitude(day.planet, moment).degrees();
    const double lifted = day.altitude_at_chart_hour.degrees() - true_altitude;
    if (true_altitude < -1) {
      EXPECT_NEAR(lifted, 0, 1e-4) << iso_date(day.date) << ' ' << body_name(day.planet);
      ++below;
    } else if (true_altitude < 80) {
      EXPECT_GT(lifted, 0.001) << iso_date(day.date) << ' ' << body_name(day.planet);
      ++above;
    }
  }
  EXPECT_GT(below, 80);
  EXPECT_GT(above, 80);
}

TEST(PlanetEvening, TimesAreOfTheNightAndNearTheMoment) {
  const SiteYear year = year_of_site(test_place(-33.9, 18.4, "Africa/Johannesburg"), 2027, 1, true);
  for (const EveningSky& e : year.evenings) {
    const Night& n = night_of(year, e.year, e.month, 15);
    for (const PlanetEvening& p : e.planets) {
      for (const auto& t : {p.rises, p.highest, p.sets}) {
        if (!t) {
          // Mercury and Venus, when swift, come back after more than 24 hours.
          EXPECT_TRUE(p.planet == Body::mercury || p.planet == Body::venus) << body_name(p.planet);
          continue;
        }
        EXPECT_GE(*t, n.from);
        EXPECT_LT(*t, n.to);
      }
      if (p.visible) {
        EXPECT_GE(p.place.altitude.degrees(), 5.0);
        EXPECT_LT(p.magnitude, e.faintest_star);
      }
      // Up at the moment exactly when its instants say so (in this latitude it rises and sets once
      // in the night).
      if (!p.rises || !p.sets) continue;
      const bool up = *p.rises < *p.sets ? *p.rises < e.moment && e.moment < *p.sets
                                         : !(*p.sets < e.moment && e.moment < *p.rises);
      if (std::abs(p.place.altitude.degrees()) > 1) {
        EXPECT_EQ(p.place.altitude.degrees() > 0, up) << body_name(p.planet);
      }
    }
  }
}

TEST(PlanetMonth, AtOppositionAllNightAndNearTheSunNotAtAll) {
  // February 2027 has two planets opposite the Sun, as their elongations say.
  const SiteYear year = year_of_site(test_place(40.0, -3.7, "Europe/Madrid"), 2027);
  const auto february = planet_month(ephemeris_of({2027, 1}), year, 1);
  ASSERT_EQ(february.size(), 7u);
  for (const PlanetMonth& p : february) {
    if (std::abs(p.elongation.degrees()) > 165) {
      EXPECT_EQ(p.sight, PlanetSight::all_night) << body_name(p.planet);
      EXPECT_EQ(iso_date(p.first_evening.value()), "2027-02-01");
      EXPECT_EQ(iso_date(p.last_evening.value()), "2027-02-28");
      // Its best in the evening is before it stands highest, or then.
      EXPECT_LT((p.best.value() - p.highest.value()).count() * 24, 0.3);
    }
    EXPECT_EQ(p.sights.size(), 4u);
    EXPECT_EQ(p.best.has_value(), p.sight != PlanetSight::not_visible);
    EXPECT_EQ(p.place.has_value(), p.best.has_value());
    if (p.place) {
      EXPECT_GE(p.place->altitude.degrees(), 5);
    }
  }
  EXPECT_GE(std::count_if(february.begin(), february.end(),
                          [](const PlanetMonth& p) { return p.sight == PlanetSight::all_night; }),
            2);
  int hidden = 0;
  for (int month = 0; month < 12; ++month)
    for (const PlanetMonth& p : planet_month(ephemeris_of({2027, 1}), year, month)) {
      if (std::abs(p.elongation.degrees()) < 6) {
        EXPECT_EQ(p.sight, PlanetSight::not_visible) << month << ' ' << body_name(p.planet);
        ++hidden;
      }
      // East of the Sun is the evening, west of it the morning, within a quarter turn.
      if (p.sight == PlanetSight::evening && std::abs(p.elongation.degrees()) < 60) {
        EXPECT_GT(p.elongation.degrees(), 0);
      }
      if (p.sight == PlanetSight::morning && std::abs(p.elongation.degrees()) < 60) {
        EXPECT_LT(p.elongation.degrees(), 0);
      }
      if (p.planet == Body::neptune) {
        EXPECT_TRUE(p.optics_only);
      }
    }
  EXPECT_GE(hidden, 3);
}

TEST(PlanetMonth, NothingIsSeenUnderTheMidnightSun) {
  const SiteYear year = year_of_site(test_place(78.2, 15.6, "Arctic/Longyearbyen"), 2027);
  for (const PlanetMonth& p : planet_month(ephemeris_of({2027, 1}), year, 5)) {
    EXPECT_EQ(p.sight, PlanetSight::not_visible);
    EXPECT_FALSE(p.best || p.first_evening || p.last_evening);
  }
}

}  // namespace
}  // namespace duskleaf
