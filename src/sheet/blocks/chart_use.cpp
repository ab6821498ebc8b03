#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {

// How to hold the charts, for someone who has never looked up: set in the corner that a dome leaves
// free, so that its lines grow shorter downward.
double draw_chart_use(const BlockContext& c, const BlockOptions&, const Box& area,
                      std::vector<Mark>& out) {
  Setter set(c, out);
  const Style style{Face::regular, c.theme.label_pt, c.theme.soft};
  const double pitch = 3.5;
  double baseline = area.y + 2.9;
  for (int line = 1; c.words.has("chart-use." + std::to_string(line)); ++line, baseline += pitch)
    set.right(area.right(), baseline, c.words("chart-use." + std::to_string(line)), style);
  return baseline - area.y;
}

}  // namespace duskleaf
