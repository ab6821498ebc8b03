// Rise and set of Sun and Moon, and twilights, against published tables:
// tests/reference/riseset_usno.csv, twilight.csv.
#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>
#include <map>
#include <tuple>

#include "events/events.hpp"
#include "events/site_sky.hpp"
#include "published.hpp"

namespace duskleaf {
namespace {

Ut at(double day) { return Ut(Days(day)); }

// The rows of one place, body and year.
struct Page {
  struct Row {
    double day;
    bool rise;
  };
  std::vector<Row> rows;
};

TEST(PublishedRiseAndSet, AgreeWithinTheirRounding) {
  const std::string text = reference_text("riseset_usno.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 3419u);
  std::map<std::tuple<std::string, double, double, int>, Page> pages;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto instant = table.cell(r, table.column("instant_ut"));
    pages[{std::string(table.cell(r, table.column("body"))), table.number(r, table.column("lat")),
           table.number(r, table.column("lon")),
           static_cast<int>(parse_number(instant.substr(0, 4)))}]
        .rows.push_back({table_day(instant), table.cell(r, table.column("event")) == "rise"});
  }
  ASSERT_EQ(pages.size(), 10u);
  for (const auto& [key, page] : pages) {
    const auto& [body_text, latitude, longitude, year] = key;
    const Body body = body_text == "Sun" ? Body::sun : Body::moon;
    const Observer observer{Angle::from_degrees(latitude), Angle::from_degrees(longitude), 0};
    const Ut from = ut_midnight(make_date(year, 1, 1)), to = ut_midnight(make_date(year + 1, 1, 1));
    const YearEphemeris ephemeris(to_tt(from - Days(2)), to_tt(to + Days(2)));
    const auto events = site_events(ephemeris, observer, from - Days(1), to + Days(1));
    const SiteSky sky(ephemeris, observer, from - Days(1), to + Days(1));
    // The published minute is rounded, so the body passes its limit within 30 s of it. Besides,
    // altitudes may differ by a hundredth of a degree: UT1 and UTC differ by up to 0.9 s, the table
    // of the Sun was computed to about that, and years ahead (2034, 2037, 2050) with a TT - UT some
    // 10 to 25 s larger, in which the Moon moves up to 14 arcseconds.
    std::vector<int> used(events.size(), 0);
    for (const Page::Row& row : page.rows) {
      const EventKind kind = body == Body::sun
                                 ? (row.rise ? EventKind::sunrise : EventKind::sunset)
                                 : (row.rise ? EventKind::moonrise : EventKind::moonset);
      double nearest = 1e9;
      std::size_t which = 0;
      for (std::size_t i = 0; i < events.size(); ++i)
        if (events[i].kind == kind && std::abs(events[i].at.days() - row.day) < std::abs(nearest)) {
          nearest = events[i].at.days() - row.day;
          which = i;
        }
      const double seconds = std::abs(nearest) * 86400;
      const auto excess = [&](double offset_seconds) {
        const Ut t = at(row.day + offset_seconds / 86400);
        return body == Body::sun
                   ? sky.altitude(Body::sun, t).degrees() - sun_rise_altitude.degrees()
                   : Angle::from_radians(SiteSky::moon_excess(sky.sight(Body::moon, t))).degrees();
      };
      const auto [low, high] = std::minmax({excess(-30), excess(0), excess(30)});
      EXPECT_TRUE(seconds < 900 && low < 0.01 && high > -0.01)
          << body_text << ' ' << latitude << ' ' << longitude << ' '
          << Zone::utc().civil(at(row.day)).iso() << (row.rise ? " rise " : " set ")
          << nearest * 86400 << " s, altitude " << low << " to " << high;
      if (seconds < 900) ++used[which];
    }
    // None missing from the tables, none too many, from their first row to their last.
    for (std::size_t i = 0; i < events.size(); ++i) {
      const EventKind k = events[i].kind;
      const bool ours = body == Body::sun ? k == EventKind::sunrise || k == EventKind::sunset
                                          : k == EventKind::moonrise || k == EventKind::moonset;
      if (!ours || events[i].at.days() < page.rows.front().day - 0.001 ||
          events[i].at.days() > page.rows.back().day + 0.001)
        continue;
      EXPECT_EQ(used[i], 1) << body_text << ' ' << latitude << ' ' << longitude << ' '
                            << Zone::utc().civil(events[i].at).iso() << ' ' << event_name(k);
    }
  }
}

TEST(PublishedTwilight, AgreesWithinItsRounding) {
  const std::string text = reference_text("twilight.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 6u);
  const std::pair<const char*, EventKind> columns[] = {
      {"astronomical_dawn", EventKind::astronomical_dawn},
      {"nautical_dawn", EventKind::nautical_dawn},
      {"civil_dawn", EventKind::civil_dawn},
      {"civil_dusk", EventKind::civil_dusk},
      {"nautical_dusk", EventKind::nautical_dusk},
      {"astronomical_dusk", EventKind::astronomical_dusk}};
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const Observer observer{Angle::from_degrees(table.number(r, 0)),
                            Angle::from_degrees(table.number(r, 1)), 0};
    const Ut start = at(table_day(table.cell(r, table.column("search_start_ut"))));
    const YearEphemeris ephemeris(to_tt(start - Days(1)), to_tt(start + Days(2)));
    const auto events = site_events(ephemeris, observer, start, start + Days(1));
    for (const auto& [column, kind] : columns) {
      const auto found = std::find_if(events.begin(), events.end(),
                                      [&](const Event& e) { return e.kind == kind; });
      ASSERT_NE(found, events.end()) << column << " row " << r;
      // Second-hand, its calculator unnamed: its times are cut to the minute (one is rounded up),
      // so they hold to a minute.
      const double seconds =
          (found->at.days() - table_day(table.cell(r, table.column(column)))) * 86400;
      EXPECT_LE(std::abs(seconds), 60.0) << column << " row " << r;
    }
  }
}

}  // namespace
}  // namespace duskleaf
