// P. Bretagnon & G. Francou 1988, "Planetary theories in rectangular and spherical variables.
// VSOP87 solutions", A&A 202, 309: version B (heliocentric, spherical, dynamical ecliptic and
// equinox J2000), and that paper's rotation to FK5.
#include "ephemeris/vsop87.hpp"

#include <array>
#include <cmath>
#include <mutex>
#include <stdexcept>
#include <string>
#include <string_view>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "ephemeris/series.hpp"

namespace duskleaf {
namespace {

constexpr int powers = 6;

struct PlanetSeries {
  std::array<std::array<VsopTerms, powers>, 3> coordinate;
};

PlanetSeries load_series(Body planet) {
  PlanetSeries series;
  const CsvTable table(embedded_file("data/vsop87b_" + std::string(body_name(planet)) + ".csv"));
  constexpr std::string_view names = "LBR";
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const std::size_t coordinate = names.find(table.cell(r, 0));
    VsopTerms& t =
        series.coordinate.at(coordinate).at(static_cast<std::size_t>(table.integer(r, 1)));
    t.amplitude.push_back(table.number(r, 2));
    t.phase.push_back(table.number(r, 3));
    t.frequency.push_back(table.number(r, 4));
  }
  return series;
}

const PlanetSeries& series_of(Body planet) {
  static std::array<std::once_flag, planets.size()> loaded;
  static std::array<PlanetSeries, planets.size()> series;
  for (std::size_t i = 0; i < planets.size(); ++i)
    if (planets[i] == planet) {
      std::call_once(loaded[i], [&] { series[i] = load_series(planet); });
      return series[i];
    }
  throw std::invalid_argument("no planetary series for the " + std::string(body_name(planet)));
}

double polynomial(const std::array<VsopTerms, powers>& by_power, double t) {
  double value = 0.0;
  for (int k = powers - 1; k >= 0; --k)
    value = value * t + sum(by_power[static_cast<std::size_t>(k)], t);
  return value;
}

}  // namespace

Eigen::Vector3d planet_position_au(Body planet, Tt when) {
  static const Eigen::Matrix3d to_fk5{{1.0, 0.000000440360, -0.000000190919},
                                      {-0.000000479966, 0.917482137087, -0.397776982902},
                                      {0.0, 0.397776982902, 0.917482137087}};
  const PlanetSeries& series = series_of(planet);
  const double t = when.days() / 365250.0;
  const double longitude = polynomial(series.coordinate[0], t);
  const double latitude = polynomial(series.coordinate[1], t);
  const double radius = polynomial(series.coordinate[2], t);
  return to_fk5 *
         (radius * Eigen::Vector3d(std::cos(latitude) * std::cos(longitude),
                                   std::cos(latitude) * std::sin(longitude), std::sin(latitude)));
}

}  // namespace duskleaf
