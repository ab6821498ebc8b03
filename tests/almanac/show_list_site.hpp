#pragma once

#include <algorithm>
#include <cmath>
#include <map>
#include <numbers>
#include <set>

#include "almanac/planets.hpp"
#include "almanac/show_list.hpp"
#include "sites.hpp"
#include "sky/moon_look.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {

inline const ShowObject& object(std::string_view code) {
  for (const ShowObject& o : show_objects())
    if (o.code == code) return o;
  throw std::runtime_error("no such object");
}

struct ShowSite {
  SiteYear year;
  SiteSky sky;
  ShowSite(double latitude, double longitude, const char* zone, double limit,
           int year_number = 2027)
      : year(make(latitude, longitude, zone, limit, year_number)),
        sky(ephemeris_of({year_number, 1}), year.place.observer, year.nights.front().from,
            year.nights.back().to) {}
  std::vector<ShowItem> at(Ut t) const { return show_list(sky, year, t); }
  /// A civil time of the evening; hours past midnight are the next date's.
  Ut evening(int month, int day, int hour) const {
    return year.place.zone.instant(make_date(2027, month, day), std::chrono::hours(hour));
  }

 private:
  static SiteYear make(double latitude, double longitude, const char* zone, double limit,
                       int year_number) {
    Place place = test_place(latitude, longitude, zone);
    place.limiting_magnitude = limit;
    return make_site_year(ephemeris_of({year_number, 1}), place, {year_number, 1}, {false});
  }
};

inline const ShowItem* find(const std::vector<ShowItem>& list, std::string_view code) {
  const auto at = std::find_if(list.begin(), list.end(), [&](const ShowItem& item) {
    return !item.body && show_objects()[static_cast<std::size_t>(item.object)].code == code;
  });
  return at == list.end() ? nullptr : &*at;
}
inline const ShowItem* find(const std::vector<ShowItem>& list, Body body) {
  const auto at = std::find_if(list.begin(), list.end(),
                               [&](const ShowItem& item) { return item.body == body; });
  return at == list.end() ? nullptr : &*at;
}

}  // namespace duskleaf
