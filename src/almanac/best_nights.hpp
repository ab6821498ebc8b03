#pragma once

#include <chrono>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// What a group wants of a night: darkness, the Moon, or either.
enum class Aim { any, dark, moon };

/// Part of a night by the civil clock, minutes after midnight. Readings up to 12:00 are of the date
/// that follows the evening's; `to` at or before `from` is a day later.
struct ClockWindow {
  std::chrono::minutes from, to;
};

/// Why a night stands where it does. Keys, each a word of words/LANG.yaml: dark-hours (number:
/// hours, of dark_rounded), darkest-limit (the Sun's altitude in degrees that stands for dark where
/// the month has no night at -18: -12 or -6), not-dark, moon-lit (percent), moon-up, moon-down
/// (throughout), moon-rises-at, moon-sets-at, planets-visible (how many).
struct NightReason {
  std::string key;
  std::optional<double> number;
  std::optional<Ut> at;
};

/// One night judged, by what a page prints, so that the order can be checked on it: times to five
/// minutes (five at least where there is a minute), the Moon's lit part in whole percents. Equal
/// ones by date.
/// Aim::dark: the longer dark time first, then the less lit Moon. Nights without dark time come
/// after all others: those with the Moon down in the window, then the rest, the less lit first.
/// Aim::moon: the greater product of moon_hours and w, w = 1 - 0.8 |2 lit - 1|: a half-lit Moon
/// counts whole, full and new a fifth, as shadows along the terminator show most.
/// Aim::any: the longer dark time first, then more planets.
struct NightRank {
  Date date;
  double score;  // falls along the order, equal for what stands by date alone. Aim::dark and any:
                 // dark hours, with less than five minutes' worth for what decides next, below 0
                 // without dark time (dark only); moon: the product
  double dark_minutes;  // Sun below dark_limit, Moon down, in the window (in the night without one)
  Angle dark_limit;     // -18 degrees, or the month's (Night::dark_limit)
  double moon_minutes;  // Moon up and Sun below -6 degrees, in the window
  int dark_rounded, moon_rounded;  // both to five minutes, as ranked: what a page should print
  double moon_lit;                 // fraction, at the night's middle (Night::moon_lit)
  int planets_visible;  // to the bare eye at that middle; without a window at the chart's hour
  std::vector<NightReason> reasons;
};

/// The candidates (dates of the span; others, and those that the zone skips, are left out), best
/// first.
std::vector<NightRank> rank_nights(const YearEphemeris&, const SiteYear&,
                                   const std::vector<Date>& candidates,
                                   std::optional<ClockWindow> window, Aim aim);

}  // namespace duskleaf
