#include "sky/moon_look.hpp"

#include <cmath>
#include <gtest/gtest.h>

#include "base/civil.hpp"
#include "base/csv.hpp"
#include "ephemeris/reference_text.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

Angle degrees(double d) { return Angle::from_degrees(d); }
Eigen::Vector3d direction(double right_ascension, double declination) {
  const Angle a = degrees(right_ascension), d = degrees(declination);
  return {cos(d) * cos(a), cos(d) * sin(a), sin(d)};
}

// J. Meeus, Astronomical Algorithms, 2nd ed. 1998, example 48.a.
TEST(MoonLook, MeeusExample48a) {
  const Angle chi =
      position_angle(direction(134.6885, 13.7684), direction(20.6579, 8.6964), {0, 0, 1});
  EXPECT_NEAR(chi.degrees(), 285.0, 0.05);
  const Tt t = Tt::from_julian_date(2448724.5);
  EXPECT_NEAR(moon_lit_fraction(YearEphemeris(t - Days(1.0), t + Days(1.0)), t), 0.6786, 0.0003);
}

TEST(MoonLook, PositionAnglesAreCounterclockwise) {
  struct Row {
    const char* label;
    double right_ascension, declination, angle;
  };
  for (const Row& row : {Row{"north", 10, 20, 0}, Row{"east", 100, 0, 90},
                         Row{"south", 10, -20, 180}, Row{"west", 280, 0, 270}})
    EXPECT_NEAR((position_angle(direction(10, 0), direction(row.right_ascension, row.declination),
                                {0, 0, 1}) -
                 degrees(row.angle))
                    .centred()
                    .degrees(),
                0.0, 1e-9)
        << row.label;
}

// A Moon of three days, an hour after sunset in March: towards the set Sun, so lit below, to the
// right in the north, to the left in the south.
TEST(MoonLook, YoungMoonIsLitTowardsTheSetSun) {
  struct Row {
    const char* label;
    double latitude, hour_ut, least, most;
  };
  for (const Row& row : {Row{"north", 45, 19.0, 180, 270}, Row{"equator", 0, 18.9, 135, 225},
                         Row{"south", -35, 19.0, 90, 180}}) {
    const Ut t = ut_midnight(make_date(2027, 3, 11)) + Days(row.hour_ut / 24);
    const YearEphemeris e(to_tt(t) - Days(1.0), to_tt(t) + Days(1.0));
    const Horizontal moon =
        topocentric_horizontal(e, Body::moon, degrees(row.latitude), Angle(), 0.0, t);
    const Horizontal sun =
        topocentric_horizontal(e, Body::sun, degrees(row.latitude), Angle(), 0.0, t);
    EXPECT_GT(moon.altitude, degrees(5)) << row.label;
    EXPECT_LT(sun.altitude, degrees(-5)) << row.label;
    const Angle limb = bright_limb_from_zenith(e, degrees(row.latitude), Angle(), 0.0, t);
    EXPECT_GT(limb, degrees(row.least)) << row.label;
    EXPECT_LT(limb, degrees(row.most)) << row.label;
    // The same from the two bodies' altitudes and azimuths: azimuth grows to the right, clockwise.
    const Angle to_right = sun.azimuth - moon.azimuth;
    const Angle clockwise = arctan2(cos(sun.altitude) * sin(to_right),
                                    sin(sun.altitude) * cos(moon.altitude) -
                                        cos(sun.altitude) * sin(moon.altitude) * cos(to_right));
    EXPECT_NEAR((limb + clockwise).centred().degrees(), 0.0, 1e-9) << row.label;
  }
}

// Against DE431 (tests/reference/make/topocentric_moon.c): the Moon's 0.1", and 0.3" of diurnal
// aberration, which only the reference has.
TEST(MoonLook, TopocentricPlaceOfTheMoon) {
  const std::string text = reference_text("topocentric_moon.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 40u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const Ut t = Ut::from_julian_date(table.number(r, 0));
    const YearEphemeris e(to_tt(t) - Days(1.0), to_tt(t) + Days(1.0));
    const Eigen::Vector3d got = topocentric(e, Body::moon, degrees(table.number(r, 1)),
                                            degrees(table.number(r, 2)), table.number(r, 3), t)
                                    .normalized();
    const Angle error =
        Angle::from_radians((got - direction(table.number(r, 4), table.number(r, 5))).norm());
    EXPECT_LT(error.arcseconds(), 0.5) << "row " << r;
  }
}

}  // namespace
}  // namespace duskleaf
