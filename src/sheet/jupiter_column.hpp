#pragma once

#include <optional>
#include <string>
#include <vector>

#include "sheet/block.hpp"

namespace duskleaf {

/// Jupiter's four bright moons night by night, at the hour of the group's sessions, else of the
/// charts.
struct JupiterColumn {
  std::string hour;                // "21:30", "dusk"
  std::vector<std::string> order;  // for each night, east to west: "2 1 J 3 4"; empty where Jupiter
                                   // is not in sight then
};
/// Nothing in months in which Jupiter is in sight at that hour on fewer than seven nights.
std::optional<JupiterColumn> jupiter_column(const BlockContext&, const std::vector<const Night*>&);

}  // namespace duskleaf
