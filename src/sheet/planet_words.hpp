#pragma once

#include <string>

#include "almanac/planet_months.hpp"
#include "sheet/block.hpp"

namespace duskleaf {

/// A planet's month in a beginner's words, one sentence or two (evening and morning): "Low in the
/// west for an hour after sunset, until the 20th." Times are of the windows' dates; most sentences
/// have 70 characters or fewer.
std::string planet_sentence(const BlockContext&, const PlanetMonth&);
std::string planet_sentence(const Words&, const Zone&, const PlanetMonth&);

}  // namespace duskleaf
