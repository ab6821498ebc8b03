#pragma once

#include <optional>
#include <vector>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// A date and what stands on it.
struct DayExtreme {
  Date date;    // civil, of `at`
  Ut at;        // of the rise or set: a day's sunrise, a night's sunset
  Days length;  // of the day or night; 0 for a single instant
};
struct DateSpan {
  Date first, last;                // both included
  bool begins_before, ends_after;  // it reaches out of the year
};

/// A site's Sun over the year. Earliest and latest are by a clock that is never changed, so that
/// summer time does not decide; a sunset after midnight counts to the day before, as the sunset
/// that follows a noon. Empty where the Sun does not rise and set about every noon.
struct YearExtremes {
  std::optional<DayExtreme> earliest_sunset, latest_sunset, earliest_sunrise, latest_sunrise;
  std::optional<DayExtreme> longest_day, shortest_day;
  std::optional<DayExtreme> longest_night, shortest_night;  // by the date of the evening
  std::vector<DateSpan> no_astronomical_night;  // evenings' dates: the Sun stays above -18 degrees
  std::vector<DateSpan> midnight_sun, polar_night;  // civil dates: up (down) from 0 to 24 h
};
YearExtremes year_extremes(const SiteYear&);

}  // namespace duskleaf
