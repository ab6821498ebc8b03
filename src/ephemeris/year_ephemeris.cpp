// One span of time as Chebyshev tables. Two layers: geometric places (ELP/MPP02, VSOP87B,
// eraEpv00), whose series are dear and whose motion is smooth, on long pieces; and from them the
// apparent places, which nutation and light deflection roughen, on short ones.
#include "ephemeris/year_ephemeris.hpp"

#include <array>
#include <cmath>
#include <erfa.h>
#include <mutex>
#include <stdexcept>
#include <vector>

#include "ephemeris/chebyshev.hpp"
#include "ephemeris/constants.hpp"
#include "ephemeris/elp_mpp02.hpp"
#include "ephemeris/reduction.hpp"
#include "ephemeris/vsop87.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;

constexpr std::size_t bodies = 9;
std::size_t index_of(Body body) { return static_cast<std::size_t>(body); }

// Days and nodes of the pieces. Measured over 445 days, the largest error that each table adds:
// rotation 0.00002", Earth 0.00001" and 5e-11 au, Moon 0.00004", apparent Sun and Moon 0.0002",
// heliocentric planets 0.0002"; tests/ephemeris/tables_test.cpp holds them to this.
constexpr double rotation_piece = 16.0, earth_piece = 16.0, moon_piece = 32.0, apparent_piece = 8.0,
                 planet_piece = 16.0;
constexpr int rotation_nodes = 14, earth_nodes = 13, moon_nodes = 40, apparent_nodes = 14,
              planet_nodes = 13;
// Relative error at which a piece of a planet's apparent places is halved.
constexpr double planet_tolerance = 0.0005 * arcsecond;
// What the tables hold beyond the span asked for: light-time from Neptune is 4.3 hours.
constexpr double margin = 0.25;

struct GeometricLayout {
  double piece_days;
  int nodes;
};
/// Heliocentric pieces by the planet's own period, and for the outer ones by that of the Sun's
/// wobble, which heliocentric places carry.
GeometricLayout geometric_layout(Body planet) {
  switch (planet) {
    case Body::mercury:
      return {15.0, 13};
    case Body::venus:
      return {45.0, 13};
    default:
      return {60.0, 13};
  }
}

}  // namespace

struct YearEphemeris::Impl {
  struct BodyTables {
    std::once_flag made_geometric, made_apparent;
    ChebyshevTable geometric, apparent;
  };

  Impl(Tt first, Tt last)
      : from(first), to(last), begin(first.days() - margin), end(last.days() + margin) {
    rotation = ChebyshevTable(PieceLayout::covering(begin, end, rotation_piece, rotation_nodes),
                              [](double t) { return nutation_and_origins(Tt(Days(t))); });
    const PieceLayout layout = PieceLayout::covering(begin, end, earth_piece, earth_nodes);
    std::vector<Vector> positions, velocities;
    for (double t : layout.node_times()) {
      const EarthState state = earth_state(Tt(Days(t)));
      positions.push_back(state.from_sun);
      velocities.push_back(state.velocity);
    }
    earth_from_sun = ChebyshevTable(layout, positions);
    earth_velocity = ChebyshevTable(layout, velocities);
  }

  void check(Tt t) const {
    if (!(t >= from && t <= to))
      throw std::out_of_range("instant outside the span of the ephemeris");
  }

  EarthState earth(double t) const {
    const Vector velocity = earth_velocity(t);
    return {earth_from_sun(t), velocity, velocity - earth_from_sun.rate(t)};
  }

  Eigen::Matrix3d to_date(double t) const {
    const Vector n = rotation(t);
    return rotation_to_date(Tt(Days(t)), n[0], n[1]);
  }

  /// Moon: geocentric; planets: heliocentric. au, ICRS.
  const ChebyshevTable& geometric(Body body) const {
    BodyTables& tables = by_body[index_of(body)];
    std::call_once(tables.made_geometric, [&] {
      if (body == Body::moon) {
        tables.geometric = ChebyshevTable(
            PieceLayout::covering(begin, end, moon_piece, moon_nodes),
            [](double t) { return Vector(moon_position_km(Tt(Days(t))) / km_per_au); });
      } else {
        const GeometricLayout g = geometric_layout(body);
        tables.geometric =
            ChebyshevTable(PieceLayout::covering(begin, end, g.piece_days, g.nodes),
                           [body](double t) { return planet_position_au(body, Tt(Days(t))); });
      }
    });
    return tables.geometric;
  }

  const ChebyshevTable& apparent(Body body) const {
    BodyTables& tables = by_body[index_of(body)];
    std::call_once(tables.made_apparent, [&] {
      const auto f = [&](double t) -> Vector {
        const EarthState now = earth(t);
        if (body == Body::sun) return to_date(t) * sun_from(now);
        if (body == Body::moon) return to_date(t) * moon_from(now, t);
        return to_date(t) * planet_from(now, body, t);
      };
      if (body == Body::sun || body == Body::moon)
        tables.apparent = ChebyshevTable(
            PieceLayout::covering(from.days(), to.days(), apparent_piece, apparent_nodes), f);
      else
        tables.apparent = ChebyshevTable::adaptive(
            PieceLayout::covering(from.days(), to.days(), planet_piece, planet_nodes),
            planet_tolerance, f);
    });
    return tables.apparent;
  }

