// What happens in a year, put together; each part names its own sources.
#include "almanac/happenings.hpp"

#include <algorithm>
#include <iterator>

#include "events/configurations.hpp"

namespace duskleaf {
namespace {

// Zones reach from UT-12 to UT+14, and a night goes on to noon after the span's last date.
constexpr Days margin(2);

void append(std::vector<Event>& to, const std::vector<Event>& events) {
  to.insert(to.end(), events.begin(), events.end());
}

void sort_by_time(std::vector<Event>& events) {
  std::sort(events.begin(), events.end(), [](const Event& a, const Event& b) {
    if (a.at != b.at) return a.at < b.at;
    return a.kind != b.kind ? a.kind < b.kind : a.subject < b.subject;
  });
}

}  // namespace

SkyYear make_sky_year(const YearEphemeris& ephemeris, const Span& span) {
  const Ut from = ut_midnight(span.first_day()) - margin, to = ut_midnight(span.end_day()) + margin;
  SkyYear year;
  year.configurations = planet_configurations(ephemeris, from, to);
  year.approaches = closest_approaches(ephemeris, from, to);
  year.lunar_eclipses = lunar_eclipses(ephemeris, from, to);
  year.solar_eclipses = solar_eclipses(ephemeris, from, to);
  year.sun_transits = sun_transits(ephemeris, from, to);
  year.shower_peaks = shower_peaks(ephemeris, from, to);

  year.events = global_events(ephemeris, from, to);
  append(year.events, year.configurations);
  std::transform(year.approaches.begin(), year.approaches.end(), std::back_inserter(year.events),
                 approach_event);
  for (const LunarEclipse& eclipse : year.lunar_eclipses)
    append(year.events, eclipse_events(eclipse));
  std::transform(year.shower_peaks.begin(), year.shower_peaks.end(),
                 std::back_inserter(year.events), shower_event);
  sort_by_time(year.events);
  return year;
}

SiteHappenings make_site_happenings(const YearEphemeris& ephemeris, const SiteYear& year,
                                    const SkyYear& sky_year, HappeningParts parts) {
  SiteHappenings site;
  const Ut from = year.nights.front().from - Days(1), to = year.nights.back().to;
  const SiteSky sky(ephemeris, year.place.observer, from - Days(1), to + Days(1));
  site.occultations = occultations(sky, from, to);
  for (const LunarEclipse& eclipse : sky_year.lunar_eclipses)
    site.lunar_eclipses.push_back(at_site(sky, eclipse));
  for (const SolarEclipse& eclipse : sky_year.solar_eclipses)
    if (const auto seen = at_site(sky, eclipse)) site.solar_eclipses.push_back(*seen);
  for (const SunTransit& transit : sky_year.sun_transits)
    if (const auto seen = at_site(sky, transit)) site.sun_transits.push_back(*seen);
  if (parts.looks) {
    site.meetings = meetings(sky, year, sky_year.approaches);
    site.showers = shower_nights(sky, year, sky_year.shower_peaks);
    site.extremes = year_extremes(year);
    site.skyline = skyline_days(sky, year);
  }

  for (const Occultation& occultation : site.occultations)
    append(site.events, occultation_events(occultation));
  for (const SiteSolarEclipse& eclipse : site.solar_eclipses)
    append(site.events, eclipse_events(eclipse));
  for (const SiteSunTransit& transit : site.sun_transits)
    append(site.events, transit_events(transit));
  sort_by_time(site.events);
  return site;
}

}  // namespace duskleaf
