#pragma once

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "sheet/jupiter_column.hpp"
#include "sheet/night_bar_drawing.hpp"

namespace duskleaf {

/// A column of clock times, each row's set as it stands on the page.
struct TimeColumn {
  std::array<std::string, 2> head;  // "Sun", "sets pm": where all of a column's times are of one
                                    // half of the day its head says so, and they do not
  std::vector<std::string> cells;
  double centre = 0;  // mm
};

/// The columns of the night bars' table, and where its parts stand, mm. Columns are as wide as what
/// they hold; the bars have the rest.
struct NightColumns {
  std::vector<TimeColumn> times;
  std::vector<std::string> lit, dark;
  std::array<std::string, 2> dark_head;
  double lit_right = 0, moon = 0, dark_right = 0;
  double jupiter = 0;  // the planet's place
  NightAxis axis;
};
NightColumns night_columns(const BlockContext&, const std::vector<const Night*>&, const Box& area,
                           const std::optional<JupiterColumn>&);
void draw_night_heads(const BlockContext&, Setter&, const NightColumns&, double top, const Style&,
                      bool jupiter);

/// Whether the month's darkest hours are counted, as none of its nights gets fully dark.
bool counts_darkest(const std::vector<const Night*>&);
/// Whether the site has a skyline that the Sun clears or goes behind in the month.
bool has_skyline_times(const BlockContext&);

}  // namespace duskleaf
