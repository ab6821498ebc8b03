// Directions from the site, without refraction and aberration: whole degrees are printed.
#include "sheet/eclipse_sky.hpp"

#include <algorithm>

#include "catalogue/stars.hpp"
#include "sky/moon_look.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

constexpr Angle least_altitude = Angle::from_degrees(4), planet_reach = Angle::from_degrees(60),
                star_reach = Angle::from_degrees(35);
constexpr double faintest_planet = 1.0, faintest_star_shown = 1.5;
constexpr std::size_t most = 5;

}  // namespace

std::vector<NearSun> bright_near_sun(const SiteSky& sky, Ut at) {
  const Observer& o = sky.observer();
  const Tt tt = to_tt(at);
  const Angle sidereal = sky.local_sidereal_time(at);
  const auto seen = [&](Body body) {
    return topocentric(sky.ephemeris(), body, o.latitude, o.longitude, o.elevation_m, at);
  };
  const Eigen::Vector3d sun = seen(Body::sun), up = zenith(o.latitude, sidereal);
  std::vector<NearSun> found;
  const auto offer = [&](const Eigen::Vector3d& direction, Angle reach, NearSun thing) {
    thing.distance = angle_between(sun, direction);
    if (thing.distance > reach ||
        to_horizontal(direction, sidereal, o.latitude).altitude < least_altitude)
      return;
    thing.side = position_angle(sun, direction, up);
    found.push_back(thing);
  };
  for (const Body planet : {Body::mercury, Body::venus, Body::mars, Body::jupiter, Body::saturn}) {
    const double magnitude = planet_magnitude(planet, planet_aspect(sky.ephemeris(), planet, tt));
    if (magnitude < faintest_planet)
      offer(seen(planet), planet_reach, {planet, -1, magnitude, Angle(), Angle()});
  }
  const Eigen::Matrix3d to_date = sky.ephemeris().icrs_to_date(tt);
  for (std::size_t i = 0; i < stars().size(); ++i) {
    const Star& star = stars()[i];
    if (star.charted && star.magnitude < faintest_star_shown && !star.name.empty())
      offer(to_date * star.direction, star_reach,
            {Body::sun, static_cast<int>(i), star.magnitude, Angle(), Angle()});
  }
  std::sort(found.begin(), found.end(),
            [](const NearSun& a, const NearSun& b) { return a.magnitude < b.magnitude; });
  found.resize(std::min(found.size(), most));
  std::sort(found.begin(), found.end(),
            [](const NearSun& a, const NearSun& b) { return a.distance < b.distance; });
  return found;
}

}  // namespace duskleaf
