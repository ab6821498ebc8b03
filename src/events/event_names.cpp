// Spelling of events in the tables: this project's own.
#include <array>

#include "events/events.hpp"

namespace duskleaf {
namespace {

constexpr std::array<std::string_view, 52> names = {"sunrise",
                                                    "sunset",
                                                    "civil-dawn",
                                                    "civil-dusk",
                                                    "nautical-dawn",
                                                    "nautical-dusk",
                                                    "astronomical-dawn",
                                                    "astronomical-dusk",
                                                    "sun-transit",
                                                    "moonrise",
                                                    "moonset",
                                                    "moon-transit",
                                                    "new-moon",
                                                    "first-quarter",
                                                    "full-moon",
                                                    "last-quarter",
                                                    "perigee",
                                                    "apogee",
                                                    "march-equinox",
                                                    "june-solstice",
                                                    "september-equinox",
                                                    "december-solstice",
                                                    "perihelion",
                                                    "aphelion",
                                                    "clock-change",
                                                    "opposition",
                                                    "conjunction",
                                                    "inferior-conjunction",
                                                    "superior-conjunction",
                                                    "stationary-then-retrograde",
                                                    "stationary-then-direct",
                                                    "greatest-elongation-east",
                                                    "greatest-elongation-west",
                                                    "closest-approach",
                                                    "occultation-disappears",
                                                    "occultation-reappears",
                                                    "transit-begins",
                                                    "transit-greatest",
                                                    "transit-ends",
                                                    "lunar-eclipse-penumbral-begins",
                                                    "lunar-eclipse-partial-begins",
                                                    "lunar-eclipse-total-begins",
                                                    "lunar-eclipse-greatest",
                                                    "lunar-eclipse-total-ends",
                                                    "lunar-eclipse-partial-ends",
                                                    "lunar-eclipse-penumbral-ends",
                                                    "solar-eclipse-partial-begins",
                                                    "solar-eclipse-central-begins",
                                                    "solar-eclipse-greatest",
                                                    "solar-eclipse-central-ends",
                                                    "solar-eclipse-partial-ends",
                                                    "shower-peak"};
static_assert(names.size() == static_cast<std::size_t>(EventKind::shower_peak) + 1);

}  // namespace

std::string event_name(EventKind kind) {
  return std::string(names[static_cast<std::size_t>(kind)]);
}

std::string_view event_body(const Event& event) {
  if (!event.subject.empty()) return event.subject;
  switch (event.kind) {
    case EventKind::clock_change:
      return "site";
    case EventKind::march_equinox:
    case EventKind::june_solstice:
    case EventKind::september_equinox:
    case EventKind::december_solstice:
    case EventKind::perihelion:
    case EventKind::aphelion:
      return "earth";
    default:
      return body_name(event.body);
  }
}

std::string_view event_unit(EventKind kind) {
  switch (kind) {
    case EventKind::perigee:
    case EventKind::apogee:
      return "km";
    case EventKind::perihelion:
    case EventKind::aphelion:
    case EventKind::opposition:
      return "au";
    case EventKind::clock_change:
      return "h";
    case EventKind::greatest_elongation_east:
    case EventKind::greatest_elongation_west:
    case EventKind::closest_approach:
    case EventKind::occultation_disappears:
    case EventKind::occultation_reappears:
    case EventKind::transit_begins:
    case EventKind::transit_greatest:
    case EventKind::transit_ends:
    case EventKind::solar_eclipse_partial_begins:
    case EventKind::solar_eclipse_central_begins:
    case EventKind::solar_eclipse_central_ends:
    case EventKind::solar_eclipse_partial_ends:
    case EventKind::shower_peak:
      return "deg";
    default:
      return "";
  }
}

}  // namespace duskleaf
