#pragma once

#include <vector>

#include "events/events.hpp"

namespace duskleaf {

/// Oppositions (value au), conjunctions, inferior and superior conjunctions, stations in apparent
/// ecliptic longitude, greatest elongations (value deg) of the planets in [from, to), in order of
/// time. Definitions, budget and measured errors: configurations.cpp.
std::vector<Event> planet_configurations(const YearEphemeris&, Ut from, Ut to);

}  // namespace duskleaf
