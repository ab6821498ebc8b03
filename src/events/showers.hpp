#pragma once

#include <vector>

#include "catalogue/showers.hpp"
#include "events/events.hpp"

namespace duskleaf {

struct ShowerPeak {
  int shower;  // index into showers()
  Ut at;       // the Sun's geometric longitude (J2000) reaches the shower's
};
/// In [from, to), in order of time: a span over a year can hold two of a shower, a shorter one
/// none.
std::vector<ShowerPeak> shower_peaks(const YearEphemeris&, Ut from, Ut to);
/// Body the shower's code, value its solar longitude in degrees.
Event shower_event(const ShowerPeak&);

}  // namespace duskleaf
