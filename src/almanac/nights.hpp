#pragma once

#include <vector>

#include "almanac/site_year.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// Whether the zone's calendar has the date at all.
bool is_skipped(const Zone&, Date);
/// 12:00 civil time of the date to 12:00 of the next date that the zone has; empty for a date that
/// it skips.
TimeSpan night_span(const Zone&, Date);

/// When the Sun is lowest in [from, to], and its geocentric altitude then.
struct DarkestMoment {
  Ut at;
  Angle sun_altitude;
};
DarkestMoment darkest_moment(const SiteSky&, Ut from, Ut to);

/// The nights of [first, end) in order. `events` (sorted) must hold every instant of them: the
/// site's and the global ones.
std::vector<Night> make_nights(const SiteSky&, const Zone&, const std::vector<Event>& events,
                               const std::vector<ClockChange>&, Date first, Date end);

}  // namespace duskleaf
