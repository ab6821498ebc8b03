#pragma once

#include <chrono>
#include <optional>
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

/// When the Moon is up in the night, in order.
std::vector<TimeSpan> moon_up_spans(const Night&);

/// The sunset that follows when something begins in daylight at a civil time (`from`, minutes after
/// midnight; readings up to 12:00 are of the following date) in the evening of a date; empty where
/// the Sun is down already, or sets within the minute that is printed, or does not set before the
/// next noon, and for dates outside the year.
std::optional<Ut> sunset_after(const SiteYear&, Date evening, std::chrono::minutes from);

}  // namespace duskleaf
