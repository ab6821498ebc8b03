#pragma once

#include <optional>
#include <vector>

#include "events/sighting.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

enum class LunarEclipseKind { penumbral, partial, total };
std::string_view eclipse_name(LunarEclipseKind);  // "penumbral", "partial", "total"

/// An eclipse of the Moon, the same everywhere. Shadow by Danjon's rule: lunar_eclipses.cpp.
/// Greatest: least angle of the Moon's centre from the shadow's axis.
struct LunarEclipse {
  LunarEclipseKind kind;
  Ut penumbral_begins, greatest, penumbral_ends;
  std::optional<Ut> partial_begins, total_begins, total_ends, partial_ends;
  double umbral_magnitude;  // negative for a penumbral one
  double penumbral_magnitude;
  double gamma;  // distance of the Moon's centre from the axis then, Earth's equatorial radii,
                 // positive north
};

/// Those whose greatest phase is in [from, to), in order. The ephemeris must reach six hours beyond
/// on both sides (else std::out_of_range).
std::vector<LunarEclipse> lunar_eclipses(const YearEphemeris&, Ut from, Ut to);
/// Instants for the tables, in order; body the kind, value of the greatest its magnitude.
std::vector<Event> eclipse_events(const LunarEclipse&);

/// The same from a site.
struct SiteLunarEclipse {
  LunarEclipse eclipse;
  struct Contact {
    EventKind kind;
    Sighting moon;
  };
  std::vector<Contact> contacts;  // in order of time, the greatest among them
  bool visible;        // the Moon is up at some moment between the first and last contact
  bool umbra_visible;  // and while the umbra touches it (penumbral: as `visible`)
  std::optional<Ut> moonrise, moonset;  // that cut it: within the eclipse
  /// For a drawing, at the moment nearest to the greatest at which the Moon is up: distance of the
  /// shadow's centre from the Moon's, radii of umbra and penumbra, all in Moon's radii; direction
  /// of the shadow's centre from the Moon's, counterclockwise from the zenith.
  Ut drawn_at;
  double shadow_distance, umbra_radius, penumbra_radius;
  Angle shadow_from_zenith;
};
SiteLunarEclipse at_site(const SiteSky&, const LunarEclipse&);

}  // namespace duskleaf
