// J. H. Lieske 1998, "Galilean satellite ephemerides E5", Astronomy and Astrophysics Supplement
// 129, 205, shortened and brought to the ecliptic of date as in J. Meeus, Astronomical Algorithms,
// 2nd ed. 1998, ch. 44. Terms: data/jupiter_moons.csv. Light that reaches us at once left nearer
// moons later than farther ones, and perspective spreads what is nearer: same chapter.
//
// Accuracy: the shortened terms lack some 0.001 Jupiter radius; the reductions here add less.
// Jupiter is flattened by its radii 71492 and 66854 km (IAU working group on cartographic
// coordinates, report of 2015). Departures: the disc's flattening is taken as seen from the plane
// of its equator (never 3.5 degrees off); a moon in the planet's shadow counts as seen.
#include "sky/jupiter_moons.hpp"

#include <algorithm>
#include <cmath>
#include <erfa.h>
#include <stdexcept>
#include <string_view>
#include <vector>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "ephemeris/constants.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;

// Arguments of the terms: value at 1976 August 10.0 TT (JD 2443000.5) and change a day, degrees.
// Gamma, a long wave of Jupiter's longitude, is added to G.
struct Argument {
  std::string_view name;
  double at_epoch, per_day;
};
constexpr std::array<Argument, 17> linear_arguments = {{{"l1", 106.07719, 203.48895579},
                                                        {"l2", 175.73161, 101.374724735},
                                                        {"l3", 120.55883, 50.317609207},
                                                        {"l4", 84.44459, 21.571071177},
                                                        {"p1", 97.0881, 0.16138586},
                                                        {"p2", 154.8663, 0.04726307},
                                                        {"p3", 188.184, 0.00712734},
                                                        {"p4", 335.2868, 0.00184},
                                                        {"w1", 312.3346, -0.13279386},
                                                        {"w2", 100.4411, -0.03263064},
                                                        {"w3", 119.1942, -0.00717703},
                                                        {"w4", 322.6186, -0.00175934},
                                                        {"Phi", 199.6766, 0.1737919},
                                                        {"psi", 316.5182, -0.00000208},
                                                        {"G", 30.23756, 0.0830925701},
                                                        {"G2", 31.97853, 0.0334597339},
                                                        {"Pi", 13.469942, 0.0}}};
constexpr std::size_t psi = 13, mean_anomaly = 14;
// After those: a whole degree, the moon's own true longitude, the sum of its own terms.
constexpr std::size_t one_degree = 17, own_longitude = 18, own_sum = 19, arguments = 20;
using Arguments = std::array<double, arguments>;  // radians

constexpr std::array mean_radii = {5.90569, 9.39657, 14.98832, 26.36273};  // Jupiter's
// How light-time shifts a moon, by its speed; how many Jupiter radii an au has.
constexpr std::array light_time_divisors = {17295.0, 21819.0, 27558.0, 36548.0};
constexpr double radii_per_au = 2095.0;
constexpr double polar_over_equatorial = 66854.0 / 71492.0;

struct Term {
  double amplitude;
  std::vector<std::pair<std::size_t, double>> argument;
  double angle(const Arguments& a) const {
    double sum = 0.0;
    for (const auto& [index, factor] : argument) sum += factor * a[index];
    return sum;
  }
};
struct MoonTerms {
  std::vector<Term> longitude, latitude, radius;
};

std::size_t argument_index(std::string_view name) {
  for (std::size_t i = 0; i < linear_arguments.size(); ++i)
    if (linear_arguments[i].name == name) return i;
  if (name == "deg") return one_degree;
  if (name == "L") return own_longitude;
  if (name == "S") return own_sum;
  throw std::runtime_error("jupiter_moons.csv: no argument " + std::string(name));
}

/// "2l1 -2l2 +52.225deg"
Term parse_term(double amplitude, std::string_view text) {
  Term term{amplitude, {}};
  while (!text.empty()) {
    const std::size_t end = std::min(text.find(' '), text.size());
    std::string_view part = text.substr(0, end);
    text.remove_prefix(std::min(end + 1, text.size()));
    const double sign = part.front() == '-' ? -1.0 : 1.0;
    if (part.front() == '-' || part.front() == '+') part.remove_prefix(1);
    const std::size_t digits = part.find_first_not_of("0123456789.");
    const double factor = digits == 0 ? 1.0 : parse_number(part.substr(0, digits));
    term.argument.emplace_back(argument_index(part.substr(digits)), sign * factor);
  }
  return term;
}

const std::array<MoonTerms, 4>& terms() {
  static const std::array<MoonTerms, 4> loaded = [] {
    std::array<MoonTerms, 4> moons;
    const CsvTable table(embedded_file("data/jupiter_moons.csv"));
    for (std::size_t r = 0; r < table.rows(); ++r) {
      MoonTerms& moon = moons.at(static_cast<std::size_t>(table.integer(r, 0) - 1));
      const std::string_view quantity = table.cell(r, 1);
      (quantity == "longitude"  ? moon.longitude
       : quantity == "latitude" ? moon.latitude
                                : moon.radius)
          .push_back(parse_term(table.number(r, 2), table.cell(r, 3)));
    }
    return moons;
  }();
  return loaded;
}

double radians(double degrees) { return Angle::from_degrees(degrees).radians(); }

