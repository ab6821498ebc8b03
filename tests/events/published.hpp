#pragma once

#include <fstream>
#include <sstream>
#include <string>

#include "base/civil.hpp"
#include "base/csv.hpp"

namespace duskleaf {

/// Text of a file of tests/reference.
inline std::string reference_text(const std::string& name) {
  std::ifstream file(std::string(DUSKLEAF_REFERENCE "/") + name, std::ios::binary);
  if (!file) throw std::runtime_error("cannot read reference " + name);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

/// Days since J2000.0 of "2001-01-04T08:52Z", "1996-03-20T08:04:07" or "1991-01-03 3.00h", on
/// whatever scale the table has.
inline double table_day(std::string_view text) {
  const auto integer = [&](std::size_t at, std::size_t n) {
    return static_cast<int>(parse_number(text.substr(at, n)));
  };
  const double day = ut_midnight(make_date(integer(0, 4), integer(5, 2), integer(8, 2))).days();
  if (text.ends_with('h')) return day + parse_number(text.substr(11, text.size() - 12)) / 24;
  const double seconds = text.size() >= 19 ? parse_number(text.substr(17, 2)) : 0.0;
  return day + integer(11, 2) / 24.0 + integer(14, 2) / 1440.0 + seconds / 86400;
}

}  // namespace duskleaf
