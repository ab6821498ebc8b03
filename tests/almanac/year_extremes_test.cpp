// Extremes of the Sun's year: against a published table of a whole year's rise and set and the
// poles' (reference/riseset_usno.csv), against the Sun's declination, and what everyone knows.
#include "almanac/year_extremes.hpp"

#include <cmath>
#include <fstream>
#include <functional>
#include <gtest/gtest.h>
#include <map>
#include <sstream>
#include <string>

#include "almanac/sites.hpp"
#include "base/csv.hpp"

namespace duskleaf {
namespace {

YearExtremes extremes_of(double latitude, double longitude, const char* zone, int year,
                         int month = 1) {
  return year_extremes(year_of_site(test_place(latitude, longitude, zone), year, month));
}

std::string text_of(const std::vector<DateSpan>& spans) {
  std::string text;
  for (const DateSpan& s : spans)
    text += (s.begins_before ? "<" : "") + iso_date(s.first) + ".." + iso_date(s.last) +
            (s.ends_after ? "> " : " ");
  return text;
}

/// Published minutes of a local date: of the mean solar day at the place's longitude.
struct PrintedDay {
  int rises = 0, sets = 0;  // since the midnight of UT, counted on
};
std::map<Date, PrintedDay> printed_year(double latitude, double longitude) {
  std::ifstream file(std::string(DUSKLEAF_REFERENCE) + "/riseset_usno.csv", std::ios::binary);
  std::ostringstream stream;
  stream << file.rdbuf();
  const std::string text = stream.str();
  const CsvTable table(text);
  std::map<Date, PrintedDay> days;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    if (table.cell(r, table.column("body")) != "Sun" ||
        table.number(r, table.column("lat")) != latitude ||
        table.number(r, table.column("lon")) != longitude)
      continue;
    const std::string_view at = table.cell(r, table.column("instant_ut"));
    const auto part = [&](std::size_t from, std::size_t n) {
      return static_cast<int>(parse_number(at.substr(from, n)));
    };
    Date date = make_date(part(0, 4), part(5, 2), part(8, 2));
    int minutes = part(11, 2) * 60 + part(14, 2);
    if (minutes + longitude * 4 < 0) {
      date -= std::chrono::days(1);
      minutes += 1440;
    }
    PrintedDay& day = days[date];
    (table.cell(r, table.column("event")) == "rise" ? day.rises : day.sets) = minutes;
  }
  return days;
}

// Each extreme falls in the run of dates whose printed minutes are as extreme.
TEST(YearExtremes, DatesOfAPublishedYear) {
  const std::map<Date, PrintedDay> days = printed_year(29, -81);
  ASSERT_EQ(days.size(), 365U);
  // The second zone keeps one offset all year: the first one's summer time must not decide.
  for (const char* zone : {"America/New_York", "Etc/GMT+5"}) {
    const YearExtremes found = extremes_of(29, -81, zone, 2019);
    const auto check = [&](const char* label, const std::optional<DayExtreme>& extreme, int sign,
                           const std::function<int(const PrintedDay&)>& minutes, int slack) {
      ASSERT_TRUE(extreme) << label;
      int most = -100000;
      for (const auto& [date, day] : days) most = std::max(most, sign * minutes(day));
      const auto at = days.find(extreme->date);
      ASSERT_NE(at, days.end()) << label << " " << iso_date(extreme->date);
      EXPECT_GE(sign * minutes(at->second), most - slack)
          << label << " " << iso_date(extreme->date) << " " << zone;
      // Not the whole year is so.
      EXPECT_LT(
          std::count_if(days.begin(), days.end(),
                        [&](const auto& d) { return sign * minutes(d.second) >= most - slack; }),
          40)
          << label;
    };
    const auto rises = [](const PrintedDay& d) { return d.rises; };
    const auto sets = [](const PrintedDay& d) { return d.sets; };
    const auto length = [](const PrintedDay& d) { return d.sets - d.rises; };
    check("earliest sunset", found.earliest_sunset, -1, sets, 0);
    check("latest sunset", found.latest_sunset, 1, sets, 0);
    check("earliest sunrise", found.earliest_sunrise, -1, rises, 0);
    check("latest sunrise", found.latest_sunrise, 1, rises, 0);
    // A length is the difference of two rounded minutes.
    check("longest day", found.longest_day, 1, length, 1);
    check("shortest day", found.shortest_day, -1, length, 1);
    EXPECT_NEAR(found.longest_day->length.count() * 1440, length(days.at(found.longest_day->date)),
                1.0);
    EXPECT_NEAR(found.shortest_day->length.count() * 1440,
                length(days.at(found.shortest_day->date)), 1.0);
    const Date evening = found.longest_night->date;
    EXPECT_NEAR(found.longest_night->length.count() * 1440,
                1440 + days.at(evening + std::chrono::days(1)).rises - days.at(evening).sets, 1.0);
  }
}

// U.S. Naval Observatory, 2022: at the North Pole the Sun rises on March 18 at 13:02 and sets on
// September 25 at 04:13; at the South Pole it sets on March 22 at 18:07 and rises on September 20
// at 21:52 UT.
TEST(YearExtremes, PolesAsPublished) {
  const YearExtremes north = extremes_of(90, 0, "UTC", 2022);
  EXPECT_EQ(text_of(north.midnight_sun), "2022-03-19..2022-09-24 ");
  EXPECT_EQ(text_of(north.polar_night), "<2022-01-01..2022-03-17 2022-09-26..2022-12-31> ");
  EXPECT_FALSE(north.earliest_sunset || north.longest_day || north.shortest_night);
  const YearExtremes south = extremes_of(-90, 0, "UTC", 2022);
  EXPECT_EQ(text_of(south.midnight_sun), "<2022-01-01..2022-03-21 2022-09-21..2022-12-31> ");
  EXPECT_EQ(text_of(south.polar_night), "2022-03-23..2022-09-19 ");
  // Twelve months from July on; the next year's rise comes 5 h 49 min later by the clock.
  const YearExtremes winter = extremes_of(90, 0, "UTC", 2022, 7);
  EXPECT_EQ(text_of(winter.midnight_sun), "<2022-07-01..2022-09-24 2023-03-19..2023-06-30> ");
  EXPECT_EQ(winter.polar_night.size(), 1U);
}

Angle declination(Date date) {
  return ephemeris_of({2027, 1})
      .place(Body::sun, to_tt(ut_midnight(date) + Days(1)))  // the midnight that ends the date
      .declination;
}

// Where the Sun's midnight altitude, declination + latitude - 90 degrees, passes the limit; it
// changes by less than 0.4 degree a day.
TEST(YearExtremes, SpansEndWhereTheDeclinationSays) {
  const auto near = [](const char* label, Date date, double wanted) {
    EXPECT_NEAR(declination(date).degrees(), wanted, 0.5) << label << " " << iso_date(date);
  };
  const YearExtremes far = extremes_of(69.6, 0, "UTC", 2027);
  ASSERT_EQ(far.midnight_sun.size(), 1U);
  near("midnight sun begins", far.midnight_sun[0].first, 90 - 69.6 - 50.0 / 60);
  near("midnight sun ends", far.midnight_sun[0].last, 90 - 69.6 - 50.0 / 60);
  EXPECT_FALSE(far.midnight_sun[0].begins_before || far.midnight_sun[0].ends_after);
  ASSERT_EQ(far.polar_night.size(), 2U);
  near("polar night ends", far.polar_night[0].last, -(90 - 69.6 + 50.0 / 60));
  near("polar night begins", far.polar_night[1].first, -(90 - 69.6 + 50.0 / 60));
  EXPECT_TRUE(far.polar_night[0].begins_before && far.polar_night[1].ends_after);
  for (const double latitude : {51.5, 57.0, -54.8}) {
    const YearExtremes white = extremes_of(latitude, 0, "UTC", 2027);
    const double limit = std::copysign(90 - 18 - std::abs(latitude), latitude);
    ASSERT_EQ(white.no_astronomical_night.size(), latitude > 0 ? 1U : 2U) << latitude;
    const DateSpan &first = white.no_astronomical_night.front(),
                   &last = white.no_astronomical_night.back();
    near("white nights begin", latitude > 0 ? first.first : last.first, limit);
    near("white nights end", latitude > 0 ? last.last : first.last, limit);
    EXPECT_EQ(first.begins_before && last.ends_after, latitude < 0) << latitude;
    EXPECT_TRUE(white.midnight_sun.empty() && white.polar_night.empty()) << latitude;
    EXPECT_TRUE(white.longest_day && white.earliest_sunset) << latitude;
  }
}

// 90 - 18 - 23.44 = 48.56 degrees: the lowest latitude without night at the solstice.
TEST(YearExtremes, WhiteNightsBeginAtFortyEightAndAHalf) {
  EXPECT_TRUE(extremes_of(48.4, 5, "UTC", 2027).no_astronomical_night.empty());
  const YearExtremes some = extremes_of(48.7, 5, "UTC", 2027);
  ASSERT_EQ(some.no_astronomical_night.size(), 1U);
  EXPECT_LE(some.no_astronomical_night[0].first, make_date(2027, 6, 21));
  EXPECT_GE(some.no_astronomical_night[0].last, make_date(2027, 6, 20));
}

// Common practice: at the equator every day lasts some 12 h 7 min.
TEST(YearExtremes, EquatorHasEqualDays) {
  const YearExtremes e = extremes_of(0, -78, "America/Guayaquil", 2027);
  ASSERT_TRUE(e.longest_day && e.shortest_day && e.longest_night && e.shortest_night);
  for (const auto& day : {e.longest_day, e.shortest_day})
    EXPECT_NEAR(day->length.count() * 24, 12 + 7.0 / 60, 1.5 / 60);
  for (const auto& night : {e.longest_night, e.shortest_night})
    EXPECT_NEAR(night->length.count() * 24, 12 - 7.0 / 60, 1.5 / 60);
  EXPECT_TRUE(e.no_astronomical_night.empty() && e.midnight_sun.empty() && e.polar_night.empty());
}

// Common practice: at middle latitudes the earliest sunset comes a week or two before the shortest
// day, the latest sunrise as much after it; in the south half a year apart.
TEST(YearExtremes, OrderAroundTheSolstices) {
  const YearExtremes north = extremes_of(52, 0, "Europe/London", 2027);
  EXPECT_LT(north.earliest_sunset->date, north.shortest_day->date);
  EXPECT_GT(north.latest_sunrise->date, north.shortest_day->date);
  EXPECT_EQ(month_of(north.shortest_day->date), 12);
  EXPECT_EQ(month_of(north.longest_day->date), 6);
  EXPECT_NEAR(Days(north.longest_day->at - north.shortest_night->at).count(), 0, 1.5);
  const YearExtremes south = extremes_of(-52, 0, "UTC", 2027);
  EXPECT_EQ(month_of(south.shortest_day->date), 6);
  EXPECT_EQ(month_of(south.longest_day->date), 12);
  EXPECT_LT(south.earliest_sunset->date, south.latest_sunrise->date);
}

// In the far north the midsummer Sun sets after midnight by a clock that is hours ahead of it: that
// is the latest sunset, not the earliest.
TEST(YearExtremes, SunsetAfterMidnightIsLate) {
  const char* zone = "America/Anchorage";
  const YearExtremes e = extremes_of(64.8, -147.7, zone, 2027);
  ASSERT_TRUE(e.latest_sunset && e.earliest_sunset);
  EXPECT_EQ(month_of(e.latest_sunset->date), 6);
  EXPECT_EQ(Zone::load(zone)->civil(e.latest_sunset->at).hour(), 0);
  EXPECT_EQ(Zone::load(zone)->civil(e.latest_sunset->at).date(), e.latest_sunset->date);
  EXPECT_EQ(month_of(e.earliest_sunset->date), 12);
  EXPECT_EQ(month_of(e.earliest_sunrise->date), 6);
}

// Samoa left out 2011 December 30: the day count goes on without a jump.
TEST(YearExtremes, SkippedDateDoesNotDecide) {
  const YearExtremes e = extremes_of(-13.83, -171.77, "Pacific/Apia", 2011);
  ASSERT_TRUE(e.latest_sunset && e.longest_day && e.shortest_day);
  // At this latitude the latest sunset comes weeks after the December solstice, in January.
  EXPECT_EQ(month_of(e.latest_sunset->date), 1);
  EXPECT_EQ(month_of(e.latest_sunrise->date), 7);
  EXPECT_LT(e.longest_night->length.count(), 0.55);
  EXPECT_EQ(month_of(e.longest_day->date), 12);
}

}  // namespace
}  // namespace duskleaf
