#include "base/civil.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {

// The usual cautions: eyes and the Sun, what the times are not for, the night-time site.
double draw_cautions(const BlockContext& c, const BlockOptions&, const Box& area,
                     std::vector<Mark>& out) {
  Setter set(c, out);
  set.rule(area.x, area.right(), area.y, c.theme.blue, 0.25);
  double y = area.y + 1.2;
  const Style body{Face::regular, c.theme.table_pt, c.theme.black};
  y += set.lead_in(area.x, y, area.width, c.words("cautions.sun-lead"), c.words("cautions.sun"),
                   body, 1.22) +
       0.3;
  y += set.lead_in(area.x, y, area.width, c.words("cautions.site-lead"), c.words("cautions.site"),
                   body, 1.22);
  return y - area.y;
}

// How the numbers are made, in a few lines, with the versions that they rest on.
double draw_sources(const BlockContext& c, const BlockOptions&, const Box& area,
                    std::vector<Mark>& out) {
  Setter set(c, out);
  const Style small{Face::regular, c.theme.small_pt, c.theme.soft};
  static const std::string zone_version = time_zone_data_version();
  std::string text =
      c.words("sources.text", {{"zone", c.year.place.zone.name()}, {"version", zone_version}});
  const auto [year, month] = c.year.span.month(c.month_index);
  if (year > 2035) text += " " + c.words("sources.far-year");
  const double height =
      set.lead_in(area.x, area.y, area.width, c.words("sources.lead"), text, small, 1.22);
  return height;
}

}  // namespace duskleaf
