// What the tables say: columns and spelling are this project's own. Local times are ISO 8601 to the
// minute with the offset.
#include <algorithm>
#include <chrono>
#include <cmath>
#include <fmt/format.h>

#include "almanac/planets.hpp"
#include "almanac/time_spans.hpp"
#include "catalogue/constellations.hpp"
#include "export/happening_rows.hpp"
#include "export/tables.hpp"

namespace duskleaf {
namespace {

Cell local(const Zone& zone, const std::optional<Ut>& t) {
  if (!t) return {};
  return zone.civil(*t).iso();
}

// Several instants in one cell are separated by a space.
Cell local_list(const Zone& zone, const std::vector<Ut>& instants) {
  std::string text;
  for (const Ut t : instants) {
    if (!text.empty()) text += ' ';
    text += zone.civil(t).iso();
  }
  return text.empty() ? Cell{} : Cell{text};
}

int value_decimals(EventKind kind) {
  switch (kind) {
    case EventKind::perihelion:
    case EventKind::aphelion:
      return 7;
    case EventKind::opposition:
      return 5;
    case EventKind::closest_approach:
    case EventKind::lunar_eclipse_greatest:
    case EventKind::solar_eclipse_greatest:
      return 4;
    case EventKind::greatest_elongation_east:
    case EventKind::greatest_elongation_west:
    case EventKind::shower_peak:
      return 3;
    case EventKind::clock_change:
      return 2;
    default:
      return 1;
  }
}

Row instant_row(const std::string& site, const Event& event, Cell local_time) {
  const Cell value = event.value ? Cell{Number{*event.value, value_decimals(event.kind)}} : Cell{};
  const std::string_view unit = event_unit(event.kind);
  Row row;  // cell by cell, as an initializer list would copy each text
  row.reserve(7);
  row.emplace_back(site);
  row.emplace_back(event_name(event.kind));
  row.emplace_back(std::string(event_body(event)));
  row.emplace_back(utc_text(event.at));
  row.push_back(std::move(local_time));
  row.push_back(value);
  row.push_back(unit.empty() ? Cell{} : Cell{std::string(unit)});
  return row;
}

std::vector<Event> in_table_order(std::vector<Event> events) {
  std::stable_sort(events.begin(), events.end(), [](const Event& a, const Event& b) {
    if (a.at != b.at) return a.at < b.at;
    return a.kind != b.kind ? event_name(a.kind) < event_name(b.kind)
                            : event_body(a) < event_body(b);
  });
  return events;
}

std::vector<Row> instants(const SiteYear& year, const SiteHappenings& happenings) {
  std::vector<Row> rows;
  const Zone& zone = year.place.zone;
  const Date first = year.span.first_day(), end = year.span.end_day();
  std::vector<Event> events = year.local;
  events.insert(events.end(), happenings.events.begin(), happenings.events.end());
  for (const Event& event : in_table_order(std::move(events))) {
    const CivilMinute civil = zone.civil(event.at);
    if (civil.date() >= first && civil.date() < end)
      rows.push_back(instant_row(year.place.id, event, civil.iso()));
  }
  return rows;
}

std::vector<Row> nights(const SiteYear& year) {
  std::vector<Row> rows;
  const Zone& zone = year.place.zone;
  for (const Night& night : year.nights) {
    // The Moon's rise and set belong to the night between sunset and sunrise (to the 24 hours where
    // the Sun does neither).
    const auto of_the_night = [&](const std::vector<Ut>& all) {
      std::vector<Ut> some;
      for (const Ut t : all)
        if (night.sun != Presence::rises_or_sets || contains(night.sun_down, t)) some.push_back(t);
      return some;
    };
    const auto longest = std::max_element(
        night.dark.begin(), night.dark.end(),
        [](const TimeSpan& a, const TimeSpan& b) { return a.to - a.from < b.to - b.from; });
    const bool dark = longest != night.dark.end();
    const bool skipped = night.from == night.to;  // the zone has no such date
    const std::string notes = fmt::format("{}", fmt::join(night.notes, " "));
    rows.push_back({year.place.id, iso_date(night.date), local(zone, night.sunset),
                    local(zone, night.civil_dusk), local(zone, night.nautical_dusk),
                    local(zone, night.astronomical_dusk), local(zone, night.astronomical_dawn),
                    local(zone, night.nautical_dawn), local(zone, night.civil_dawn),
                    local(zone, night.sunrise), local_list(zone, of_the_night(night.moonrises)),
                    local_list(zone, of_the_night(night.moonsets)),
                    skipped ? Cell{} : Cell{Number{100.0 * night.moon_lit, 1}},
                    dark ? local(zone, longest->from) : Cell{},
                    dark ? local(zone, longest->to) : Cell{},
                    skipped ? Cell{} : Cell{Number{length(night.dark).count() * 1440.0, 0}},
                    notes.empty() ? Cell{} : Cell{notes}});
  }
  return rows;
}

std::string figure_name(const Figure& figure) {
  std::string name(constellations()[static_cast<std::size_t>(figure.constellation)].name);
  if (!figure.part.empty()) {
    name += ' ';
    name += static_cast<char>(figure.part[0] - 'a' + 'A');  // "caput", "cauda"
    name += figure.part.substr(1);
  }
  return name;
}

std::vector<Row> constellations_rows(const SiteYear& year) {
  std::vector<Row> rows;
  const Zone& zone = year.place.zone;
  for (const EveningSky& evening : year.evenings)
    for (const ConstellationEvening& c : evening.constellations) {
      const char* state = c.state == FigureState::up          ? "up"
                          : c.state == FigureState::partly_up ? "partly-up"
                                                              : "below";
      const char* phase = c.phase == FigurePhase::rising ? "rising"
                          : c.phase == FigurePhase::high ? "high"
                                                         : "sinking";
      rows.push_back({year.place.id, fmt::format("{:04}-{:02}", evening.year, evening.month),
                      figure_name(figures()[static_cast<std::size_t>(c.figure)]), c.on_equator,
                      Number{c.mean_place.altitude.degrees(), 1},
                      Number{c.mean_place.azimuth.degrees(), 1}, fmt::format("{} {}", state, phase),
                      local(zone, c.rises), local(zone, c.highest), local(zone, c.sets)});
    }
  return rows;
}

std::vector<Row> planets_rows(const YearEphemeris& ephemeris, const SiteYear& year) {
  std::vector<Row> rows;
  const Zone& zone = year.place.zone;
  for (const PlanetDay& p : planet_days(ephemeris, year))
    rows.push_back({year.place.id, iso_date(p.date), std::string(body_name(p.planet)),
                    Number{p.place.right_ascension.degrees(), 4},
                    Number{p.place.declination.degrees(), 4}, Number{p.magnitude, 2},
                    Number{p.elongation.degrees(), 2},
                    std::string(constellations()[static_cast<std::size_t>(p.constellation)].name),
                    local(zone, p.rises), local(zone, p.highest), local(zone, p.sets),
                    Number{p.altitude_at_chart_hour.degrees(), 1}});
  return rows;
}

}  // namespace

std::string utc_text(Ut t) {
  const double day =
      std::floor(t.days() + 0.5 + 0.05 / 86400.0);  // that of the rounded instant, from 2000-01-01
  const auto tenths = std::max(0LL, std::llround((t.days() + 0.5 - day) * 864000.0));
  const std::chrono::year_month_day date(make_date(2000, 1, 1) +
                                         std::chrono::days(static_cast<int>(day)));
  return fmt::format("{:04}-{:02}-{:02}T{:02}:{:02}:{:02}.{}Z", static_cast<int>(date.year()),
                     static_cast<unsigned>(date.month()), static_cast<unsigned>(date.day()),
                     tenths / 36000, tenths / 600 % 60, tenths / 10 % 60, tenths % 10);
}

std::vector<Row> global_rows(TableName name, const SkyYear& sky_year, const Span& span) {
  std::vector<Row> rows;
  if (name != TableName::instants) return rows;
  const Ut from = ut_midnight(span.first_day()), to = ut_midnight(span.end_day());
  for (const Event& event : in_table_order(sky_year.events))
    if (from <= event.at && event.at < to) rows.push_back(instant_row("-", event, {}));
  return rows;
}

std::vector<Row> site_rows(TableName name, const YearEphemeris& ephemeris, const SiteYear& year,
                           const SiteHappenings& happenings) {
  switch (name) {
    case TableName::instants:
      return instants(year, happenings);
    case TableName::nights:
      return nights(year);
    case TableName::constellations:
      return constellations_rows(year);
    case TableName::planet_places:
      return planets_rows(ephemeris, year);
    case TableName::showers:
      return shower_rows(year, happenings);
    case TableName::eclipses:
      return eclipse_rows(year, happenings);
  }
  return {};
}

}  // namespace duskleaf
