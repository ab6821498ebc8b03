// Local circumstances from Besselian elements: Explanatory Supplement to the Astronomical Almanac
// (1992), ch. 8.36. The site stands in the shadow where its distance m from the axis, in a plane
// through it parallel to the fundamental one, is less than the radius L there: L1 of the penumbra,
// L2 of the umbra (negative before the cone's point: total). Magnitude and obscuration follow from
// m, L1 and L2 alone. Greatest phase is that of the greatest magnitude.
//
// Against topocentric discs from DE431 (34 eclipses of 2020-2035): no contact missed, none extra;
// at 214 places of the tests outer contacts within 0.5 s, inner ones 0.14 s, magnitude 0.00003,
// obscuration 0.0008 (the Moon's two radii), the Sun's rise and set 0.05 s. At 8,457 random places
// once: 0.3 s, but 2.2 s where less than a hundredth of the Sun is covered, and 4.4 s for a
// totality of half a second, where 0.05" of the Moon's place decides.
#include <algorithm>
#include <cmath>
#include <numbers>

#include "ephemeris/constants.hpp"
#include "events/besselian_elements.hpp"
#include "events/search.hpp"
#include "sky/moon_look.hpp"

namespace duskleaf {
namespace {

constexpr double half_span_hours = 4.0, step_hours = 1.0 / 6.0, tolerance_hours = 1e-7;

/// What the shadow is at the site at one moment, in Earth's equatorial radii.
struct Shade {
  double m, l1, l2;

  double magnitude() const { return (l1 - m) / (l1 + l2); }  // of a partial phase
  bool central() const { return m < std::abs(l2); }
  double moon_radius() const { return (l1 - l2) / (l1 + l2); }  // in Sun's radii, as the distance
  double moon_distance() const { return 2.0 * m / (l1 + l2); }
};

class Ground {
 public:
  Ground(const BesselianElements& elements, const Observer& observer)
      : elements_(elements),
        // With the longitude in the sidereal time's place: axes fixed to the Earth, x to Greenwich.
        place_(observer_vector_au(observer.latitude, observer.elevation_m, observer.longitude) /
               earth_radius_au),
        from_axis_(std::hypot(place_.x(), place_.y())),
        longitude_(observer.longitude.radians()) {}

  Shade at(double hours) const {
    const ShadowAxis s = shadow_axis(elements_, hours);
    const double h = s.mu + longitude_, towards = from_axis_ * std::cos(h);
    const double xi = from_axis_ * std::sin(h);
    const double eta = place_.z() * s.cosine_d - towards * s.sine_d;
    const double zeta = place_.z() * s.sine_d + towards * s.cosine_d;
    return {std::hypot(s.x - xi, s.y - eta), s.l1 - zeta * elements_.tan_f1,
            s.l2 - zeta * elements_.tan_f2};
  }
  Ut instant(double hours) const { return to_ut(elements_.t0 + Days(hours / 24.0)); }
  double hours(Ut t) const { return (to_tt(t) - elements_.t0).count() * 24.0; }

