// Transits of Mercury and Venus against reference/sun_transits_de431.csv (made by
// tests/reference/make with an outside library on DE431-based files; complete for 1972-2060) and
// against published contacts.
#include "events/sun_transits.hpp"

#include <gtest/gtest.h>
#include <iostream>
#include <set>

#include "published.hpp"
#include "reference_years.hpp"

namespace duskleaf {
namespace {

struct Row {
  std::string label;
  bool geocentric;
  Observer observer;
  std::string planet, begins, fully_on, greatest, begins_to_leave, ends;
  double separation, sun_altitude, highest_sun;
};

std::vector<Row> read_rows() {
  const std::string text = reference_text("sun_transits_de431.csv");
  const CsvTable table(text);
  std::vector<Row> rows;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](const char* name) {
      return std::string(table.cell(r, table.column(name)));
    };
    const auto number = [&](const char* name) { return table.number(r, table.column(name)); };
    Row row{cell("site") + " " + cell("begins"),
            cell("site") == "-",
            {},
            cell("planet"),
            cell("begins"),
            cell("fully_on"),
            cell("greatest"),
            cell("begins_to_leave"),
            cell("ends"),
            number("separation_arcsec"),
            0,
            0};
    if (!row.geocentric) {
      row.observer = {Angle::from_degrees(number("latitude")),
                      Angle::from_degrees(number("longitude")), number("elevation_m")};
      row.sun_altitude = number("sun_altitude");
      row.highest_sun = number("highest_sun");
    }
    rows.push_back(row);
  }
  return rows;
}

double off(Ut found, const std::string& wanted) {
  return std::abs(Seconds(found - instant_of_text(wanted)).count());
}

constexpr double slack_s = 2.0;

TEST(SunTransits, EveryOneOf1972To2060FromTheEarthsCentre) {
  std::vector<SunTransit> found;
  for (int year = 1972; year <= 2060; ++year)
    for (const SunTransit& t :
         sun_transits(tables_of_year(year), start_of_year(year), start_of_year(year + 1)))
      found.push_back(t);
  std::size_t i = 0;
  double worst = 0;
  std::vector<Row> rows = read_rows();
  std::erase_if(rows, [](const Row& r) { return !r.geocentric; });
  std::sort(rows.begin(), rows.end(),
            [](const Row& a, const Row& b) { return a.greatest < b.greatest; });
  ASSERT_EQ(rows.size(), 14U);
  ASSERT_EQ(found.size(), rows.size());
  for (const Row& row : rows) {
    const SunTransit& t = found[i++];
    EXPECT_EQ(body_name(t.planet), row.planet) << row.label;
    EXPECT_LE(off(t.begins, row.begins), slack_s) << row.label;
    EXPECT_LE(off(t.greatest, row.greatest), slack_s) << row.label;
    EXPECT_LE(off(t.ends, row.ends), slack_s) << row.label;
    EXPECT_NEAR(t.separation.arcseconds(), row.separation, 0.4) << row.label;
    worst = std::max(
        {worst, off(t.begins, row.begins), off(t.greatest, row.greatest), off(t.ends, row.ends)});
  }
  std::cout << "Transits, Earth's centre: largest difference " << worst << " s\n";
}

