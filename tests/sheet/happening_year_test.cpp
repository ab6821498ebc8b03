// Meteors and the Sun's year as the month's lines tell them.
#include <algorithm>
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "catalogue/showers.hpp"
#include "month_scene.hpp"
#include "sheet/happening_lines.hpp"

namespace duskleaf {
namespace {

using testing::HasSubstr;

// ---- meteors

/// Index of the Perseids' line, or an empty one.
HappeningLine perseids(MonthScene& scene) {
  for (const HappeningLine& line : happening_lines(scene.context()))
    if (line.text.starts_with("Perseids")) return line;
  return {};
}

// The Moon's set, 2:14, and its lit part, 85 %, of this night are this project's own.
TEST(HappeningMeteors, HoursEndWhereTheMoonOrTheDayBegins) {
  MonthScene scene(41.3, -73.9, "America/New_York", 2027, 8);
  scene.compute(true);
  const HappeningLine line = perseids(scene);
  ASSERT_FALSE(line.text.empty());
  EXPECT_TRUE(line.meteors && line.sight && !line.when.empty());
  const SiteSky sky(*scene.ephemeris, scene.site.place.observer, line.at - Days(1),
                    line.at + Days(1));
  const bool names_moon = line.text.find("lit, is up") != std::string::npos;
  const bool says_down = line.text.find("the Moon is down") != std::string::npos ||
                         line.text.find("the Moon has set") != std::string::npos;
  EXPECT_NE(names_moon, says_down) << line.text;
  if (says_down) {
    EXPECT_FALSE(sky.moon_up(line.at)) << line.text;
  }
  EXPECT_LE(sky.altitude(Body::sun, line.at).degrees(), -18) << "it begins in the dark";
  EXPECT_THAT(line.text, HasSubstr("under a dark sky)"));
}

// 69.6 degrees north: in the middle of August the Sun sinks 6 degrees at least; at 78 it stays up.
TEST(HappeningMeteors, FamousOnesAreNamedInABrightSky) {
  MonthScene scene(78.2, 15.6, "Arctic/Longyearbyen", 2027, 8);
  scene.compute(true);
  EXPECT_EQ(perseids(scene).text, "Perseids: the sky is too bright here.");
}

TEST(HappeningMeteors, WhatGivesLittleIsNotTold) {
  MonthScene scene(41.3, -73.9, "America/New_York", 2027, 1);
  scene.compute(true);
  int told = 0, dull = 0;
  for (scene.month_index = 0; scene.month_index < 12; ++scene.month_index)
    for (const HappeningLine& line : happening_lines(scene.context())) {
      if (!line.meteors || line.rank >= fact_rank) continue;
      ++told;
      for (const SiteShower& s : scene.happenings.showers)
        if (s.expected_per_hour < 5 &&
            line.text.starts_with(std::string(showers()[static_cast<std::size_t>(s.shower)].name) +
                                  ":"))
          ++dull;
    }
  EXPECT_GE(told, 8);
  EXPECT_LE(dull, 8) << "the famous eight at most";
}

// ---- the Sun's year

struct YearCase {
  const char* label;
  double latitude, longitude;
  const char* zone;
  int month;
  const char* text;
};
// Which months these fall in: common facts of the Sun's year (equation of time; the polar circle).
class SunsYear : public testing::TestWithParam<YearCase> {};
TEST_P(SunsYear, StandsInItsMonthAboveLesserMeetings) {
  const YearCase& row = GetParam();
  MonthScene scene(row.latitude, row.longitude, row.zone, 2027, row.month);
  scene.compute(true);
  int told = 0;
  for (const HappeningLine& line : happening_lines(scene.context())) {
    if (line.text.find(row.text) == std::string::npos) continue;
    ++told;
    EXPECT_LT(line.rank, 2.6) << line.text;
    EXPECT_FALSE(line.sight) << line.text;
  }
  EXPECT_EQ(told, 1) << row.text;
}
INSTANTIATE_TEST_SUITE_P(
    Year, SunsYear,
    testing::Values(
        YearCase{"north_sunset", 41.3, -73.9, "America/New_York", 12, "Earliest sunset"},
        YearCase{"north_sunrise", 41.3, -73.9, "America/New_York", 1, "Latest sunrise"},
        YearCase{"north_longest", 41.3, -73.9, "America/New_York", 6, "Longest day"},
        YearCase{"south_longest", -43.4, 171.6, "Pacific/Auckland", 12, "Longest day"},
        YearCase{"south_sunset", -43.4, 171.6, "Pacific/Auckland", 6, "Earliest sunset"},
        YearCase{"midnight_sun", 69.6, 19.4, "Europe/Oslo", 5, "stays up day and night until"},
        YearCase{"midnight_sun_ends", 69.6, 19.4, "Europe/Oslo", 7, "The Sun sets again"},
        YearCase{"polar_night", 69.6, 19.4, "Europe/Oslo", 11, "does not rise again this year"},
        YearCase{"polar_night_ends", 69.6, 19.4, "Europe/Oslo", 1, "The Sun rises again"}),
    [](const auto& row) { return std::string(row.param.label); });

}  // namespace
}  // namespace duskleaf
