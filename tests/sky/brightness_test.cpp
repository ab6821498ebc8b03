#include "sky/brightness.hpp"

#include <cmath>
#include <gtest/gtest.h>

namespace duskleaf {
namespace {

Angle degrees(double d) { return Angle::from_degrees(d); }

/// Schaefer 1990 for a dark-adapted eye, from the sky's brightness in V magnitudes per square
/// arcsecond.
double schaefer(double sky) {
  return 7.93 - 5.0 * std::log10(std::pow(10.0, 4.316 - sky / 5.0) + 1.0);
}

TEST(Brightness, DarkSkyIsTheSitesOwn) {
  for (double limit : {3.0, 5.0, 6.5, 7.4})
    EXPECT_EQ(faintest_star(limit, degrees(-20), degrees(-3), 0.9), limit);
}

// Patat, Ugolnikov & Postylyakov 2006: V at the zenith is 11.84 + 1.518 x - 0.057 x^2, x = Sun's
// zenith distance - 95 degrees. At a site with Paranal's own night sky the sum is that fit; where
// it is dark enough for Schaefer's night relation, the two give the limit.
TEST(Brightness, TwilightFollowsThePublishedFit) {
  const double site = schaefer(21.6);
  for (double x : {6.0, 7.0, 8.0, 9.0, 10.0})
    EXPECT_NEAR(faintest_star(site, degrees(-5.0 - x), degrees(-30), 0.0),
                schaefer(11.84 + 1.518 * x - 0.057 * x * x), 0.005)
        << x;
}

// Hong Kong Observatory, "What is twilight?": with the Sun 6 degrees down stars of the first
// magnitude show.
TEST(Brightness, CivilTwilightShowsTheFirstStars) {
  const double limit = faintest_star(6.0, degrees(-6), degrees(-30), 0.0);
  EXPECT_GT(limit, 1.0);
  EXPECT_LT(limit, 2.5);
  EXPECT_LT(faintest_star(6.0, degrees(-0.8), degrees(-30), 0.0), -2.0);
  EXPECT_LT(faintest_star(6.0, degrees(30), degrees(-30), 0.0), -2.0);
}

// Common practice: a high full Moon hides all but stars of the fourth magnitude or so from a dark
// site, and hardly matters in a town.
TEST(Brightness, MoonlightHidesFaintStars) {
  const double dark_site = faintest_star(6.5, degrees(-30), degrees(60), 1.0);
  EXPECT_GT(dark_site, 3.5);
  EXPECT_LT(dark_site, 5.3);
  EXPECT_GT(faintest_star(6.5, degrees(-30), degrees(60), 0.5), dark_site + 0.4);
  EXPECT_GT(faintest_star(3.5, degrees(-30), degrees(60), 1.0), 3.0);
}

TEST(Brightness, SteadyWithoutJumps) {
  const auto check = [](const char* label, double from, double to, double step, auto limit) {
    for (double x = from; x < to; x += step) {
      const double now = limit(x), next = limit(x + step);
      EXPECT_LE(next, now + 1e-9) << label << ' ' << x;
      EXPECT_GT(next, now - 0.15) << label << ' ' << x;
    }
  };
  for (double site : {2.5, 4.0, 5.0, 6.5}) {
    check("Sun rises", -20, 30, 0.05,
          [&](double h) { return faintest_star(site, degrees(h), degrees(-9), 0.5); });
    check("Moon waxes", 0, 1, 0.005,
          [&](double k) { return faintest_star(site, degrees(-30), degrees(40), k); });
    check("Moon rises", -2, 80, 0.1,
          [&](double h) { return faintest_star(site, degrees(-30), degrees(h), 1.0); });
  }
}

}  // namespace
}  // namespace duskleaf
