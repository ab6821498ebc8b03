// What follows from the project's conventions for a night: no outside values but facts of the
// time-zone data and geometry.
#include "almanac/nights.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>

#include "almanac/time_spans.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

constexpr double hour = 1.0 / 24;

TEST(Night, AnOrdinaryOneHasItsInstantsInOrder) {
  const SiteYear year = year_of_site(test_place(40.0, -3.7, "Europe/Madrid"), 2027);
  ASSERT_EQ(year.nights.size(), 365u);
  for (const Night& n : year.nights) {
    ASSERT_TRUE(n.sunset && n.civil_dusk && n.nautical_dusk && n.astronomical_dusk &&
                n.astronomical_dawn && n.nautical_dawn && n.civil_dawn && n.sunrise)
        << iso_date(n.date);
    const Ut order[] = {n.from,
                        *n.sunset,
                        *n.civil_dusk,
                        *n.nautical_dusk,
                        *n.astronomical_dusk,
                        n.darkest,
                        *n.astronomical_dawn,
                        *n.nautical_dawn,
                        *n.civil_dawn,
                        *n.sunrise,
                        n.to};
    EXPECT_TRUE(std::is_sorted(std::begin(order), std::end(order))) << iso_date(n.date);
    EXPECT_EQ(n.sun, Presence::rises_or_sets);
    ASSERT_EQ(n.sun_down.size(), 1u);
    EXPECT_EQ(n.sun_down[0].from, *n.sunset);
    EXPECT_EQ(n.sun_down[0].to, *n.sunrise);
    EXPECT_DOUBLE_EQ(n.dark_limit.degrees(), -18);
    // Dark is what the Moon leaves of the time below -18 degrees.
    double dark = 0;
    for (const TimeSpan& s : n.dark) {
      EXPECT_LT(s.from, s.to);
      EXPECT_GE(s.from, *n.astronomical_dusk);
      EXPECT_LE(s.to, *n.astronomical_dawn);
      dark += (s.to - s.from).count();
    }
    if (n.moon == Presence::up_throughout) {
      EXPECT_EQ(dark, 0) << iso_date(n.date);
    }
    if (n.moon == Presence::down_throughout) {
      EXPECT_NEAR(dark, (*n.astronomical_dawn - *n.astronomical_dusk).count(), 1e-9)
          << iso_date(n.date);
    }
  }
}

TEST(Night, TheMoonAtItsStartIsWhereItsNextInstantSays) {
  const SiteYear year = year_of_site(test_place(-36.0, 146.9, "Australia/Melbourne"), 2027);
  for (std::size_t i = 0; i < year.nights.size(); ++i) {
    const Night& n = year.nights[i];
    const auto next = std::find_if(year.local.begin(), year.local.end(), [&](const Event& e) {
      return e.at >= n.from && (e.kind == EventKind::moonrise || e.kind == EventKind::moonset);
    });
    ASSERT_NE(next, year.local.end());
    EXPECT_EQ(n.moon_up_at_start, next->kind == EventKind::moonset) << iso_date(n.date);
    const auto at_dusk = std::find_if(year.local.begin(), year.local.end(), [&](const Event& e) {
      return e.at >= *n.sunset && (e.kind == EventKind::moonrise || e.kind == EventKind::moonset);
    });
    EXPECT_EQ(n.moon_up_at_dusk, at_dusk->kind == EventKind::moonset) << iso_date(n.date);
  }
}

TEST(Night, FullMoonIsUpAllNightAndNewMoonDown) {
  const SiteYear year = year_of_site(test_place(10.0, 0.0, "UTC"), 2027);
  for (const Event& e : year.global) {
    if (e.kind != EventKind::full_moon && e.kind != EventKind::new_moon) continue;
    for (const Night& n : year.nights)
      if (n.from <= e.at && e.at < n.to) {
        EXPECT_NEAR(n.moon_lit, e.kind == EventKind::full_moon ? 1.0 : 0.0, 0.005)
            << iso_date(n.date);
        // At new Moon some minutes after sunset or before sunrise may remain.
        const double dark = length(n.dark).count() * 24;
        EXPECT_EQ(dark < 0.5, e.kind == EventKind::full_moon) << iso_date(n.date) << ' ' << dark;
        EXPECT_EQ(dark > 8.5, e.kind == EventKind::new_moon) << iso_date(n.date) << ' ' << dark;
      }
  }
}

