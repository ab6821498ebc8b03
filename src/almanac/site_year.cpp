// One site's year put together; each part names its own sources.
#include "almanac/site_year.hpp"

#include <algorithm>
#include <chrono>

#include "almanac/civil_days.hpp"
#include "almanac/evening_sky.hpp"
#include "almanac/nights.hpp"

namespace duskleaf {
namespace {

// Zones reach from UT-12 to UT+14; a night goes on to noon after the last date; global events are
// kept a month further.
constexpr Days month_margin(31);
constexpr Days margin(35);

}  // namespace

Date Span::first_day() const { return make_date(first_year, first_month, 1); }
Date Span::end_day() const { return make_date(first_year + 1, first_month, 1); }
std::pair<int, int> Span::month(int index) const {
  const int months = first_month - 1 + index;
  return {first_year + months / 12, months % 12 + 1};
}

std::pair<Tt, Tt> ephemeris_span(const Span& span) {
  return {to_tt(ut_midnight(span.first_day()) - margin),
          to_tt(ut_midnight(span.end_day()) + margin)};
}

SiteYear make_site_year(const YearEphemeris& ephemeris, const Place& place, const Span& span,
                        AlmanacParts parts) {
  SiteYear year;
  year.place = place;
  year.span = span;
  const Zone& zone = year.place.zone;
  const Date first = span.first_day(), end = span.end_day();
  const Ut begins = zone.start_of(first) - Days(1), ends = zone.start_of(end) + Days(2);
  year.global = global_events(ephemeris, zone.start_of(first) - month_margin,
                              zone.start_of(end) + month_margin);
  year.clock_changes = zone.changes(begins, ends);
  year.local = site_events(ephemeris, place.observer, begins, ends);
  const auto earlier = [](const Event& a, const Event& b) { return a.at < b.at; };
  const auto merged = [&](const std::vector<Event>& a, const std::vector<Event>& b) {
    std::vector<Event> all;
    all.reserve(a.size() + b.size());
    std::merge(a.begin(), a.end(), b.begin(), b.end(), std::back_inserter(all), earlier);
    return all;
  };
  year.local = merged(year.local, clock_change_events(year.clock_changes));
  const std::vector<Event> all = merged(year.local, year.global);
  year.days = make_civil_days(zone, all, first, end);
  const SiteSky sky(ephemeris, year.place.observer, begins, ends);
  year.nights = make_nights(sky, zone, all, year.clock_changes, first, end);
  if (parts.evenings) make_evenings(sky, year);
  return year;
}

}  // namespace duskleaf
