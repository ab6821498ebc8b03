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
  clock_change
};
std::string event_name(EventKind);  // "civil-dawn"

struct Event {
  EventKind kind;
  Body body;  // what it is of; the Earth's seasons and apsides carry Body::sun, clock changes too
  Ut at;
  std::optional<double> value;  // km, au, hours: see event_unit
};
/// What the body column says: "sun", "moon", "earth", "site".
std::string_view event_body(const Event&);
/// "km", "au", "h" or empty.
std::string_view event_unit(EventKind);

/// Where an observer stands: geodetic WGS 84; longitude positive east. Elevation enters the
/// topocentric place only.
struct Observer {
  Angle latitude, longitude;
  double elevation_m = 0.0;
};

/// Everything in [from, to) that is the same everywhere: phases, seasons, apsides; in order of
/// time.
std::vector<Event> global_events(const YearEphemeris&, Ut from, Ut to);
/// Rise, set, transit of Sun and Moon and the three twilights at a site in [from, to), in order of
/// time.
std::vector<Event> site_events(const YearEphemeris&, const Observer&, Ut from, Ut to);

}  // namespace duskleaf
