// Diameters, lit parts and Saturn's tilt against published values and against DE431.
#include "sky/planet_disc.hpp"

#include <cmath>
#include <gtest/gtest.h>

#include "base/csv.hpp"
#include "ephemeris/reference_text.hpp"

namespace duskleaf {
namespace {

PlanetDisc disc_at(Body planet, Tt t) {
  return planet_disc(YearEphemeris(t - Days(0.5), t + Days(0.5)), planet, t);
}

// Equatorial semidiameters at 1 au: J. Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 55 (as
// carried by npm astronomia 4.2.0, MIT). The outer planets have been measured better since: Uranus
// and Neptune, Voyager 2, by 0.6 and 1.9 percent; the others differ by 0.1 or less.
TEST(PlanetDisc, SemidiametersAtOneAu) {
  struct Row {
    Body body;
    double arcseconds, percent;
  };
  for (const Row& row :
       {Row{Body::sun, 959.63, 0.05}, Row{Body::mercury, 3.36, 0.2}, Row{Body::venus, 8.34, 0.1},
        Row{Body::mars, 4.68, 0.1}, Row{Body::jupiter, 98.44, 0.2}, Row{Body::saturn, 82.73, 0.5},
        Row{Body::uranus, 35.02, 0.7}, Row{Body::neptune, 33.50, 2.0}})
    EXPECT_NEAR(disc_radius(row.body, 1.0).arcseconds(), row.arcseconds,
                row.arcseconds * row.percent / 100.0)
        << body_name(row.body);
}

// The Moon at its mean distance 384400 km: semidiameter 15'32.6" (Explanatory Supplement to the
// Astronomical Almanac, 1992, from memory).
TEST(PlanetDisc, TheMoonAtItsMeanDistance) {
  EXPECT_NEAR(disc_radius(Body::moon, 384400.0 / 149597870.7).arcseconds(), 932.6, 0.6);
}

// Against DE431, tests/reference/planet_discs.csv, whose diameters are by mean radii: the polar
// flattening of Jupiter and Saturn makes them 2.3 and 3.5 percent less than the equatorial ones.
TEST(PlanetDisc, FourDecadesOfDe431) {
  const std::string text = reference_text("planet_discs.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 168u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    Body planet = Body::mercury;
    for (Body b : planets)
      if (body_name(b) == table.cell(r, 0)) planet = b;
    const PlanetDisc disc = disc_at(planet, Tt::from_julian_date(table.number(r, 1)));
    SCOPED_TRACE(testing::Message() << body_name(planet) << " row " << r);
    EXPECT_NEAR(disc.lit, table.number(r, 3), 1e-4);
    // The diameter goes as the distance alone.
    EXPECT_NEAR(disc.diameter / disc_radius(planet, table.number(r, 2)), 2.0, 1e-5);
    const double ratio = disc.diameter.arcseconds() / table.number(r, 4);
    EXPECT_GT(ratio, 0.999);
    EXPECT_LT(ratio, planet == Body::saturn ? 1.036 : planet == Body::jupiter ? 1.024 : 1.009);
    EXPECT_NEAR(disc.ring_tilt.degrees(), table.number(r, 5), 0.01);
  }
}

// Meeus, example 41.a: Venus on 1992 December 20, lit 0.647.
TEST(PlanetDisc, MeeusExample41aVenus) {
  EXPECT_NEAR(disc_at(Body::venus, Tt::from_julian_date(2448976.5)).lit, 0.647, 5e-4);
}

// Meeus, example 45.a: Saturn on 1992 December 16, rings tilted 16.442 degrees, north face seen,
// their outer edge 35.87" across. A-ring edge over equatorial radius 136775/60268 (same chapter:
// 375.35" at 1 au over 2 x 82.73").
TEST(PlanetDisc, MeeusExample45aSaturnsRings) {
  const PlanetDisc saturn = disc_at(Body::saturn, Tt::from_julian_date(2448972.50068));
  EXPECT_NEAR(saturn.ring_tilt.degrees(), 16.442, 0.01);
  EXPECT_NEAR(saturn.diameter.arcseconds() * 375.35 / (2.0 * 82.73), 35.87, 0.2);
  EXPECT_GT(saturn.lit, 0.998);
}

TEST(PlanetDisc, OnlySaturnHasATilt) {
  for (Body planet : planets) {
    const double tilt = disc_at(planet, Tt::from_julian_date(2461545.0)).ring_tilt.degrees();
    EXPECT_EQ(tilt != 0.0, planet == Body::saturn) << body_name(planet);
  }
}

}  // namespace
}  // namespace duskleaf
