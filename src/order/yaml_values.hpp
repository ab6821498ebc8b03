#pragma once

#include <chrono>
#include <string>
#include <string_view>
#include <vector>

#include "order/yaml_reader.hpp"

namespace duskleaf {

/// A map whose keys are known: the constructor throws OrderError for anything but a map and at the
/// first unknown key, offering the nearest known one. `what` names the map in messages ("a site").
/// The value must outlive the reader.
class MapReader {
 public:
  MapReader(const YamlValue& value, std::string what, std::vector<std::string_view> keys);

  /// nullptr when the key is not given, or given without a value.
  const YamlValue* find(std::string_view key) const;
  /// Throws OrderError when the key is not given or has no value.
  const YamlValue& require(std::string_view key) const;
  /// Where the key stands; the map itself when it does not.
  const Location& where(std::string_view key) const;
  const Location& where() const { return value_.at; }

 private:
  const YamlEntry* entry(std::string_view key) const;
  const YamlValue& value_;
  std::string what_;
};

/// Typed readings of a value. `what` names it in messages ("latitude"). All throw OrderError at the
/// value's place.
std::string read_text(const YamlValue&, std::string_view what);  // one or more characters
double read_number(const YamlValue&, std::string_view what, double least, double most);
int read_integer(const YamlValue&, std::string_view what, int least, int most);
bool read_bool(const YamlValue&, std::string_view what);  // true or false
/// Index of the word in `choices`; offers the nearest.
std::size_t read_choice(const YamlValue&, std::string_view what,
                        const std::vector<std::string_view>& choices);
Date read_date(const YamlValue&, std::string_view what);  // 2027-03-19, years 1900..2101
std::chrono::minutes read_clock(const YamlValue&, std::string_view what);  // 21:30, 00:00..23:59
const std::vector<YamlValue>& read_list(const YamlValue&, std::string_view what);

/// "a list", "a map", "nothing" or the scalar in quotes (shortened), for messages.
std::string described(const YamlValue&);

}  // namespace duskleaf
