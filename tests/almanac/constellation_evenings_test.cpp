// The rule of the half on invented figures, and the catalogue's figures against a search by
// altitude.
#include "almanac/constellation_evenings.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>
#include <numbers>

#include "almanac/evening_sky.hpp"
#include "catalogue/constellations.hpp"
#include "events/site_sky.hpp"
#include "sites.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {
namespace {

constexpr double pi = std::numbers::pi;
Eigen::Vector3d direction(double ra_degrees, double dec_degrees) {
  const Angle ra = Angle::from_degrees(ra_degrees), dec = Angle::from_degrees(dec_degrees);
  return {cos(dec) * cos(ra), cos(dec) * sin(ra), sin(dec)};
}

TEST(DailyArc, RisesNeverAndNeverSets) {
  struct Row {
    const char* label;
    double latitude, declination, half_arc_degrees, tolerance;
  };
  // At the equator every star is up for half a turn and a little more by refraction: 90 degrees
  // 34'.
  for (const Row& row :
       {Row{"equator", 0, 0, 90 + 34.0 / 60, 1e-9},
        Row{"circumpolar in the north", 54, 40, 180, 1e-9},
        Row{"never seen from the north", 54, -40, 0, 1e-9},
        Row{"circumpolar in the south", -54, -40, 180, 1e-9},
        Row{"on the equator, seen from the north", 54, 0, 90 + 34.0 / 60 / std::cos(54 * pi / 180),
            0.01},
        Row{"at the pole, above", 90, 1, 180, 1e-9}, Row{"at the pole, below", 90, -1, 0, 1e-9}}) {
    const DailyArc arc =
        daily_arc(direction(30, row.declination), Angle::from_degrees(row.latitude));
    EXPECT_NEAR(arc.half_arc * 180 / pi, row.half_arc_degrees, row.tolerance) << row.label;
    EXPECT_NEAR(arc.right_ascension * 180 / pi, 30, 1e-9) << row.label;
  }
}

TEST(DailyArc, RefractionLiftsWhatCulminatesWithin34MinutesOfTheHorizon) {
  // From latitude 54 degrees declination -36 culminates on the true horizon.
  EXPECT_GT(daily_arc(direction(0, -36.56), Angle::from_degrees(54)).half_arc, 0.0);
  EXPECT_EQ(daily_arc(direction(0, -36.57), Angle::from_degrees(54)).half_arc, 0.0);
}

TEST(FigureTimes, HalfOfTheStarsDecide) {
  // Three stars an hour apart with arcs of 6 hours: the figure is up from the second's rise to the
  // second's set.
  const std::vector<DailyArc> stars = {{0.0, pi / 2}, {pi / 12, pi / 2}, {pi / 6, pi / 2}};
  const FigureTimes t = figure_times(stars, direction(15, 0), pi / 12);
  EXPECT_FALSE(t.circumpolar || t.never_rises);
  EXPECT_NEAR(t.rises.value(), -pi / 2, 1e-12);
  EXPECT_NEAR(t.sets.value(), pi / 2, 1e-12);
  EXPECT_NEAR(t.highest.value(), 0, 1e-12);
  // Of two stars one is half of them: it is up from the first's rise to the last's set.
  const FigureTimes two = figure_times({stars[0], stars[2]}, direction(15, 0), pi / 12);
  EXPECT_NEAR(two.rises.value(), -pi / 2 - pi / 12, 1e-12);
  EXPECT_NEAR(two.sets.value(), pi / 2 + pi / 12, 1e-12);
}

TEST(FigureTimes, TheNearestOfEachIsGiven) {
  const std::vector<DailyArc> star = {{0.0, pi / 2}};
  // Five hours after the transit: set an hour ahead, rise 11 hours back; seven hours after: rise 11
  // hours ahead.
  const FigureTimes five = figure_times(star, direction(0, 0), 5 * pi / 12);
  EXPECT_NEAR(five.sets.value(), pi / 12, 1e-12);
  EXPECT_NEAR(five.rises.value(), -11 * pi / 12, 1e-12);
  EXPECT_NEAR(five.highest.value(), -5 * pi / 12, 1e-12);
  const FigureTimes seven = figure_times(star, direction(0, 0), 7 * pi / 12);
  EXPECT_NEAR(seven.sets.value(), -pi / 12, 1e-12);
  EXPECT_NEAR(seven.rises.value(), 11 * pi / 12, 1e-12);
}

TEST(FigureTimes, CircumpolarNeverRisingAndHalfOfEach) {
  const FigureTimes polar = figure_times({{0, pi}, {1, pi}}, direction(30, 80), 0);
  EXPECT_TRUE(polar.circumpolar);
  EXPECT_FALSE(polar.rises || polar.sets);
  EXPECT_TRUE(polar.highest);
  const FigureTimes never = figure_times({{0, 0}, {1, 0}}, direction(30, -80), 0);
  EXPECT_TRUE(never.never_rises);
  EXPECT_FALSE(never.rises || never.sets || never.highest);
  // Half never sets: the figure counts as risen all day, yet is not circumpolar.
  const FigureTimes half = figure_times({{0, pi}, {1, 1}}, direction(30, 50), 0);
  EXPECT_FALSE(half.circumpolar || half.never_rises || half.rises || half.sets);
  EXPECT_TRUE(half.half_never_sets && polar.half_never_sets);
  // Less than half ever rises: it never does.
  const FigureTimes less = figure_times({{0, 1}, {1, 0}, {2, 0}}, direction(30, -50), 0);
  EXPECT_FALSE(less.rises || less.sets || less.never_rises);
  EXPECT_FALSE(less.half_never_sets || never.half_never_sets);
}

TEST(ConstellationEvenings, AtTheInstantsHalfOfTheStarsAreUp) {
  const SiteYear year = year_of_site(test_place(35.0, 139.7, "Asia/Tokyo"), 2027, 1, true);
  const YearEphemeris& ephemeris = ephemeris_of({2027, 1});
  const SiteSky sky(ephemeris, year.place.observer, year.nights.front().from,
                    year.nights.back().to);
  for (std::size_t month : {0u, 4u, 8u}) {
    const EveningSky& e = year.evenings[month];
    const auto directions = stars_of_date(ephemeris, to_tt(e.moment));
    for (const ConstellationEvening& c : e.constellations) {
      const Figure& figure = figures()[static_cast<std::size_t>(c.figure)];
      const auto risen = [&](Ut t) {
        std::size_t n = 0;
        for (int star : figure.figure_stars)
          n += to_horizontal(directions[static_cast<std::size_t>(star)], sky.local_sidereal_time(t),
                             year.place.observer.latitude)
                   .altitude.arcminutes() > -34;
        return 2 * n >= figure.figure_stars.size();
      };
      const Days second(2.0 / 86400);
      if (c.rises) {
        EXPECT_FALSE(risen(*c.rises - second)) << figure.constellation;
        EXPECT_TRUE(risen(*c.rises + second)) << figure.constellation;
        EXPECT_LE(std::abs((*c.rises - e.moment).count()), 0.4987);
      }
      if (c.sets) {
        EXPECT_TRUE(risen(*c.sets - second)) << figure.constellation;
        EXPECT_FALSE(risen(*c.sets + second)) << figure.constellation;
      }
      std::size_t high = 0;
      for (int star : figure.figure_stars)
        high += e.stars[static_cast<std::size_t>(star)].altitude.degrees() >= 5;
      EXPECT_EQ(c.state, high == figure.figure_stars.size() ? FigureState::up
                         : high > 0                         ? FigureState::partly_up
                                                            : FigureState::below);
      ASSERT_TRUE(c.highest);
      const double hours = (e.moment - *c.highest).count() * 24;
      const FigurePhase phase = hours < -1.995  ? FigurePhase::rising
                                : hours < 1.995 ? FigurePhase::high
                                                : FigurePhase::sinking;
      EXPECT_EQ(c.phase, phase) << figure.constellation;
    }
  }
}

// At 69.6 N Eridanus was "high" with its mean place below the horizon even in transit, and "never
// set".
TEST(ConstellationEvenings, WhatNeverQuiteRisesIsNeitherHighNorCircumpolar) {
  const SiteYear year = year_of_site(test_place(69.6, 18.9, "Europe/Oslo"), 2027, 1, true);
  int below = 0, around = 0;
  for (const EveningSky& e : year.evenings)
    for (const ConstellationEvening& c : e.constellations) {
      const Figure& figure = figures()[static_cast<std::size_t>(c.figure)];
      SCOPED_TRACE(constellations()[static_cast<std::size_t>(figure.constellation)].name);
      EXPECT_EQ(c.highest.has_value(), c.mean_place_rises || c.rises || c.half_never_sets);
      if (figure.constellation == constellation_index("Eri")) {
        EXPECT_FALSE(c.mean_place_rises || c.half_never_sets);
      }
      if (!c.mean_place_rises) {
        EXPECT_LT(c.mean_place.altitude.degrees(), 0);
        EXPECT_EQ(c.phase, c.mean_place.azimuth.degrees() < 180 ? FigurePhase::rising
                                                                : FigurePhase::sinking);
        ++below;
      }
      if (c.circumpolar) {
        EXPECT_TRUE(c.half_never_sets);
      }
      if (c.half_never_sets) {
        EXPECT_FALSE(c.rises || c.sets);
        ++around;
      }
      EXPECT_FALSE(c.never_rises && c.half_never_sets);
    }
  EXPECT_GT(below, 11);
  EXPECT_GT(around, 11);
}

// At 80 N Hydra rose at 23:08 and set at 03:48 with no time at which it stands highest: its mean
// place stays below the horizon, but half of its stars do not.
TEST(ConstellationEvenings, WhatRisesAndSetsStandsHighestBetween) {
  const SiteYear year = year_of_site(test_place(80.0, 20.0, "Europe/Oslo"), 2027, 1, true);
  int rising = 0, low = 0;
  for (const EveningSky& e : year.evenings)
    for (const ConstellationEvening& c : e.constellations) {
      if (!c.rises) continue;
      const Figure& figure = figures()[static_cast<std::size_t>(c.figure)];
      SCOPED_TRACE(constellations()[static_cast<std::size_t>(figure.constellation)].name);
      ASSERT_TRUE(c.highest && c.sets);
      // From rise to highest and from highest to set, each the nearest of its kind to the moment.
      const auto later = [](Ut from, Ut to) {
        const double day = std::fmod((to - from).count() / 0.99726957, 1.0);
        return day < 0 ? day + 1 : day;
      };
      EXPECT_LT(later(*c.rises, *c.highest), later(*c.rises, *c.sets));
      ++rising;
      low += !c.mean_place_rises;
    }
  EXPECT_GT(rising, 11);
  EXPECT_GE(low, 12);
}

TEST(ConstellationEvenings, NearThePolesTheEquatorsFiguresCircleOrStayBelow) {
  const SiteYear north = year_of_site(test_place(85.0, 0.0, "UTC"), 2027, 1, true);
  int circumpolar = 0, never = 0;
  for (const ConstellationEvening& c : north.evenings[0].constellations) {
    circumpolar += c.circumpolar;
    never += c.never_rises;
    EXPECT_FALSE(c.circumpolar && c.never_rises);
  }
  EXPECT_GT(circumpolar, 5);
  EXPECT_GT(never, 5);
}

}  // namespace
}  // namespace duskleaf
