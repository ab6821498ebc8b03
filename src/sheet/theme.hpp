#pragma once

#include "sheet/marks.hpp"

namespace duskleaf {

/// The inks and sizes of a publication. Black, one deep blue, greys: nothing is told by hue alone.
struct Theme {
  Ink black, soft,
      faint;  // text; secondary text (no lighter than half grey); hairlines that nobody must read
  Ink blue, blue_soft;  // the one deep blue; its half tone for lines
  Ink paper, sky, lap;  // white; the charts' ground; the toned lap beyond the zenith
  Ink day, civil, nautical, astronomical, dark;  // the night bars' tones
  Ink figure;                                    // thin lines of the figures
  double hairline_mm = 0.3 * 25.4 / 72.0;        // the thinnest line, 0.3 pt
  double body_pt = 8.5, table_pt = 7.5, label_pt = 7.5, small_pt = 6.5;

  static Theme colour();
  static Theme grey();
};

}  // namespace duskleaf
