// Rise and set: Explanatory Supplement to the Astronomical Almanac (1992), ch. 9; U.S. Naval
// Observatory, "Rise, Set, and Twilight Definitions": 34' of refraction at the horizon, 16' for the
// Sun's semidiameter, the Moon's upper limb; twilights at -6, -12, -18 degrees. The Moon's limit
// 0.7275 parallax - 34': J. Meeus, Astronomical Algorithms, 2nd ed. (1998), p. 102.
#include "events/site_sky.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "ephemeris/constants.hpp"
#include "events/search.hpp"

namespace duskleaf {

namespace {
constexpr double moon_limit_parallax = 0.7275;
}  // namespace

SiderealClock::SiderealClock(const YearEphemeris& ephemeris, Ut from, Ut to)
    : first_day_(from.days()) {
  const double turn = 2.0 * std::numbers::pi;
  const auto days = static_cast<std::size_t>(std::max(1.0, std::ceil((to - from).count())));
  at_day_.reserve(days + 1);
  for (std::size_t i = 0; i <= days; ++i) {
    // The last look-up would stand past `to`: it is made at `to` and carried on at a sidereal day's
    // rate.
    const double wanted = first_day_ + static_cast<double>(i), day = std::min(wanted, to.days());
    double angle = ephemeris.apparent_sidereal_time(Ut(Days(day))).radians();
    angle +=
        (wanted - day) * turn * 1.00273781191135448;  // IAU 2000 Earth rotation angle, turns a day
    if (i > 0) {
      // A day's advance is a turn and 0.99 degrees.
      const double last = at_day_.back();
      angle = last + turn + std::remainder(angle - last, turn);
    }
    at_day_.push_back(angle);
  }
}

Angle SiderealClock::greenwich(Ut t) const {
  const double x = t.days() - first_day_;
  const double last = static_cast<double>(at_day_.size() - 2);
  const auto i = static_cast<std::size_t>(std::clamp(std::floor(x), 0.0, last));
  return Angle::from_radians(at_day_[i] +
                             (x - static_cast<double>(i)) * (at_day_[i + 1] - at_day_[i]));
}

SiteSky::SiteSky(const YearEphemeris& ephemeris, const Observer& observer, Ut from, Ut to)
    : ephemeris_(ephemeris),
      observer_(observer),
      sine_latitude_(sin(observer.latitude)),
      cosine_latitude_(cos(observer.latitude)),
      clock_(ephemeris, from, to) {}

Angle SiteSky::local_sidereal_time(Ut t) const {
  return (clock_.greenwich(t) + observer_.longitude).positive();
}

SiteSky::Sight SiteSky::sight(Body body, Ut t) const {
  const Eigen::Vector3d place = ephemeris_.apparent(body, to_tt(t));
  const double theta = clock_.greenwich(t).radians() + observer_.longitude.radians();
  const double c = std::cos(theta), s = std::sin(theta), distance = place.norm();
  const double south = (place.x() * c + place.y() * s) / distance;
  const double west = (place.x() * s - place.y() * c) / distance;
  return {cosine_latitude_ * south + sine_latitude_ * place.z() / distance, west, south, distance};
}

Angle SiteSky::altitude(Body body, Ut t) const { return arcsin(sight(body, t).altitude); }

double SiteSky::moon_excess(const Sight& moon) {
  const double parallax = std::asin(earth_radius_au / moon.distance_au);
  return moon.altitude - std::sin(moon_limit_parallax * parallax + star_rise_altitude.radians());
}

RiseSet planet_rise_set(const SiteSky& sky, Body planet, Ut from, Ut to) {
  RiseSet result;
  const double limit = sin(star_rise_altitude);
  for (const Crossing& c :
       find_crossings([&](Ut t) { return sky.sight(planet, t).altitude - limit; }, from, to))
    (c.rising ? result.rises : result.sets).push_back(c.at);
  SearchOptions transits;
  transits.falling = false;
  transits.look_for_grazes = false;
  for (const Crossing& c :
       find_crossings([&](Ut t) { return sky.sight(planet, t).west; }, from, to, transits))
    result.transits.push_back(c.at);
  return result;
}

}  // namespace duskleaf
