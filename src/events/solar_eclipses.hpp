#pragma once

#include <array>
#include <optional>
#include <vector>

#include "events/sighting.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// Besselian elements: polynomials in hours of TT from t0 (Explanatory Supplement 1992, ch. 8).
struct BesselianElements {
  Tt t0;
  std::array<double, 4> x, y, l1, l2;  // Earth's equatorial radii
  std::array<double, 4> d, mu;         // radians; mu is the Greenwich hour angle of the axis, by
                                // true sidereal time of the instant's UT (no ephemeris meridian)
  double tan_f1, tan_f2;
};

enum class SolarEclipseKind { partial, annular, total, hybrid };
std::string_view eclipse_name(SolarEclipseKind);

struct SolarEclipse {
  SolarEclipseKind kind;  // somewhere on Earth
  Ut greatest;            // axis nearest to the Earth's centre
  double gamma;
  BesselianElements elements;  // good from 4 h before to 4 h after t0
};
/// Those with a greatest phase in [from, to), in order. The ephemeris must reach seven hours beyond
/// on both sides, where an eclipse may be in progress (else std::out_of_range).
std::vector<SolarEclipse> solar_eclipses(const YearEphemeris&, Ut from, Ut to);

/// The same from a site: geometric contacts, whether or not the Sun is up. Within 0.5 s of discs
/// drawn from DE431, 5 s where the Moon's limb grazes: see besselian_circumstances.cpp.
struct SiteSolarEclipse {
  SolarEclipseKind kind;  // as seen there: partial, annular or total
  Sighting partial_begins, greatest, partial_ends;
  std::optional<Sighting> central_begins, central_ends;
  double magnitude;    // at the greatest phase: part of the Sun's diameter covered (ratio of the
                       // diameters within a central one)
  double obscuration;  // part of the Sun's disc covered, 0..1
  std::optional<Ut> sunrise, sunset;  // that cut it: within the eclipse
  Sighting best;  // the greatest phase with the Sun up: the greatest, or the Sun's rise or set
  double best_magnitude, best_obscuration;
  /// For a drawing at `best`: Moon's radius and distance of its centre, both in Sun's radii;
  /// direction of the Moon's centre from the Sun's, counterclockwise from the zenith.
  double moon_radius, moon_distance;
  Angle moon_from_zenith;
};
/// Empty where there is no contact, or the Sun is down from the first to the last.
std::optional<SiteSolarEclipse> at_site(const SiteSky&, const SolarEclipse&);
/// Instants for the tables, in order; body the kind as seen there.
std::vector<Event> eclipse_events(const SiteSolarEclipse&);

}  // namespace duskleaf
