#include "sky/planet_magnitude.hpp"

#include <cmath>
#include <gtest/gtest.h>

#include "base/civil.hpp"
#include "base/csv.hpp"
#include "ephemeris/reference_text.hpp"

namespace duskleaf {
namespace {

Body planet_named(std::string_view name) {
  for (Body b : planets)
    if (body_name(b) == name) return b;
  throw std::runtime_error("no planet " + std::string(name));
}

// The authors' own values, tests/reference/planet_magnitudes.csv.
TEST(PlanetMagnitude, MallamaAndHiltonsTestValues) {
  const std::string text = reference_text("planet_magnitudes.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 23u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const Body planet = planet_named(table.cell(r, 0));
    const auto number = [&](const char* column) { return table.number(r, table.column(column)); };
    const PlanetAspect aspect{number("sun_distance"),
                              number("earth_distance"),
                              Angle::from_degrees(number("phase_angle")),
                              Angle::from_degrees(number("sub_solar_latitude")),
                              Angle::from_degrees(number("sub_earth_latitude")),
                              number("year")};
    const bool globe = planet == Body::saturn && table.cell(r, table.column("with_rings")) == "no";
    const double got = globe ? saturn_globe_magnitude(aspect) : planet_magnitude(planet, aspect);
    // Mars: the terms left out here.
    EXPECT_NEAR(got, number("magnitude"), planet == Body::mars ? 0.08 : 0.001)
        << table.cell(r, 0) << " row " << r;
  }
}

// Against DE431, tests/reference/planet_aspects.csv, which simplifies the tilt of Saturn and
// Uranus.
TEST(PlanetMagnitude, PhaseAnglesAndMagnitudesOfSixDecades) {
  const std::string text = reference_text("planet_aspects.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 84u);
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const Body planet = planet_named(table.cell(r, 0));
    const Tt t = Tt::from_julian_date(table.number(r, 1));
    const PlanetAspect aspect =
        planet_aspect(YearEphemeris(t - Days(0.5), t + Days(0.5)), planet, t);
    EXPECT_NEAR(aspect.phase_angle.degrees(), table.number(r, 2), 0.02)
        << table.cell(r, 0) << " row " << r;
    const double tolerance = planet == Body::uranus ? 0.05 : planet == Body::saturn ? 0.02 : 0.002;
    EXPECT_NEAR(planet_magnitude(planet, aspect), table.number(r, 3), tolerance)
        << table.cell(r, 0) << " row " << r;
  }
}

TEST(PlanetMagnitude, RefusesSunAndMoon) {
  EXPECT_THROW(planet_magnitude(Body::moon, PlanetAspect{}), std::invalid_argument);
  EXPECT_THROW(planet_magnitude(Body::sun, PlanetAspect{}), std::invalid_argument);
}

// J. Meeus, Astronomical Algorithms, 2nd ed. 1998, example 41.a: Venus on 1992 December 20.
TEST(PlanetMagnitude, MeeusExample41aVenus) {
  const Tt t = Tt::from_julian_date(2448976.5);
  const YearEphemeris e(t - Days(1.0), t + Days(1.0));
  const PlanetAspect aspect = planet_aspect(e, Body::venus, t);
  EXPECT_NEAR(aspect.sun_distance, 0.724604, 5e-6);  // the book's series is shortened
  EXPECT_NEAR(aspect.earth_distance, 0.910947,
              2e-4);  // the book's is geometric, ours that of the light seen
  EXPECT_NEAR(aspect.phase_angle.degrees(), 72.96, 0.01);
  EXPECT_NEAR(lit_fraction(aspect.phase_angle), 0.647, 0.001);
}

// Meeus, example 45.a: Saturn's latitudes from its rings, 1992 December 16 (Earth 16.442,
// Sun 14.679 degrees).
TEST(PlanetMagnitude, MeeusExample45aSaturnsTilt) {
  const Tt t = to_tt(Ut::from_julian_date(2448972.5));
  const PlanetAspect aspect =
      planet_aspect(YearEphemeris(t - Days(1.0), t + Days(1.0)), Body::saturn, t);
  EXPECT_NEAR(aspect.sub_earth_latitude.degrees(), 16.442, 0.02);
  EXPECT_NEAR(aspect.sub_solar_latitude.degrees(), 14.679, 0.02);
}

// The Sun stood over Uranus' equator in December 2007 and over the pole in 1985 (from memory).
TEST(PlanetMagnitude, SeasonsOfUranus) {
  const auto sub_solar = [](int year, int month) {
    const Tt t = to_tt(ut_midnight(make_date(year, month, 16)));
    return planet_aspect(YearEphemeris(t - Days(1.0), t + Days(1.0)), Body::uranus, t)
        .sub_solar_latitude.degrees();
  };
  EXPECT_NEAR(sub_solar(2007, 12), 0.0, 0.5);
  EXPECT_NEAR(std::abs(sub_solar(1985, 10)), 82.0, 1.0);
}

}  // namespace
}  // namespace duskleaf
