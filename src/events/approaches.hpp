#pragma once

#include <vector>

#include "events/targets.hpp"

namespace duskleaf {

/// A least geocentric separation of two targets.
struct Approach {
  Ut at;
  int a, b;  // indices into targets(), a < b
  Angle separation;
};

/// Every closest approach in [from, to) below 5 degrees with both at least 12 degrees from the Sun:
/// of the Moon and the planets with each other, with the stars and clusters that meet
/// (Target::meets); in order of time.
std::vector<Approach> closest_approaches(const YearEphemeris&, Ut from, Ut to);
/// As an instant for the tables: body "moon+venus", value deg.
Event approach_event(const Approach&);

}  // namespace duskleaf
