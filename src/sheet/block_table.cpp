#include "sheet/blocks/blocks.hpp"

namespace duskleaf {

const std::vector<BlockSpec>& block_table() {
  static const std::vector<BlockSpec> table{
      {"masthead",
       "the month, the group and the place, with its logo and the code of its link; at the back a "
       "narrow title",
       {{"side", "front", "front|back", "which side of the sheet"}},
       draw_masthead},
      {"chart-fits",
       "the dates and clock times through the month at which the charts' sky stands",
       {},
       draw_chart_fits},
      {"dome",
       "the half of the evening sky above one horizon",
       {{"facing", "equator", "equator|pole",
         "towards the celestial equator, or towards the pole that is up"}},
       draw_dome},
      {"chart-key",
       "what the charts' dots and lines mean",
       {{"corner", "top-left", "top-left|top-right", "where it stands in the block it lies over"}},
       draw_chart_key},
      {"chart-use",
       "how to hold the charts, for the top right corner of a dome",
       {},
       draw_chart_use},
      {"ribbon",
       "the sky within 40 degrees of the celestial equator, with the site's horizon",
       {},
       draw_ribbon},
      {"night-bars",
       "one row a night: times, Moon, dark hours, and a bar of the twilights",
       {},
       draw_night_bars},
      {"moon-phases", "the month's phases with date, time and look", {}, draw_moon_phases},
      {"planets", "each planet in words and numbers", {}, draw_planets},
      {"constellations",
       "the constellations near the celestial equator: rising, high, sinking",
       {},
       draw_constellations},
      {"happenings",
       "seasons, apsides, clock changes and the order's own dates",
       {},
       draw_happenings},
      {"best-nights",
       "the month's best nights, of the group's weekday where it has one",
       {},
       draw_best_nights},
      {"sessions", "the group's own evenings and words", {}, draw_sessions},
      {"cautions", "the usual cautions: the Sun, and the site at night", {}, draw_cautions},
      {"sources", "how the numbers are made, and what they rest on", {}, draw_sources},
  };
  return table;
}

}  // namespace duskleaf
