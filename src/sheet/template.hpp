#pragma once

#include <string>
#include <vector>

#include "order/order.hpp"
#include "sheet/block.hpp"

namespace duskleaf {

/// A page template as read from YAML: bands from top to bottom, in each band columns of a 12-column
/// grid, in each column blocks under one another. Heights are in steps of 4 mm, or shares of what
/// the other bands leave, or the blocks' own.
struct PageTemplate {
  struct Block {
    const BlockSpec* spec = nullptr;
    BlockOptions options;
    bool over = false;  // drawn in the area of the block before it, taking no room of its own
    bool fill = false;  // drawn last of its column, into what room the others leave, with fewer
                        // lines than its option `most` where they are too many
    bool roam = false;  // may stand at the end of another column of its band, where that is shorter
  };
  struct Column {
    int first = 1, last = 12;  // of the grid, counted from 1
    std::vector<Block> blocks;
  };
  struct Band {
    double steps = 0, share = 0;  // both 0: the blocks' own height
    double gap_mm = 3;            // below the band
    std::vector<Column> columns;
  };
  struct Page {
    std::string bookmark;  // key of the words; takes {month} and {year}
    std::vector<Band> bands;
  };
  std::string title, subject;  // keys of the words
  std::vector<std::string> papers;
  double margin_mm = 12;
  std::vector<Page> pages;  // made for each month
};

inline constexpr int grid_columns = 12;
inline constexpr double grid_step_mm = 4.0;
inline constexpr double grid_gutter_mm = 4.0;

/// Throws OrderError with the template's FILE:LINE:COLUMN at the first mistake.
PageTemplate parse_template(std::string_view text, const std::string& file);
/// The publication's template: ours by name, or a file. Throws OrderError or FileError; an
/// OrderError at the publication where its paper is none of the template's.
PageTemplate load_template(const Order&, const Publication&);

}  // namespace duskleaf
