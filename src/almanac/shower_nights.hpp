#pragma once

#include <optional>
#include <string_view>
#include <vector>

#include "almanac/site_year.hpp"
#include "events/showers.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// Whether a shower is worth going out for, at this site in this year: shower_nights.cpp says by
/// which numbers.
enum class Verdict { good, fair, poor, not_seen };
std::string_view verdict_name(Verdict);  // "good", "fair", "poor", "not-seen"
/// What spoils it most, or `none`.
enum class Spoiler {
  none,
  moon,
  low_radiant,
  radiant_down,
  bright_night,
  peak_by_day,
  few_meteors
};

/// A shower's peak from a site, on the night that gives it most meteors.
struct SiteShower {
  int shower;  // index into showers()
  Ut peak;
  Date night;                            // that of its best hour
  std::optional<Ut> best_from, best_to;  // when the rate is at least half of the best one's, the
                                         // Moon's hours left out where that pays (.cpp)
  std::optional<Ut> best;
  Horizontal radiant;     // at `best` (at the peak where there is none), no refraction
  Angle radiant_highest;  // while the Sun is low enough that night
  double moon_lit;        // at `best`
  bool moon_up;           // at any time from best_from to best_to (at the peak without them)
  std::optional<Ut> moon_sets, moon_rises;  // the first ones strictly between best_from and best_to
  double expected_per_hour;  // at `best`, under that sky: see the .cpp; 0 where the ZHR varies
  double expected_dark;      // the same without Moon and twilight under a limit of 6.5
  Verdict verdict;           // poor at best where the ZHR varies
  Spoiler spoiler;
};
/// One for each peak, in order of time.
std::vector<SiteShower> shower_nights(const SiteSky&, const SiteYear&,
                                      const std::vector<ShowerPeak>&);

}  // namespace duskleaf
