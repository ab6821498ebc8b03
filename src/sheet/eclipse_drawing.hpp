#pragma once

#include <vector>

#include "events/lunar_eclipses.hpp"
#include "events/solar_eclipses.hpp"
#include "events/sun_transits.hpp"
#include "sheet/marks.hpp"
#include "sheet/theme.hpp"

namespace duskleaf {

// Small drawings as the site sees them, the zenith up, in white and tones that a grey copy keeps.
// `box` is square; what is drawn stays in it.

/// The Sun with the Moon before it at the eclipse's best.
void draw_solar_phase(const SiteSolarEclipse&, const Box& box, const Theme&, std::vector<Mark>&);
/// The Moon in the Earth's shadow at the drawn moment, with the shadow's edge.
void draw_lunar_phase(const SiteLunarEclipse&, const Box& box, const Theme&, std::vector<Mark>&);
/// The Sun with the planet's way over it, and the planet at the middle of the transit, larger than
/// it is.
void draw_sun_transit(const SiteSky&, const SiteSunTransit&, Ut at, const Box& box, const Theme&,
                      std::vector<Mark>&);

}  // namespace duskleaf
