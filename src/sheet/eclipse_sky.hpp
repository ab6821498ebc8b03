#pragma once

#include <vector>

#include "base/angle.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// Something bright near the Sun while it is totally eclipsed.
struct NearSun {
  Body planet;       // Body::sun: it is a star
  int star;          // index into stars(), else -1
  double magnitude;  // V
  Angle distance;    // from the Sun
  Angle side;        // of the Sun, counterclockwise from the overhead as the observer faces it
};
/// Planets brighter than magnitude 1 within 60 degrees and stars brighter than 1.5 within 35, up 4
/// degrees or more, at most five: the brightest, nearest first (this project's choice; totality is
/// about as bright as a twilight with the Sun 5 degrees down, common practice).
std::vector<NearSun> bright_near_sun(const SiteSky&, Ut);

}  // namespace duskleaf
