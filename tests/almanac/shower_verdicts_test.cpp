// What a shower's row says of its number, its best hours and the Moon: the rules of
// shower_nights.cpp, looked at every two minutes.
#include <gtest/gtest.h>
#include <string>
#include <tuple>

#include "almanac/shower_watch.hpp"

namespace duskleaf {
namespace {

// Their ZHR is given as variable (International Meteor Organization, 2025 Meteor Shower Calendar):
// nobody may be sent out for them, however high the radiant and whatever the Moon does.
TEST(ShowerNights, WithoutASteadyRateTheyArePoorAtBest) {
  int poor = 0, not_seen = 0;
  for (const double latitude : {52.0, -34.0})
    for (const int year : {2024, 2025, 2026, 2027, 2028}) {
      const Watch watch(dark_place(latitude, 13, "UTC", 6.5), year);
      for (const char* code : {"PPU", "JBO", "PAU", "AMO", "PHO"}) {
        const SiteShower& row = watch.row(code);
        const std::string label = std::string(code) + " " + std::to_string(year);
        EXPECT_FALSE(shower_of(row).zhr) << label;
        EXPECT_EQ(row.expected_per_hour, 0.0) << label;
        EXPECT_EQ(row.expected_dark, 0.0) << label;
        if (row.best) {
          EXPECT_EQ(row.verdict, Verdict::poor) << label;
          EXPECT_EQ(row.spoiler, Spoiler::few_meteors) << label;
          ++poor;
        } else {
          EXPECT_EQ(row.verdict, Verdict::not_seen) << label;
          ++not_seen;
        }
      }
    }
  EXPECT_GT(poor, 20);
  EXPECT_GE(not_seen, 5);
}

// The header's promise, by looking every two minutes: the Moon is down through the best hours, or
// the row says that it is up and when it comes and goes.
TEST(ShowerNights, MoonIsSaidToBeUpIfItIsInAnyOfTheBestHours) {
  int cut = 0, part = 0, throughout = 0;
  for (const auto& [latitude, longitude, zone] : {std::tuple{52.0, 13.0, "Europe/Berlin"},
                                                  {-34.0, 151.0, "Australia/Sydney"},
                                                  {69.6, 19.0, "Europe/Oslo"}})
    for (const int year : {2025, 2026, 2027}) {
      const Watch watch(dark_place(latitude, longitude, zone), year);
      for (const SiteShower& row : watch.rows) {
        if (!row.best) continue;
        const std::string label =
            std::string(shower_of(row).code) + " " + zone + " " + std::to_string(year);
        const Days step(2.0 / 1440), second(1.0 / 86400);
        const Ut from = *row.best_from, to = *row.best_to;
        int up = 0, all = 0;
        for (Ut t = from + step; t < to - step; t = t + step, ++all) up += watch.sky.moon_up(t);
        if (up > 0) {
          EXPECT_TRUE(row.moon_up) << label;
        }
        if (all > 0 && row.moon_up && !row.moon_sets && !row.moon_rises) {
          EXPECT_EQ(up, all) << label;
          ++throughout;
        }
        if (row.moon_sets) {
          EXPECT_TRUE(from <= *row.moon_sets && *row.moon_sets <= to) << label;
          EXPECT_TRUE(watch.sky.moon_up(*row.moon_sets - second * 5)) << label;
          EXPECT_FALSE(watch.sky.moon_up(*row.moon_sets + second * 5)) << label;
        }
        if (row.moon_rises) {
          EXPECT_TRUE(from <= *row.moon_rises && *row.moon_rises <= to) << label;
          EXPECT_FALSE(watch.sky.moon_up(*row.moon_rises - second * 5)) << label;
          EXPECT_TRUE(watch.sky.moon_up(*row.moon_rises + second * 5)) << label;
        }
        if (row.moon_sets || row.moon_rises) {
          EXPECT_TRUE(row.moon_up) << label;
          ++part;
        }
        EXPECT_TRUE(from <= *row.best && *row.best <= to) << label;
        if (!row.moon_up && (watch.sky.moon_up(from - step) || watch.sky.moon_up(to + step))) {
          EXPECT_GT(Seconds(to - from).count(), 45 * 60 - 1) << label;
          ++cut;
        }
      }
    }
  EXPECT_GT(cut, 20);
  EXPECT_GT(part, 10);
  EXPECT_GT(throughout, 20);
}

// Full Moon on 2027 October 15 at 13:47 UT (USNO): six days later the Moon is up nearly all night
// in the far north; the radiant (declination 16 N) passes 36 degrees high, which alone is good.
TEST(ShowerNights, MoonIsBlamedBeforeARadiantThatIsHighEnough) {
  const Watch watch(dark_place(69.6, 19.4, "Europe/Oslo", 5.8), 2027);
  const SiteShower& orionids = watch.row("ORI");
  EXPECT_NEAR(orionids.radiant_highest.degrees(), 36.4, 1.0);
  EXPECT_TRUE(orionids.moon_up);
  EXPECT_EQ(orionids.spoiler, Spoiler::moon);
  // Without the Moon, too few and from no great height.
  const SiteShower& taurids = watch.row("STA");
  EXPECT_FALSE(taurids.moon_up);
  EXPECT_EQ(taurids.spoiler, Spoiler::low_radiant);
}

}  // namespace
}  // namespace duskleaf
