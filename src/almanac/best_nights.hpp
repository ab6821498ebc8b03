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
/// hours), darkest-limit (the Sun's altitude in degrees that stands for dark where the month has no
/// night at -18: -12 or -6), not-dark, moon-lit (percent), moon-up, moon-down (throughout),
/// moon-rises-at, moon-sets-at, planets-visible (how many).
struct NightReason {
  std::string key;
  std::optional<double> number;
  std::optional<Ut> at;
};

/// One night judged. The score is hours: dark_hours for Aim::dark; for Aim::moon the hours with the
/// Moon up and the Sun below -6 degrees, times 1 - 0.8 |2 lit - 1| (a half-lit Moon counts whole,
/// full and new a fifth, as shadows along the terminator show most); for Aim::any the dark hours
/// and half of the Moon's. A planet in sight adds a tenth of an hour to each.
struct NightRank {
  Date date;
  double score;
  double dark_minutes;  // Sun below dark_limit, Moon down, in the window (in the night without one)
  Angle dark_limit;     // -18 degrees, or the month's (Night::dark_limit)
  double moon_minutes;  // Moon up and Sun below -6 degrees, in the window
  double moon_lit;      // fraction, at the middle of the window
  int planets_visible;  // to the bare eye at that middle; without a window at the chart's hour
  std::vector<NightReason> reasons;
};

/// The candidates (dates of the span; others, and those that the zone skips, are left out), best
/// first; equal ones by date.
std::vector<NightRank> rank_nights(const YearEphemeris&, const SiteYear&,
                                   const std::vector<Date>& candidates,
                                   std::optional<ClockWindow> window, Aim aim);

}  // namespace duskleaf
