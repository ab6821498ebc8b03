#pragma once

#include "base/angle.hpp"

namespace duskleaf {

/// Faintest star seen by the bare eye, given the site's limit in full darkness, the Sun's altitude,
/// and the Moon's altitude and lit part. The published models used are named in brightness.cpp.
double faintest_star(double site_limit, Angle sun_altitude, Angle moon_altitude,
                     double moon_lit_fraction);

}  // namespace duskleaf
