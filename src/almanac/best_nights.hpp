#pragma once

#include <chrono>
#include <optional>
#include <string>
#include <string_view>
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
/// Its instants in the evening of a date; empty where the clocks skip it.
TimeSpan window_span(const Zone&, Date, const ClockWindow&);

/// What may happen in a night and count in its rank.
enum class NightHappening { lunar_eclipse, shower, meeting, occultation };
std::string_view night_happening_name(NightHappening);  // "lunar-eclipse", "shower" ...

/// Why a night stands where it does. Keys, each a word of words/LANG.yaml: dark-hours (number:
/// hours, of dark_rounded), darkest-limit (the Sun's altitude in degrees that stands for dark where
/// the month has no night at -18: -12 or -6), not-dark, moon-lit (percent), moon-up, moon-down
/// (throughout), moon-rises-at, moon-sets-at, planets-visible (how many), happens (last;
/// `happening` and its index tell what; number: the minutes that it counts; at: its moment).
struct NightReason {
  std::string key;
  std::optional<double> number;
  std::optional<Ut> at;
  std::optional<NightHappening> happening = {};
  std::size_t index = 0;  // into SiteHappenings' list of that kind
};

/// One night judged, by what a page prints, so that the order can be checked on it: times to the
/// minute, as the table of nights has them, the Moon's lit part in whole percents. Equal ones by
/// date.
/// Aim::dark: the longer dark time first, then the less lit Moon. Nights without dark time come
/// after all others: those with the Moon down in the window, then the rest, the less lit first.
/// Aim::moon: the greater sum of happens_minutes and the product of moon_rounded and w,
/// w = 1 - 0.8 |2 lit - 1|: a half-lit Moon counts whole, full and new a fifth, as shadows along
/// the terminator show most.
/// Aim::any: the greater sum of dark_rounded and happens_minutes first, then more planets.
/// What happens counts as minutes. An eclipse of the Moon in the umbra: as much of the window (of
/// the time from sunset to sunrise without one) as the umbra covers of the Moon's diameter, so that
/// a total one stands among the darkest nights. Besides, 120 in all at most: a shower in its best
/// night 60 where its verdict is good, 30 where it is fair, and nothing where fewer than 10 meteors
/// an hour are to be expected (its reason is left out too); a meeting within 2 degrees, seen by the
/// bare eye, 30; the Moon's covering of a planet or a star of V 2.5 or brighter 30. For Aim::moon
/// only what the Moon does; for Aim::dark nothing (the reasons tell it all the same).
struct NightRank {
  Date date;
  double score;  // falls along the order, equal for what stands by date alone. Aim::dark and any:
                 // hours, with less than a minute's worth for what decides next, below 0 without
                 // dark time (dark only); moon: hours
  double dark_minutes;  // Sun below dark_limit, Moon down, in the window (in the night without one)
  Angle dark_limit;     // -18 degrees, or the month's (Night::dark_limit)
  double moon_minutes;  // Moon up and Sun below -6 degrees, in the window
  int dark_rounded, moon_rounded;  // both to the minute, as ranked: what a page should print
  int happens_minutes;             // what happenings count in this ranking, see above
  double moon_lit;                 // fraction, at the night's middle (Night::moon_lit)
  int planets_visible;             // how many of `planets`
  std::vector<Body> planets;  // seen by the bare eye at the window's middle (without a window at
                              // the chart's hour), outward from the Sun
  std::vector<NightReason> reasons;
};

struct SiteHappenings;  // almanac/happenings.hpp

/// The candidates (dates of the span; others, and those that the zone skips, are left out), best
/// first. A happening is the night's that it falls in; with a window it must fall in that (a
/// shower's better half and the umbra's time overlap it; a meeting's look within two hours of it).
std::vector<NightRank> rank_nights(const YearEphemeris&, const SiteYear&,
                                   const std::vector<Date>& candidates,
                                   std::optional<ClockWindow> window, Aim aim,
                                   const SiteHappenings* happenings = nullptr);

}  // namespace duskleaf
