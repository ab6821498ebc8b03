#pragma once

#include <vector>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// The civil dates of [first, end), each with the events (of a sorted list) whose rounded civil
/// minute falls on it.
std::vector<CivilDay> make_civil_days(const Zone&, const std::vector<Event>& events, Date first,
                                      Date end);

/// Clock changes as events of the site, value in hours.
std::vector<Event> clock_change_events(const std::vector<ClockChange>&);

}  // namespace duskleaf
