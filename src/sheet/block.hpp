#pragma once

#include <map>
#include <string>
#include <string_view>
#include <vector>

#include "almanac/happenings.hpp"
#include "almanac/site_year.hpp"
#include "base/csv.hpp"
#include "order/order.hpp"
#include "sheet/marks.hpp"
#include "sheet/theme.hpp"
#include "sheet/type.hpp"
#include "sheet/words.hpp"

namespace duskleaf {

/// What left the page for lack of room; `press --verbose` tells.
struct Tally {
  int labels_left_out = 0;
  std::vector<std::string> notes;
};

/// Everything that a block may look at.
struct BlockContext {
  const Order& order;
  const Site& site;
  const Publication& publication;
  const SiteYear& year;
  int month_index;  // 0..11 of the span
  const YearEphemeris& ephemeris;
  const SkyYear& sky_year;
  const SiteHappenings& happenings;
  const TypeSet& type;
  const Words& words;
  const Theme& theme;
  Tally& tally;

  const EveningSky& evening() const { return year.evenings[static_cast<std::size_t>(month_index)]; }
};

/// Options of a block as the template gives them, already checked against the block's table.
struct BlockOptions {
  std::map<std::string, std::string, std::less<>> values;
  const std::string& get(std::string_view name) const { return values.find(name)->second; }
  /// Of an option that is a whole number of 0 or more, which the template's reader has checked.
  int number(std::string_view name) const { return static_cast<int>(parse_number(get(name))); }
};

/// Draws into `area` and returns the height used in mm (at most area.height unless the block cannot
/// shrink so far). A block with nothing to say returns 0 and draws nothing.
using DrawBlock = double (*)(const BlockContext&, const BlockOptions&, const Box& area,
                             std::vector<Mark>& out);

/// One option: its name, default, what it may be ("one of a|b", "number", "text"), and a line of
/// help.
struct OptionSpec {
  std::string_view name, fallback, allowed, help;
};
/// One block that templates can name. The table of all of them parses templates and documents
/// itself.
struct BlockSpec {
  std::string_view name, help;
  std::vector<OptionSpec> options;
  DrawBlock draw;
  /// Of a block that grows with its room: the least that a band's share must leave it, mm.
  double (*least_height)(const BlockContext&) = nullptr;
};
const std::vector<BlockSpec>& block_table();

}  // namespace duskleaf
