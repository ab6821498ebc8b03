#pragma once

#include <vector>

#include "base/angle.hpp"
#include "sheet/marks.hpp"
#include "sheet/theme.hpp"

namespace duskleaf {

/// The Moon as it looks: a disc whose lit fraction (0..1) is left paper-white and whose dark part
/// is toned. The middle of the bright limb points `bright_limb_from_up`, counterclockwise from the
/// page's top. Radius in mm.
void draw_moon(Point centre, double radius, double lit, Angle bright_limb_from_up, const Theme&,
               std::vector<Mark>& out);

}  // namespace duskleaf
