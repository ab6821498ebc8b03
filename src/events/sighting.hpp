#pragma once

#include "base/time.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {

/// A moment of something as a site sees it.
struct Sighting {
  Ut at;
  Horizontal place;  // of Sun or Moon: topocentric, no refraction
  bool visible;      // Sun's centre above -50', Moon's upper limb above the refracted horizon
};

}  // namespace duskleaf