TEST(SunTransits, ContactsAtSites) {
  double worst = 0;
  int seen = 0, unseen = 0;
  for (const Row& row : read_rows()) {
    if (row.geocentric) continue;
    const int year = year_of_text(row.greatest);
    const YearEphemeris& tables = tables_of_year(year);
    const Ut from = instant_of_text(row.greatest) - Days(2), to = from + Days(4);
    const SiteSky sky(tables, row.observer, from, to);
    const std::vector<SunTransit> transits = sun_transits(tables, from, to);
    ASSERT_EQ(transits.size(), 1U) << row.label;
    const auto site = at_site(sky, transits.front());
    // No row's Sun culminates within 0.1 degree of the limit.
    ASSERT_GT(std::abs(row.highest_sun - sun_rise_altitude.degrees()), 0.1) << row.label;
    ASSERT_EQ(site.has_value(), row.highest_sun > sun_rise_altitude.degrees()) << row.label;
    if (!site) {
      ++unseen;
      continue;
    }
    ++seen;
    const auto compare = [&](Ut at, const std::string& wanted) {
      EXPECT_LE(off(at, wanted), slack_s) << row.label;
      worst = std::max(worst, off(at, wanted));
    };
    compare(site->begins.at, row.begins);
    compare(site->greatest.at, row.greatest);
    compare(site->ends.at, row.ends);
    ASSERT_EQ(site->fully_on.has_value(), !row.fully_on.empty()) << row.label;
    ASSERT_EQ(site->begins_to_leave.has_value(), !row.begins_to_leave.empty()) << row.label;
    if (site->fully_on) {
      compare(*site->fully_on, row.fully_on);
      compare(*site->begins_to_leave, row.begins_to_leave);
    }
    EXPECT_NEAR(site->separation.arcseconds(), row.separation, 0.4) << row.label;
    EXPECT_NEAR(site->greatest.place.altitude.degrees(), row.sun_altitude, 0.03) << row.label;
    EXPECT_EQ(site->greatest.visible, row.sun_altitude > sun_rise_altitude.degrees()) << row.label;
    const std::vector<Event> events = transit_events(*site);
    ASSERT_EQ(events.size(), 3U);
    EXPECT_EQ(event_name(events[0].kind), "transit-begins");
    EXPECT_EQ(event_body(events[2]), row.planet);
    EXPECT_EQ(events[1].value, site->greatest.place.altitude.degrees());
    EXPECT_LT(events[0].at, events[1].at);
    EXPECT_LT(events[1].at, events[2].at);
  }
  std::cout << "Transits at sites: " << seen << " seen, " << unseen
            << " with the Sun down; largest difference " << worst << " s\n";
  EXPECT_GE(seen, 40);
  EXPECT_GE(unseen, 15);
}

// A transit that the Sun's set cuts, one that its rise cuts, and one in a polar night.
TEST(SunTransits, CutByRiseAndSet) {
  struct Case {
    const char* label;
    double latitude, longitude;
    const char* about;
    bool seen, begins, ends;
  };
  // The Sun's altitudes: the reference's rows of these sites.
  for (const Case& c :
       {Case{"ridge 2016, set during it", -0.4, 37.0, "2016-05-09T15:00:00.00Z", true, true, false},
        Case{"ridge 2052, rise during it", -0.4, 37.0, "2052-11-09T02:30:00.00Z", true, false,
             true},
        Case{"far north 2032, polar night", 78.0, 15.6, "2032-11-13T08:54:00.00Z", false, false,
             false},
        Case{"far north 2049, midnight sun", 78.0, 15.6, "2049-05-07T14:24:00.00Z", true, true,
             true}}) {
    const Ut about = instant_of_text(c.about);
    const YearEphemeris& tables = tables_of_year(year_of_text(c.about));
    const SiteSky sky(tables, {Angle::from_degrees(c.latitude), Angle::from_degrees(c.longitude)},
                      about - Days(1), about + Days(1));
    const auto transits = sun_transits(tables, about - Days(1), about + Days(1));
    ASSERT_EQ(transits.size(), 1U) << c.label;
    const auto site = at_site(sky, transits.front());
    ASSERT_EQ(site.has_value(), c.seen) << c.label;
    if (!site) continue;
    EXPECT_EQ(site->begins.visible, c.begins) << c.label;
    EXPECT_EQ(site->ends.visible, c.ends) << c.label;
  }
}