TEST(Night, TwilightAllNightInHighSummer) {
  const SiteYear year = year_of_site(test_place(54.18, -4.62, "Europe/London"), 2027);
  const Night& june = night_of(year, 2027, 6, 21);
  EXPECT_TRUE(has_note(june, "no-astronomical-dark"));
  EXPECT_FALSE(has_note(june, "no-nautical-dark"));
  EXPECT_FALSE(june.astronomical_dusk || june.astronomical_dawn);
  EXPECT_TRUE(june.nautical_dusk && june.nautical_dawn);
  EXPECT_TRUE(june.dark.empty());
  // Lower culmination: latitude + declination - 90 degrees.
  EXPECT_NEAR(june.darkest_sun_altitude.degrees(), 54.18 + 23.434 - 90, 0.02);
  // None of June's nights reaches -18, so its ranking goes by -12; August's reach it.
  EXPECT_NEAR(june.dark_limit.degrees(), -12, 1e-9);
  const Night& new_moon = night_of(year, 2027, 6, 4);
  EXPECT_TRUE(new_moon.dark.empty());
  ASSERT_EQ(new_moon.dark_or_darkest.size(), 1u);
  EXPECT_EQ(new_moon.dark_or_darkest[0].from, *new_moon.nautical_dusk);
  EXPECT_EQ(new_moon.dark_or_darkest[0].to, *new_moon.nautical_dawn);
  EXPECT_NEAR(night_of(year, 2027, 8, 1).dark_limit.degrees(), -18, 1e-9);
  // Without -12 it goes by -6; above the polar circle there is not even that.
  const SiteYear north = year_of_site(test_place(60.2, 24.9, "Europe/Helsinki"), 2027);
  EXPECT_NEAR(night_of(north, 2027, 6, 10).dark_limit.degrees(), -6, 1e-9);
  EXPECT_TRUE(has_note(night_of(north, 2027, 6, 21), "no-nautical-dark"));
  const SiteYear between = year_of_site(test_place(61.5, 23.8, "Europe/Helsinki"), 2027);
  EXPECT_TRUE(has_note(night_of(between, 2027, 6, 21), "no-civil-dark"));
}

TEST(Night, PolarDayAndPolarNight) {
  const SiteYear year = year_of_site(test_place(78.2, 15.6, "Arctic/Longyearbyen"), 2027);
  const Night& june = night_of(year, 2027, 6, 15);
  EXPECT_EQ(june.sun, Presence::up_throughout);
  EXPECT_TRUE(june.sun_down.empty());
  EXPECT_TRUE(has_note(june, "sun-up-all-night"));
  EXPECT_FALSE(has_note(june, "no-civil-dark"));
  EXPECT_TRUE(june.dark_or_darkest.empty());
  EXPECT_FALSE(june.sunset || june.sunrise || june.civil_dusk);
  const Night& december = night_of(year, 2027, 12, 15);
  EXPECT_EQ(december.sun, Presence::down_throughout);
  EXPECT_TRUE(has_note(december, "sun-down-all-day"));
  ASSERT_EQ(december.sun_down.size(), 1u);
  EXPECT_NEAR((december.sun_down[0].to - december.sun_down[0].from).count(), 1.0, 1e-9);
  // The polar night is dark (-18) for some hours, and the Moon can be up or down for whole days.
  EXPECT_TRUE(december.astronomical_dusk && december.astronomical_dawn);
  const auto all = [&](Presence p) {
    return std::any_of(year.nights.begin(), year.nights.end(), [&](const Night& n) {
      return n.moon == p && n.moonrises.empty() && n.moonsets.empty() &&
             n.sun == Presence::down_throughout;
    });
  };
  EXPECT_TRUE(all(Presence::up_throughout));
  EXPECT_TRUE(all(Presence::down_throughout));
}

