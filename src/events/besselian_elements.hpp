#pragma once

#include "events/solar_eclipses.hpp"

namespace duskleaf {

/// Elements for four hours on either side of `t0`, fitted to the ephemeris, which must reach there
/// (else std::out_of_range). How well: besselian_elements.cpp.
BesselianElements besselian_elements(const YearEphemeris&, Tt t0);

/// The elements at one moment.
struct ShadowAxis {
  double x, y, l1, l2;
  double sine_d, cosine_d, mu;  // mu in radians
};
ShadowAxis shadow_axis(const BesselianElements&, double hours_from_t0);

}  // namespace duskleaf
