#pragma once

#include <optional>
#include <string>
#include <vector>

#include "sheet/block.hpp"

namespace duskleaf {

/// One line of a month's happenings as a page prints it, in civil time of the site.
struct HappeningLine {
  Date date;  // what is seen in a night stands under the date of its evening (noon to noon), what
              // happens by day under its civil date
  std::optional<Date> after_midnight;  // the civil date, where the night's time is past midnight
  Ut at;                               // for the order within a date
  std::string when;                    // "21:30", "01:00–04:00" or empty
  std::string text;                    // a whole sentence
  std::string caution;                 // to print in bold after it; whenever the Sun is looked at
  std::string brief;                   // a few words for the closing line; empty: never left out
  int rank;                            // 0 matters most, 5 least
  bool own = false;                    // one of the order's own dates
};

/// All lines of the context's month, in order of date and time. What the site does not see is left
/// out, but for eclipses of which people hear, which say that they are not seen.
std::vector<HappeningLine> happening_lines(const BlockContext&);

/// The lines that a page has room for.
struct HappeningChoice {
  std::vector<HappeningLine> shown, left_out;  // both in order of date
};
/// At most `most` lines and one that counts the rest: the least important are left out, of equal
/// ones the later. The order's own dates always stay.
HappeningChoice choose_lines(std::vector<HappeningLine>, std::size_t most);

}  // namespace duskleaf
