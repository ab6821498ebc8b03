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
  Horizontal place;  // refracted
  Date night;        // the evening's date
  bool morning;      // before sunrise rather than in the evening
  bool above_skyline;
};

/// A closest approach as a site can see it.
struct Meeting {
  Approach closest;
  std::optional<Look> look;  // the nearest convenient one; empty where the two are not up in any
  Angle separation;          // topocentric, at the look (at the closest moment without one)
  bool bare_eye;             // both within the bare eye's reach at the look
};
std::vector<Meeting> meetings(const SiteSky&, const SiteYear&, const std::vector<Approach>&);

}  // namespace duskleaf
