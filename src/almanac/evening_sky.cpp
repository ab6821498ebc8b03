// Apparent places of stars: proper motion, annual aberration to first order in v/c (below 0.001
// arcsecond left out), IAU 2006 precession and IAU 2000B nutation; parallax is left out (below 0.8
// arcsecond). Explanatory Supplement 1992, ch. 3.
#include "almanac/evening_sky.hpp"

#include <chrono>
#include <tuple>

#include "almanac/constellation_evenings.hpp"
#include "almanac/evening_moment.hpp"
#include "almanac/nights.hpp"
#include "almanac/planets.hpp"
#include "catalogue/stars.hpp"

namespace duskleaf {
namespace {

// Latitudes beyond the polar circles may wait for months: past the tables' end the Sun is computed
// anew, by itself.
std::optional<Date> first_date_with_stars(const SiteSky& sky, const SiteYear& year, Date after) {
  for (const Night& night : year.nights)
    if (night.date > after && night.from < night.to && night.darkest_sun_altitude < civil_altitude)
      return night.date;
  const Date end = year.span.end_day();
  const Ut from = ut_midnight(end) - Days(2), to = from + Days(250);
  const YearEphemeris later(to_tt(from - Days(1)), to_tt(to + Days(3)));
  const SiteSky later_sky(later, sky.observer(), from, to + Days(2));
  for (Date date = end; ut_midnight(date) < to; date += std::chrono::days(1)) {
    const TimeSpan span = night_span(year.place.zone, date);
    if (span.from < span.to &&
        darkest_moment(later_sky, span.from, span.to).sun_altitude < civil_altitude)
      return date;
  }
  return {};
}

}  // namespace

std::vector<Eigen::Vector3d> stars_of_date(const YearEphemeris& ephemeris, Tt t) {
  std::vector<Eigen::Vector3d> directions = star_directions(t.julian_centuries() * 100.0);
  const Eigen::Vector3d velocity = ephemeris.earth_velocity(t);
  const Eigen::Matrix3d rotation = ephemeris.icrs_to_date(t);
  for (Eigen::Vector3d& d : directions) d = rotation * (d + velocity).normalized();
  return directions;
}

void make_evenings(const SiteSky& sky, SiteYear& year) {
  const Place& place = year.place;
  const Date first = year.span.first_day();
  std::array<std::optional<Angle>, 12> sidereal_times;  // by month of the year
  const auto night_of = [&](Date date) -> const Night& {
    return year.nights[static_cast<std::size_t>((date - first).count())];
  };
  for (int index = 0; index < 12; ++index) {
    EveningSky& evening = year.evenings[static_cast<std::size_t>(index)];
    std::tie(evening.year, evening.month) = year.span.month(index);
    evening.date = make_date(evening.year, evening.month, 15);
    const auto month = static_cast<std::size_t>(evening.month - 1);
    const EveningMoment moment =
        evening_moment(sky, place.zone, place.chart_hours[month], night_of(evening.date));
    evening.chart_moment = moment.chart_moment;
    evening.moment = moment.moment;
    evening.shift = moment.shift;
    evening.local_sidereal_time = sky.local_sidereal_time(evening.moment);
    if (evening.shift != EveningShift::no_stars)
      sidereal_times[month] = evening.local_sidereal_time;
  }
  for (std::size_t index = 0; index < 12; ++index) {
    EveningSky& evening = year.evenings[index];
    const Night& night = night_of(evening.date);
    const SkyLight light = sky_light(sky, place.limiting_magnitude, evening.moment);
    evening.sun_altitude = light.sun_altitude;
    evening.faintest_star = light.faintest_star;
    evening.moon = light.moon;
    evening.moon_lit = light.moon_lit;
    const Angle latitude = place.observer.latitude;
    const std::vector<Eigen::Vector3d> directions =
        stars_of_date(sky.ephemeris(), to_tt(evening.moment));
    evening.stars.clear();
    evening.stars.reserve(directions.size());
    for (const Eigen::Vector3d& d : directions)
      evening.stars.push_back(to_horizontal(d, evening.local_sidereal_time, latitude));
    evening.planets.clear();
    for (Body planet : planets)
      evening.planets.push_back(planet_evening(sky, planet, evening.moment, evening.faintest_star,
                                               {night.from, night.to}));
    if (evening.sun_altitude > planets_visible_below)
      for (PlanetEvening& p : evening.planets) p.visible = false;
    evening.constellations = constellation_evenings(directions, latitude, evening.moment,
                                                    evening.local_sidereal_time, sidereal_times);
    if (evening.shift == EveningShift::no_stars)
      evening.stars_return = first_date_with_stars(sky, year, evening.date);
    evening.fits = chart_fits(place.zone, evening.date, evening.moment);

    const CivilMinute clock = place.zone.civil(evening.moment);
    const std::chrono::minutes after_midnight =
        std::chrono::hours(clock.hour()) + std::chrono::minutes(clock.minute());
    std::vector<MoonLook>& looks = year.month_moons[index];
    looks.clear();
    for (int day = 1; day <= days_in_month(evening.year, evening.month); ++day)
      looks.push_back(moon_look(
          sky, place.zone, night_of(make_date(evening.year, evening.month, day)), after_midnight));
  }
}

}  // namespace duskleaf
