#pragma once

#include "sheet/block.hpp"

namespace duskleaf {

// One function for each block, each in its own file of this folder. block_table() names them.
double draw_masthead(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_dome(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_chart_key(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_chart_use(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_chart_fits(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_ribbon(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_night_bars(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
/// The least height of its rows, heads and notes.
double night_bars_least_height(const BlockContext&);
double draw_moon_phases(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_planets(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_constellations(const BlockContext&, const BlockOptions&, const Box&,
                           std::vector<Mark>&);
double draw_happenings(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_eclipses(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_show(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_best_nights(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_sessions(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_cautions(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);
double draw_sources(const BlockContext&, const BlockOptions&, const Box&, std::vector<Mark>&);

}  // namespace duskleaf
