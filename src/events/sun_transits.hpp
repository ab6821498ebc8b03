#pragma once

#include <optional>
#include <vector>

#include "events/sighting.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// Mercury or Venus crossing the Sun's disc, for the Earth's centre: exterior contacts. Where it
/// misses the disc for the centre, but not by more than its parallax, both equal the greatest
/// phase.
struct SunTransit {
  Body planet;
  Ut begins, greatest, ends;
  Angle separation;  // of the centres at the greatest
};
/// Those with a greatest phase in [from, to), in order. The ephemeris should reach a day further.
/// Contacts within 1 s of a DE431-based reference (14 transits, 5 sites).
std::vector<SunTransit> sun_transits(const YearEphemeris&, Ut from, Ut to);

/// The same from a site: `begins` and `ends` are the exterior contacts, the interior ones where
/// there are.
struct SiteSunTransit {
  Body planet;
  Sighting begins, greatest, ends;  // places of the Sun
  std::optional<Ut> fully_on, begins_to_leave;
  Angle separation;
};
/// Empty where the disc is missed, or the Sun is down from the first to the last contact.
std::optional<SiteSunTransit> at_site(const SiteSky&, const SunTransit&);
/// Instants for the tables, in order; value the Sun's altitude in degrees.
std::vector<Event> transit_events(const SiteSunTransit&);

}  // namespace duskleaf
