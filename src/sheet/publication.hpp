#pragma once

#include <vector>

#include "sheet/block.hpp"

namespace duskleaf {

/// The sheets of one publication for one site: the template's pages for each of the months (indices
/// 0..11 of the order's span). Throws OrderError when the template is wrong, FileError when it
/// cannot be read.
SheetDocument make_handout(const Order&, const Site&, const Publication&, const SiteYear&,
                           const SkyYear&, const SiteHappenings&, const YearEphemeris&,
                           const std::vector<int>& month_indices, const TypeSet&, Tally&);

/// Reads and checks the publication's template without drawing; throws as make_handout.
void check_template(const Order&, const Publication&);

/// Our own templates that this version prints.
bool is_printable_template(std::string_view name);

}  // namespace duskleaf
