// Lunar eclipses by Danjon's rule (A. Danjon, "Les eclipses de Lune par la penombre en 1951",
// L'Astronomie 65 (1951) 51; from memory): the air makes the Earth's shadow larger as if the Earth
// were larger by 1/85, less what its flattening takes off at 45 degrees of latitude, 1/594. F.
// Espenak and J. Meeus, Five Millennium Canon of Lunar Eclipses (NASA/TP-2009-214172), round 1 +
// 1/85 - 1/594 to 1.01 and so does this:
//   umbra's radius    = 1.01 parallax of the Moon - Sun's semidiameter + Sun's parallax
//   penumbra's radius = 1.01 parallax of the Moon + Sun's semidiameter + Sun's parallax
// as angles at the Earth's centre, about the point opposite to the apparent Sun. The parallaxes are
// equatorial; the Sun's semidiameter is 959.63" at 1 au; the Moon's is k = 0.2725076 of the Earth's
// equatorial radius (IAU 1982). Greatest is the least angle from the axis, which the published
// instants follow (the least length is up to 6 s away).
//
// Against cones and a sphere in space from DE431 (37 eclipses of 2020-2035): contacts within 1.4 s,
// 2.9 s where the umbra just touches (2034-09-28), 11 s at the graze of 2027-07-18, which lasts 11
// minutes; greatest 0.13 s; magnitudes 0.0005. An angle in place of a tangent plane leaves out
// 0.16", as the canon does. Against published contacts in TT (13 eclipses of 2024-2030): umbral
// within 2.3 s, penumbral 3.6 s (the published penumbra is narrower by 1"), greatest 0.9 s, after a
// common shift of each row of up to 3.9 s, the TT - UT that its author took.
#include "events/lunar_eclipses.hpp"

#include <algorithm>
#include <cmath>

#include "ephemeris/constants.hpp"
#include "events/search.hpp"
#include "events/syzygies.hpp"
#include "sky/moon_look.hpp"

namespace duskleaf {
namespace {

constexpr double enlargement = 1.01;
// Past 1.6 degrees of latitude at full Moon the penumbra is missed.
constexpr Angle largest_latitude = Angle::from_degrees(1.7);
constexpr double half_span_days = 4.0 / 24.0, tolerance_days = 0.005 / 86400.0;

struct Shadow {
  double separation, umbra, penumbra, moon;  // angles at the Earth's centre, radians
  double from_axis, north;                   // of the Moon's centre, au

