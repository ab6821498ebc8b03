// Elementary; conventions of rise and set: events/site_sky.hpp, what counts as a day: the header.
#include "almanac/year_extremes.hpp"

#include <algorithm>
#include <chrono>

#include "almanac/nights.hpp"

namespace duskleaf {
namespace {

/// A day from sunrise to sunset about a noon, and the next sunrise.
struct SunDay {
  Ut rises, sets, rises_next;
  Days rise_clock, set_clock;  // since the midnight before that noon, by one clock all year
};

// Empty where a noon of the year has no sunrise before it, no sunset after it, or none of the next
// day.
std::vector<SunDay> sun_days(const SiteYear& year) {
  const Zone& zone = year.place.zone;
  std::vector<Event> sun;
  for (const Event& e : year.local)
    if (e.kind == EventKind::sunrise || e.kind == EventKind::sunset ||
        e.kind == EventKind::sun_transit)
      sun.push_back(e);
  std::vector<SunDay> days;
  const Ut midnight = ut_midnight(year.span.first_day());
  for (std::size_t i = 0; i < sun.size(); ++i) {
    if (sun[i].kind != EventKind::sun_transit) continue;
    const Date date = zone.civil(sun[i].at).date();
    if (date < year.span.first_day() || date >= year.span.end_day()) continue;
    // Rise, transit, set, rise, in turn: anything else is a day without one of them.
    if (i == 0 || i + 2 >= sun.size() || sun[i - 1].kind != EventKind::sunrise ||
        sun[i + 1].kind != EventKind::sunset || sun[i + 2].kind != EventKind::sunrise)
      return {};
    // Noons are counted, not dates: a zone may have skipped one.
    const Ut base = midnight + Days(static_cast<double>(days.size()));
    days.push_back(
        {sun[i - 1].at, sun[i + 1].at, sun[i + 2].at, sun[i - 1].at - base, sun[i + 1].at - base});
  }
  return days;
}

void set_extremes(YearExtremes& extremes, const SiteYear& year) {
  const std::vector<SunDay> days = sun_days(year);
  if (days.empty()) return;
  const Zone& zone = year.place.zone;
  const auto length = [](const SunDay& d) { return d.sets - d.rises; };
  const auto night = [](const SunDay& d) { return d.rises_next - d.sets; };
  const auto none = [](const SunDay&) { return Days(0); };
  const auto find = [&](const auto& of, bool greatest, Ut SunDay::*at, const auto& size) {
    const auto less = [&](const SunDay& a, const SunDay& b) { return of(a) < of(b); };
    const SunDay& d = greatest ? *std::max_element(days.begin(), days.end(), less)
                               : *std::min_element(days.begin(), days.end(), less);
    return DayExtreme{zone.civil(d.*at).date(), d.*at, size(d)};
  };
  const auto rise = [](const SunDay& d) { return d.rise_clock; };
  const auto set = [](const SunDay& d) { return d.set_clock; };
  extremes.earliest_sunset = find(set, false, &SunDay::sets, none);
  extremes.latest_sunset = find(set, true, &SunDay::sets, none);
  extremes.earliest_sunrise = find(rise, false, &SunDay::rises, none);
  extremes.latest_sunrise = find(rise, true, &SunDay::rises, none);
  extremes.longest_day = find(length, true, &SunDay::rises, length);
  extremes.shortest_day = find(length, false, &SunDay::rises, length);
  extremes.longest_night = find(night, true, &SunDay::sets, night);
  extremes.shortest_night = find(night, false, &SunDay::sets, night);
}

/// Runs of dates that have something; `outside` says whether the dates just before and after the
/// year have it too.
class Runs {
 public:
  void add(Date date, bool has) {
    if (has && !open_) spans_.push_back({date, date, false, false});
    if (has) spans_.back().last = date;
    open_ = has;
  }
  std::vector<DateSpan> closed(bool first_has, bool before, bool after) {
    if (!spans_.empty()) {
      spans_.front().begins_before = first_has && before;
      spans_.back().ends_after = open_ && after;
    }
    return spans_;
  }

 private:
  std::vector<DateSpan> spans_;
  bool open_ = false;
};

/// Whether the year's instants have none of two kinds in [from, to).
bool none_between(const SiteYear& year, EventKind a, EventKind b, Ut from, Ut to) {
  return std::none_of(year.local.begin(), year.local.end(), [&](const Event& e) {
    return (e.kind == a || e.kind == b) && e.at >= from && e.at < to;
  });
}

// What lasts through a night or date without an instant lasts on until the next instant: so the
// neighbours of the year's ends are known by having none.
std::vector<DateSpan> nights_without_dark(const SiteYear& year) {
  const Zone& zone = year.place.zone;
  const auto without = [](const Night& n) {
    return n.darkest_sun_altitude >= astronomical_altitude;
  };
  Runs runs;
  for (const Night& night : year.nights)
    if (night.from < night.to) runs.add(night.date, without(night));
  const Ut first = year.nights.front().from, end = year.nights.back().to;
  const auto quiet = [&](Ut from, Ut to) {
    return none_between(year, EventKind::astronomical_dawn, EventKind::astronomical_dusk, from, to);
  };
  return runs.closed(without(year.nights.front()), quiet(first - Days(0.9), first),
                     quiet(end, zone.start_of(year.span.end_day()) + Days(1.5)));
}

// Dates on which the Sun neither rises nor sets, by the printed minute, and is up (down).
std::vector<DateSpan> dates_throughout(const SiteYear& year, bool up) {
  const Zone& zone = year.place.zone;
  const auto turns = [](const Event& e) {
    return e.kind == EventKind::sunrise || e.kind == EventKind::sunset;
  };
  // At the year's start, should it have no instant at all.
  bool is_up = year.nights.front().darkest_sun_altitude >= sun_rise_altitude;
  const auto first_turn = std::find_if(year.local.begin(), year.local.end(), turns);
  if (first_turn != year.local.end()) is_up = first_turn->kind == EventKind::sunset;
  Runs runs;
  bool first_has = false;
  const Date first = year.span.first_day(), end = year.span.end_day();
  for (const Event& e : year.local)
    if (turns(e) && zone.civil(e.at).date() < first) is_up = e.kind == EventKind::sunrise;
  for (const CivilDay& day : year.days) {
    if (day.skipped) continue;
    const bool quiet = std::none_of(day.events.begin(), day.events.end(), turns);
    const bool has = quiet && is_up == up;
    if (day.date == year.days.front().date) first_has = has;
    runs.add(day.date, has);
    for (const Event& e : day.events)
      if (turns(e)) is_up = e.kind == EventKind::sunrise;
  }
  const auto quiet = [&](Date date) {
    return std::none_of(year.local.begin(), year.local.end(), [&](const Event& e) {
      return turns(e) && zone.civil(e.at).date() == date;
    });
  };
  return runs.closed(first_has, quiet(first - std::chrono::days(1)), quiet(end));
}

}  // namespace

YearExtremes year_extremes(const SiteYear& year) {
  YearExtremes extremes;
  set_extremes(extremes, year);
  extremes.no_astronomical_night = nights_without_dark(year);
  extremes.midnight_sun = dates_throughout(year, true);
  extremes.polar_night = dates_throughout(year, false);
  return extremes;
}

}  // namespace duskleaf
