#pragma once

#include <string>
#include <vector>

#include "sheet/setting.hpp"

namespace duskleaf {

/// Hours of the clock since the midnight that begins the night's date: 12 to 36.
double clock_hours(const Zone&, const Night&, Ut);

/// The bars' axis: whole hours that hold every sunset and sunrise of the month; all 24 where the
/// Sun does not rise or set.
struct NightAxis {
  double from = 12, to = 36;  // hours
  double x = 0, width = 0;    // mm
  double at(double hours) const;
};
NightAxis night_axis(const BlockContext&, const std::vector<const Night*>&);

/// One night's row of the page, mm.
struct NightRow {
  const Night& night;
  double top, height;
};
/// The twilights' tones with the Moon's time up over them.
void draw_night_bar(const BlockContext&, const NightAxis&, const NightRow&, std::vector<Mark>& out);
/// A clock change within the night: a line across its bar with the step, "+1 h", beside it.
void mark_clock_change(const BlockContext&, Setter&, const NightAxis&, const NightRow&,
                       std::vector<Mark>& out);
/// Hours over the bars and their lines behind them. The hours' words have their baseline at
/// `baseline`.
void draw_hour_lines(const BlockContext&, Setter&, const NightAxis&, const Style&, double baseline,
                     double bars_top, double bars_bottom, std::vector<Mark>& out);
/// What is out of the ordinary, over the bars; neighbouring rows with the same note share one.
void label_night_bars(const BlockContext&, Setter&, const NightAxis&,
                      const std::vector<const Night*>&, double bars_top, double pitch,
                      std::vector<Mark>& out);
/// What the bars' tones mean, right-aligned; returns the width used.
double draw_night_key(const BlockContext&, Setter&, const Style&, double right, double y,
                      std::vector<Mark>& out);

}  // namespace duskleaf
