#pragma once

#include <chrono>
#include <optional>
#include <vector>

#include "almanac/site_year.hpp"
#include "sky/planet_disc.hpp"

namespace duskleaf {

/// Where in the night a planet is to be seen, while the Sun is 5 degrees down or lower (common
/// practice: nobody sweeps with optics, or strains to see, near a Sun that has barely set).
/// Evening: until an hour after the evening's drawn moment (EveningMoment; at least until the
/// darkest moment where the Sun is down for less than six hours). Morning: from two hours before
/// sunrise, or one before nautical dawn where that is earlier, but after the darkest moment.
/// All night: both, and at nine tenths or more of the time with the Sun below -12 degrees. Else a
/// sight of the morning must be seen in the last hour whose light lets it be seen: what has set
/// before the day breaks is none. What is seen between the two alone goes by the side of the
/// darkest moment on which it stands highest.
enum class PlanetSight { not_visible, evening, morning, evening_and_morning, all_night };

/// What begins or ends a planet's window: its height, the Sun's light, or the night's 24 hours
/// (nothing does, where the Sun stays down).
enum class WindowEdge { height, twilight, open };

/// One night's stretch of time in which a planet is visible without a break. Moonlight, which comes
/// and goes in the month, is left out of it (it hides Uranus alone).
struct PlanetWindow {
  Date date;    // of the night's evening
  Ut from, to;  // within 10 s
  WindowEdge begins, ends;
  Ut best;  // when it stands highest while visible in that part of the night (5 minutes)
  Horizontal at_from, at_best, at_to;      // refracted
  std::optional<Ut> rises, highest, sets;  // before, within and after the window, in the night
  std::optional<Horizontal> at_highest;    // refracted
  std::optional<Ut> sunset, sunrise;       // about it, in the night
};

/// A planet's month at a site, as a page tells it.
struct PlanetMonth {
  Body planet;
  bool optics_only;  // never within the bare eye's reach this month: sight is then that of a pair
                     // of binoculars (Uranus and Neptune 10 degrees high, the Sun below -12).
                     // Uranus counts for the bare eye half a magnitude above the limit alone
  std::vector<std::pair<Date, PlanetSight>> sights;  // the 1st, 11th and 21st and the last day
  std::optional<Date> first_evening,
      last_evening;  // first and last date of the month on which it is an evening sight
  std::optional<Date> first_morning, last_morning;  // and a morning sight; all night is both
  // The night of best_date:
  Date best_date;     // the 15th, or where it is not visible then the nearest date (the earlier of
                      // two) on which it is; the 15th where it is not visible all month
  PlanetSight sight;  // not_visible: on no date of the month
  std::optional<Ut> best;           // when it stands highest while visible in the part of the night
                                    // that `sight` names, the evening where it names both; given
                                    // whenever it is visible
  std::optional<Horizontal> place;  // at `best`, refracted
  double magnitude;
  Angle elongation;  // positive east of the Sun
  int constellation;
  std::optional<Ut> rises, highest, sets;
  PlanetDisc disc;    // at `best`, or the darkest moment
  Angle darkest_sun;  // the Sun's altitude at the darkest moment of the month's nights
  // Each on the date nearest to the 15th (the earlier of two) on which it is a sight of that part
  // of the night. Where it is seen from evening to morning both are of the same stretch.
  std::optional<PlanetWindow> evening_window, morning_window;
};

/// How high a body stands, in a word: low below 15 degrees, fairly low below 30, halfway up below
/// 60 and nearly overhead from 75 degrees on (this project's choice; a fist at arm's length is 10
/// degrees, common practice).
enum class HeightWord { low, fairly_low, halfway, high, overhead };
HeightWord height_word(Angle apparent_altitude);

/// A time as people say it: to the quarter of an hour, beyond an hour and a half to the half;
/// at least half an hour.
std::chrono::minutes spoken_length(Days);

/// The seven planets outward in the month (0..11 of the span); `year` needs its nights alone. About
/// 2 ms a month.
std::vector<PlanetMonth> planet_month(const YearEphemeris&, const SiteYear& year, int index);

}  // namespace duskleaf
