#pragma once

#include <Eigen/Dense>

#include "base/time.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

/// Heliocentric position of Mercury to Neptune, au, axes of FK5 J2000 (within 0.03" of ICRS):
/// VSOP87B. Reads the planet's terms when first asked; thread-safe. Throws std::invalid_argument
/// for the Sun and the Moon.
Eigen::Vector3d planet_position_au(Body, Tt);

}  // namespace duskleaf
