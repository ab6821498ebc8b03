// The local horizon against reference/skyline_de431.csv (made by tests/reference/make with an
// outside library on DE431-based files, second by second) and, where it is flat, against published
// sunrises.
#include "almanac/skyline.hpp"

#include <fstream>
#include <gtest/gtest.h>
#include <iostream>
#include <map>
#include <sstream>

#include "base/csv.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

std::string text_of(const std::string& name) {
  std::ifstream file(std::string(DUSKLEAF_REFERENCE "/") + name, std::ios::binary);
  if (!file) throw std::runtime_error("cannot read reference " + name);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

SkylinePoint point(double azimuth, double altitude) {
  return {Angle::from_degrees(azimuth), Angle::from_degrees(altitude)};
}

/// "2027-03-20T20:24:41.31Z" or "2019-01-01T12:19Z".
Ut instant(std::string_view text) {
  const auto number = [&](std::size_t at, std::size_t n) {
    return parse_number(text.substr(at, n));
  };
  const double seconds = text.size() > 17 ? number(17, text.size() - 18) : 0.0;
  return ut_midnight(make_date(static_cast<int>(number(0, 4)), static_cast<int>(number(5, 2)),
                               static_cast<int>(number(8, 2)))) +
         Days(number(11, 2) / 24 + number(14, 2) / 1440 + seconds / 86400);
}
double seconds_off(Ut a, Ut b) { return std::abs(Seconds(a - b).count()); }

std::vector<SkylineDay> days_of(const Place& place, int first_year, int first_month = 1) {
  SiteYear year;
  year.place = place;
  year.span = {first_year, first_month};
  const YearEphemeris& ephemeris = ephemeris_of(year.span);
  const SiteSky sky(ephemeris, place.observer, ut_midnight(year.span.first_day()) - Days(2),
                    ut_midnight(year.span.end_day()) + Days(2));
  return skyline_days(sky, year);
}

TEST(Skyline, HeightIsLinearAndClosedThroughNorth) {
  const std::vector<SkylinePoint> four = {point(10, 3), point(90, 8), point(180, 2), point(350, 5)};
  struct Case {
    const char* label;
    double azimuth, height;
  };
  // Proportion by hand.
  for (const Case& c :
       {Case{"at a point", 90, 8}, Case{"first point", 10, 3}, Case{"last point", 350, 5},
        Case{"half way", 50, 5.5}, Case{"a tenth of the way", 197, 2.3}, Case{"north", 0, 4},
        Case{"just west of north", 355, 4.5}, Case{"just east of north", 5, 3.5},
        Case{"a turn further", 365, 3.5}, Case{"a turn less", -5, 4.5}})
    EXPECT_NEAR(skyline_height(four, Angle::from_degrees(c.azimuth)).degrees(), c.height, 1e-9)
        << c.label;
  EXPECT_EQ(skyline_height({}, Angle::from_degrees(77)).degrees(), 0.0);
  for (const double azimuth : {0.0, 120.0, 300.0})
    EXPECT_NEAR(skyline_height({point(120, -2.5)}, Angle::from_degrees(azimuth)).degrees(), -2.5,
                1e-12);
}

TEST(Skyline, AboveIsStrict) {
  const std::vector<SkylinePoint> line = {point(0, 6), point(180, 10)};
  const auto above = [&](double altitude, double azimuth) {
    return above_skyline(line, {Angle::from_degrees(altitude), Angle::from_degrees(azimuth)});
  };
  EXPECT_TRUE(above(8.001, 90));
  EXPECT_FALSE(above(7.999, 90));
  EXPECT_TRUE(above(8.001, 270));
  EXPECT_FALSE(above(7.999, 270));
}

TEST(Skyline, ReferenceDays) {
  const std::string text = text_of("skyline_de431.csv");
  const CsvTable table(text);
  std::map<std::string, std::vector<SkylineDay>> years;
  double worst = 0;
  int instants = 0, never = 0, always = 0, jagged = 0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](const char* name) {
      return std::string(table.cell(r, table.column(name)));
    };
    const std::string site = cell("site"), label = site + " " + cell("date");
    if (!years.count(site)) {
      Place place = test_place(table.number(r, table.column("latitude")),
                               table.number(r, table.column("longitude")), "UTC");
      place.observer.elevation_m = table.number(r, table.column("elevation_m"));
      std::istringstream points(cell("skyline"));
      for (std::string word; points >> word;) {
        const std::size_t colon = word.find(':');
        place.skyline.push_back(
            point(parse_number(word.substr(0, colon)), parse_number(word.substr(colon + 1))));
      }
      years[site] = days_of(place, 2027);
      ASSERT_EQ(years[site].size(), 366U);
    }
    const Ut noon = instant(cell("date") + "T12:00Z");
    const SkylineDay& day = years[site].at(
        static_cast<std::size_t>(noon.days() - ut_midnight(make_date(2027, 1, 1)).days()));
    EXPECT_EQ(iso_date(day.date), cell("date"));
    if (cell("graze") == "1") continue;
    ASSERT_EQ(day.clears.has_value(), !cell("clears").empty()) << label;
    ASSERT_EQ(day.gone.has_value(), !cell("gone").empty()) << label;
    EXPECT_EQ(day.never_clears, cell("all_day") == "behind") << label;
    never += day.never_clears;
    always += cell("all_day") == "above";
    jagged += table.integer(r, table.column("crossings")) > 2;
    const auto compare = [&](const std::optional<Ut>& found, const char* column) {
      if (!found) return;
      const double off = seconds_off(*found, instant(cell(column)));
      EXPECT_LE(off, 0.5) << label << ", " << column;
      worst = std::max(worst, off);
      ++instants;
    };
    compare(day.clears, "clears");
    compare(day.gone, "gone");
  }
  std::cout << "Skyline: " << instants << " instants, largest difference " << worst << " s; "
            << never << " days behind, " << always << " above, " << jagged
            << " with more than two crossings\n";
  EXPECT_GT(instants, 600);
  EXPECT_GT(never, 50);
  EXPECT_GT(always, 20);
  EXPECT_GE(jagged, 10);
}

