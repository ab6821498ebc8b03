#pragma once

#include <algorithm>
#include <chrono>
#include <map>
#include <memory>
#include <string>
#include <utility>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// A site of the tests; chart hour 21:30 unless another is given (minutes; negative: dusk).
inline Place test_place(double latitude, double longitude, const char* zone,
                        int chart_minutes = 21 * 60 + 30) {
  Place place;
  place.id = "site";
  place.observer = {Angle::from_degrees(latitude), Angle::from_degrees(longitude), 0.0};
  place.zone = Zone::load(zone).value();
  if (chart_minutes >= 0)
    for (ChartHour& hour : place.chart_hours)
      hour.after_midnight = std::chrono::minutes(chart_minutes);
  return place;
}

/// One ephemeris for each span, kept.
inline const YearEphemeris& ephemeris_of(const Span& span) {
  static std::map<std::pair<int, int>, std::unique_ptr<YearEphemeris>> made;
  std::unique_ptr<YearEphemeris>& e = made[{span.first_year, span.first_month}];
  if (!e)
    e = std::make_unique<YearEphemeris>(ephemeris_span(span).first, ephemeris_span(span).second);
  return *e;
}

inline SiteYear year_of_site(const Place& place, int year, int month = 1, bool evenings = false) {
  const Span span{year, month};
  return make_site_year(ephemeris_of(span), place, span, {evenings});
}

inline const Night& night_of(const SiteYear& year, int y, int m, int d) {
  return year.nights.at(
      static_cast<std::size_t>((make_date(y, m, d) - year.span.first_day()).count()));
}
inline const CivilDay& day_of_year(const SiteYear& year, int y, int m, int d) {
  return year.days.at(
      static_cast<std::size_t>((make_date(y, m, d) - year.span.first_day()).count()));
}
inline bool has_note(const Night& night, const std::string& key) {
  return std::find(night.notes.begin(), night.notes.end(), key) != night.notes.end();
}

}  // namespace duskleaf
