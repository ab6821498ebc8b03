#include "sky/horizon.hpp"

#include <cmath>
#include <gtest/gtest.h>

#include "base/csv.hpp"
#include "ephemeris/reference_text.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {
namespace {

Angle degrees(double d) { return Angle::from_degrees(d); }
Angle dms(double d, double m, double s) { return Angle::from_arcseconds(3600 * d + 60 * m + s); }

Eigen::Vector3d direction(Angle right_ascension, Angle declination) {
  return {cos(declination) * cos(right_ascension), cos(declination) * sin(right_ascension),
          sin(declination)};
}

Angle greenwich(double julian_date) {
  const Ut t = Ut::from_julian_date(julian_date);
  return YearEphemeris(to_tt(t) - Days(1.0), to_tt(t) + Days(1.0)).apparent_sidereal_time(t);
}

// J. Meeus, Astronomical Algorithms, 2nd ed. 1998, example 13.b (azimuth there from the south).
TEST(Horizon, MeeusExample13bVenus) {
  const Angle sidereal = greenwich(2446896.30625) - dms(77, 3, 56);
  const Eigen::Vector3d venus =
      direction(Angle::from_hours(23 + 9 / 60.0 + 16.641 / 3600), -dms(6, 43, 11.61));
  const Horizontal place = to_horizontal(venus, sidereal, dms(38, 55, 17));
  EXPECT_NEAR(place.azimuth.degrees(), 180.0 + 68.0337, 1e-4);
  EXPECT_NEAR(place.altitude.degrees(), 15.1249, 1e-4);
  EXPECT_NEAR(sine_of_altitude(venus, sidereal, dms(38, 55, 17)), sin(place.altitude), 1e-14);
}

// By definition of the directions; latitude 50 north and 30 south, sidereal time 6 h.
TEST(Horizon, CardinalPoints) {
  struct Row {
    const char* label;
    double latitude, right_ascension, declination, altitude, azimuth, hour_angle;
  };
  for (const Row& row : {Row{"equator on the meridian, north", 50, 90, 0, 40, 180, 0},
                         Row{"equator on the meridian, south", -30, 90, 0, 60, 0, 0},
                         Row{"equator rising", 50, 180, 0, 0, 90, -90},
                         Row{"equator setting", -30, 0, 0, 0, 270, 90},
                         Row{"below the pole", 50, 270, 70, 30, 0, 180}}) {
    const Eigen::Vector3d v = direction(degrees(row.right_ascension), degrees(row.declination));
    const Horizontal place = to_horizontal(v, degrees(90), degrees(row.latitude));
    EXPECT_NEAR(place.altitude.degrees(), row.altitude, 1e-9) << row.label;
    EXPECT_NEAR((place.azimuth - degrees(row.azimuth)).centred().degrees(), 0.0, 1e-9) << row.label;
    EXPECT_NEAR((hour_angle(v, degrees(90)) - degrees(row.hour_angle)).centred().degrees(), 0.0,
                1e-9)
        << row.label;
  }
}

// ERFA's validation of eraGd2gc: longitude 3.1 rad, latitude -0.5 rad, height 2500 m on WGS 84
// (arguments from memory).
TEST(Horizon, ObserverVectorAsErfaHasIt) {
  const std::string text = reference_text("erfa_values.csv");
  const CsvTable table(text);
  const Eigen::Vector3d metres =
      observer_vector_au(Angle::from_radians(-0.5), 2500.0, Angle::from_radians(3.1)) *
      149597870700.0;
  int seen = 0;
  for (std::size_t r = 0; r < table.rows(); ++r)
    for (int i = 0; i < 3; ++i)
      if (table.cell(r, 0) == "gd2gc" && table.cell(r, 2) == "xyz[" + std::to_string(i) + "]") {
        EXPECT_NEAR(metres[i], table.number(r, table.column("expected")), 1e-6) << i;
        ++seen;
      }
  EXPECT_EQ(seen, 3);
}

// Meeus, example 11.a: Palomar, on the ellipsoid of 1976 (a metre from WGS 84 there).
TEST(Horizon, MeeusExample11aPalomar) {
  const Eigen::Vector3d v =
      observer_vector_au(dms(33, 21, 22), 1706.0, Angle()) * 149597870.7 / 6378.14;
  EXPECT_NEAR(v.z(), 0.546861, 2e-6);
  EXPECT_NEAR(v.x(), 0.836339, 2e-6);
}

// Meeus, example 40.a: Mars near the Earth seen from Palomar.
TEST(Horizon, MeeusExample40aParallax) {
  const Angle sidereal =
      greenwich(2452879.5 + (3 + 17 / 60.0) / 24) - Angle::from_hours(7 + 47 / 60.0 + 27 / 3600.0);
  const Eigen::Vector3d mars = 0.37276 * direction(degrees(339.530208), degrees(-15.771083));
  const EquatorialPlace seen =
      to_equatorial(mars - observer_vector_au(dms(33, 21, 22), 1706.0, sidereal));
  EXPECT_NEAR(seen.right_ascension.hours() * 3600, (22 * 60 + 38) * 60 + 8.54, 0.01);
  EXPECT_NEAR(seen.declination.arcseconds(), -dms(15, 46, 30.0).arcseconds(), 0.1);
}

// Meeus, example 16.a (Saemundsson); at the zenith nothing by definition; below -1 degree held.
TEST(Refraction, MeeusExample16aAndEnds) {
  EXPECT_NEAR(refraction(Angle::from_arcminutes(33.246)).arcminutes(), 24.618, 0.003);
  EXPECT_NEAR(refraction(degrees(90)).arcseconds(), 0.0, 0.001);
  EXPECT_EQ(refraction(degrees(-5)), refraction(degrees(-1)));
  for (double h = -1.0; h < 90.0; h += 0.25)
    EXPECT_GT(refraction(degrees(h)), refraction(degrees(h + 0.25))) << h;
}

}  // namespace
}  // namespace duskleaf