 private:
  const BesselianElements& elements_;
  Eigen::Vector3d place_;
  double from_axis_, longitude_;
};

/// Part of a disc of radius 1 that one of radius r at a distance covers.
double covered(double r, double distance) {
  if (distance >= 1.0 + r) return 0.0;
  if (distance <= std::abs(1.0 - r)) return std::min(1.0, r * r);
  const double d2 = distance * distance;
  const double a = arccos((d2 + 1.0 - r * r) / (2.0 * distance)).radians();
  const double b = arccos((d2 + r * r - 1.0) / (2.0 * distance * r)).radians();
  return (a - 0.5 * std::sin(2.0 * a) + r * r * (b - 0.5 * std::sin(2.0 * b))) / std::numbers::pi;
}

struct Phase {
  double magnitude, obscuration;
};
Phase phase(const Shade& s) {
  return {s.central() ? s.moon_radius() : std::max(0.0, s.magnitude()),
          covered(s.moon_radius(), s.moon_distance())};
}

/// Where `f` is greatest between two moments around `about`.
template <class F>
double greatest_between(const F& f, double a, double b, double about) {
  constexpr double lift = 20.0;  // the search wants positive values
  return search_detail::least_between([&](double t) { return lift - f(t); }, a, b, about,
                                      tolerance_hours)
      .at;
}

struct Contacts {
  double first, greatest, last;
  std::optional<double> central_begins, central_ends;
};
std::optional<Contacts> contacts(const Ground& ground) {
  const auto magnitude = [&](double t) { return ground.at(t).magnitude(); };
  double about = -half_span_hours, best = magnitude(about);
  const int steps = static_cast<int>(std::lround(2.0 * half_span_hours / step_hours));
  for (int i = 1; i <= steps; ++i) {
    const double t = -half_span_hours + i * step_hours, value = magnitude(t);
    if (value > best) best = value, about = t;
  }
  constexpr double within_a_step = 0.3;  // what the magnitude can gain between two samples
  if (best < -within_a_step) return std::nullopt;
  const double greatest =
      greatest_between(magnitude, about - step_hours, about + step_hours, about);
  const auto penumbra = [&](double t) {
    const Shade s = ground.at(t);
    return s.l1 - s.m;
  };
  if (penumbra(greatest) <= 0.0) return std::nullopt;
  const auto zero = [&](const auto& f, double outside, double inside) {
    return search_detail::zero_between(f, outside, f(outside), inside, f(inside), tolerance_hours);
  };
  Contacts c{zero(penumbra, -half_span_hours, greatest),
             greatest,
             zero(penumbra, half_span_hours, greatest),
             {},
             {}};
  const auto umbra = [&](double t) {
    const Shade s = ground.at(t);
    return std::abs(s.l2) - s.m;
  };
  // At the edge of the path the deepest moment is a little off the greatest.
  constexpr double beside = 0.05;
  const double deepest = greatest_between(umbra, greatest - beside, greatest + beside, greatest);
  if (umbra(deepest) > 0.0) {
    c.central_begins = zero(umbra, c.first, deepest);
    c.central_ends = zero(umbra, c.last, deepest);
    c.greatest = std::clamp(c.greatest, *c.central_begins, *c.central_ends);
  }
  return c;
}

}  // namespace

std::optional<SiteSolarEclipse> at_site(const SiteSky& sky, const SolarEclipse& eclipse) {
  const Ground ground(eclipse.elements, sky.observer());
  const std::optional<Contacts> c = contacts(ground);
  if (!c) return std::nullopt;
  const Observer& here = sky.observer();
  const YearEphemeris& ephemeris = sky.ephemeris();
  const auto height = [&](Ut t) {
    return sky.sight(Body::sun, t).altitude - sin(sun_rise_altitude);
  };
  const Ut first = ground.instant(c->first), last = ground.instant(c->last);
  SearchOptions options;
  options.step = Days((last - first).count() / 8.0);  // half an hour at most
  const std::vector<Crossing> horizon = find_crossings(height, first, last, options);
  if (horizon.empty() && height(first) <= 0.0) return std::nullopt;

  const auto sighting_at = [&](Ut t, bool up) {
    return Sighting{t,
                    topocentric_horizontal(ephemeris, Body::sun, here.latitude, here.longitude,
                                           here.elevation_m, t),
                    up};
  };
  const auto sighting = [&](double hours) {
    const Ut t = ground.instant(hours);
    return sighting_at(t, height(t) > 0.0);
  };
  SiteSolarEclipse s{};
  s.partial_begins = sighting(c->first);
  s.greatest = sighting(c->greatest);
  s.partial_ends = sighting(c->last);
  if (c->central_begins) s.central_begins = sighting(*c->central_begins);
  if (c->central_ends) s.central_ends = sighting(*c->central_ends);
  for (const Crossing& crossing : horizon) {
    std::optional<Ut>& at = crossing.rising ? s.sunrise : s.sunset;
    if (!at) at = crossing.at;
  }

  const Shade deepest = ground.at(c->greatest);
  const Phase most = phase(deepest);
  s.kind = !c->central_begins ? SolarEclipseKind::partial
           : deepest.l2 < 0.0 ? SolarEclipseKind::total
                              : SolarEclipseKind::annular;
  s.magnitude = most.magnitude;
  s.obscuration = most.obscuration;
  // The phase grows to the greatest and shrinks after: with the Sun down then, the best moment is a
  // rise or a set.
  s.best = s.greatest;
  double best_hour = c->greatest;
  if (!s.greatest.visible && !horizon.empty()) {
    const auto depth = [&](const Crossing& x) { return ground.at(ground.hours(x.at)).magnitude(); };
    const Crossing& best = *std::max_element(
        horizon.begin(), horizon.end(),
        [&](const Crossing& a, const Crossing& b) { return depth(a) < depth(b); });
    best_hour = ground.hours(best.at);
    s.best = sighting_at(best.at, true);
  }
  const Shade drawn = ground.at(best_hour);
  const Phase seen = phase(drawn);
  s.best_magnitude = seen.magnitude;
  s.best_obscuration = seen.obscuration;
  s.moon_radius = drawn.moon_radius();
  s.moon_distance = drawn.moon_distance();
  const auto seen_from_here = [&](Body body) {
    return topocentric(ephemeris, body, here.latitude, here.longitude, here.elevation_m, s.best.at);
  };
  s.moon_from_zenith = position_angle(seen_from_here(Body::sun), seen_from_here(Body::moon),
                                      zenith(here.latitude, sky.local_sidereal_time(s.best.at)));
  return s;
}

}  // namespace duskleaf
