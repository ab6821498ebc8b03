#pragma once

#include <vector>

#include "sheet/block.hpp"
#include "sheet/template.hpp"

namespace duskleaf {

/// One page's marks on a sheet of that size (mm). A page whose own words make it too long is laid
/// out on a larger sheet and reduced, in steps, down to seven eighths; the tally's notes say so.
std::vector<Mark> draw_page(const BlockContext&, const PageTemplate&, const PageTemplate::Page&,
                            double width, double height);

}  // namespace duskleaf
