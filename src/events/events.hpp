#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "base/angle.hpp"
#include "base/time.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

/// Names in the tables are these with hyphens ("civil_dawn" -> "civil-dawn").
enum class EventKind {
  sunrise,
  sunset,
  civil_dawn,
  civil_dusk,
  nautical_dawn,
  nautical_dusk,
  astronomical_dawn,
  astronomical_dusk,
  sun_transit,
  moonrise,
  moonset,
  moon_transit,
  new_moon,
  first_quarter,
  full_moon,
  last_quarter,
  perigee,
  apogee,
  march_equinox,
  june_solstice,
  september_equinox,
  december_solstice,
  perihelion,
  aphelion,
  clock_change,
  opposition,
  conjunction,
  inferior_conjunction,
  superior_conjunction,
  stationary_then_retrograde,
  stationary_then_direct,
  greatest_elongation_east,
  greatest_elongation_west,
  closest_approach,
  occultation_disappears,
  occultation_reappears,
  transit_begins,
  transit_greatest,
  transit_ends,
  lunar_eclipse_penumbral_begins,
  lunar_eclipse_partial_begins,
  lunar_eclipse_total_begins,
  lunar_eclipse_greatest,
  lunar_eclipse_total_ends,
  lunar_eclipse_partial_ends,
  lunar_eclipse_penumbral_ends,
  solar_eclipse_partial_begins,
  solar_eclipse_central_begins,
  solar_eclipse_greatest,
  solar_eclipse_central_ends,
  solar_eclipse_partial_ends,
  shower_peak
};
std::string event_name(EventKind);  // "civil-dawn"

struct Event {
  EventKind kind;
  Body body;  // what it is of; the Earth's seasons and apsides carry Body::sun, clock changes too
  Ut at;
  std::optional<double> value;  // km, au, hours, degrees: see event_unit
  std::string_view subject =
      {};  // where it is of more than a body: "moon+venus", "total", "PER"; text that never dies
};
/// What the body column says: "sun", "moon", "earth", "site", or the event's subject.
std::string_view event_body(const Event&);
/// "km", "au", "h", "deg" or empty.
std::string_view event_unit(EventKind);

/// Where an observer stands: geodetic WGS 84; longitude positive east. Elevation enters the
/// topocentric place only.
struct Observer {
  Angle latitude, longitude;
  double elevation_m = 0.0;
};

/// Phases, seasons and apsides in [from, to), the same everywhere; in order of time. What else is
/// the same everywhere: planet_configurations, closest_approaches, lunar_eclipses, shower_peaks.
std::vector<Event> global_events(const YearEphemeris&, Ut from, Ut to);
/// Rise, set, transit of Sun and Moon and the three twilights at a site in [from, to), in order of
/// time.
std::vector<Event> site_events(const YearEphemeris&, const Observer&, Ut from, Ut to);

}  // namespace duskleaf
