#pragma once

#include <map>
#include <memory>

#include "base/civil.hpp"
#include "base/csv.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

inline Ut start_of_year(int year) { return ut_midnight(make_date(year, 1, 1)); }

/// The tables of one calendar year, and three days on either side; made once.
inline const YearEphemeris& tables_of_year(int year) {
  static std::map<int, std::unique_ptr<YearEphemeris>> years;
  std::unique_ptr<YearEphemeris>& made = years[year];
  if (!made)
    made = std::make_unique<YearEphemeris>(to_tt(start_of_year(year) - Days(3)),
                                           to_tt(start_of_year(year + 1) + Days(3)));
  return *made;
}

/// "2027-03-20T20:24:41.31Z" as an instant.
inline Ut instant_of_text(std::string_view text) {
  const auto integer = [&](std::size_t at, std::size_t n) {
    return static_cast<int>(parse_number(text.substr(at, n)));
  };
  const Ut day = ut_midnight(make_date(integer(0, 4), integer(5, 2), integer(8, 2)));
  return day + Days(integer(11, 2) / 24.0 + integer(14, 2) / 1440.0 +
                    parse_number(text.substr(17, text.size() - 18)) / 86400.0);
}
inline int year_of_text(std::string_view text) {
  return static_cast<int>(parse_number(text.substr(0, 4)));
}

}  // namespace duskleaf