Arguments arguments_at(double days) {
  Arguments a{};
  for (std::size_t i = 0; i < linear_arguments.size(); ++i)
    a[i] = radians(
        std::fmod(linear_arguments[i].at_epoch + linear_arguments[i].per_day * days, 360.0));
  a[mean_anomaly] += radians(0.33033) * std::sin(radians(163.679 + 0.0010512 * days)) +
                     radians(0.03439) * std::sin(radians(34.486 - 0.0161731 * days));
  a[one_degree] = radians(1.0);
  return a;
}

/// Where a moon stands about Jupiter: x towards the ascending node of Jupiter's equator on its
/// orbit, z to the pole; in Jupiter's radii.
Vector in_equator(std::size_t moon, Arguments a) {
  const MoonTerms& t = terms()[moon];
  for (const Term& term : t.longitude)
    a[own_sum] += radians(term.amplitude) * std::sin(term.angle(a));
  a[own_longitude] = a[moon] + a[own_sum];
  double tangent = 0.0, radius = 1.0;
  for (const Term& term : t.latitude) tangent += term.amplitude * std::sin(term.angle(a));
  for (const Term& term : t.radius) radius += term.amplitude * std::cos(term.angle(a));
  const double latitude = std::atan(tangent), from_node = a[own_longitude] - a[psi];
  return mean_radii[moon] * radius *
         Vector(std::cos(latitude) * std::cos(from_node), std::cos(latitude) * std::sin(from_node),
                std::sin(latitude));
}

Eigen::Matrix3d about_x(double angle) {
  return Eigen::AngleAxisd(angle, Vector::UnitX()).toRotationMatrix();
}
Eigen::Matrix3d about_z(double angle) {
  return Eigen::AngleAxisd(angle, Vector::UnitZ()).toRotationMatrix();
}

/// From Jupiter's equator through its orbit to the mean ecliptic and equinox of date. `node`: of
/// the equator on the orbit, referred to the equinox of 1950.
Eigen::Matrix3d equator_to_ecliptic(double node, Tt t) {
  const double from_1950 = (t.days() + 2451545.0 - 2433282.423) / 36525.0;
  const double from_1900 = t.julian_centuries() + 1.0, centuries = t.julian_centuries();
  const double precession = radians((1.3966626 + 0.0003088 * from_1950) * from_1950);
  const double equator_on_orbit = radians(3.120262 + 0.0006 * from_1900);
  // Jupiter's orbit on the ecliptic of date, same book, table 31.A.
  const double orbit_node = radians(
      100.464407 + centuries * (1.0209774 + centuries * (0.00040315 + centuries * 4.04e-7)));
  const double inclination =
      radians(1.303267 + centuries * (-0.0054965 + centuries * (4.66e-6 - centuries * 2e-9)));
  return about_z(orbit_node) * about_x(inclination) * about_z(node + precession - orbit_node) *
         about_x(equator_on_orbit);
}

/// Direction of Jupiter without aberration (first order: 0.001" is left), mean ecliptic of date.
Vector line_of_sight(const YearEphemeris& ephemeris, const Vector& apparent, Tt t) {
  const Vector seen = ephemeris.icrs_to_date(t).transpose() * apparent.normalized();
  const Vector natural = (seen - ephemeris.earth_velocity(t)).normalized();
  double icrs_to_ecliptic[3][3];
  eraEcm06(2451545.0, t.days(), icrs_to_ecliptic);
  Vector direction;
  for (int row = 0; row < 3; ++row) direction[row] = Vector(icrs_to_ecliptic[row]).dot(natural);
  return direction;
}

}  // namespace

std::array<JupiterMoon, 4> jupiter_moons(const YearEphemeris& ephemeris, Tt t) {
  const Vector apparent = ephemeris.apparent(Body::jupiter, t);
  const double distance = apparent.norm();
  const Vector sight = line_of_sight(ephemeris, apparent, t);
  const Tt then = t - Days(distance / light_speed_au_per_day);
  const Arguments a = arguments_at(then.days() + 2451545.0 - 2443000.5);
  const Eigen::Matrix3d to_ecliptic = equator_to_ecliptic(a[psi], t);
  const Vector pole = to_ecliptic.col(2);
  const Vector west = sight.cross(pole).normalized(), north = west.cross(sight);

  std::array<JupiterMoon, 4> moons{};
  for (std::size_t i = 0; i < moons.size(); ++i) {
    const Vector place = to_ecliptic * in_equator(i, a);
    const double away = place.dot(sight);
    double x = place.dot(west);
    const double across = x / place.norm();
    x += std::abs(away) / light_time_divisors[i] * std::sqrt(1.0 - across * across);
    const double perspective = distance / (distance + away / radii_per_au);
    JupiterMoon& moon = moons[i];
    moon.x = x * perspective;
    moon.y = place.dot(north) * perspective;
    moon.z = -away;
    const bool on_disc = std::hypot(moon.x, moon.y / polar_over_equatorial) < 1.0;
    moon.hidden = on_disc && moon.z < 0.0;
    moon.in_front = on_disc && moon.z >= 0.0;
  }
  return moons;
}

std::string moons_east_to_west(const std::array<JupiterMoon, 4>& moons) {
  std::vector<std::pair<double, char>> row = {{0.0, 'J'}};
  for (std::size_t i = 0; i < moons.size(); ++i)
    if (!moons[i].hidden && !moons[i].in_front)
      row.emplace_back(moons[i].x, static_cast<char>('1' + static_cast<char>(i)));
  std::sort(row.begin(), row.end());
  std::string text;
  for (const auto& [x, name] : row) {
    if (!text.empty()) text += ' ';
    text += name;
  }
  return text;
}

}  // namespace duskleaf
