// The ranking by the project's own rule (almanac/best_nights.hpp), checked against the nights that
// it ranks.
#include "almanac/best_nights.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>
#include <tuple>

#include "almanac/happenings.hpp"
#include "almanac/planets.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

std::vector<Date> month_of_dates(int y, int m) {
  std::vector<Date> dates;
  for (int d = 1; d <= days_in_month(y, m); ++d) dates.push_back(make_date(y, m, d));
  return dates;
}
const NightReason* reason(const NightRank& rank, const std::string& key) {
  const auto found = std::find_if(rank.reasons.begin(), rank.reasons.end(),
                                  [&](const NightReason& r) { return r.key == key; });
  return found == rank.reasons.end() ? nullptr : &*found;
}
const SiteYear& madrid() {
  static const SiteYear year = year_of_site(test_place(40.4, -3.7, "Europe/Madrid"), 2027);
  return year;
}

TEST(BestNights, ForDarknessThoseWithoutTheMoon) {
  const auto ranks = rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11),
                                 ClockWindow{20h, 23h}, Aim::dark);
  ASSERT_EQ(ranks.size(), 30u);
  EXPECT_NEAR(ranks.front().dark_minutes, 180, 1e-6);
  EXPECT_TRUE(reason(ranks.front(), "moon-down"));
  EXPECT_TRUE(reason(ranks.back(), "not-dark"));
  for (std::size_t i = 0; i < ranks.size(); ++i) {
    const NightRank& r = ranks[i];
    if (i > 0) {
      EXPECT_GE(ranks[i - 1].score, r.score);
    }
    EXPECT_FALSE(reason(r, "darkest-limit"));
    ASSERT_TRUE(reason(r, "moon-lit"));
    EXPECT_NEAR(*reason(r, "moon-lit")->number, 100 * r.moon_lit, 1e-9);
    EXPECT_NEAR(*reason(r, "planets-visible")->number, r.planets_visible, 1e-9);
    // Dark and moonlit time do not overlap, and the window in November is wholly below -6 degrees.
    EXPECT_NEAR(r.dark_minutes + r.moon_minutes, 180, 0.01) << iso_date(r.date);
  }
}

// Rows of 11.4, 11.5 and 11.5 dark hours stood in that order under "by dark hours, then Moon": a
// tenth of an hour for each planet, printed nowhere, had moved them.
TEST(BestNights, TheOrderCanBeCheckedOnThePage) {
  const auto percent = [](const NightRank& r) { return std::lround(100 * r.moon_lit); };
  const auto moon_product = [&](const NightRank& r) {
    return r.moon_rounded / 60.0 *
           (1 - 0.8 * std::abs(2 * static_cast<double>(percent(r)) / 100 - 1));
  };
  int pairs = 0, darkless = 0;
  for (int month = 1; month <= 12; ++month)
    for (const Aim aim : {Aim::any, Aim::dark, Aim::moon})
      for (const auto& window :
           {std::optional<ClockWindow>{}, std::optional(ClockWindow{20h, 22h})}) {
        const auto ranks = rank_nights(ephemeris_of({2027, 1}), madrid(),
                                       month_of_dates(2027, month), window, aim);
        for (std::size_t i = 0; i < ranks.size(); ++i) {
          EXPECT_LE(std::abs(ranks[i].dark_rounded - ranks[i].dark_minutes), 0.5);
          EXPECT_LE(std::abs(ranks[i].moon_rounded - ranks[i].moon_minutes), 0.5);
          EXPECT_EQ(ranks[i].planets_visible, static_cast<int>(ranks[i].planets.size()));
          if (!window) {  // the table of nights prints its sum to the minute
            double minutes = 0;
            for (const TimeSpan& s :
                 night_of(madrid(), 2027, month, day_of(ranks[i].date)).dark_or_darkest)
              minutes += (s.to - s.from).count() * 1440;
            EXPECT_EQ(ranks[i].dark_rounded, std::lround(minutes));
          }
          // The table of nights prints 77 % where the ranking said 76 %.
          EXPECT_EQ(ranks[i].moon_lit,
                    night_of(madrid(), 2027, month, day_of(ranks[i].date)).moon_lit);
          if (i == 0) continue;
          const NightRank &a = ranks[i - 1], &b = ranks[i];
          SCOPED_TRACE(iso_date(a.date) + " before " + iso_date(b.date));
          ++pairs;
          EXPECT_GE(a.score, b.score);
          if (a.score == b.score) {
            EXPECT_LT(a.date, b.date);
          }
          if (aim == Aim::moon) {
            EXPECT_GE(moon_product(a), moon_product(b) - 1e-12);
            continue;
          }
          EXPECT_GE(a.dark_rounded, b.dark_rounded);
          if (a.dark_rounded != b.dark_rounded) continue;
          if (aim == Aim::any) {
            EXPECT_GE(a.planets_visible, b.planets_visible);
            continue;
          }
          if (a.dark_rounded == 0) {
            ++darkless;
            const bool a_down = reason(a, "moon-down"), b_down = reason(b, "moon-down");
            EXPECT_TRUE(a_down || !b_down);
            if (a_down != b_down) continue;
          }
          EXPECT_LE(percent(a), percent(b));
        }
      }
  EXPECT_GT(pairs, 2000);
  EXPECT_GT(darkless, 50);
}

