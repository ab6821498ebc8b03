#pragma once

#include <vector>

#include "sheet/block.hpp"
#include "sheet/template.hpp"

namespace duskleaf {

/// One page's marks on a sheet of that size (mm). Where its words are too many, lists that fill the
/// room are cut to three lines, then blocks leave out what their option `leave-out` names, then the
/// lists go. A page that is too full even then, by the order's own words, is reduced (to 55 % at
/// least), and noted in the tally.
std::vector<Mark> draw_page(const BlockContext&, const PageTemplate&, const PageTemplate::Page&,
                            double width, double height);

}  // namespace duskleaf
