#include <algorithm>

#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"
#include "sheet/sky_chart_dome.hpp"

namespace duskleaf {

// How to hold the charts, for someone who has never looked up: set in the corner that a dome leaves
// free, so that its lines grow shorter downward.
double draw_chart_use(const BlockContext& c, const BlockOptions&, const Box& area,
                      std::vector<Mark>& out) {
  Setter set(c, out);
  // The chart above which this stands faces the equator's side.
  const std::string direction =
      c.words.direction(dome_azimuth(DomeFacing::equator, c.site.place.observer.latitude));
  const double pitch = 3.6;
  double baseline = area.y + 2.9;
  for (int line = 1; c.words.has("chart-use." + std::to_string(line)); ++line, baseline += pitch) {
    const std::string key = "chart-use." + std::to_string(line);
    const Style style{line == 1 ? Face::bold : Face::regular,
                      std::max(c.theme.label_pt, line == 1 ? 8.0 : 0.0), c.theme.black};
    set.right(area.right(), baseline, c.words(key, {{"direction", direction}}), style);
  }
  return baseline - area.y;
}

}  // namespace duskleaf
