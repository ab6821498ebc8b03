// A night from noon to noon and what is dark in it: this project's conventions (header), with the
// twilights of the Explanatory Supplement to the Astronomical Almanac (1992), ch. 9.
#include "almanac/nights.hpp"

#include <algorithm>
#include <chrono>
#include <cmath>
#include <numbers>

#include "almanac/time_spans.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

struct Twilight {
  EventKind dawn, dusk;
  Angle altitude;
};
constexpr Twilight civil{EventKind::civil_dawn, EventKind::civil_dusk, civil_altitude};
constexpr Twilight nautical{EventKind::nautical_dawn, EventKind::nautical_dusk, nautical_altitude};
constexpr Twilight astronomical{EventKind::astronomical_dawn, EventKind::astronomical_dusk,
                                astronomical_altitude};

std::vector<TimeSpan> sun_below(const Night& night, const Twilight& limit) {
  return spans_below(night.events, limit.dawn, limit.dusk, night.from, night.to,
                     night.darkest_sun_altitude < limit.altitude);
}

std::vector<TimeSpan> moon_down(const Night& night) {
  return spans_below(night.events, EventKind::moonrise, EventKind::moonset, night.from, night.to,
                     !night.moon_up_at_start);
}

// The first dusk and the last dawn: where a graze gives more, the events have them all.
std::optional<Ut> first(const Night& night, EventKind kind) {
  for (const Event& e : night.events)
    if (e.kind == kind) return e.at;
  return {};
}
std::optional<Ut> last(const Night& night, EventKind kind) {
  for (auto e = night.events.rbegin(); e != night.events.rend(); ++e)
    if (e->kind == kind) return e->at;
  return {};
}

Presence presence(bool ever_above, bool ever_below) {
  if (ever_above && ever_below) return Presence::rises_or_sets;
  return ever_above ? Presence::up_throughout : Presence::down_throughout;
}

void set_sun(Night& night) {
  night.sunset = first(night, EventKind::sunset);
  night.civil_dusk = first(night, EventKind::civil_dusk);
  night.nautical_dusk = first(night, EventKind::nautical_dusk);
  night.astronomical_dusk = first(night, EventKind::astronomical_dusk);
  night.astronomical_dawn = last(night, EventKind::astronomical_dawn);
  night.nautical_dawn = last(night, EventKind::nautical_dawn);
  night.civil_dawn = last(night, EventKind::civil_dawn);
  night.sunrise = last(night, EventKind::sunrise);
  night.sun_down = spans_below(night.events, EventKind::sunrise, EventKind::sunset, night.from,
                               night.to, night.darkest_sun_altitude < sun_rise_altitude);
  night.sun = night.sunset || night.sunrise
                  ? Presence::rises_or_sets
                  : presence(night.sun_down.empty(), !night.sun_down.empty());
}

void set_moon(Night& night, const SiteSky& sky) {
  for (const Event& e : night.events) {
    if (e.kind == EventKind::moonrise) night.moonrises.push_back(e.at);
    if (e.kind == EventKind::moonset) night.moonsets.push_back(e.at);
  }
  const auto moon_event = std::find_if(
      night.events.begin(), night.events.end(),
      [](const Event& e) { return e.kind == EventKind::moonrise || e.kind == EventKind::moonset; });
  night.moon_up_at_start = moon_event != night.events.end() ? moon_event->kind == EventKind::moonset
                                                            : sky.moon_up(night.from);
  const std::vector<TimeSpan> down = moon_down(night);
  const std::vector<TimeSpan> whole = {{night.from, night.to}};
  const std::vector<TimeSpan>& of = night.sun == Presence::rises_or_sets ? night.sun_down : whole;
  const Days down_for = length(intersection(of, down));
  night.moon = presence(down_for<length(of), down_for> Days(0));
  night.moon_up_at_dusk = !contains(down, night.sunset.value_or(night.darkest));
  night.moon_lit =
      moon_lit_fraction(sky.ephemeris(), to_tt(night.from + (night.to - night.from) / 2));
}

void set_notes(Night& night, bool clock_change, bool skipped) {
  const auto note = [&](bool applies, const char* key) {
    if (applies) night.notes.emplace_back(key);
  };
  if (!skipped) {
    // Of the lacks of darkness the greatest is named.
    if (night.sun == Presence::up_throughout) {
      night.notes.emplace_back("sun-up-all-night");
    } else {
      note(night.sun == Presence::down_throughout, "sun-down-all-day");
      if (sun_below(night, civil).empty())
        night.notes.emplace_back("no-civil-dark");
      else if (sun_below(night, nautical).empty())
        night.notes.emplace_back("no-nautical-dark");
      else if (sun_below(night, astronomical).empty())
        night.notes.emplace_back("no-astronomical-dark");
    }
    note(night.moon == Presence::up_throughout, "moon-up-all-night");
    note(night.moon == Presence::down_throughout, "moon-down-all-night");
    note(night.moonrises.empty(), "no-moonrise");
    note(night.moonsets.empty(), "no-moonset");
    note(night.moonrises.size() > 1, "two-moonrises");
    note(night.moonsets.size() > 1, "two-moonsets");
  }
  note(clock_change, "clock-change");
  note(skipped, "short-date");
}

