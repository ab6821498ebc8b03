#include "sky/projection.hpp"

#include <cmath>
#include <gtest/gtest.h>

namespace duskleaf {
namespace {

Angle degrees(double d) { return Angle::from_degrees(d); }

// J. P. Snyder, USGS Professional Paper 1395 (1987), p. 158: a point at distance c from the centre
// lies at 2 k tan(c/2); here k = 1/2.
TEST(Projection, PlacesOfKnownDirections) {
  struct Row {
    const char* label;
    double facing, altitude, azimuth, x, y;
  };
  const double t20 = std::tan(10.0 * 0.017453292519943295);
  for (const Row& row :
       {Row{"centre", 180, 0, 180, 0, 0}, Row{"zenith", 180, 90, 0, 0, 1},
        Row{"east, facing south", 180, 0, 90, -1, 0}, Row{"west, facing south", 180, 0, 270, 1, 0},
        Row{"east, facing north", 0, 0, 90, 1, 0}, Row{"20 degrees up", 75, 20, 75, 0, t20},
        Row{"20 degrees right, over north", 350, 0, 10, t20, 0},
        Row{"nadir", 180, -90, 0, 0, -1}}) {
    const Eigen::Vector2d p =
        FacingProjection(degrees(row.facing))({degrees(row.altitude), degrees(row.azimuth)});
    EXPECT_NEAR(p.x(), row.x, 1e-12) << row.label;
    EXPECT_NEAR(p.y(), row.y, 1e-12) << row.label;
  }
}

TEST(Projection, ThereAndBack) {
  const FacingProjection projection(degrees(137));
  for (double altitude = -80; altitude <= 80; altitude += 16)
    for (double azimuth = 0; azimuth < 360; azimuth += 23) {
      const Horizontal back = projection.inverse(projection({degrees(altitude), degrees(azimuth)}));
      EXPECT_NEAR(back.altitude.degrees(), altitude, 1e-9) << azimuth;
      EXPECT_NEAR((back.azimuth - degrees(azimuth)).centred().degrees(), 0.0, 1e-9) << altitude;
    }
}

TEST(Projection, BehindTheObserverIsFarButFinite) {
  const Eigen::Vector2d p = FacingProjection(degrees(0))({degrees(0), degrees(180)});
  EXPECT_TRUE(std::isfinite(p.x()) && std::isfinite(p.y()));
  EXPECT_GT(FacingProjection(degrees(0))({degrees(0.01), degrees(180)}).norm(), 1e3);
}

}  // namespace
}  // namespace duskleaf