TEST(BestNights, ForTheMoonThoseAboutTheHalfMoon) {
  const auto ranks = rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11),
                                 ClockWindow{19h, 21h}, Aim::moon);
  EXPECT_NEAR(ranks.front().moon_lit, 0.5, 0.2);
  EXPECT_GT(ranks.front().moon_minutes, 60);
  EXPECT_TRUE(reason(ranks.front(), "moon-up") || reason(ranks.front(), "moon-sets-at"));
}

TEST(BestNights, TheMoonsRiseWithinTheWindowIsGiven) {
  const auto ranks = rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11),
                                 ClockWindow{20h, 23h}, Aim::any);
  int rises = 0;
  for (const NightRank& r : ranks)
    if (const NightReason* rise = reason(r, "moon-rises-at")) {
      ++rises;
      const CivilMinute clock = madrid().place.zone.civil(rise->at.value());
      EXPECT_EQ(clock.date(), r.date);
      EXPECT_GE(clock.hour(), 20);
      EXPECT_LE(clock.hour(), 23);
    }
  EXPECT_GE(rises, 2);
}

TEST(BestNights, AWindowMayPassMidnightOrLieInTheMorning) {
  for (const ClockWindow& window : {ClockWindow{23h, 1h}, ClockWindow{2h, 4h}}) {
    const auto ranks = rank_nights(ephemeris_of({2027, 1}), madrid(), {make_date(2027, 11, 28)},
                                   window, Aim::dark);
    ASSERT_EQ(ranks.size(), 1u);
    EXPECT_LT(ranks[0].moon_lit, 0.02);  // new Moon: dark throughout
    EXPECT_NEAR(ranks[0].dark_minutes, 120, 1e-6);
  }
}

TEST(BestNights, WithoutAWindowTheWholeNight) {
  const auto ranks =
      rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11), {}, Aim::dark);
  for (const NightRank& r : ranks) {
    double minutes = 0;
    for (const TimeSpan& s : night_of(madrid(), 2027, 11, day_of(r.date)).dark)
      minutes += (s.to - s.from).count() * 1440;
    EXPECT_NEAR(r.dark_minutes, minutes, 1e-6);
  }
}

TEST(BestNights, WhereNoNightIsDarkItSaysByWhatItGoes) {
  const SiteYear year = year_of_site(test_place(54.18, -4.62, "Europe/London"), 2027);
  for (const NightRank& r :
       rank_nights(ephemeris_of({2027, 1}), year, month_of_dates(2027, 6), {}, Aim::dark)) {
    ASSERT_TRUE(reason(r, "darkest-limit"));
    EXPECT_DOUBLE_EQ(*reason(r, "darkest-limit")->number, -12);
    EXPECT_DOUBLE_EQ(r.dark_limit.degrees(), -12);
  }
}

TEST(BestNights, DatesOutsideTheSpanAndSkippedOnesAreLeftOut) {
  const SiteYear apia = year_of_site(test_place(-13.83, -171.77, "Pacific/Apia"), 2011);
  const auto ranks =
      rank_nights(ephemeris_of({2011, 1}), apia,
                  {make_date(2011, 12, 30), make_date(2012, 5, 1), make_date(2011, 12, 29)},
                  ClockWindow{20h, 22h}, Aim::any);
  ASSERT_EQ(ranks.size(), 1u);
  EXPECT_EQ(iso_date(ranks[0].date), "2011-12-29");
}

