#pragma once

#include <vector>

#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

enum class Syzygy { new_moon, full_moon };

/// New or full Moons, to a minute, at which the Moon's ecliptic latitude is at most `latitude`:
/// those that may bring an eclipse whose greatest phase is in [from, to), and a few more at the
/// ends. In order.
std::vector<Tt> syzygies_near_node(const YearEphemeris&, Syzygy, Angle latitude, Ut from, Ut to);

}  // namespace duskleaf
