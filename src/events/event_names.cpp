// Spelling of events in the tables: this project's own.
#include <algorithm>
#include <array>

#include "events/events.hpp"

namespace duskleaf {
namespace {

constexpr std::array<std::string_view, 25> names = {"sunrise",           "sunset",
                                                    "civil-dawn",        "civil-dusk",
                                                    "nautical-dawn",     "nautical-dusk",
                                                    "astronomical-dawn", "astronomical-dusk",
                                                    "sun-transit",       "moonrise",
                                                    "moonset",           "moon-transit",
                                                    "new-moon",          "first-quarter",
                                                    "full-moon",         "last-quarter",
                                                    "perigee",           "apogee",
                                                    "march-equinox",     "june-solstice",
                                                    "september-equinox", "december-solstice",
                                                    "perihelion",        "aphelion",
                                                    "clock-change"};
static_assert(names.size() == static_cast<std::size_t>(EventKind::clock_change) + 1);

}  // namespace

std::string event_name(EventKind kind) {
  return std::string(names[static_cast<std::size_t>(kind)]);
}

std::string_view event_body(const Event& event) {
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
      return "au";
    case EventKind::clock_change:
      return "h";
    default:
      return "";
  }
}

}  // namespace duskleaf
