#pragma once

namespace duskleaf {

inline constexpr double km_per_au = 149597870.7;  // IAU 2012 resolution B2
inline constexpr double light_speed_au_per_day =
    173.1446326846693;  // 299792.458 km/s (SI) in au and days of 86400 s
inline constexpr double arcsecond = 4.848136811095359935899141e-6;  // radians

}  // namespace duskleaf
