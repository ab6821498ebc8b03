// What the Chebyshev tables add: the same instant from tables that begin elsewhere, whose pieces
// are cut at other times.
#include <cmath>
#include <gtest/gtest.h>
#include <limits>
#include <stdexcept>
#include <thread>

#include "ephemeris/chebyshev.hpp"
#include "ephemeris/elp_mpp02.hpp"
#include "ephemeris/reduction.hpp"
#include "ephemeris/vsop87.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {
namespace {

constexpr double au_km = 149597870.7;
double arcseconds_between(const Eigen::Vector3d& a, const Eigen::Vector3d& b) {
  return Angle::from_radians((a.normalized() - b.normalized()).norm()).arcseconds();
}

TEST(Tables, PlacesDoNotDependOnWhereTheTableBegins) {
  struct Row {
    Body body;
    double limit;  // arcseconds
  };
  // A span with conjunctions of every planet behind the Sun.
  const Tt from(Days(9800.0)), to(Days(10245.0));
  const YearEphemeris one(from, to), other(from - Days(3.7), to);
  for (const Row& row :
       {Row{Body::sun, 0.0002}, Row{Body::moon, 0.0002}, Row{Body::mercury, 0.005},
        Row{Body::venus, 0.005}, Row{Body::mars, 0.005}, Row{Body::jupiter, 0.005},
        Row{Body::saturn, 0.005}, Row{Body::uranus, 0.005}, Row{Body::neptune, 0.005}})
    for (double day = 9800.0; day <= 10245.0; day += 0.0731) {
      const Tt t{Days(day)};
      ASSERT_LT(arcseconds_between(one.apparent(row.body, t), other.apparent(row.body, t)),
                row.limit)
          << body_name(row.body) << " on day " << day;
    }
}

TEST(Tables, GeometricPlacesFollowTheSeries) {
  const YearEphemeris ephemeris(Tt(Days(9800.0)), Tt(Days(10245.0)));
  for (double day = 9801.3; day < 10245.0; day += 17.917) {
    const Tt t{Days(day)};
    EXPECT_NEAR(ephemeris.geometric_distance_au(Body::moon, t) * au_km, moon_position_km(t).norm(),
                1e-4)
        << day;
    EXPECT_NEAR(ephemeris.geometric_distance_au(Body::sun, t), earth_state(t).from_sun.norm(),
                1e-10)
        << day;
    for (Body planet : planets)
      EXPECT_NEAR(ephemeris.heliocentric_distance_au(planet, t),
                  planet_position_au(planet, t).norm(), 2e-8)
          << body_name(planet) << ' ' << day;
  }
}

TEST(Tables, OutsideTheSpanIsRefused) {
  const Tt from(Days(9800.0)), to(Days(9810.0));
  const YearEphemeris ephemeris(from, to);
  EXPECT_NO_THROW(ephemeris.apparent(Body::sun, from));
  EXPECT_NO_THROW(ephemeris.apparent(Body::neptune, to));
  EXPECT_THROW(ephemeris.apparent(Body::sun, from - Days(0.001)), std::out_of_range);
  EXPECT_THROW(ephemeris.place(Body::moon, to + Days(0.001)), std::out_of_range);
  EXPECT_THROW(ephemeris.true_obliquity(to + Days(1.0)), std::out_of_range);
  EXPECT_THROW(ephemeris.icrs_to_date(from - Days(1.0)), std::out_of_range);
  EXPECT_THROW(ephemeris.apparent_sidereal_time(to_ut(to) + Days(0.001)), std::out_of_range);
  EXPECT_THROW(ephemeris.apparent(Body::sun, Tt(Days(std::numeric_limits<double>::quiet_NaN()))),
               std::out_of_range);
  EXPECT_THROW(ephemeris.geometric_distance_au(Body::mars, from), std::invalid_argument);
  EXPECT_THROW(YearEphemeris(to, from), std::invalid_argument);
}

TEST(Tables, ThreadsThatAskTogetherGetTheSame) {
  const Tt from(Days(9800.0)), to(Days(9900.0));
  const YearEphemeris alone(from, to), shared(from, to);
  std::array<std::array<Eigen::Vector3d, 9>, 4> seen;
  std::vector<std::thread> threads;
  for (std::size_t k = 0; k < seen.size(); ++k)
    threads.emplace_back([&, k] {
      for (std::size_t b = 0; b < 9; ++b)
        seen[k][(b + k) % 9] = shared.apparent(static_cast<Body>((b + k) % 9), Tt(Days(9850.25)));
    });
  for (std::thread& thread : threads) thread.join();
  for (std::size_t k = 0; k < seen.size(); ++k)
    for (std::size_t b = 0; b < 9; ++b)
      EXPECT_EQ(seen[k][b], alone.apparent(static_cast<Body>(b), Tt(Days(9850.25))))
          << k << ' ' << b;
}

// Interpolation of an exponential: the error bound of Chebyshev nodes is far below 1e-12 with 14 of
// them on pieces of length 1.
TEST(Chebyshev, ValuesAndRates) {
  const auto f = [](double t) { return Eigen::Vector3d(std::exp(t), std::sin(t), t * t * t); };
  const ChebyshevTable table(PieceLayout::covering(-1.0, 2.5, 1.0, 14), f);
  for (double t = -1.0; t <= 2.5; t += 0.0173) {
    EXPECT_LT((table(t) - f(t)).norm(), 1e-12) << t;
    EXPECT_LT((table.rate(t) - Eigen::Vector3d(std::exp(t), std::cos(t), 3 * t * t)).norm(), 1e-10)
        << t;
  }
}

TEST(Chebyshev, AdaptivePiecesFollowASpike) {
  const auto f = [](double t) { return Eigen::Vector3d(1.0, 1e-5 * t / (t * t + 0.04), 1.0); };
  const PieceLayout layout = PieceLayout::covering(-8.0, 8.0, 8.0, 13);
  const ChebyshevTable adaptive = ChebyshevTable::adaptive(layout, 1e-9, f), plain(layout, f);
  double worst = 0.0, worst_plain = 0.0;
  for (double t = -8.0; t <= 8.0; t += 0.00917) {
    worst = std::max(worst, (adaptive(t) - f(t)).norm());
    worst_plain = std::max(worst_plain, (plain(t) - f(t)).norm());
  }
  EXPECT_LT(worst, 1e-8);
  EXPECT_GT(worst_plain, 1e-6);
}

}  // namespace
}  // namespace duskleaf
