#include <algorithm>

#include "sheet/blocks/blocks.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {

// A strip of dates with the clock time at which the charts' sky stands then.
double draw_chart_fits(const BlockContext& c, const BlockOptions&, const Box& area,
                       std::vector<Mark>& out) {
  const EveningSky& evening = c.evening();
  if (evening.fits.empty() || evening.shift == EveningShift::no_stars) return 0;
  Setter set(c, out);
  const Style time_style{Face::bold, 9, c.theme.blue},
      date_style{Face::regular, c.theme.table_pt, c.theme.soft};
  const Style label{Face::italic, c.theme.body_pt, c.theme.black};
  const double height = 8.2;
  set.rule(area.x, area.right(), area.y, c.theme.blue_soft, c.theme.hairline_mm);
  set.rule(area.x, area.right(), area.y + height, c.theme.blue_soft, c.theme.hairline_mm);
  const std::string& title = c.words("chart-fits.title");
  set.left(area.x, area.y + 5.1, title, label);
  const double from = area.x + set.width(title, label) + 6;
  const double cell = (area.right() - from) / static_cast<double>(evening.fits.size());
  for (std::size_t i = 0; i < evening.fits.size(); ++i) {
    const ChartFit& fit = evening.fits[i];
    // A clock change shows as a mark before the first reading of the new clock.
    const bool changed = i > 0 && fit.clock.offset != evening.fits[i - 1].clock.offset;
    const double x = from + cell * (static_cast<double>(i) + 0.5);
    if (fit.date == evening.date)  // the charts' own date
      out.push_back(
          Fill{Path::rectangle({x - cell * 0.46, area.y + 0.5, cell * 0.92, height - 1.0}),
               c.theme.lap});
    set.centre(x, area.y + 3.4, c.words.day_month(fit.clock.date()), date_style);
    set.centre(x, area.y + 7.0, c.words.time(fit.clock), time_style);
    if (changed) {
      const double at = x - cell / 2;
      out.push_back(Stroke{Path::polyline({{at, area.y + 1}, {at, area.y + height - 1}}),
                           0.25,
                           c.theme.blue,
                           {0.6, 0.6},
                           false});
    }
  }
  return height + 0.5;
}

}  // namespace duskleaf
