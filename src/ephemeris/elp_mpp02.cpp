// J. Chapront & G. Francou 2003, "The lunar theory ELP revisited. Introduction of new planetary
// perturbations", A&A 404, 735: the series, and the rotation from the inertial mean ecliptic of
// date to that of J2000 (P, Q of Laskar 1986, A&A 157, 59). From the inertial mean ecliptic of
// J2000 to the axes of DE405 (ICRS): J. Chapront, M. Chapront-Touze & G. Francou 2002, A&A 387,
// 700: obliquity 23 deg 26' 21.40928", arc from the origin of right ascensions to the equinox
// -0.05028" (both from memory, borne out by the comparison with DE431 in year_ephemeris.hpp).
#include "ephemeris/elp_mpp02.hpp"

#include <array>
#include <cmath>
#include <string_view>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "ephemeris/constants.hpp"
#include "ephemeris/series.hpp"

namespace duskleaf {
namespace {

constexpr int powers = 5;

struct MoonSeries {
  std::array<double, powers> mean_longitude{};  // radians
  std::array<std::array<ElpTerms, powers>, 3> coordinate;
};

MoonSeries load_series() {
  MoonSeries series;
  const CsvTable w1(embedded_file("data/elp_mpp02_w1.csv"));
  for (std::size_t r = 0; r < w1.rows(); ++r)
    series.mean_longitude.at(static_cast<std::size_t>(w1.integer(r, 0))) = w1.number(r, 1);
  const CsvTable table(embedded_file("data/elp_mpp02.csv"));
  constexpr std::string_view names = "LBR";
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const std::size_t coordinate = names.find(table.cell(r, 0));
    ElpTerms& t =
        series.coordinate.at(coordinate).at(static_cast<std::size_t>(table.integer(r, 1)));
    t.amplitude.push_back(table.number(r, 2));
    t.phase0.push_back(table.number(r, 3));
    t.phase1.push_back(table.number(r, 4));
    t.phase2.push_back(table.number(r, 5));
    t.phase3.push_back(table.number(r, 6));
    t.phase4.push_back(table.number(r, 7));
  }
  return series;
}

double polynomial(const std::array<ElpTerms, powers>& by_power, double t) {
  double value = 0.0;
  for (int k = powers - 1; k >= 0; --k)
    value = value * t + sum(by_power[static_cast<std::size_t>(k)], t);
  return value;
}

/// Inertial mean ecliptic of date to that of J2000, both with the departure point of J2000.
Eigen::Matrix3d ecliptic_of_date_to_j2000(double t) {
  const double p =
      t * (0.10180391e-4 +
           t * (0.47020439e-6 + t * (-0.5417367e-9 + t * (-0.2507948e-11 + t * 0.463486e-14))));
  const double q =
      t * (-0.113469002e-3 +
           t * (0.12372674e-6 + t * (0.12654170e-8 + t * (-0.1371808e-11 - t * 0.320334e-14))));
  const double root = std::sqrt(1.0 - p * p - q * q);
  return Eigen::Matrix3d{{1 - 2 * p * p, 2 * p * q, 2 * p * root},
                         {2 * p * q, 1 - 2 * q * q, -2 * q * root},
                         {-2 * p * root, 2 * q * root, 1 - 2 * p * p - 2 * q * q}};
}

Eigen::Matrix3d ecliptic_j2000_to_icrs() {
  const double obliquity = (23.0 * 3600 + 26 * 60 + 21.40928) * arcsecond;
  const double equinox = -0.05028 * arcsecond;
  return (Eigen::AngleAxisd(equinox, Eigen::Vector3d::UnitZ()) *
          Eigen::AngleAxisd(obliquity, Eigen::Vector3d::UnitX()))
      .toRotationMatrix();
}

}  // namespace

Eigen::Vector3d moon_position_km(Tt when) {
  static const MoonSeries series = load_series();
  static const Eigen::Matrix3d to_icrs = ecliptic_j2000_to_icrs();
  const double t = when.julian_centuries();
  double mean_longitude = 0.0;
  for (int k = powers - 1; k >= 0; --k)
    mean_longitude = mean_longitude * t + series.mean_longitude[static_cast<std::size_t>(k)];
  const double longitude = mean_longitude + polynomial(series.coordinate[0], t) * arcsecond;
  const double latitude = polynomial(series.coordinate[1], t) * arcsecond;
  const double distance = polynomial(series.coordinate[2], t);
  const Eigen::Vector3d of_date =
      distance * Eigen::Vector3d(std::cos(latitude) * std::cos(longitude),
                                 std::cos(latitude) * std::sin(longitude), std::sin(latitude));
  return to_icrs * (ecliptic_of_date_to_j2000(t) * of_date);
}

}  // namespace duskleaf
