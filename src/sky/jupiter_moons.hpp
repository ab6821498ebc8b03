#pragma once

#include <array>
#include <string>

#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

/// One of Jupiter's four bright moons beside the planet's disc, as the Earth's centre sees it.
struct JupiterMoon {
  double x, y;    // from Jupiter's centre in its equatorial radii: x positive to the west, y north
  double z;       // positive towards the Earth
  bool hidden;    // behind the disc
  bool in_front;  // before the disc
};
/// Io, Europa, Ganymede, Callisto. Theory, accuracy: jupiter_moons.cpp.
std::array<JupiterMoon, 4> jupiter_moons(const YearEphemeris&, Tt);
/// Their order from east to west with "J" for the planet: "2 1 J 3 4"; a hidden one is left out,
/// one before the disc too.
std::string moons_east_to_west(const std::array<JupiterMoon, 4>&);

}  // namespace duskleaf
