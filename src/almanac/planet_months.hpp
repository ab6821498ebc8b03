#pragma once

#include <optional>
#include <vector>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// Where in the night a planet is to be seen. Evening: between sunset and an hour after the chart's
/// hour (at least until the darkest moment where the Sun is down for less than six hours); morning:
/// in the last two hours before sunrise, or where it is seen, but not in the evening; all night: at
/// nine tenths or more of the time with the Sun below -12 degrees.
enum class PlanetSight { not_visible, evening, morning, evening_and_morning, all_night };

/// A planet's month at a site, as a page tells it.
struct PlanetMonth {
  Body planet;
  bool optics_only;  // never within the bare eye's reach this month: sight is then that of a pair
                     // of binoculars (Uranus and Neptune 10 degrees high, the Sun below -12)
  std::vector<std::pair<Date, PlanetSight>> sights;  // the 1st, 11th and 21st and the last day
  std::optional<Date> first_evening,
      last_evening;  // first and last date of the month on which it is an evening sight
  // The night of the 15th:
  PlanetSight sight;
  std::optional<Ut>
      best;  // when it stands highest while visible, in the evening if it is seen then
  std::optional<Horizontal> place;  // at `best`, refracted
  double magnitude;
  Angle elongation;  // positive east of the Sun
  int constellation;
  std::optional<Ut> rises, highest, sets;
};

/// The seven planets outward in the month (0..11 of the span); `year` needs its nights alone. About
/// 5 ms a month.
std::vector<PlanetMonth> planet_month(const YearEphemeris&, const SiteYear& year, int index);

}  // namespace duskleaf
