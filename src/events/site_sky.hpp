#pragma once

#include <vector>

#include "ephemeris/year_ephemeris.hpp"
#include "events/events.hpp"

namespace duskleaf {

/// Greenwich apparent sidereal time, linear between look-ups a day apart (it leaves a straight line
/// by less than 0.01 arcsecond).
class SiderealClock {
 public:
  /// Good in [from, to]; outside it the first or last day's rate goes on.
  SiderealClock(const YearEphemeris&, Ut from, Ut to);
  /// Not reduced to a turn.
  Angle greenwich(Ut) const;

 private:
  double first_day_;
  std::vector<double> at_day_;  // radians, unwrapped
};

/// Geocentric altitudes at one site as fast as searches want them. Keeps references: the ephemeris
/// must outlive it.
class SiteSky {
 public:
  SiteSky(const YearEphemeris&, const Observer&, Ut from, Ut to);

  const YearEphemeris& ephemeris() const { return ephemeris_; }
  const Observer& observer() const { return observer_; }
  Angle local_sidereal_time(Ut) const;  // [0, 360) degrees

  /// What a body does in this sky: `altitude` is the sine of its geocentric altitude, `west` and
  /// `south` are the components of its unit vector in the equator's plane towards hour angles 90
  /// and 0 degrees.
  struct Sight {
    double altitude, west, south;
    double distance_au;
  };
  Sight sight(Body, Ut) const;
  Angle altitude(Body, Ut) const;  // geocentric, no refraction
  /// Sine of the Moon's geocentric altitude less that of its limit of rise and set (0.7275 parallax
  /// - 34').
  static double moon_excess(const Sight&);
  bool moon_up(Ut t) const { return moon_excess(sight(Body::moon, t)) > 0.0; }

 private:
  const YearEphemeris& ephemeris_;
  Observer observer_;
  double sine_latitude_, cosine_latitude_;
  SiderealClock clock_;
};

/// Altitudes of the Sun's centre: at rise and set, and at the ends of the twilights (conventions:
/// see site_sky.cpp).
inline constexpr Angle sun_rise_altitude = Angle::from_arcminutes(-50.0);
inline constexpr Angle civil_altitude = Angle::from_degrees(-6.0);
inline constexpr Angle nautical_altitude = Angle::from_degrees(-12.0);
inline constexpr Angle astronomical_altitude = Angle::from_degrees(-18.0);
/// Altitude of a star or planet at rise and set.
inline constexpr Angle star_rise_altitude = Angle::from_arcminutes(-34.0);

/// Rises, transits and sets of a planet in [from, to), each in order.
struct RiseSet {
  std::vector<Ut> rises, transits, sets;
};
RiseSet planet_rise_set(const SiteSky&, Body, Ut from, Ut to);

}  // namespace duskleaf
