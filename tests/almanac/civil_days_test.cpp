// Civil days: facts of the time-zone data, and the published table of the U.S. Naval Observatory
// (riseset_usno.csv).
#include "almanac/civil_days.hpp"

#include <algorithm>
#include <fstream>
#include <gtest/gtest.h>
#include <map>
#include <sstream>

#include "base/csv.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

std::ptrdiff_t count(const CivilDay& day, EventKind kind) {
  return std::count_if(day.events.begin(), day.events.end(),
                       [&](const Event& e) { return e.kind == kind; });
}

TEST(CivilDays, AnInstantBelongsToTheDateOfItsRoundedMinute) {
  const Zone zone = Zone::utc();
  const Ut midnight = ut_midnight(make_date(2027, 5, 2));
  const std::vector<Event> events = {
      {EventKind::moonset, Body::moon, midnight - Days(Seconds(31)), {}},
      {EventKind::moonset, Body::moon, midnight - Days(Seconds(29)), {}},
      {EventKind::moonset, Body::moon, midnight + Days(Seconds(1)), {}}};
  const auto days = make_civil_days(zone, events, make_date(2027, 5, 1), make_date(2027, 5, 3));
  ASSERT_EQ(days.size(), 2u);
  EXPECT_EQ(days[0].events.size(), 1u);
  EXPECT_EQ(days[1].events.size(), 2u);
}

TEST(CivilDays, ASkippedDateIsMarkedAndEmpty) {
  const SiteYear year = year_of_site(test_place(-13.83, -171.77, "Pacific/Apia"), 2011);
  EXPECT_TRUE(day_of_year(year, 2011, 12, 30).skipped);
  EXPECT_TRUE(day_of_year(year, 2011, 12, 30).events.empty());
  EXPECT_FALSE(day_of_year(year, 2011, 12, 29).skipped);
  EXPECT_EQ(count(day_of_year(year, 2011, 12, 29), EventKind::sunset), 1);
  EXPECT_EQ(count(day_of_year(year, 2011, 12, 31), EventKind::sunrise), 1);
  EXPECT_EQ(std::count_if(year.days.begin(), year.days.end(),
                          [](const CivilDay& d) { return d.skipped; }),
            1);
}

TEST(CivilDays, ClockChangesAreInstantsOfTheSite) {
  const SiteYear year = year_of_site(test_place(-31.5, 159.1, "Australia/Lord_Howe"), 2027);
  const CivilDay &autumn = day_of_year(year, 2027, 4, 4), &spring = day_of_year(year, 2027, 10, 3);
  ASSERT_EQ(count(autumn, EventKind::clock_change), 1);
  ASSERT_EQ(count(spring, EventKind::clock_change), 1);
  const auto value = [](const CivilDay& day) {
    return std::find_if(day.events.begin(), day.events.end(),
                        [](const Event& e) { return e.kind == EventKind::clock_change; })
        ->value.value();
  };
  EXPECT_DOUBLE_EQ(value(autumn), -0.5);
  EXPECT_DOUBLE_EQ(value(spring), 0.5);
}

TEST(CivilDays, EveryDayOfAMiddleLatitudeHasOneSunriseAndOneSunset) {
  for (const auto& [zone, longitude] :
       {std::pair{"Pacific/Kiritimati", -157.4}, std::pair{"Pacific/Auckland", 174.8},
        std::pair{"America/St_Johns", -52.7}, std::pair{"Asia/Kathmandu", 85.3}}) {
    const SiteYear year = year_of_site(test_place(-20.0, longitude, zone), 2027);
    for (const CivilDay& day : year.days) {
      EXPECT_EQ(count(day, EventKind::sunrise), 1) << zone << ' ' << iso_date(day.date);
      EXPECT_EQ(count(day, EventKind::sunset), 1) << zone << ' ' << iso_date(day.date);
    }
  }
}

// Each date of 2034 at 80 N 130 E: how often the Moon rises and sets, twice and never among them.
TEST(CivilDays, MoonrisesOfADateAreAsManyAsPublished) {
  std::ifstream file(DUSKLEAF_REFERENCE "/riseset_usno.csv", std::ios::binary);
  std::ostringstream stream;
  stream << file.rdbuf();
  const std::string text = stream.str();
  const CsvTable table(text);
  std::map<std::string, std::pair<int, int>> published;
  for (std::size_t r = 0; r < table.rows(); ++r)
    if (table.cell(r, table.column("lat")) == "80") {
      auto& [rises, sets] =
          published[std::string(table.cell(r, table.column("instant_ut")).substr(0, 10))];
      ++(table.cell(r, table.column("event")) == "rise" ? rises : sets);
    }
  ASSERT_GT(published.size(), 100u);
  const SiteYear year = year_of_site(test_place(80.0, 130.0, "UTC"), 2034);
  int twice = 0, never = 0;
  for (const CivilDay& day : year.days) {
    const auto [rises, sets] = published[iso_date(day.date)];
    EXPECT_EQ(count(day, EventKind::moonrise), rises) << iso_date(day.date);
    EXPECT_EQ(count(day, EventKind::moonset), sets) << iso_date(day.date);
    twice += rises == 2 || sets == 2;
    never += rises == 0;
  }
  EXPECT_GT(twice, 0);
  EXPECT_GT(never, 100);
}

TEST(CivilDays, ASpanMayBeginInAnyMonth) {
  const SiteYear year = year_of_site(test_place(40.0, 0.0, "Europe/Madrid"), 2027, 9);
  EXPECT_EQ(iso_date(year.days.front().date), "2027-09-01");
  EXPECT_EQ(iso_date(year.days.back().date), "2028-08-31");
  EXPECT_EQ(year.span.month(0), (std::pair{2027, 9}));
  EXPECT_EQ(year.span.month(3), (std::pair{2027, 12}));
  EXPECT_EQ(year.span.month(4), (std::pair{2028, 1}));
  EXPECT_EQ(year.span.month(11), (std::pair{2028, 8}));
}

}  // namespace
}  // namespace duskleaf
