#pragma once

#include <stdexcept>
#include <string_view>
#include <vector>

#include "almanac/shower_nights.hpp"
#include "almanac/sites.hpp"

namespace duskleaf {

inline const Shower& shower_of(const SiteShower& row) {
  return showers()[static_cast<std::size_t>(row.shower)];
}

/// A site's year with all that showers need of it.
struct Watch {
  SiteYear year;
  SiteSky sky;
  std::vector<ShowerPeak> peaks;
  std::vector<SiteShower> rows;

  Watch(const Place& place, int calendar_year)
      : year(year_of_site(place, calendar_year)),
        sky(ephemeris_of(year.span), year.place.observer, year.nights.front().from - Days(2),
            year.nights.back().to + Days(1)),
        peaks(shower_peaks(ephemeris_of(year.span), ut_midnight(year.span.first_day()),
                           ut_midnight(year.span.end_day()))),
        rows(shower_nights(sky, year, peaks)) {}

  const SiteShower& row(std::string_view code) const {
    for (const SiteShower& r : rows)
      if (shower_of(r).code == code) return r;
    throw std::out_of_range("no such shower in the year");
  }
  SiteShower at(std::string_view code, Ut peak) const {
    return shower_nights(sky, year, {{shower_index(code), peak}}).at(0);
  }
};

inline Place dark_place(double latitude, double longitude, const char* zone, double limit = 6.0) {
  Place place = test_place(latitude, longitude, zone);
  place.limiting_magnitude = limit;
  return place;
}

}  // namespace duskleaf
