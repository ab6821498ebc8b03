#pragma once

#include <string>
#include <vector>

#include "sheet/setting.hpp"

namespace duskleaf {

/// A piece of a paragraph in one style.
struct Run {
  std::string text;
  Style style;
};

/// Sets pieces of several styles as one paragraph, broken at spaces, with a space between pieces;
/// the first piece's size gives the line pitch. Returns the height used in mm.
double flow(Setter&, double x, double top, double width, const std::vector<Run>&,
            double leading = 1.28);

}  // namespace duskleaf
