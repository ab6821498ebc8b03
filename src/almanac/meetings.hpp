#pragma once

#include <optional>
#include <vector>

#include "almanac/site_year.hpp"
#include "events/approaches.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// A convenient moment at which a site sees something, and where: meetings.cpp says how chosen.
struct Look {
  Ut at;
  Horizontal place;    // refracted; of the first of the two (the Moon, the inner planet)
  Date night;          // the evening's date
  bool morning;        // after midnight and past the evening's hours
  bool above_skyline;  // both; true where the order gives no skyline
};

/// A closest approach as a site can see it.
struct Meeting {
  Approach closest;
  std::optional<Look> look;  // the nearest convenient one; empty where the two are not up in any
  Angle separation;          // topocentric, at the look (at the closest moment without one)
  bool bare_eye;             // both within the bare eye's reach at the look
};
/// One for each approach, in its order.
std::vector<Meeting> meetings(const SiteSky&, const SiteYear&, const std::vector<Approach>&);

/// Two targets as a site sees them at an instant: refracted places and the topocentric separation
/// (no refraction).
struct PairSight {
  Horizontal a, b;
  Angle separation;
};
PairSight pair_sight(const SiteSky&, int a, int b, Ut);

}  // namespace duskleaf
