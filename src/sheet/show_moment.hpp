#pragma once

#include "sheet/block.hpp"

namespace duskleaf {

/// The evening for which a month's page says what to show.
struct ShowMoment {
  Date evening;
  Ut at;
  bool session;  // one of the group's own
  bool dark;     // where it is none: the month's best night, which has dark hours
};
/// The month's first session by date, from its beginning on: when the Sun is 12 degrees down,
/// within the session's hours, where the Sun has set by then. Without one the month's best night
/// (rank_nights, aim any) at the chart's hour, or when it is dark; the charts' own evening where
/// the month has no dark night.
ShowMoment show_moment(const BlockContext&);

}  // namespace duskleaf