TEST(Night, AtThePole) {
  const SiteYear year = year_of_site(test_place(-90.0, 0.0, "UTC"), 2027);
  int sets = 0, rises = 0;
  for (const Night& n : year.nights) {
    sets += n.sunset.has_value();
    rises += n.sunrise.has_value();
  }
  EXPECT_EQ(sets, 1);
  EXPECT_EQ(rises, 1);
  EXPECT_NEAR(night_of(year, 2027, 6, 21).darkest_sun_altitude.degrees(), -23.43, 0.02);
  EXPECT_TRUE(has_note(night_of(year, 2027, 1, 1), "sun-up-all-night"));
  // While the Sun sinks it is lowest at a night's end.
  const Night& sinking = night_of(year, 2027, 3, 30);
  EXPECT_NEAR((sinking.darkest - sinking.to).count(), 0, 1e-6);
}

TEST(Night, DarkestIsLowestOfItsDay) {
  for (double latitude : {89.9, 71.0, 45.0, 0.0, -23.0, -66.5, -89.5}) {
    const SiteYear year = year_of_site(test_place(latitude, 20.0, "Africa/Cairo"), 2027);
    const SiteSky sky(ephemeris_of({2027, 1}), year.place.observer, year.nights.front().from,
                      year.nights.back().to);
    for (std::size_t i = 0; i < year.nights.size(); i += 13) {
      const Night& n = year.nights[i];
      double lowest = 1;
      for (Ut t = n.from; t <= n.to; t = t + Days(hour / 12))
        lowest = std::min(lowest, sky.sight(Body::sun, t).altitude);
      EXPECT_LE(sin(n.darkest_sun_altitude), lowest + 2e-7) << latitude << ' ' << iso_date(n.date);
      EXPECT_GE(n.darkest, n.from);
      EXPECT_LE(n.darkest, n.to);
    }
  }
}

// tz database: Samoa crossed the date line at the end of 2011-12-29, skipping the 30th; Kiribati's
// Line Islands skipped 1994-12-31; Lord Howe shifts by half an hour; London changes clocks on
// 2027-03-28 and 2027-10-31.
TEST(Night, ASkippedDateHasAnEmptyNightAndTheOneBeforeGoesOn) {
  const SiteYear year = year_of_site(test_place(-13.83, -171.77, "Pacific/Apia"), 2011);
  const Night &before = night_of(year, 2011, 12, 29), &skipped = night_of(year, 2011, 12, 30),
              &after = night_of(year, 2011, 12, 31);
  EXPECT_NEAR((before.to - before.from).count(), 1.0, 1e-9);
  EXPECT_TRUE(before.sunset && before.sunrise);
  EXPECT_TRUE(has_note(before, "clock-change"));
  EXPECT_EQ(skipped.from, skipped.to);
  EXPECT_TRUE(skipped.events.empty() && skipped.dark.empty());
  EXPECT_EQ(skipped.notes, std::vector<std::string>{"short-date"});
  EXPECT_EQ(before.to, after.from);
  EXPECT_NEAR((after.to - after.from).count(), 1.0, 1e-9);
  const SiteYear islands = year_of_site(test_place(1.87, -157.4, "Pacific/Kiritimati"), 1994);
  EXPECT_TRUE(has_note(night_of(islands, 1994, 12, 31), "short-date"));
}

TEST(Night, ClockChangesMakeLongAndShortNights) {
  struct Row {
    const char* zone;
    double latitude, longitude;
    int month, day;
    double hours;
  };
  for (const Row& row :
       {Row{"Europe/London", 51.5, 0, 3, 27, 23}, Row{"Europe/London", 51.5, 0, 10, 30, 25},
        Row{"Australia/Lord_Howe", -31.5, 159, 4, 3, 24.5},
        Row{"Australia/Lord_Howe", -31.5, 159, 10, 2, 23.5}}) {
    const SiteYear year = year_of_site(test_place(row.latitude, row.longitude, row.zone), 2027);
    const Night& night = night_of(year, 2027, row.month, row.day);
    EXPECT_NEAR((night.to - night.from).count() * 24, row.hours, 1e-6)
        << row.zone << ' ' << row.month;
    EXPECT_TRUE(has_note(night, "clock-change")) << row.zone << ' ' << row.month;
    EXPECT_EQ(std::count_if(year.nights.begin(), year.nights.end(),
                            [](const Night& n) { return has_note(n, "clock-change"); }),
              2);
  }
}