  double penumbral_magnitude() const { return (penumbra + moon - separation) / (2.0 * moon); }
  double umbral_magnitude() const { return (umbra + moon - separation) / (2.0 * moon); }
};

Shadow shadow_at(const YearEphemeris& ephemeris, double tt_days) {
  const Tt t{Days(tt_days)};
  const Eigen::Vector3d sun = ephemeris.apparent(Body::sun, t),
                        moon = ephemeris.apparent(Body::moon, t);
  const double sun_distance = sun.norm(), moon_distance = moon.norm();
  const Eigen::Vector3d axis = -sun / sun_distance;
  const double from_axis = moon.cross(axis).norm();
  const double parallax = std::asin(earth_radius_au / moon_distance);
  const double sun_parallax = earth_radius_au / sun_distance,
               sun_radius = sun_semidiameter / sun_distance;
  const Eigen::Vector3d north = Eigen::Vector3d::UnitZ() - axis.z() * axis;
  return {std::atan2(from_axis, moon.dot(axis)),
          enlargement * parallax + sun_parallax - sun_radius,
          enlargement * parallax + sun_parallax + sun_radius,
          std::asin(moon_k * earth_radius_au / moon_distance),
          from_axis,
          moon.dot(north)};
}

std::optional<LunarEclipse> eclipse_near(const YearEphemeris& ephemeris, Tt full_moon) {
  const auto shadow = [&](double day) { return shadow_at(ephemeris, day); };
  // From a whole hour, so that the result does not depend on the span that was searched.
  const double about = std::round(full_moon.days() * 24.0) / 24.0;
  const double greatest = search_detail::least_between(
                              [&](double day) { return shadow(day).separation; },
                              about - half_span_days, about + half_span_days, about, tolerance_days)
                              .at;
  const Shadow most = shadow(greatest);
  if (most.penumbral_magnitude() <= 0.0) return std::nullopt;
  LunarEclipse e{};
  e.greatest = to_ut(Tt(Days(greatest)));
  e.umbral_magnitude = most.umbral_magnitude();
  e.penumbral_magnitude = most.penumbral_magnitude();
  e.gamma = std::copysign(most.from_axis / earth_radius_au, most.north);
  e.kind = e.umbral_magnitude >= 1.0  ? LunarEclipseKind::total
           : e.umbral_magnitude > 0.0 ? LunarEclipseKind::partial
                                      : LunarEclipseKind::penumbral;
  // The contact on one side at which the magnitude `which` passes a value.
  const auto contact = [&](double (Shadow::*which)() const, double value, double side) {
    const auto f = [&](double day) { return (shadow(day).*which)() - value; };
    const double outside = greatest + side * half_span_days;
    return to_ut(Tt(Days(search_detail::zero_between(f, outside, f(outside), greatest, f(greatest),
                                                     tolerance_days))));
  };
  e.penumbral_begins = contact(&Shadow::penumbral_magnitude, 0.0, -1.0);
  e.penumbral_ends = contact(&Shadow::penumbral_magnitude, 0.0, 1.0);
  if (e.kind != LunarEclipseKind::penumbral) {
    e.partial_begins = contact(&Shadow::umbral_magnitude, 0.0, -1.0);
    e.partial_ends = contact(&Shadow::umbral_magnitude, 0.0, 1.0);
  }
  if (e.kind == LunarEclipseKind::total) {
    e.total_begins = contact(&Shadow::umbral_magnitude, 1.0, -1.0);
    e.total_ends = contact(&Shadow::umbral_magnitude, 1.0, 1.0);
  }
  return e;
}

struct Moment {
  EventKind kind;
  Ut at;
};
std::vector<Moment> moments(const LunarEclipse& e) {
  std::vector<Moment> list = {{EventKind::lunar_eclipse_penumbral_begins, e.penumbral_begins}};
  const auto add = [&](EventKind kind, const std::optional<Ut>& at) {
    if (at) list.push_back({kind, *at});
  };
  add(EventKind::lunar_eclipse_partial_begins, e.partial_begins);
  add(EventKind::lunar_eclipse_total_begins, e.total_begins);
  add(EventKind::lunar_eclipse_greatest, e.greatest);
  add(EventKind::lunar_eclipse_total_ends, e.total_ends);
  add(EventKind::lunar_eclipse_partial_ends, e.partial_ends);
  add(EventKind::lunar_eclipse_penumbral_ends, e.penumbral_ends);
  return list;
}

}  // namespace

std::string_view eclipse_name(LunarEclipseKind kind) {
  switch (kind) {
    case LunarEclipseKind::penumbral:
      return "penumbral";
    case LunarEclipseKind::partial:
      return "partial";
    case LunarEclipseKind::total:
      break;
  }
  return "total";
}

std::vector<LunarEclipse> lunar_eclipses(const YearEphemeris& ephemeris, Ut from, Ut to) {
  std::vector<LunarEclipse> found;
  for (const Tt about :
       syzygies_near_node(ephemeris, Syzygy::full_moon, largest_latitude, from, to)) {
    const std::optional<LunarEclipse> e = eclipse_near(ephemeris, about);
    if (e && e->greatest >= from && e->greatest < to) found.push_back(*e);
  }
  return found;
}

std::vector<Event> eclipse_events(const LunarEclipse& e) {
  std::vector<Event> events;
  for (const Moment& m : moments(e)) {
    std::optional<double> value;
    if (m.kind == EventKind::lunar_eclipse_greatest)
      value = e.kind == LunarEclipseKind::penumbral ? e.penumbral_magnitude : e.umbral_magnitude;
    events.push_back({m.kind, Body::moon, m.at, value, eclipse_name(e.kind)});
  }
  return events;
}

SiteLunarEclipse at_site(const SiteSky& sky, const LunarEclipse& e) {
  const Observer& here = sky.observer();
  const YearEphemeris& ephemeris = sky.ephemeris();
  SiteLunarEclipse s{};
  s.eclipse = e;
  for (const Moment& m : moments(e))
    s.contacts.push_back({m.kind,
                          {m.at,
                           topocentric_horizontal(ephemeris, Body::moon, here.latitude,
                                                  here.longitude, here.elevation_m, m.at),
                           sky.moon_up(m.at)}});
  SearchOptions options;
  options.step = Days((e.penumbral_ends - e.penumbral_begins).count() / 8.0);
  const std::vector<Crossing> horizon =
      find_crossings([&](Ut t) { return SiteSky::moon_excess(sky.sight(Body::moon, t)); },
                     e.penumbral_begins, e.penumbral_ends, options);
  const auto within = [&](Ut a, Ut b) {
    return sky.moon_up(a) || sky.moon_up(b) ||
           std::any_of(horizon.begin(), horizon.end(),
                       [&](const Crossing& c) { return c.at >= a && c.at < b; });
  };
  s.visible = within(e.penumbral_begins, e.penumbral_ends);
  s.umbra_visible = e.partial_begins ? within(*e.partial_begins, *e.partial_ends) : s.visible;
  s.drawn_at = e.greatest;
  const bool look = !sky.moon_up(e.greatest);
  double nearest = 1.0;
  for (const Crossing& c : horizon) {
    std::optional<Ut>& at = c.rising ? s.moonrise : s.moonset;
    if (!at) at = c.at;
    const double away = std::abs((c.at - e.greatest).count());
    if (look && away < nearest) nearest = away, s.drawn_at = c.at;
  }

  const Tt drawn = to_tt(s.drawn_at);
  const Shadow shadow = shadow_at(ephemeris, drawn.days());
  s.shadow_distance = shadow.separation / shadow.moon;
  s.umbra_radius = shadow.umbra / shadow.moon;
  s.penumbra_radius = shadow.penumbra / shadow.moon;
  // The shadow's centre stands as far off as the Moon and shares its parallax.
  const Eigen::Vector3d moon = ephemeris.apparent(Body::moon, drawn);
  const Eigen::Vector3d centre = -ephemeris.apparent(Body::sun, drawn).normalized() * moon.norm();
  const Angle sidereal = sky.local_sidereal_time(s.drawn_at);
  const Eigen::Vector3d site = observer_vector_au(here.latitude, here.elevation_m, sidereal);
  s.shadow_from_zenith =
      position_angle(moon - site, centre - site, zenith(here.latitude, sidereal));
  return s;
}

}  // namespace duskleaf
