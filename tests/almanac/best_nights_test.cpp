// The ranking by the project's own rule (almanac/best_nights.hpp), checked against the nights that
// it ranks.
#include "almanac/best_nights.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>

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
    EXPECT_NEAR(r.score, r.dark_minutes / 60 + 0.1 * r.planets_visible, 1e-9);
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

}  // namespace
}  // namespace duskleaf