  /// The Sun as it was a light-time ago, seen from the moving Earth. Its own light is not
  /// deflected.
  static Vector sun_from(const EarthState& earth) {
    const double light_time = earth.from_sun.norm() / light_speed_au_per_day;
    return with_aberration(-earth.from_sun - light_time * earth.sun_velocity, earth);
  }

  Vector moon_from(const EarthState& earth, double t) const {
    const ChebyshevTable& moon = geometric(Body::moon);
    const double light_time = moon(t).norm() / light_speed_au_per_day;
    const Vector then = moon(t - light_time);
    // In the barycentric frame the Earth has moved on as well; its aberration brings that back, all
    // but second order. The length stays that from the Earth's centre, which is what parallax
    // needs.
    const Vector seen = with_aberration(then - light_time * earth.velocity, earth);
    return seen * (then.norm() / seen.norm());
  }

  Vector planet_from(const EarthState& earth, Body planet, double t) const {
    const ChebyshevTable& heliocentric = geometric(planet);
    Vector from_sun = heliocentric(t);
    Vector from_earth = from_sun - earth.from_sun;
    for (int i = 0; i < 3; ++i) {
      const double light_time = from_earth.norm() / light_speed_au_per_day;
      from_sun = heliocentric(t - light_time);
      from_earth = from_sun - light_time * earth.sun_velocity - earth.from_sun;
    }
    return with_aberration(with_deflection(from_earth, from_sun, earth), earth);
  }

  Tt from, to;
  double begin, end;  // with margins, days since J2000.0
  ChebyshevTable rotation, earth_from_sun, earth_velocity;
  mutable std::array<BodyTables, bodies> by_body;
};

std::string_view body_name(Body body) {
  constexpr std::array<std::string_view, bodies> names = {
      "sun", "moon", "mercury", "venus", "mars", "jupiter", "saturn", "uranus", "neptune"};
  return names[index_of(body)];
}

EquatorialPlace to_equatorial(const Vector& v) {
  return {arctan2(v.y(), v.x()).positive(), arctan2(v.z(), std::hypot(v.x(), v.y())), v.norm()};
}

YearEphemeris::YearEphemeris(Tt from, Tt to) {
  if (!(from <= to)) throw std::invalid_argument("an ephemeris must begin before it ends");
  impl_ = std::make_unique<Impl>(from, to);
}
YearEphemeris::~YearEphemeris() = default;

Tt YearEphemeris::from() const { return impl_->from; }
Tt YearEphemeris::to() const { return impl_->to; }

Vector YearEphemeris::apparent(Body body, Tt t) const {
  impl_->check(t);
  return impl_->apparent(body)(t.days());
}

EquatorialPlace YearEphemeris::place(Body body, Tt t) const {
  return to_equatorial(apparent(body, t));
}

double YearEphemeris::geometric_distance_au(Body body, Tt t) const {
  impl_->check(t);
  if (body == Body::sun) return impl_->earth_from_sun(t.days()).norm();
  if (body == Body::moon) return impl_->geometric(body)(t.days()).norm();
  throw std::invalid_argument("geometric distance is kept for Sun and Moon only");
}

Angle YearEphemeris::ecliptic_longitude(Body body, Tt t) const {
  const Vector v = apparent(body, t);
  const Angle obliquity = true_obliquity(t);
  return arctan2(v.y() * cos(obliquity) + v.z() * sin(obliquity), v.x()).positive();
}

Angle YearEphemeris::ecliptic_latitude(Body body, Tt t) const {
  const Vector v = apparent(body, t);
  const Angle obliquity = true_obliquity(t);
  return arcsin((v.z() * cos(obliquity) - v.y() * sin(obliquity)) / v.norm());
}

double YearEphemeris::heliocentric_distance_au(Body body, Tt t) const {
  impl_->check(t);
  if (body == Body::sun) return impl_->earth_from_sun(t.days()).norm();
  if (body == Body::moon)
    return (impl_->earth_from_sun(t.days()) + impl_->geometric(body)(t.days())).norm();
  return impl_->geometric(body)(t.days()).norm();
}

Angle YearEphemeris::apparent_sidereal_time(Ut ut) const {
  const Tt t = to_tt(ut);
  impl_->check(t);
  return Angle::from_radians(eraEra00(2451545.0, ut.days()) - impl_->rotation(t.days())[2])
      .positive();
}

Angle YearEphemeris::true_obliquity(Tt t) const {
  impl_->check(t);
  return Angle::from_radians(mean_obliquity(t) + impl_->rotation(t.days())[1]);
}

Eigen::Matrix3d YearEphemeris::icrs_to_date(Tt t) const {
  impl_->check(t);
  return impl_->to_date(t.days());
}

Vector YearEphemeris::earth_velocity(Tt t) const {
  impl_->check(t);
  return impl_->earth_velocity(t.days()) / light_speed_au_per_day;
}

}  // namespace duskleaf
