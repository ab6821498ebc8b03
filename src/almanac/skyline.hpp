#pragma once

#include <optional>
#include <vector>

#include "almanac/site_year.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// Apparent (refracted) altitude of the local horizon, linear between its points, closed through
/// north; 0 where there are none.
Angle skyline_height(const std::vector<SkylinePoint>&, Angle azimuth);
bool above_skyline(const std::vector<SkylinePoint>&, const Horizontal& apparent);

/// When the Sun's upper edge first clears the skyline on a civil date and when it is last gone
/// behind it. Both empty where it stays behind all day (or above it).
struct SkylineDay {
  Date date;
  std::optional<Ut> clears, gone;
  bool never_clears;
};
/// One for each date of the span; none where the order gives no skyline.
std::vector<SkylineDay> skyline_days(const SiteSky&, const SiteYear&);

}  // namespace duskleaf