TEST(BestNights, ThePlanetsAreNamed) {
  // In the evenings of November 2027 Saturn stands high, a month after its opposition, and neither
  // Jupiter nor Neptune is seen by the bare eye at 20:00 to 22:00 (common practice).
  const auto ranks = rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11),
                                 ClockWindow{20h, 22h}, Aim::any);
  ASSERT_EQ(ranks.size(), 30u);
  for (const NightRank& r : ranks) {
    EXPECT_EQ(std::count(r.planets.begin(), r.planets.end(), Body::saturn), 1) << iso_date(r.date);
    EXPECT_EQ(std::count(r.planets.begin(), r.planets.end(), Body::jupiter), 0);
    EXPECT_EQ(std::count(r.planets.begin(), r.planets.end(), Body::neptune), 0);
  }
}

// Happenings made up for the purpose: what they count is the rule of almanac/best_nights.hpp.
class Happening : public testing::Test {
 protected:
  Ut clock(int day, int hour) const {
    return madrid().place.zone.instant(make_date(2027, 11, day), std::chrono::hours(hour));
  }
  void meeting(int day, int hour, Body a, Body b, bool bare_eye) {
    Meeting m{};
    m.closest = {clock(day, hour), target_index(a), target_index(b), Angle::from_degrees(1)};
    m.look = Look{clock(day, hour), {}, make_date(2027, 11, day), false, true};
    m.bare_eye = bare_eye;
    happenings.meetings.push_back(m);
  }
  void shower(int day, int from, int to, Verdict verdict) {
    SiteShower s{};
    s.night = make_date(2027, 11, day);
    s.best_from = clock(day, from);
    s.best_to = clock(day, to);
    s.best = clock(day, to);
    s.verdict = verdict;
    s.expected_per_hour = 20;
    happenings.showers.push_back(s);
  }
  std::vector<NightRank> ranks(Aim aim, std::optional<ClockWindow> window) const {
    return rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11), window, aim,
                       &happenings);
  }
  static const NightRank& night(const std::vector<NightRank>& ranks, int day) {
    return *std::find_if(ranks.begin(), ranks.end(),
                         [&](const NightRank& r) { return r.date == make_date(2027, 11, day); });
  }
  static int minutes(const std::vector<NightRank>& ranks, int day) {
    return night(ranks, day).happens_minutes;
  }
  SiteHappenings happenings{};
};

TEST_F(Happening, CountsAsMinutesInItsOwnNight) {
  meeting(3, 20, Body::venus, Body::jupiter, true);
  meeting(5, 20, Body::moon, Body::saturn, true);
  meeting(7, 20, Body::moon, Body::saturn, false);
  meeting(8, 20, Body::moon, Body::saturn, true);
  happenings.meetings.back().separation = Angle::from_degrees(2.1);
  shower(9, 22, 30, Verdict::good);
  shower(10, 22, 30, Verdict::fair);
  shower(11, 22, 30, Verdict::poor);
  shower(12, 22, 30, Verdict::good);
  happenings.showers.back().expected_per_hour = 4;  // not worth an evening
  const auto any = ranks(Aim::any, {}), moon = ranks(Aim::moon, {}), dark = ranks(Aim::dark, {});
  for (const auto& [day, for_any, for_moon] : {std::tuple{3, 30, 0},
                                               {4, 0, 0},
                                               {5, 30, 30},
                                               {7, 0, 0},
                                               {8, 0, 0},
                                               {9, 60, 0},
                                               {10, 30, 0},
                                               {11, 0, 0},
                                               {12, 0, 0}}) {
    EXPECT_EQ(minutes(any, day), for_any) << day;
    EXPECT_EQ(minutes(moon, day), for_moon) << day;
    EXPECT_EQ(minutes(dark, day), 0) << day;
    // The reasons tell it whatever the aim.
    EXPECT_EQ(reason(night(dark, day), "happens") != nullptr, for_any > 0) << day;
  }
  const NightReason& told = *reason(night(any, 9), "happens");
  EXPECT_EQ(told.happening, NightHappening::shower);
  EXPECT_EQ(told.index, 0u);
  EXPECT_EQ(*told.number, 60);
  EXPECT_EQ(night_happening_name(*told.happening), "shower");
  EXPECT_EQ(*reason(night(any, 5), "happens")->at, clock(5, 20));
  EXPECT_EQ(reason(night(any, 5), "happens")->index, 1u);
}