// Geocentric contacts as a space agency's tables print them, from memory; for Venus they hold a
// slightly larger disc than ours (interior contacts 4 s, exterior 5 s apart).
TEST(SunTransits, PublishedFromMemory) {
  struct Case {
    const char *begins, *greatest, *ends;
    double separation;
  };
  for (const Case& c : {Case{"2004-06-08T05:13:29.00Z", "2004-06-08T08:19:44.00Z",
                             "2004-06-08T11:25:59.00Z", 626.9},
                        Case{"2012-06-05T22:09:38.00Z", "2012-06-06T01:29:36.00Z",
                             "2012-06-06T04:49:35.00Z", 554.4},
                        Case{"2016-05-09T11:12:19.00Z", "2016-05-09T14:57:26.00Z",
                             "2016-05-09T18:42:26.00Z", 318.5},
                        Case{"2019-11-11T12:35:27.00Z", "2019-11-11T15:19:48.00Z",
                             "2019-11-11T18:04:14.00Z", 75.9}}) {
    const int year = year_of_text(c.greatest);
    const auto found =
        sun_transits(tables_of_year(year), start_of_year(year), start_of_year(year + 1));
    ASSERT_EQ(found.size(), 1U) << c.greatest;
    EXPECT_LE(off(found[0].begins, c.begins), 8.0) << c.begins;
    EXPECT_LE(off(found[0].greatest, c.greatest), 5.0) << c.greatest;
    EXPECT_LE(off(found[0].ends, c.ends), 8.0) << c.ends;
    EXPECT_NEAR(found[0].separation.arcseconds(), c.separation, 0.5) << c.greatest;
  }
}

// 1937-05-11: Mercury grazed the Sun for the south of Africa and missed it for the north of Europe
// (from memory). The centre's list must hold it all the same.
TEST(SunTransits, MissedByTheCentreSeenInTheSouth) {
  const Ut from = start_of_year(1937), to = start_of_year(1938);
  const YearEphemeris& tables = tables_of_year(1937);
  const auto found = sun_transits(tables, from, to);
  ASSERT_EQ(found.size(), 1U);
  const auto at = [&](double latitude, double longitude) {
    const SiteSky sky(tables, {Angle::from_degrees(latitude), Angle::from_degrees(longitude)},
                      found[0].greatest - Days(1), found[0].greatest + Days(1));
    return at_site(sky, found[0]);
  };
  EXPECT_TRUE(at(-34.0, 18.5).has_value());
  EXPECT_FALSE(at(60.0, 25.0).has_value());
}

// The edge of the strip that sees 1937's graze: a bisection of the latitude ends with a short
// contact on one side and none on the other.
TEST(SunTransits, GrazeByBisection) {
  const YearEphemeris& tables = tables_of_year(1937);
  const auto found = sun_transits(tables, start_of_year(1937), start_of_year(1938));
  ASSERT_EQ(found.size(), 1U);
  const auto length_s = [&](double latitude) {
    const SiteSky sky(tables, {Angle::from_degrees(latitude), Angle::from_degrees(25.0)},
                      found[0].greatest - Days(1), found[0].greatest + Days(1));
    const auto seen = at_site(sky, found[0]);
    return seen ? Seconds(seen->ends.at - seen->begins.at).count() : 0.0;
  };
  double south = -34.0, north = 60.0;
  ASSERT_GT(length_s(south), 600.0);
  ASSERT_EQ(length_s(north), 0.0);
  while (north - south > 1e-9) {
    const double middle = 0.5 * (south + north);
    (length_s(middle) > 0.0 ? south : north) = middle;
  }
  EXPECT_LT(length_s(south), 30.0);
  EXPECT_EQ(length_s(north + 1e-6), 0.0);
}

TEST(SunTransits, NoneInAYearWithout) {
  EXPECT_TRUE(sun_transits(tables_of_year(2027), start_of_year(2027), start_of_year(2028)).empty());
}

// A span's halves hold together what the whole holds, wherever it is cut.
TEST(SunTransits, SpanIsHalfOpen) {
  const YearEphemeris& tables = tables_of_year(2019);
  const Ut from = start_of_year(2019), to = start_of_year(2020);
  const auto whole = sun_transits(tables, from, to);
  ASSERT_EQ(whole.size(), 1U);
  const Days hour(1.0 / 24.0);
  for (int k = -30; k <= 30; ++k) {
    const Ut cut = whole[0].greatest + hour * (k + 0.5);
    EXPECT_EQ(sun_transits(tables, from, cut).size() + sun_transits(tables, cut, to).size(), 1U)
        << k;
  }
}

}  // namespace
}  // namespace duskleaf
