// Seasons, phases and apsides against published tables: tests/reference/seasons.csv,
// moon_phases.csv, apsides.csv, each of which names its sources.
#include <gtest/gtest.h>
#include <map>
#include <memory>

#include "events/events.hpp"
#include "published.hpp"

namespace duskleaf {
namespace {

const std::map<std::string, EventKind, std::less<>> kinds = {
    {"March equinox", EventKind::march_equinox},
    {"June solstice", EventKind::june_solstice},
    {"September equinox", EventKind::september_equinox},
    {"December solstice", EventKind::december_solstice},
    {"New Moon", EventKind::new_moon},
    {"First Quarter", EventKind::first_quarter},
    {"Full Moon", EventKind::full_moon},
    {"Last Quarter", EventKind::last_quarter},
    {"Perihelion", EventKind::perihelion},
    {"Aphelion", EventKind::aphelion},
    {"Perigee", EventKind::perigee},
    {"Apogee", EventKind::apogee}};

// One year's ephemeris and events at a time, as the tables are in order of time.
const std::vector<Event>& events_of(int year) {
  static std::map<int, std::vector<Event>> made;
  const auto found = made.find(year);
  if (found != made.end()) return found->second;
  const Ut from = ut_midnight(make_date(year, 1, 1)) - Days(2),
           to = ut_midnight(make_date(year + 1, 1, 1)) + Days(2);
  const YearEphemeris ephemeris(to_tt(from - Days(2)), to_tt(to + Days(2)));
  return made[year] = global_events(ephemeris, from, to);
}

struct Difference {
  double seconds;  // ours minus the table's
  double value;    // of our event
};
Difference compare(std::string_view event, std::string_view instant, bool in_tt) {
  const EventKind kind = kinds.find(event)->second;
  const double day = table_day(instant);
  Difference best{1e9, 0};
  for (const Event& e : events_of(static_cast<int>(parse_number(instant.substr(0, 4))))) {
    if (e.kind != kind) continue;
    const double seconds = ((in_tt ? to_tt(e.at).days() : e.at.days()) - day) * 86400;
    if (std::abs(seconds) < std::abs(best.seconds)) best = {seconds, e.value.value_or(0)};
  }
  return best;
}

// Tables rounded to a minute: 30 s, and what a table made years ahead lacks in TT - UT: some 3 s by
// 2010. From 2020 on the tables rest on predictions of TT - UT made at the time, up to 10 s too
// large for 2030 and 25 s for 2050 (the prediction of Espenak & Meeus 2006 gives 93 s for 2050,
// where this project holds 69.2 s).
double minute_tolerance(std::string_view instant) {
  const double year = parse_number(instant.substr(0, 4));
  return 31.0 + (year < 2020 ? 0.3 * std::max(0.0, year - 2000) : 6.0 + 0.75 * (year - 2020));
}

TEST(PublishedSeasons, AgreeWithinTheirRounding) {
  const std::string text = reference_text("seasons.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 244u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto event = table.cell(r, table.column("event")),
               instant = table.cell(r, table.column("instant"));
    const bool tt = table.cell(r, table.column("time_scale")) == "TD";
    // Meeus gives seconds from the complete VSOP87 theory, whose Sun is good to some 0.05 arcsecond
    // (24 s each arcsecond).
    const double tolerance = tt ? 2.0 : minute_tolerance(instant);
    EXPECT_LE(std::abs(compare(event, instant, tt).seconds), tolerance)
        << event << ' ' << instant << ' ' << compare(event, instant, tt).seconds;
  }
}

TEST(PublishedPhases, AgreeWithinTheirRounding) {
  const std::string text = reference_text("moon_phases.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 303u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto event = table.cell(r, table.column("phase")),
               instant = table.cell(r, table.column("instant"));
    const auto source = table.cell(r, table.column("source_id"));
    const bool tt = table.cell(r, table.column("time_scale")) == "TD";
    // Meeus's examples follow his shortened series (up to 17 s off by his own statement);
    // Aslaksen's seconds are up to 10.3 s from the DE431 ephemeris too (1990-10-18), so they cannot
    // hold more than that.
    const double tolerance = tt ? 17.0 : source == "Aslaksen" ? 11.0 : minute_tolerance(instant);
    EXPECT_LE(std::abs(compare(event, instant, tt).seconds), tolerance)
        << event << ' ' << instant << ' ' << compare(event, instant, tt).seconds;
  }
}

TEST(PublishedApsides, AgreeWithinTheirRounding) {
  const std::string text = reference_text("apsides.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 432u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto event = table.cell(r, table.column("event")),
               instant = table.cell(r, table.column("instant"));
    const bool moon = table.cell(r, table.column("body")) == "Moon";
    const bool tt = table.cell(r, table.column("time_scale")) == "TD";
    const Difference d = compare(event, instant, tt);
    // The Earth's instants are rounded to a minute (Meeus's to 0.01 h). The Moon's table follows a
    // shortened theory: it gives distances some kilometres from the DE431 ephemeris and, as the
    // distance hardly changes near an apsis, instants up to half an hour from it (2021-02-03: 1,811
    // s; this project's instant is within 1 s of DE431 there).
    EXPECT_LE(std::abs(d.seconds), moon ? 2000.0 : 240.0)
        << event << ' ' << instant << ' ' << d.seconds;
    const double tolerance = moon ? 11.0 : tt ? 1.01e-6 : 1.5e-7;
    EXPECT_NEAR(d.value, table.number(r, table.column("distance")), tolerance)
        << event << ' ' << instant;
  }
}

TEST(GlobalEvents, AYearHasAllOfThemInOrder) {
  const std::vector<Event>& events = events_of(2027);
  std::map<EventKind, int> count;
  for (std::size_t i = 0; i < events.size(); ++i) {
    if (i > 0) {
      EXPECT_LE(events[i - 1].at, events[i].at);
    }
    ++count[events[i].kind];
  }
  // 369 days: 12 or 13 of each phase and apsis; each season and apsis of the Earth once, perihelion
  // at most twice.
  for (EventKind kind : {EventKind::new_moon, EventKind::first_quarter, EventKind::full_moon,
                         EventKind::last_quarter})
    EXPECT_TRUE(count[kind] == 12 || count[kind] == 13) << event_name(kind);
  for (EventKind kind : {EventKind::perigee, EventKind::apogee})
    EXPECT_TRUE(count[kind] == 13 || count[kind] == 14) << event_name(kind);
  for (EventKind kind :
       {EventKind::march_equinox, EventKind::june_solstice, EventKind::september_equinox,
        EventKind::december_solstice, EventKind::perihelion, EventKind::aphelion})
    EXPECT_EQ(count[kind], 1) << event_name(kind);
}

TEST(EventNames, AreTheTablesSpelling) {
  EXPECT_EQ(event_name(EventKind::civil_dawn), "civil-dawn");
  EXPECT_EQ(event_name(EventKind::clock_change), "clock-change");
  EXPECT_EQ(event_body({EventKind::march_equinox, Body::sun, Ut(), {}}), "earth");
  EXPECT_EQ(event_body({EventKind::clock_change, Body::sun, Ut(), {}}), "site");
  EXPECT_EQ(event_body({EventKind::perigee, Body::moon, Ut(), {}}), "moon");
  EXPECT_EQ(event_unit(EventKind::perigee), "km");
  EXPECT_EQ(event_unit(EventKind::aphelion), "au");
  EXPECT_EQ(event_unit(EventKind::clock_change), "h");
  EXPECT_EQ(event_unit(EventKind::sunset), "");
}

}  // namespace
}  // namespace duskleaf
