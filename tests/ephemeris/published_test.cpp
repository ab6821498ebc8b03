// Worked examples of J. Meeus, Astronomical Algorithms, 2nd ed. 1998
// (tests/reference/meeus_examples.csv says where each was read), and ERFA's own validation values
// (tests/reference/erfa_values.csv) where a wrapper of ours stands before its routine.
#include <cmath>
#include <gtest/gtest.h>

#include "base/csv.hpp"
#include "ephemeris/elp_mpp02.hpp"
#include "ephemeris/reduction.hpp"
#include "ephemeris/reference_text.hpp"
#include "ephemeris/vsop87.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {
namespace {

Angle dms(double d, double m, double s) { return Angle::from_arcseconds(3600 * d + 60 * m + s); }
Angle hms(double h, double m, double s) { return Angle::from_hours(h + m / 60 + s / 3600); }

/// The "expected" cell of a worked example.
std::string meeus(std::string_view example, std::string_view quantity) {
  static const std::string text = reference_text("meeus_examples.csv");
  static const CsvTable table(text);
  for (std::size_t r = 0; r < table.rows(); ++r)
    if (table.cell(r, table.column("example")) == example &&
        table.cell(r, table.column("quantity")) == quantity)
      return std::string(table.cell(r, table.column("expected")));
  throw std::runtime_error("no example " + std::string(example));
}
double meeus_number(std::string_view example, std::string_view quantity) {
  return parse_number(meeus(example, quantity));
}

double erfa(std::string_view function, std::string_view output) {
  static const std::string text = reference_text("erfa_values.csv");
  static const CsvTable table(text);
  for (std::size_t r = 0; r < table.rows(); ++r)
    if (table.cell(r, 0) == function && table.cell(r, table.column("output")) == output)
      return table.number(r, table.column("expected"));
  throw std::runtime_error("no value of " + std::string(function));
}

YearEphemeris around(double julian_date) {
  const Tt t = Tt::from_julian_date(julian_date);
  return YearEphemeris(t - Days(2.0), t + Days(2.0));
}

// The book's Moon is shortened: 10" in longitude, 4" in latitude, by its own words.
TEST(Meeus, Example47aMoon) {
  const Tt t = Tt::from_julian_date(2448724.5);
  const YearEphemeris e = around(2448724.5);
  EXPECT_NEAR(e.ecliptic_longitude(Body::moon, t).degrees(),
              meeus_number("47.a", "apparent lambda"), 10.0 / 3600);
  EXPECT_NEAR(e.ecliptic_latitude(Body::moon, t).degrees(), meeus_number("47.a", "beta"),
              4.0 / 3600);
  EXPECT_NEAR(moon_position_km(t).norm(), meeus_number("47.a", "distance"), 10.0);
  const EquatorialPlace place = e.place(Body::moon, t);
  EXPECT_NEAR(place.right_ascension.degrees(), meeus_number("47.a", "apparent alpha"), 10.0 / 3600);
  EXPECT_NEAR(place.declination.degrees(), meeus_number("47.a", "apparent delta"), 6.0 / 3600);
}

// Complete VSOP87 with the nutation of 1980, which differs by some 0.05" in this year.
TEST(Meeus, Example25bSun) {
  const Tt t = Tt::from_julian_date(2448908.5);
  const YearEphemeris e = around(2448908.5);
  ASSERT_EQ(meeus("25.b", "apparent longitude"), "199d54m21.548s");
  EXPECT_NEAR((e.ecliptic_longitude(Body::sun, t) - dms(199, 54, 21.548)).arcseconds(), 0.0, 0.1);
  EXPECT_NEAR(e.ecliptic_latitude(Body::sun, t).arcseconds(), meeus_number("25.b", "latitude"),
              0.1);
  EXPECT_NEAR(e.heliocentric_distance_au(Body::sun, t), meeus_number("25.b", "radius vector"),
              2e-7);
}

TEST(Meeus, Example33aVenus) {
  const Tt t = Tt::from_julian_date(2448976.5);
  const EquatorialPlace place = around(2448976.5).place(Body::venus, t);
  ASSERT_EQ(meeus("33.a", "alpha , delta"), "21h04m41.454s , -18d53m16.84s");
  EXPECT_NEAR((place.right_ascension - hms(21, 4, 41.454)).arcseconds(), 0.0, 0.15);
  EXPECT_NEAR((place.declination + dms(18, 53, 16.84)).arcseconds(), 0.0, 0.1);
}

// The book's nutation is that of 1980; against it IAU 2000 moves by some 0.06" in longitude, the
// obliquity of 2006 by 0.04".
TEST(Meeus, Example22aNutation) {
  const Tt t = Tt::from_julian_date(2446895.5);
  const Eigen::Vector3d n = nutation_and_origins(t);
  ASSERT_EQ(meeus("22.a", "nutation in longitude"), "-3.788 arcsec");
  EXPECT_NEAR(Angle::from_radians(n[0]).arcseconds(), -3.788, 0.08);
  EXPECT_NEAR(Angle::from_radians(n[1]).arcseconds(), 9.443, 0.02);
  EXPECT_NEAR((around(2446895.5).true_obliquity(t) - dms(23, 26, 36.850)).arcseconds(), 0.0, 0.06);
}

TEST(Meeus, Example12aSiderealTime) {
  ASSERT_EQ(meeus("12.a", "apparent sidereal time Greenwich"), "13h10m46.1351s");
  const Angle got = around(2446895.5).apparent_sidereal_time(Ut::from_julian_date(2446895.5));
  EXPECT_NEAR((got - hms(13, 10, 46.1351)).hours() * 3600, 0.0, 0.006);
}

TEST(Erfa, EarthState) {
  const EarthState s = earth_state(Tt::from_julian_date(2400000.5 + 53411.52501161));
  EXPECT_NEAR(s.from_sun.x(), erfa("epv00", "pvh[0][0]"), 1e-10);
  EXPECT_NEAR(s.from_sun.y(), erfa("epv00", "pvh[0][1]"), 1e-10);
  EXPECT_NEAR(s.from_sun.z(), erfa("epv00", "pvh[0][2]"), 1e-10);
  EXPECT_NEAR(s.velocity.x(), erfa("epv00", "pvb[1][0]"), 1e-12);
  EXPECT_NEAR(s.velocity.y(), erfa("epv00", "pvb[1][1]"), 1e-12);
  EXPECT_NEAR(s.velocity.z(), erfa("epv00", "pvb[1][2]"), 1e-12);
  EXPECT_NEAR(s.sun_velocity.x(), erfa("epv00", "pvb[1][0]") - erfa("epv00", "pvh[1][0]"), 1e-12);
}

TEST(Erfa, NutationObliquityAndOrigins) {
  const Tt t = Tt::from_julian_date(2400000.5 + 53736.0);
  const Eigen::Vector3d n = nutation_and_origins(t);
  EXPECT_NEAR(n[0], erfa("nut00b", "dpsi"), 1e-13);
  EXPECT_NEAR(n[1], erfa("nut00b", "deps"), 1e-13);
  EXPECT_NEAR(n[2], erfa("eo06a", "eo"), 5e-9);  // there with nutation 2000A: 1 milliarcsecond
  EXPECT_NEAR(mean_obliquity(Tt::from_julian_date(2400000.5 + 54388.0)), erfa("obl06", "return"),
              1e-13);
}

// Nutation 2000A there, 2000B here: a milliarcsecond, 5e-9.
TEST(Erfa, RotationToDate) {
  const Tt t = Tt::from_julian_date(2400000.5 + 50123.9999);
  const Eigen::Matrix3d m = YearEphemeris(t - Days(20.0), t + Days(20.0)).icrs_to_date(t);
  for (int i = 0; i < 3; ++i)
    for (int j = 0; j < 3; ++j)
      EXPECT_NEAR(m(i, j),
                  erfa("pnm06a", "rbpn[" + std::to_string(i) + "][" + std::to_string(j) + "]"),
                  5e-9)
          << i << j;
}

TEST(Erfa, Aberration) {
  EarthState earth;
  earth.velocity =
      Eigen::Vector3d(2.1044018893653786e-5, -8.9108923304429319e-5, -3.8633714797716569e-5) *
      173.1446326846693;
  earth.from_sun = Eigen::Vector3d(0.99980921395708788, 0.0, 0.0);
  const Eigen::Vector3d natural(-0.76321968546737951, -0.60869453983060384, -0.21676408580639883);
  const Eigen::Vector3d got = with_aberration(5.0 * natural, earth) / 5.0;
  EXPECT_NEAR(got.x(), erfa("ab", "ppr[0]"), 1e-12);
  EXPECT_NEAR(got.y(), erfa("ab", "ppr[1]"), 1e-12);
  EXPECT_NEAR(got.z(), erfa("ab", "ppr[2]"), 1e-12);
}

// A planet so far away that its direction is the same from Sun and Earth is deflected as a star is.
TEST(Erfa, DeflectionBySun) {
  EarthState earth;
  earth.from_sun = Eigen::Vector3d(-0.973644023, -0.20925523, -0.0907169552) * 0.999809214;
  const Eigen::Vector3d star(-0.763276255, -0.608633767, -0.216735543);
  const Eigen::Vector3d got = with_deflection(1e12 * star, 1e12 * star, earth).normalized();
  EXPECT_NEAR(got.x(), erfa("ldsun", "p1[0]"), 1e-9);
  EXPECT_NEAR(
      (got - star.normalized()).norm(),
      (Eigen::Vector3d(erfa("ldsun", "p1[0]"), erfa("ldsun", "p1[1]"), erfa("ldsun", "p1[2]")) -
       star)
          .norm(),
      1e-10);
}

}  // namespace
}  // namespace duskleaf