// A flat skyline at 0 is the sunrise of the tables, but for the refraction formula (34.4' there
// against 34') and the Sun's own semidiameter (15.7' to 16.3' against 16'): 5 s here.
TEST(Skyline, FlatIsThePublishedSunrise) {
  Place place = test_place(29, -81, "Etc/GMT+5");
  place.skyline = {point(0, 0)};
  const std::vector<SkylineDay> days = days_of(place, 2019);
  const std::string text = text_of("riseset_usno.csv");
  const CsvTable table(text);
  int compared = 0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    if (table.cell(r, 0) != "Sun" || table.cell(r, 1) != "29" || table.cell(r, 2) != "-81")
      continue;
    const Ut published = instant(table.cell(r, 3));
    const bool rise = table.cell(r, 4) == "rise";
    double nearest = 1e9;
    for (const SkylineDay& day : days)
      if (const std::optional<Ut>& at = rise ? day.clears : day.gone)
        nearest = std::min(nearest, seconds_off(*at, published));
    EXPECT_LE(nearest, 30.0 + 6.0) << table.cell(r, 3);
    ++compared;
  }
  EXPECT_EQ(compared, 730);
}

// A valley floor walled all round as high as the Sun ever stands there: 90 - 54.2 + 23.44 = 59.2
// degrees.
TEST(Skyline, ValleyThatTheSunNeverReaches) {
  Place place = test_place(54.2, -4.6, "Europe/London");
  place.skyline = {point(0, 60)};
  for (const SkylineDay& day : days_of(place, 2027)) {
    EXPECT_TRUE(day.never_clears) << iso_date(day.date);
    EXPECT_FALSE(day.clears || day.gone) << iso_date(day.date);
  }
  place.skyline = {point(0, 58.5)};
  int cleared = 0;
  for (const SkylineDay& day : days_of(place, 2027)) {
    if (!day.clears) continue;
    ++cleared;
    EXPECT_TRUE(month_of(day.date) == 6 || month_of(day.date) == 7) << iso_date(day.date);
    EXPECT_LT(*day.clears, *day.gone);
  }
  // Declination above 22.43 degrees (edge and refraction add 0.27): 5 weeks by the tables of any
  // year, from memory.
  EXPECT_GT(cleared, 30);
  EXPECT_LT(cleared, 50);
}