// dark_limit is a matter of the whole month.
void set_dark(std::vector<Night>& nights) {
  for (auto begin = nights.begin(); begin != nights.end();) {
    const auto end = std::find_if(begin, nights.end(), [&](const Night& n) {
      return month_of(n.date) != month_of(begin->date);
    });
    Twilight limit = civil;
    for (const Twilight& candidate : {astronomical, nautical}) {
      if (std::any_of(begin, end,
                      [&](const Night& n) { return !sun_below(n, candidate).empty(); })) {
        limit = candidate;
        break;
      }
    }
    for (auto night = begin; night != end; ++night) {
      const std::vector<TimeSpan> down = moon_down(*night);
      night->dark = intersection(sun_below(*night, astronomical), down);
      night->dark_limit = limit.altitude;
      night->dark_or_darkest = intersection(sun_below(*night, limit), down);
    }
    begin = end;
  }
}

}  // namespace

bool is_skipped(const Zone& zone, Date date) {
  return zone.start_of(date) == zone.start_of(date + std::chrono::days(1));
}

TimeSpan night_span(const Zone& zone, Date date) {
  Date next = date + std::chrono::days(1);
  while (is_skipped(zone, next)) next += std::chrono::days(1);
  const Ut to = zone.instant(next, 12h);
  // The night of a skipped date is empty, at the end of the one before it.
  return {is_skipped(zone, date) ? to : zone.instant(date, 12h), to};
}

DarkestMoment darkest_moment(const SiteSky& sky, Ut from, Ut to) {
  const auto altitude = [&](Ut t) { return sky.sight(Body::sun, t).altitude; };
  // Begin at lower transit; then go to the bottom of the parabola through three altitudes half an
  // hour apart. Near a pole, where the Sun climbs or sinks all day, the lowest place is one of the
  // ends.
  const SiteSky::Sight noon = sky.sight(Body::sun, from);
  const double hour_angle = std::atan2(noon.west, noon.south);  // radians
  const double turn = 2.0 * std::numbers::pi;
  double wait = std::fmod(turn / 2 - hour_angle, turn) / turn;
  if (wait < 0) wait += 1.0;
  Ut t = std::min(from + Days(wait), to);
  const Days half_hour(0.5 / 24);
  for (int i = 0; i < 6; ++i) {
    const double a = altitude(t - half_hour), b = altitude(t), c = altitude(t + half_hour),
                 bend = a - 2 * b + c;
    if (bend <= 0) break;
    const double shift = std::clamp(0.5 * (a - c) / bend, -4.0, 4.0);
    t = std::clamp(t + half_hour * shift, from, to);
    if (std::abs(shift) < 1e-4) break;
  }
  for (const Ut end : {from, to})
    if (altitude(end) < altitude(t)) t = end;
  return {t, arcsin(altitude(t))};
}

std::vector<Night> make_nights(const SiteSky& sky, const Zone& zone,
                               const std::vector<Event>& events,
                               const std::vector<ClockChange>& changes, Date first_date, Date end) {
  std::vector<Night> nights;
  const auto before = [](const Event& e, Ut t) { return e.at < t; };
  for (Date date = first_date; date < end; date += std::chrono::days(1)) {
    const TimeSpan span = night_span(zone, date);
    Night night{};
    night.date = date;
    night.from = span.from;
    night.to = span.to;
    night.events.assign(std::lower_bound(events.begin(), events.end(), span.from, before),
                        std::lower_bound(events.begin(), events.end(), span.to, before));
    const DarkestMoment darkest = darkest_moment(sky, span.from, span.to);
    night.darkest = darkest.at;
    night.darkest_sun_altitude = darkest.sun_altitude;
    set_sun(night);
    set_moon(night, sky);
    const bool changed = std::any_of(changes.begin(), changes.end(), [&](const ClockChange& c) {
      return span.from < c.at && c.at < span.to;
    });
    set_notes(night, changed, is_skipped(zone, date));
    nights.push_back(std::move(night));
  }
  set_dark(nights);
  return nights;
}

std::vector<TimeSpan> moon_up_spans(const Night& night) {
  // The Moon's setting is its rising for the question of when it is up.
  return spans_below(night.events, EventKind::moonset, EventKind::moonrise, night.from, night.to,
                     night.moon_up_at_start);
}

std::optional<Ut> sunset_after(const SiteYear& year, Date evening, std::chrono::minutes from) {
  const auto index = (evening - year.span.first_day()).count();
  if (index < 0 || index >= static_cast<std::ptrdiff_t>(year.nights.size())) return {};
  const Night& night = year.nights[static_cast<std::size_t>(index)];
  const Zone& zone = year.place.zone;
  const Ut begins = zone.instant(evening + std::chrono::days(from <= 12h ? 1 : 0), from);
  for (const Event& e : night.events) {
    if (e.at < begins) continue;
    if (e.kind == EventKind::sunrise) return {};
    if (e.kind != EventKind::sunset) continue;
    const CivilMinute sets = zone.civil(e.at), starts = zone.civil(begins);
    const bool same_minute = sets.date() == starts.date() && sets.hour() == starts.hour() &&
                             sets.minute() == starts.minute();
    return same_minute ? std::nullopt : std::optional(e.at);
  }
  return {};
}

}  // namespace duskleaf
