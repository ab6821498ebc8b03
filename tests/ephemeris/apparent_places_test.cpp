// Apparent places against DE431: tests/reference/apparent_places.csv, whose generator is beside it.
// For a larger sample let the generator write one and name it:
// DUSKLEAF_APPARENT_PLACES=/path/to/file test_ephemeris --gtest_filter=ApparentPlaces.*
#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <gtest/gtest.h>
#include <iostream>
#include <map>

#include "base/csv.hpp"
#include "ephemeris/reference_text.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {
namespace {

struct Sample {
  Body body;
  Tt when;
  Eigen::Vector3d direction;
  double distance;
};

Body body_named(std::string_view name) {
  for (int i = 0; i < 9; ++i)
    if (body_name(static_cast<Body>(i)) == name) return static_cast<Body>(i);
  throw std::runtime_error("no body " + std::string(name));
}

TEST(ApparentPlaces, WithinTheLimitsOfDe431) {
  const char* other = std::getenv("DUSKLEAF_APPARENT_PLACES");
  const std::string text = reference_text(other ? other : "apparent_places.csv");
  const CsvTable table(text);
  ASSERT_GE(table.rows(), 9u * 60u);
  // Short spans for few dates, so that little is computed that nobody asks for.
  const double span = other ? 400.0 : 8.0;  // days
  std::map<int, std::vector<Sample>> by_span;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const Tt when = Tt::from_julian_date(table.number(r, table.column("jd_tt")));
    const double ra =
        Angle::from_degrees(table.number(r, table.column("right_ascension"))).radians();
    const double dec = Angle::from_degrees(table.number(r, table.column("declination"))).radians();
    by_span[static_cast<int>(std::floor(when.days() / span))].push_back(
        {body_named(table.cell(r, 0)),
         when,
         {std::cos(dec) * std::cos(ra), std::cos(dec) * std::sin(ra), std::sin(dec)},
         table.number(r, table.column("distance"))});
  }
  std::map<Body, double> largest, largest_distance;
  for (const auto& [index, samples] : by_span) {
    const YearEphemeris ephemeris(Tt(Days(index * span)), Tt(Days((index + 1) * span)));
    for (const Sample& s : samples) {
      const Eigen::Vector3d place = ephemeris.apparent(s.body, s.when);
      const Angle error = Angle::from_radians((place.normalized() - s.direction).norm());
      largest[s.body] = std::max(largest[s.body], error.arcseconds());
      largest_distance[s.body] =
          std::max(largest_distance[s.body], std::abs(place.norm() / s.distance - 1.0));
    }
  }
  struct Limit {
    Body body;
    double arcseconds, distance;
  };
  // The Moon's distance counts from where the Earth's centre is, the reference's from where it was:
  // up to 1.1e-4 between them.
  for (const Limit& limit : {Limit{Body::sun, 0.1, 1e-7}, Limit{Body::moon, 0.2, 1.2e-4},
                             Limit{Body::mercury, 1.2, 2e-6}, Limit{Body::venus, 1.2, 2e-6},
                             Limit{Body::mars, 1.2, 2e-6}, Limit{Body::jupiter, 1.2, 2e-6},
                             Limit{Body::saturn, 1.2, 2e-6}, Limit{Body::uranus, 2.5, 5e-6},
                             Limit{Body::neptune, 2.5, 5e-6}}) {
    EXPECT_LT(largest[limit.body], limit.arcseconds) << body_name(limit.body);
    EXPECT_GT(largest[limit.body], 0.0) << body_name(limit.body);
    EXPECT_LT(largest_distance[limit.body], limit.distance) << body_name(limit.body);
    if (other)
      std::cout << body_name(limit.body) << ": largest error " << largest[limit.body]
                << "\", of distance " << largest_distance[limit.body] << " of itself\n";
  }
}

}  // namespace
}  // namespace duskleaf