// Where the zone skipped a date (Apia, 30 December 2011) it has no instants; leap years have their
// day; the span may begin in another month.
TEST(Skyline, DatesOfTheSpan) {
  Place samoa = test_place(-13.8, -171.8, "Pacific/Apia");
  samoa.skyline = {point(0, 4), point(180, 7)};
  const std::vector<SkylineDay> skipped = days_of(samoa, 2011);
  ASSERT_EQ(skipped.size(), 366U);
  for (const SkylineDay& day : skipped) {
    const bool missing = iso_date(day.date) == "2011-12-30";
    EXPECT_EQ(day.clears.has_value(), !missing) << iso_date(day.date);
    EXPECT_EQ(day.gone.has_value(), !missing) << iso_date(day.date);
    EXPECT_FALSE(day.never_clears) << iso_date(day.date);
    if (day.clears) {
      EXPECT_EQ(samoa.zone.civil(*day.clears).date(), day.date);
      EXPECT_EQ(samoa.zone.civil(*day.gone).date(), day.date);
    }
  }
  Place leap = test_place(54.2, -4.6, "Europe/London");
  leap.skyline = {point(0, 4)};
  const std::vector<SkylineDay> days = days_of(leap, 2027, 9);
  ASSERT_EQ(days.size(), 367U);
  EXPECT_EQ(iso_date(days.front().date), "2027-09-01");
  EXPECT_EQ(iso_date(days.at(181).date), "2028-02-29");
  EXPECT_TRUE(days.at(181).clears.has_value());
}

TEST(Skyline, NoneInTheOrderGivesNone) {
  EXPECT_TRUE(days_of(test_place(54.2, -4.6, "Europe/London"), 2027).empty());
}

// The zenith, the poles and the equator have awkward azimuths.
TEST(Skyline, AwkwardPlaces) {
  for (const double latitude : {90.0, -90.0, 0.0, 23.44}) {
    Place place = test_place(latitude, 0, "UTC");
    place.skyline = {point(0, 10), point(90, 20), point(180, 35), point(270, 15)};
    const std::vector<SkylineDay> days = days_of(place, 2027);
    ASSERT_EQ(days.size(), 366U);
    for (const SkylineDay& day : days) {
      EXPECT_FALSE(day.never_clears && (day.clears || day.gone)) << latitude;
      if (std::abs(latitude) < 90.0) {
        EXPECT_TRUE(day.clears && day.gone) << latitude;
      }
    }
  }
  // At the pole the Sun stands within a quarter of a degree of its declination all day: a flat
  // skyline at 10 degrees is cleared for the season and no day of midsummer has an instant.
  Place pole = test_place(90, 0, "UTC");
  pole.skyline = {point(0, 10)};
  int clears = 0, gone = 0;
  for (const SkylineDay& day : days_of(pole, 2027)) {
    clears += day.clears.has_value();
    gone += day.gone.has_value();
    const int month = month_of(day.date);
    if (month == 6 || month == 7) {
      EXPECT_FALSE(day.never_clears || day.clears || day.gone);
    }
    if (month < 4 || month > 9) {
      EXPECT_TRUE(day.never_clears);
    }
  }
  EXPECT_EQ(clears, 1);
  EXPECT_EQ(gone, 1);
}

}  // namespace
}  // namespace duskleaf
