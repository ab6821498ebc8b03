#pragma once

#include <string>
#include <vector>

#include "order/order.hpp"

namespace duskleaf {

/// One file that a publication gives: its path below the output folder, without the site's folder
/// where it has one.
struct OutputFile {
  std::string
      path;  // "handout-2027-03.pdf", "handout-2027.pdf", "pairs/a+b/paired-places-2027-03-19.pdf"
  std::vector<int> months;     // indices 0..11 of the order's span; empty for pairs
  bool in_site_folder = true;  // false for pairs
};
std::vector<OutputFile> output_files(const Order&, const Publication&);

/// Refuses two publications that write the same file (letters' case apart, as some file systems
/// ignore it).
void check_outputs(const Order&);

}  // namespace duskleaf