TEST_F(Happening, TheOrderFollowsTheSum) {
  meeting(20, 20, Body::venus, Body::jupiter, true);
  shower(20, 19, 22, Verdict::good);
  const auto window = ClockWindow{19h, 22h};
  for (const Aim aim : {Aim::any, Aim::moon, Aim::dark}) {
    const auto list = ranks(aim, window);
    for (std::size_t i = 1; i < list.size(); ++i) {
      EXPECT_GE(list[i - 1].score, list[i].score);
      if (aim == Aim::any) {
        EXPECT_GE(list[i - 1].dark_rounded + list[i - 1].happens_minutes,
                  list[i].dark_rounded + list[i].happens_minutes);
      }
    }
  }
  const auto with = ranks(Aim::any, window);
  const auto without =
      rank_nights(ephemeris_of({2027, 1}), madrid(), month_of_dates(2027, 11), window, Aim::any);
  EXPECT_EQ(minutes(with, 20), 90);
  const auto place = [&](const std::vector<NightRank>& list) {
    return &night(list, 20) - list.data();
  };
  EXPECT_LT(place(with), place(without));
}

TEST_F(Happening, TwoHoursAreTheMost) {
  for (int i = 0; i < 6; ++i) meeting(12, 20, Body::moon, Body::mars, true);
  EXPECT_EQ(minutes(ranks(Aim::any, {}), 12), 120);
  EXPECT_EQ(minutes(ranks(Aim::moon, {}), 12), 120);
}

TEST_F(Happening, WithAWindowOnlyWhatFallsInIt) {
  meeting(3, 18, Body::moon, Body::venus, true);  // an hour before it: still together
  meeting(4, 30, Body::moon, Body::venus, true);  // towards morning
  shower(9, 25, 29, Verdict::good);               // after midnight
  shower(10, 20, 29, Verdict::good);
  const auto evening = ranks(Aim::any, ClockWindow{19h, 22h});
  EXPECT_EQ(minutes(evening, 3), 30);
  EXPECT_EQ(minutes(evening, 4), 0);
  EXPECT_EQ(minutes(evening, 9), 0);
  EXPECT_EQ(minutes(evening, 10), 60);
  const auto morning = ranks(Aim::any, ClockWindow{4h, 6h});
  EXPECT_EQ(minutes(morning, 4), 30);
  EXPECT_EQ(minutes(morning, 9), 60);
  EXPECT_EQ(minutes(morning, 3), 0);
}

TEST_F(Happening, AnEclipseWhereTheMoonIsUpInTheUmbra) {
  SiteLunarEclipse e{};
  e.eclipse.partial_begins = clock(14, 25);
  e.eclipse.greatest = clock(14, 26);
  e.eclipse.partial_ends = clock(14, 27);
  e.visible = e.umbra_visible = true;
  e.eclipse.umbral_magnitude = 1.2;
  happenings.lunar_eclipses.push_back(e);
  const Night& full = night_of(madrid(), 2027, 11, 14);
  const double whole = (*full.sunrise - *full.sunset).count() * 1440;
  for (const Aim aim : {Aim::moon, Aim::any}) {
    const auto list = ranks(aim, {});
    EXPECT_NEAR(minutes(list, 14), whole, 0.5);
    EXPECT_EQ(list.front().date, make_date(2027, 11, 14));
    EXPECT_EQ(minutes(list, 13), 0);
  }
  EXPECT_EQ(minutes(ranks(Aim::dark, {}), 14), 0);
  EXPECT_EQ(minutes(ranks(Aim::any, ClockWindow{20h, 23h}), 14), 0);
  EXPECT_EQ(minutes(ranks(Aim::any, ClockWindow{20h, 2h}), 14), 360);
  happenings.lunar_eclipses.front().eclipse.umbral_magnitude = 0.25;
  EXPECT_EQ(minutes(ranks(Aim::any, ClockWindow{20h, 2h}), 14), 90);
  happenings.lunar_eclipses.front().umbra_visible = false;
  EXPECT_EQ(minutes(ranks(Aim::moon, {}), 14), 0);
}

TEST_F(Happening, AnOccultationInTheDark) {
  Occultation o{};
  o.target = target_index(Body::saturn);
  o.disappears.at = clock(10, 21);
  o.reappears.at = clock(10, 22);
  o.disappears.up = true;
  o.disappears.sun_altitude = Angle::from_degrees(-20);
  o.reappears = o.disappears;
  happenings.occultations = {o};
  EXPECT_EQ(minutes(ranks(Aim::any, {}), 10), 30);
  EXPECT_EQ(minutes(ranks(Aim::moon, ClockWindow{20h, 23h}), 10), 30);
  EXPECT_EQ(minutes(ranks(Aim::any, ClockWindow{22h, 23h}), 10), 0);
  happenings.occultations[0].disappears.sun_altitude = Angle::from_degrees(5);
  happenings.occultations[0].reappears.sun_altitude = Angle::from_degrees(5);
  EXPECT_EQ(minutes(ranks(Aim::any, {}), 10), 0);
}

}  // namespace
}  // namespace duskleaf
