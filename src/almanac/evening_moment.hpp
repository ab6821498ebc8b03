#pragma once

#include "almanac/site_year.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// When an evening's chart is drawn.
struct EveningMoment {
  Ut chart_moment;  // the order's chart hour
  Ut moment;        // what is drawn
  EveningShift shift;
};

/// The instant of the order's chart hour in the evening of a night. Dusk is the night's nautical
/// dusk, to the next five minutes; where the Sun does not sink to -12 degrees, the darkest moment;
/// where it is below -12 all the time, 18:00 civil time. A clock hour that the clocks skip is the
/// moment of the jump.
Ut chart_moment(const SiteSky&, const Zone&, const ChartHour&, const Night&);

/// The chart hour, or on a bright evening what is drawn instead: the moment when the Sun reaches
/// -12 degrees, to the next five minutes, whether the chart hour falls before it or in the
/// morning's twilight; else the darkest moment, to the minute, with `no_stars` where the Sun stays
/// above -6 degrees.
EveningMoment evening_moment(const SiteSky&, const Zone&, const ChartHour&, const Night&);

/// When the sky of `moment` (in the evening of `evening`) stands there on other dates of its month:
/// the 1st, 8th, 15th, 22nd, the last, and both sides of each clock change.
std::vector<ChartFit> chart_fits(const Zone&, Date evening, Ut moment);

}  // namespace duskleaf
