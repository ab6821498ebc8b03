#include "base/time.hpp"

#include <gtest/gtest.h>

#include "base/civil.hpp"

namespace duskleaf {
namespace {

// IERS Bulletin C: TAI - UTC = 10 s from 1972-01-01, 37 s from 2017-01-01; TT = TAI + 32.184 s (IAU
// 1991).
TEST(TimeScales, LeapSecondsAreExact) {
  struct Row {
    int year, month, day;
    double tt_minus_ut;
  };
  for (const Row& row : {Row{1972, 1, 1, 42.184}, Row{1972, 6, 30, 42.184}, Row{1972, 7, 1, 43.184},
                         Row{1999, 1, 1, 64.184}, Row{2016, 12, 31, 68.184},
                         Row{2017, 1, 1, 69.184}, Row{2099, 6, 1, 69.184}})
    EXPECT_NEAR(tt_minus_ut(ut_midnight(make_date(row.year, row.month, row.day))).count(),
                row.tt_minus_ut, 1e-9)
        << row.year << '-' << row.month;
}

// Morrison et al. (2021), Table S15: the constant terms of the pieces that begin in 1900, 1950,
// 1968, within their drift of a day.
TEST(TimeScales, SplineBefore1972) {
  EXPECT_NEAR(tt_minus_ut(ut_midnight(make_date(1950, 1, 1))).count(), 28.932, 0.01);
  EXPECT_NEAR(tt_minus_ut(ut_midnight(make_date(1968, 1, 1))).count(), 37.956, 0.01);
  // Continuous with the leap-second table where they meet, within the 0.9 s that UT1 and UTC may
  // differ.
  EXPECT_NEAR(tt_minus_ut(ut_midnight(make_date(1971, 12, 31))).count(), 42.184, 0.9);
}

TEST(TimeScales, ThereAndBack) {
  for (double day = -36524; day < 36525; day += 997.3) {
    const Ut t{Days(day)};
    EXPECT_NEAR((to_ut(to_tt(t)) - t).count() * 86400, 0.0, 1e-4) << day;
  }
}

}  // namespace
}  // namespace duskleaf
