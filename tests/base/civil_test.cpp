#include "base/civil.hpp"

#include <gtest/gtest.h>

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

// Facts of the IANA time-zone data (tz database, files europe, australasia, asia).
TEST(Zone, RoundingNearAClockChangeTakesTheOffsetOfTheRoundedMinute) {
  const Zone london = *Zone::load("Europe/London");
  // Clocks go forward at 2027-03-28T01:00Z: no clock there ever shows 01:00 that day.
  const Ut jump = ut_midnight(make_date(2027, 3, 28)) + Days(1h);
  EXPECT_EQ(london.civil(jump - Days(10s)).iso(), "2027-03-28T02:00+01:00");
  EXPECT_EQ(london.civil(jump - Days(40s)).iso(), "2027-03-28T00:59+00:00");
}

TEST(Zone, SkippedReadingIsTheJumpAndARepeatedOneItsFirst) {
  const Zone london = *Zone::load("Europe/London");
  EXPECT_NEAR((london.instant(make_date(2027, 3, 28), 90min) -
               (ut_midnight(make_date(2027, 3, 28)) + Days(1h)))
                  .count(),
              0, 1e-9);
  EXPECT_EQ(london.civil(london.instant(make_date(2027, 10, 31), 90min)).iso(),
            "2027-10-31T01:30+01:00");
}

TEST(Zone, ChangesOfOffsetInBothDirections) {
  const Zone london = *Zone::load("Europe/London");
  const auto changes =
      london.changes(ut_midnight(make_date(2027, 1, 1)), ut_midnight(make_date(2028, 1, 1)));
  ASSERT_EQ(changes.size(), 2u);
  EXPECT_EQ(london.civil(changes[0].at).iso(), "2027-03-28T02:00+01:00");
  EXPECT_EQ(london.civil(changes[1].at).iso(), "2027-10-31T01:00+00:00");
  EXPECT_EQ(changes[0].after - changes[0].before, 1h);
  EXPECT_EQ(changes[1].after - changes[1].before, -1h);
}

TEST(Zone, HalfHourSummerTimeOfLordHowe) {
  const Zone zone = *Zone::load("Australia/Lord_Howe");
  const auto changes =
      zone.changes(ut_midnight(make_date(2027, 1, 1)), ut_midnight(make_date(2028, 1, 1)));
  ASSERT_EQ(changes.size(), 2u);
  EXPECT_EQ(changes[0].after - changes[0].before, -30min);
}

TEST(Zone, ADateThatSamoaSkippedIsEmpty) {
  const Zone apia = *Zone::load("Pacific/Apia");
  EXPECT_EQ(apia.start_of(make_date(2011, 12, 30)), apia.start_of(make_date(2011, 12, 31)));
  EXPECT_LT(apia.start_of(make_date(2011, 12, 29)), apia.start_of(make_date(2011, 12, 30)));
}

TEST(Zone, RulesGoOnPast2037) {
  const Zone london = *Zone::load("Europe/London");
  EXPECT_EQ(london.offset_at(ut_midnight(make_date(2099, 7, 1))), 1h);
}

TEST(Zone, NamesThatAreNoZones) {
  EXPECT_FALSE(Zone::load("Europe/Londn"));
  EXPECT_FALSE(Zone::load("/etc/localtime"));
  EXPECT_FALSE(Zone::load("localtime"));
  EXPECT_FALSE(Zone::load("../zoneinfo/UTC"));
  EXPECT_FALSE(Zone::load(""));
}

TEST(Zone, LocalMeanTimeOfOldKeepsItsSeconds) {
  const Zone amsterdam = *Zone::load("Africa/Monrovia");  // -0:43:08 until 1919 in the data
  EXPECT_EQ(amsterdam.civil(ut_midnight(make_date(1910, 1, 1)) + Days(12h)).iso().substr(16),
            "-00:43:08");
}

// Seen in the tz database: its version line begins "# version 20".
TEST(Zone, DataVersionIsKnown) { EXPECT_EQ(time_zone_data_version().substr(0, 2), "20"); }

}  // namespace
}  // namespace duskleaf
