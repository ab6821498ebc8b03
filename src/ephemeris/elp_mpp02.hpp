#pragma once

#include <Eigen/Dense>

#include "base/time.hpp"

namespace duskleaf {

/// Geometric geocentric position of the Moon, km, ICRS axes: ELP/MPP02 with constants fitted to
/// DE405, 4,862 terms. TT stands for TDB (they differ by less than 2 ms, 0.001" of the Moon's
/// motion). Thread-safe.
Eigen::Vector3d moon_position_km(Tt);

}  // namespace duskleaf
