// Peaks of meteor showers: the Sun's geometric longitude, mean ecliptic and equinox J2000, reaches
// the listed one. Geometric (no aberration), since that is what the lists are reduced with: C.
// Steyaert 1991, "Calculating the solar longitude 2000.0", WGN 19, 31; an apparent longitude would
// come 8 minutes later. A listed longitude holds to 0.01 degree (15 minutes) at best, most to a
// degree (a day).
//
// Budget of time: the Sun moves 1 arcsecond in 24 s; the ephemeris is good to 0.02 arcsecond.
#include "events/showers.hpp"

#include <algorithm>
#include <numbers>

#include "events/search.hpp"

namespace duskleaf {
namespace {

constexpr Days margin(5);
constexpr double tropical_year = 365.2422;                            // days
constexpr Angle obliquity_j2000 = Angle::from_arcseconds(84381.406);  // IAU 2006

Angle sun_longitude(const YearEphemeris& ephemeris, Ut t) {
  const Tt tt = to_tt(t);
  // Aberration is undone to first order; what is left, and the Sun's own motion while its light
  // is under way, stay below 0.02 arcsecond.
  const Eigen::Vector3d sun =
      ephemeris.icrs_to_date(tt).transpose() * ephemeris.apparent(Body::sun, tt).normalized() -
      ephemeris.earth_velocity(tt);
  return arctan2(sun.y() * cos(obliquity_j2000) + sun.z() * sin(obliquity_j2000), sun.x());
}

}  // namespace

std::vector<ShowerPeak> shower_peaks(const YearEphemeris& ephemeris, Ut from, Ut to) {
  std::vector<ShowerPeak> peaks;
  if (!(from < to)) return peaks;
  const double turn = 2.0 * std::numbers::pi, per_day = turn / tropical_year;
  const Angle first = sun_longitude(ephemeris, from);
  const std::span<const Shower> all = showers();
  for (std::size_t i = 0; i < all.size(); ++i) {
    const auto ahead = [&](Ut t) {
      return (sun_longitude(ephemeris, t) - all[i].peak_longitude).centred().radians();
    };
    // Within five days of where the mean motion puts it, each year: the equation of the centre,
    // 1.9 degrees, can count twice.
    const double until = (all[i].peak_longitude - first).positive().radians() / per_day;
    for (Ut about = from + Days(until - tropical_year); about < to + margin;
         about = about + Days(tropical_year)) {
      const Ut low = std::max(from, about - margin), high = std::min(to, about + margin);
      if (!(low < high)) continue;
      const double a = ahead(low), b = ahead(high);
      if (a > 0.0 || b <= 0.0) continue;
      const double at =
          search_detail::zero_between([&](double day) { return ahead(Ut(Days(day))); }, low.days(),
                                      a, high.days(), b, 0.01 / 86400.0);
      if (Ut(Days(at)) >= from && Ut(Days(at)) < to)
        peaks.push_back({static_cast<int>(i), Ut(Days(at))});
    }
  }
  std::sort(peaks.begin(), peaks.end(), [](const ShowerPeak& a, const ShowerPeak& b) {
    return a.at != b.at ? a.at < b.at : a.shower < b.shower;
  });
  return peaks;
}

Event shower_event(const ShowerPeak& peak) {
  const Shower& shower = showers()[static_cast<std::size_t>(peak.shower)];
  return {EventKind::shower_peak, Body::sun, peak.at, shower.peak_longitude.degrees(), shower.code};
}

}  // namespace duskleaf
