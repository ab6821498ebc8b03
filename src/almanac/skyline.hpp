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

/// When the top of the Sun first clears the skyline on a civil date and when it is last gone behind
/// it: what lies between may be cut by the skyline again. An instant belongs to the date of its
/// rounded minute; at high latitudes `gone` may come before `clears`. Both empty where it stays
/// behind all day (or above it). Within 0.02 s of a reference with the same refraction (734
/// instants); real refraction moves them by some seconds, near the horizon by minutes.
struct SkylineDay {
  Date date;
  std::optional<Ut> clears, gone;
  bool never_clears;
};
/// One for each date of the span and one for the morning after its last night; none where the order
/// gives no skyline.
std::vector<SkylineDay> skyline_days(const SiteSky&, const SiteYear&);

}  // namespace duskleaf
