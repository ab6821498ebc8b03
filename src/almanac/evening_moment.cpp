// Bright evenings: this project's rule (header). A sidereal day is 86,164.0905 s of UT1
// (Explanatory Supplement 1992, ch. 2).
#include "almanac/evening_moment.hpp"

#include <algorithm>
#include <chrono>
#include <cmath>
#include <set>

#include "almanac/nights.hpp"

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

constexpr Days sidereal_day(86164.0905 / 86400.0);

// The first instant not before t at which the civil clock reads a multiple of the step.
Ut next_on_the_clock(const Zone& zone, Ut t, double step_seconds) {
  const double offset = static_cast<double>(zone.offset_at(t).count());
  const double reading =
      (t.days() - 0.5) * 86400.0 + offset;  // seconds since a civil midnight of 2000
  return Ut(Days(Seconds(std::ceil((reading - 1e-3) / step_seconds) * step_seconds - offset))) +
         Days(0.5);
}

Ut nearest_minute(const Zone& zone, Ut t) { return next_on_the_clock(zone, t - Days(30s), 60.0); }

}  // namespace

Ut chart_moment(const SiteSky& sky, const Zone& zone, const ChartHour& hour, const Night& night) {
  std::chrono::minutes minutes = 18h;
  if (hour.after_midnight) {
    minutes = *hour.after_midnight;
  } else if (night.nautical_dusk) {
    const Ut dusk = next_on_the_clock(zone, *night.nautical_dusk, 300.0);
    return sky.altitude(Body::sun, dusk) <= nautical_altitude ? dusk : night.darkest;
  } else if (night.darkest_sun_altitude > nautical_altitude) {
    return nearest_minute(zone, night.darkest);
  }
  const bool next_date = minutes <= 12h;
  return zone.instant(night.date + std::chrono::days(next_date ? 1 : 0), minutes);
}

EveningMoment evening_moment(const SiteSky& sky, const Zone& zone, const ChartHour& hour,
                             const Night& night) {
  EveningMoment evening;
  evening.chart_moment = evening.moment = chart_moment(sky, zone, hour, night);
  evening.shift = EveningShift::none;
  // The Sun needs a second's grace, since dusk itself is found to a hundredth of one.
  if (sky.altitude(Body::sun, evening.chart_moment) <=
      nautical_altitude + Angle::from_arcseconds(15))
    return evening;
  if (night.nautical_dusk) {
    evening.shift = EveningShift::waits_for_dark;
    evening.moment = next_on_the_clock(zone, *night.nautical_dusk, 300.0);
    // A dip below -12 degrees may be over when the next five minutes strike.
    if (sky.altitude(Body::sun, evening.moment) > nautical_altitude) evening.moment = night.darkest;
    return evening;
  }
  evening.moment = nearest_minute(zone, night.darkest);
  evening.shift = night.darkest_sun_altitude > civil_altitude ? EveningShift::no_stars
                                                              : EveningShift::darkest_moment;
  return evening;
}

std::vector<ChartFit> chart_fits(const Zone& zone, Date evening, Ut moment) {
  const int year = year_of(evening), month = month_of(evening), last = days_in_month(year, month);
  const Ut noon = zone.instant(evening, 12h);
  const auto date_of = [&](int day) { return make_date(year, month, day); };
  const auto moment_of = [&](int day) {
    const double days = std::round((zone.instant(date_of(day), 12h) - noon).count());
    return moment + sidereal_day * days;
  };
  std::set<int> days = {1, 8, 15, 22, last};
  for (int day = 2; day <= last; ++day)
    if (zone.offset_at(moment_of(day)) != zone.offset_at(moment_of(day - 1)))
      days.insert({day - 1, day});
  std::vector<ChartFit> fits;
  for (int day : days)
    if (!is_skipped(zone, date_of(day))) fits.push_back({date_of(day), zone.civil(moment_of(day))});
  return fits;
}

}  // namespace duskleaf