TEST(Night, NightsFollowOneAnotherAndShareAllInstants) {
  for (const char* zone :
       {"Europe/London", "Pacific/Apia", "Asia/Kathmandu", "Pacific/Kiritimati"}) {
    const SiteYear year = year_of_site(test_place(-13.83, -171.77, zone), 2011);
    std::size_t instants = 0;
    for (std::size_t i = 0; i < year.nights.size(); ++i) {
      if (i > 0) {
        EXPECT_EQ(year.nights[i - 1].to, year.nights[i].from) << zone << ' ' << i;
      }
      instants += year.nights[i].events.size();
    }
    const auto inside = [&](const Event& e) {
      return year.nights.front().from <= e.at && e.at < year.nights.back().to;
    };
    EXPECT_EQ(instants, static_cast<std::size_t>(
                            std::count_if(year.local.begin(), year.local.end(), inside) +
                            std::count_if(year.global.begin(), year.global.end(), inside)));
  }
}

TEST(Night, MoonriseCountsSayTwoOrNone) {
  // Beyond 61.5 degrees the Moon can rise earlier from day to day, and so twice in 24 hours.
  const SiteYear year = year_of_site(test_place(65.0, 25.5, "Europe/Helsinki"), 2025);
  int none = 0, two = 0;
  for (const Night& n : year.nights) {
    EXPECT_EQ(has_note(n, "no-moonrise"), n.moonrises.empty());
    EXPECT_EQ(has_note(n, "two-moonrises"), n.moonrises.size() == 2);
    EXPECT_EQ(has_note(n, "no-moonset"), n.moonsets.empty());
    EXPECT_EQ(has_note(n, "two-moonsets"), n.moonsets.size() == 2);
    none += n.moonrises.empty();
    two += n.moonrises.size() == 2;
  }
  EXPECT_GE(none, 12);
  EXPECT_GE(two, 1);
}

TEST(NightSpan, ALeapDayIsANightLikeOthers) {
  const SiteYear year = year_of_site(test_place(40.0, 0.0, "Europe/Madrid"), 2028);
  EXPECT_EQ(year.nights.size(), 366u);
  EXPECT_EQ(iso_date(night_of(year, 2028, 2, 29).date), "2028-02-29");
  EXPECT_TRUE(night_of(year, 2028, 2, 29).sunset);
  EXPECT_EQ(year.days.size(), 366u);
}

// A session that begins in daylight was printed without a word of it.
TEST(SunsetAfter, OnlyWhereTheSessionBeginsBeforeIt) {
  const SiteYear year = year_of_site(test_place(52.0, -0.5, "Europe/London"), 2027);
  const Date june = make_date(2027, 6, 15);
  const Ut sunset = night_of(year, 2027, 6, 15).sunset.value();
  const CivilMinute clock = year.place.zone.civil(sunset);
  const auto minute = std::chrono::hours(clock.hour()) + std::chrono::minutes(clock.minute());
  using std::chrono::hours;
  using std::chrono::minutes;
  struct Row {
    const char* label;
    Date date;
    minutes from;
    bool daylight;
  };
  for (const Row& row : {Row{"an afternoon", june, hours(17), true},
                         Row{"a minute before", june, minute - minutes(1), true},
                         Row{"in the printed minute", june, minute, false},
                         Row{"a minute after", june, minute + minutes(1), false},
                         Row{"after midnight", june, hours(1), false},
                         Row{"after sunrise, of the next date", june, hours(9), false},
                         Row{"winter", make_date(2027, 12, 15), hours(20), false},
                         Row{"outside the year", make_date(2028, 6, 15), hours(17), false}}) {
    const std::optional<Ut> sets = sunset_after(year, row.date, row.from);
    EXPECT_EQ(sets.has_value(), row.daylight) << row.label;
    if (row.daylight && sets) {
      EXPECT_EQ(*sets, sunset) << row.label;
    }
  }
}

}  // namespace
}  // namespace duskleaf
