// A site's evenings as a whole: consistency of their parts, and facts of the trade (conventions:
// "common practice").
#include "almanac/evening_sky.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>

#include "almanac/nights.hpp"
#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

const SiteYear& north() {
  static const SiteYear year =
      year_of_site(test_place(54.18, -4.62, "Europe/London"), 2027, 1, true);
  return year;
}

TEST(EveningSky, HasEveryStarAndPlanetAndTheEquatorsFigures) {
  for (const EveningSky& e : north().evenings) {
    EXPECT_EQ(e.stars.size(), stars().size());
    EXPECT_EQ(e.planets.size(), 7u);
    EXPECT_EQ(e.constellations.size(), 36u);  // 35, of which Serpens is two
    EXPECT_EQ(day_of(e.date), 15);
    EXPECT_FALSE(e.stars_return);
  }
}

TEST(EveningSky, ThePoleStandsAsHighAsTheLatitude) {
  const auto polaris =
      static_cast<std::size_t>(star_index(424));  // HR 424, within 0.7 degree of the pole
  for (const EveningSky& e : north().evenings)
    EXPECT_NEAR(e.stars[polaris].altitude.degrees(), 54.18, 0.75);
}

TEST(EveningSky, OrionIsAnEveningSightOfWinterAndScorpiusOfSummer) {
  const auto sights = [](const SiteYear& year, const char* abbreviation) {
    for (const ConstellationEvening& c : year.evenings[0].constellations)
      if (figures()[static_cast<std::size_t>(c.figure)].constellation ==
          constellation_index(abbreviation))
        return c.evening_sight;
    ADD_FAILURE() << abbreviation;
    return std::array<bool, 12>{};
  };
  EXPECT_TRUE(sights(north(), "Ori")[0]);
  EXPECT_FALSE(sights(north(), "Ori")[6]);
  EXPECT_TRUE(sights(north(), "Leo")[3]);
  EXPECT_TRUE(sights(north(), "Peg")[9]);
}

TEST(EveningSky, WhereTheStarsDoNotShowItSaysWhenTheyReturn) {
  const SiteYear arctic = year_of_site(test_place(69.65, 18.96, "Europe/Oslo"), 2027, 1, true);
  const EveningSky& june = arctic.evenings[5];
  EXPECT_EQ(june.shift, EveningShift::no_stars);
  ASSERT_TRUE(june.stars_return);
  const auto index =
      static_cast<std::size_t>((*june.stars_return - arctic.span.first_day()).count());
  EXPECT_LT(arctic.nights[index].darkest_sun_altitude.degrees(), -6);
  EXPECT_GT(arctic.nights[index - 1].darkest_sun_altitude.degrees(), -6);
  for (const ConstellationEvening& c : june.constellations) EXPECT_FALSE(c.evening_sight[5]);
}

TEST(EveningSky, TheReturnMayLieInTheFollowingYear) {
  const SiteYear antarctic =
      year_of_site(test_place(-77.85, 166.67, "Antarctica/McMurdo"), 2027, 1, true);
  const EveningSky& december = antarctic.evenings[11];
  ASSERT_TRUE(december.stars_return);
  // The same night by the following year's own tables.
  const SiteYear next = year_of_site(test_place(-77.85, 166.67, "Antarctica/McMurdo"), 2028);
  const auto first = std::find_if(next.nights.begin(), next.nights.end(), [](const Night& n) {
    return n.darkest_sun_altitude.degrees() < -6;
  });
  EXPECT_EQ(iso_date(*december.stars_return), iso_date(first->date));
}

TEST(EveningSky, ASpanFromSeptemberKeepsMonthsOfTheYearApart) {
  const SiteYear year = year_of_site(test_place(54.18, -4.62, "Europe/London"), 2026, 9, true);
  EXPECT_EQ(year.evenings[0].month, 9);
  EXPECT_EQ(year.evenings[4].year, 2027);
  EXPECT_EQ(year.evenings[4].month, 1);
  for (const ConstellationEvening& c : year.evenings[0].constellations)
    if (figures()[static_cast<std::size_t>(c.figure)].constellation == constellation_index("Ori")) {
      EXPECT_TRUE(c.evening_sight[0]);  // January first, whatever the span's first month
      EXPECT_FALSE(c.evening_sight[8]);
    }
}

