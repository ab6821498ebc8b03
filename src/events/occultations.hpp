#pragma once

#include <vector>

#include "events/site_sky.hpp"
#include "events/targets.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {

/// A star or a planet's centre at the Moon's edge, as a site sees it.
struct LimbContact {
  Ut at;
  Horizontal place;      // of the target, topocentric, no refraction
  Angle position_angle;  // of the point on the Moon's edge, from celestial north through east
  bool dark_limb;        // over 90 degrees from the middle of the bright limb
  bool up;               // the target stands above -34'
  Angle sun_altitude;
};

/// The Moon covers a target. Mean limb (k = 0.2725076, IAU 1982): mountains move a contact by
/// seconds, and a graze by more.
struct Occultation {
  int target;  // index into targets()
  LimbContact disappears, reappears;
  Angle least_distance;  // of the target from the Moon's centre
  Angle moon_radius;     // as seen then; least_distance close to it is a graze
  double moon_lit;
};

/// Every occultation of a planet or star of targets() at the site, in order, with a contact in
/// [from, to) at which the target is up. Clusters' stars are among them. The ephemeris should reach
/// half a day further on both sides: what it cuts is not found. Against a DE431-based reference
/// (623 at five sites, 2020-2035) contacts are off by at most 1 s for Mercury to Saturn, 5 s for
/// Uranus, Neptune and stars (the catalogue's places), 11 s for Porrima; a graze within 0.002
/// degree may go either way.
std::vector<Occultation> occultations(const SiteSky&, Ut from, Ut to);
/// Instants for the tables: those contacts at which the target is up; value its altitude in
/// degrees.
std::vector<Event> occultation_events(const Occultation&);

}  // namespace duskleaf
