// A planet's month in sentences, from windows made for the test and from a year of real ones. What
// each should say follows from the window given (this project's own rules, sheet/planet_words.cpp).
#include "sheet/planet_words.hpp"

#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <regex>

#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {
namespace {

Horizontal at(double altitude, double azimuth) {
  return {Angle::from_degrees(altitude), Angle::from_degrees(azimuth)};
}

/// A clock reading of the night of 2027 March 15, hours after midnight UT (from 12 to 36).
Ut clock(double hours) { return ut_midnight(make_date(2027, 3, 15)) + Days(hours / 24); }

PlanetWindow window(double from, WindowEdge begins, double to, WindowEdge ends) {
  PlanetWindow w{};
  w.date = make_date(2027, 3, 15);
  w.from = w.best = clock(from);
  w.to = clock(to);
  w.begins = begins;
  w.ends = ends;
  w.at_from = w.at_best = at(35, 225);
  w.at_to = at(5, 270);
  w.sunset = clock(18);
  w.sunrise = clock(30);
  return w;
}

PlanetMonth month(PlanetSight sight, const std::optional<PlanetWindow>& evening,
                  const std::optional<PlanetWindow>& morning = {}) {
  PlanetMonth p{};
  p.planet = Body::venus;
  p.best_date = make_date(2027, 3, 15);
  p.sight = sight;
  p.evening_window = evening;
  p.morning_window = morning;
  if (evening) {
    p.first_evening = make_date(2027, 3, 1);
    p.last_evening = make_date(2027, 3, 31);
  }
  if (morning) {
    p.first_morning = make_date(2027, 3, 1);
    p.last_morning = make_date(2027, 3, 31);
  }
  return p;
}

std::string told(const PlanetMonth& p) {
  static const Words words("en");
  return planet_sentence(words, Zone::utc(), p);
}

constexpr WindowEdge height = WindowEdge::height, twilight = WindowEdge::twilight,
                     open = WindowEdge::open;

TEST(PlanetWords, LowInTheWestAfterSunset) {
  PlanetWindow w = window(18.5, twilight, 19.05, height);
  w.at_from = w.at_best = at(12, 272);
  PlanetMonth p = month(PlanetSight::evening, w);
  EXPECT_EQ(told(p), "Low in the west for an hour after sunset.");
  p.last_evening = make_date(2027, 3, 20);
  EXPECT_EQ(told(p), "Low in the west for an hour after sunset, until the 20th.");
  p.first_evening = make_date(2027, 3, 3);
  EXPECT_EQ(told(p), "Low in the west for an hour after sunset, 3rd to 20th.");
  p.last_evening = p.first_evening;
  EXPECT_EQ(told(p), "Low in the west for an hour after sunset, on the 3rd.");
  p.last_evening = make_date(2027, 3, 31);
  EXPECT_EQ(told(p), "Low in the west for an hour after sunset, from the 3rd.");
}

TEST(PlanetWords, FromNightfallUntilItSets) {
  PlanetWindow w = window(18.5, twilight, 23.2, height);
  w.sets = clock(23 + 40.0 / 60);
  w.at_from = at(61, 180);
  EXPECT_EQ(told(month(PlanetSight::evening, w)), "High in the south at nightfall, sets 23:40.");
  w.highest = clock(21);
  w.at_highest = at(40, 180);
  w.at_from = at(35, 100);
  EXPECT_EQ(told(month(PlanetSight::evening, w)),
            "Halfway up in the east at nightfall, highest 21:00.");
  w.at_from = at(80, 100);
  EXPECT_EQ(told(month(PlanetSight::evening, w)), "Nearly overhead at nightfall, highest 21:00.");
}

TEST(PlanetWords, Mornings) {
  PlanetWindow w = window(28.7, height, 29.5, twilight);
  w.at_best = at(10, 120);
  PlanetMonth p = month(PlanetSight::morning, {}, w);
  EXPECT_EQ(told(p), "Low in the south-east for 1¼\u00A0hours before sunrise.");
  w = window(26.25, height, 29.5, twilight);
  w.at_from = at(5, 95);
  w.at_to = at(61, 170);
  p.morning_window = w;
  EXPECT_EQ(told(p), "In the east from 02:15, high in the south by dawn.");
  p.first_morning = make_date(2027, 3, 22);
  EXPECT_EQ(told(p), "In the east from 02:15, high in the south by dawn, from the 22nd.");
}

TEST(PlanetWords, FromEveningToMorningIsOneSentence) {
  PlanetWindow w = window(21, height, 29.5, twilight);
  w.at_from = at(5, 90);
  w.highest = clock(26.5);
  w.at_highest = at(40, 180);
  PlanetMonth p = month(PlanetSight::evening_and_morning, w, w);
  // An evening sight from the 8th alone, but a morning sight all month.
  p.first_evening = make_date(2027, 3, 8);
  EXPECT_EQ(told(p), "In the east from 21:00, highest 02:30.");
  w.begins = twilight;
  p = month(PlanetSight::all_night, w, w);
  EXPECT_EQ(told(p), "All night, highest 02:30, halfway up in the south.");
  w.highest.reset();
  w.at_highest.reset();
  EXPECT_EQ(told(month(PlanetSight::all_night, w, w)),
            "All night, at best halfway up in the south-west.");
}

TEST(PlanetWords, TwoWindowsAreTwoShortSentences) {
  PlanetWindow evening = window(18.5, twilight, 19, height),
               morning = window(29, height, 29.6, twilight);
  evening.at_best = at(9, 270);
  morning.at_best = at(9, 90);
  evening.date = make_date(2027, 3, 8);
  morning.date = make_date(2027, 3, 25);
  evening.from = evening.from - Days(7);
  evening.to = evening.to - Days(7);
  morning.from = morning.from + Days(10);
  morning.to = morning.to + Days(10);
  PlanetMonth p = month(PlanetSight::evening, evening, morning);
  p.last_evening = evening.date;
  p.first_morning = morning.date;
  EXPECT_EQ(told(p),
            "Low in the west after sunset, until the 8th. Low in the east before sunrise, from the "
            "25th.");
}

// Where the Sun stays down nothing is said of dusk, dawn or sunset.
TEST(PlanetWords, ThePolarNightGoesByTheClock) {
  PlanetWindow w = window(13.5, height, 25, height);
  w.sunset.reset();
  w.sunrise.reset();
  w.highest = clock(19.25);
  w.at_highest = at(18, 180);
  EXPECT_EQ(told(month(PlanetSight::evening, w)),
            "13:30 to 01:00, highest 19:15, fairly low in the south.");
  w.highest.reset();
  w.at_highest.reset();
  EXPECT_EQ(told(month(PlanetSight::evening, w)), "Halfway up in the south-west, 13:30 to 01:00.");
  w.begins = w.ends = open;
  EXPECT_EQ(told(month(PlanetSight::all_night, w, w)),
            "All night, at best halfway up in the south-west.");
  // What the cut at noon parts from the next night's stretch is not told apart.
  const PlanetWindow rest = window(35.5, height, 36, open);
  w.begins = w.ends = height;
  EXPECT_EQ(told(month(PlanetSight::evening, w, rest)),
            "Halfway up in the south-west, 13:30 to 01:00.");
}

TEST(PlanetWords, WhatIsNotSeenAndWhatBinocularsShow) {
  PlanetMonth p = month(PlanetSight::not_visible, {});
  p.darkest_sun = Angle::from_degrees(-11);
  p.elongation = Angle::from_degrees(-12);
  EXPECT_EQ(told(p), "Not seen this month: too near the Sun.");
  p.elongation = Angle::from_degrees(60);
  EXPECT_EQ(told(p), "Not seen this month: never high enough while it is dark.");
  // Binoculars need a darker sky than the eye needs for the bright planets.
  p.optics_only = true;
  EXPECT_EQ(told(p), "Not seen this month: the nights are too bright.");
  p.optics_only = false;
  p.darkest_sun = Angle::from_degrees(2);
  EXPECT_EQ(told(p), "Not seen this month: the nights are too bright.");
  p = month(PlanetSight::evening, window(19.5, twilight, 20.0, height));
  p.optics_only = true;
  EXPECT_EQ(told(p), "Halfway up in the south-west for two hours after sunset (binoculars).");
}

// A year at places from pole to equator: whole sentences, every word found, and rarely a long one.
TEST(PlanetWords, AYearOfManyPlaces) {
  const Span span{2027, 1};
  const YearEphemeris ephemeris(ephemeris_span(span).first, ephemeris_span(span).second);
  const std::regex shape("([A-Z0-9][^.{}]*\\.)( [A-Z0-9][^.{}]*\\.)?");
  int sentences = 0, longer = 0;
  for (double latitude : {85.0, 69.6, 52.0, 20.0, 0.0, -43.0, -78.0}) {
    Place place;
    place.observer = {Angle::from_degrees(latitude), Angle(), 0.0};
    for (ChartHour& hour : place.chart_hours) hour.after_midnight = std::chrono::minutes(21 * 60);
    const SiteYear year = make_site_year(ephemeris, place, span, {false});
    for (int index = 0; index < 12; ++index)
      for (const PlanetMonth& p : planet_month(ephemeris, year, index)) {
        const std::string text = told(p);
        EXPECT_TRUE(std::regex_match(text, shape)) << latitude << ": " << text;
        EXPECT_LE(text.size(), 120u) << text;
        ++sentences;
        longer += text.size() > 75;
      }
  }
  EXPECT_EQ(sentences, 7 * 12 * 7);
  EXPECT_LT(longer, sentences / 10);
}

}  // namespace
}  // namespace duskleaf
