#pragma once

#include <algorithm>
#include <optional>
#include <vector>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// What two lists of spans (each in order, without overlap) have in common.
std::vector<TimeSpan> intersection(const std::vector<TimeSpan>&, const std::vector<TimeSpan>&);
/// The parts of [from, to] in which a body is below a limit, by its instants (`up` when it rises
/// past it, `down` when it sinks) among the events of that time; `below_if_none` says where it is
/// when there are none.
std::vector<TimeSpan> spans_below(const std::vector<Event>& events, EventKind up, EventKind down,
                                  Ut from, Ut to, bool below_if_none);
Days length(const std::vector<TimeSpan>&);
bool contains(const std::vector<TimeSpan>&, Ut);

}  // namespace duskleaf
