#pragma once

namespace duskleaf {

inline constexpr double km_per_au = 149597870.7;      // IAU 2012 resolution B2
inline constexpr double earth_radius_km = 6378.1366;  // equatorial, IERS Conventions 2010
inline constexpr double earth_radius_au = earth_radius_km / km_per_au;
inline constexpr double light_speed_au_per_day =
    173.1446326846693;  // 299792.458 km/s (SI) in au and days of 86400 s
inline constexpr double arcsecond = 4.848136811095359935899141e-6;  // radians
/// The Sun's at 1 au, radians: A. Auwers 1891, as eclipses and transits are computed with.
inline constexpr double sun_semidiameter = 959.63 * arcsecond;
/// The Moon's mean radius in the Earth's equatorial radii: k, IAU 1982.
inline constexpr double moon_k = 0.2725076;

}  // namespace duskleaf