TEST(MoonLooks, OneForEachDateAtTheEveningsHourIfUp) {
  for (std::size_t i = 0; i < 12; ++i) {
    const EveningSky& e = north().evenings[i];
    const auto& looks = north().month_moons[i];
    ASSERT_EQ(looks.size(), static_cast<std::size_t>(days_in_month(e.year, e.month)));
    for (std::size_t d = 0; d < looks.size(); ++d) {
      const Night& n = night_of(north(), e.year, e.month, static_cast<int>(d) + 1);
      EXPECT_GE(looks[d].at, n.from);
      EXPECT_LE(looks[d].at, n.to);
      EXPECT_GE(looks[d].lit, 0.0);
      EXPECT_LE(looks[d].lit, 1.0);
      if (looks[d].up) {
        EXPECT_EQ(north().place.zone.civil(looks[d].at).minute(),
                  north().place.zone.civil(e.moment).minute());
      }
    }
  }
}

// From 13 to 16 March the Moon of the phase strip swung over, since the moment had leapt from the
// evening to its highest place before dawn.
TEST(MoonLooks, WhereItIsDownAtTheHourTheNearestMomentIsShown) {
  const SiteYear& year = north();
  const SiteSky sky(ephemeris_of({2027, 1}), year.place.observer, year.nights.front().from,
                    year.nights.back().to);
  int moved = 0;
  for (std::size_t i = 0; i < 12; ++i) {
    const CivilMinute clock = year.place.zone.civil(year.evenings[i].moment);
    for (std::size_t d = 0; d < year.month_moons[i].size(); ++d) {
      const MoonLook& look = year.month_moons[i][d];
      if (look.up) continue;
      const Night& n = night_of(year, 2027, static_cast<int>(i) + 1, static_cast<int>(d) + 1);
      const bool late = clock.hour() < 12;
      const Ut hour = year.place.zone.instant(
          n.date + std::chrono::days(late ? 1 : 0),
          std::chrono::hours(clock.hour()) + std::chrono::minutes(clock.minute()));
      const double away = std::abs((look.at - hour).count());
      bool seen_at_all = false;
      for (Ut t = n.from; t < n.to; t = t + Days(1.0 / 288)) {
        if (!sky.moon_up(t) || sky.altitude(Body::sun, t).degrees() > -0.84) continue;
        seen_at_all = true;
        EXPECT_GE(std::abs((t - hour).count()), away - 1e-5) << iso_date(n.date);
      }
      if (seen_at_all) {
        EXPECT_LE(sky.altitude(Body::sun, look.at).degrees(), -0.83) << iso_date(n.date);
        ++moved;
      }
    }
  }
  EXPECT_GT(moved, 100);
}

// Common practice: in the north's evening the waxing Moon is lit on the right, in the south's on
// the left.
TEST(MoonLooks, TheFirstQuarterIsLitTowardsTheSunset) {
  const SiteYear south =
      year_of_site(test_place(-36.0, 146.9, "Australia/Melbourne"), 2027, 1, true);
  int seen = 0;
  for (const Event& e : north().global) {
    if (e.kind != EventKind::first_quarter || e.at < north().nights.front().from ||
        e.at > north().nights.back().from)
      continue;
    for (const auto& [year, right] : {std::pair{&north(), true}, std::pair{&south, false}}) {
      const Date date = year->place.zone.civil(e.at).date();
      if (year_of(date) != 2027) continue;
      const MoonLook& look = year->month_moons[static_cast<std::size_t>(month_of(date) - 1)]
                                              [static_cast<std::size_t>(day_of(date) - 1)];
      if (!look.up) continue;
      // Counterclockwise from the zenith: 0 to 180 degrees is the left side.
      EXPECT_EQ(look.bright_limb_from_zenith.degrees() > 180, right) << iso_date(date);
      ++seen;
    }
  }
  EXPECT_GT(seen, 12);
}

}  // namespace
}  // namespace duskleaf
