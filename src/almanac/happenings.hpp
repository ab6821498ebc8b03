#pragma once

#include <vector>

#include "almanac/meetings.hpp"
#include "almanac/shower_nights.hpp"
#include "almanac/site_year.hpp"
#include "almanac/skyline.hpp"
#include "almanac/year_extremes.hpp"
#include "events/lunar_eclipses.hpp"
#include "events/occultations.hpp"
#include "events/showers.hpp"
#include "events/solar_eclipses.hpp"
#include "events/sun_transits.hpp"

namespace duskleaf {

/// What happens in a year and is the same everywhere: made once, shared by all sites and threads.
struct SkyYear {
  std::vector<Event> configurations;  // of the planets
  std::vector<Approach> approaches;
  std::vector<LunarEclipse> lunar_eclipses;
  std::vector<SolarEclipse> solar_eclipses;
  std::vector<SunTransit> sun_transits;
  std::vector<ShowerPeak> shower_peaks;
  std::vector<Event> events;  // phases, seasons, apsides and of the above what has the same
                              // instants everywhere (not the Sun's eclipses and transits), in order
};
/// From two days before the span to two days after it.
SkyYear make_sky_year(const YearEphemeris&, const Span&);

/// What a site sees of it.
struct SiteHappenings {
  std::vector<Meeting> meetings;
  std::vector<Occultation> occultations;
  std::vector<SiteLunarEclipse> lunar_eclipses;  // all; some are not visible
  std::vector<SiteSolarEclipse> solar_eclipses;
  std::vector<SiteSunTransit> sun_transits;
  std::vector<SiteShower> showers;
  YearExtremes extremes;
  std::vector<SkylineDay> skyline;
  std::vector<Event> events;  // the site's own among these as instants, in order
};
/// What a page needs beyond the instants costs most: meetings' looks, showers' nights, extremes,
/// the skyline.
struct HappeningParts {
  bool looks = true;
};
SiteHappenings make_site_happenings(const YearEphemeris&, const SiteYear&, const SkyYear&,
                                    HappeningParts = {});

}  // namespace duskleaf
