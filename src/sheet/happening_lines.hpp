#pragma once

#include <optional>
#include <string>
#include <vector>

#include "sheet/block.hpp"

namespace duskleaf {

/// One line of a month's happenings as a page prints it, in civil time of the site.
struct HappeningLine {
  Date date;  // what has a time from noon to sunrise stands under the date of its evening, what
              // happens by day or has no time under its civil date
  std::optional<Date> after_midnight;  // the civil date, where the night's time is past midnight
  Ut at;                               // for the order within a date
  std::string when;                    // "21:30", "01:00–04:00" or empty
  std::string text;                    // a whole sentence
  std::string caution;                 // to print in bold after it; whenever the Sun is looked at
  std::string brief;                   // a few words for the closing line; empty: never left out
  double rank;                         // 0 matters most; from fact_rank on nobody sees it
  bool own = false;                    // one of the order's own dates
  bool sight = false;                  // something to go out for
  bool meteors = false;                // of a shower
  bool best = false;                   // one of the two, at most, that the month is best for
};

/// What nobody can see is named in the closing line alone, however much room there is.
inline constexpr double fact_rank = 5;

/// All lines of the context's month, in order of date and time. What the site does not see is left
/// out, but for eclipses of which people hear, which say that they are not seen.
std::vector<HappeningLine> happening_lines(const BlockContext&);

/// The lines that a page has room for.
struct HappeningChoice {
  std::vector<HappeningLine> shown, left_out;  // both in order of date
};
/// At most `most` lines and one that names or counts the rest: the least important are left out, of
/// equal ones the later. The order's own dates stay, but for those after the sixteenth.
HappeningChoice choose_lines(std::vector<HappeningLine>, std::size_t most);

}  // namespace duskleaf
