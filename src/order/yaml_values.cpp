// Dates and clock times by ISO 8601's extended forms; numbers by the C locale's form whatever the
// process's locale.
#include "order/yaml_values.hpp"

#include <charconv>
#include <cmath>
#include <fmt/format.h>

#include "base/csv.hpp"
#include "order/nearest_name.hpp"

namespace duskleaf {
namespace {

[[noreturn]] void refuse(const YamlValue& value, std::string_view what, std::string_view expected) {
  throw OrderError(value.at, fmt::format("{} is {}", what, described(value)),
                   fmt::format("expected {}", expected));
}

const std::string& scalar(const YamlValue& value, std::string_view what,
                          std::string_view expected) {
  if (value.kind != YamlValue::Kind::scalar) refuse(value, what, expected);
  return value.text;
}

/// Reads exactly `digits` digits at `at`; -1 when they are not there.
int digits_at(std::string_view text, std::size_t at, std::size_t digits) {
  if (at + digits > text.size()) return -1;
  int value = 0;
  for (const char c : text.substr(at, digits)) {
    if (c < '0' || c > '9') return -1;
    value = value * 10 + (c - '0');
  }
  return value;
}

}  // namespace

std::string described(const YamlValue& value) {
  switch (value.kind) {
    case YamlValue::Kind::null:
      return "nothing";
    case YamlValue::Kind::list:
      return "a list";
    case YamlValue::Kind::map:
      return "a map";
    case YamlValue::Kind::scalar:
      break;
  }
  if (value.text.size() <= 60) return fmt::format("'{}'", value.text);
  std::size_t end = 57;
  while (end > 0 && (static_cast<unsigned char>(value.text[end]) & 0xC0U) == 0x80U) --end;
  return fmt::format("'{}...'", value.text.substr(0, end));
}

MapReader::MapReader(const YamlValue& value, std::string what, std::vector<std::string_view> keys)
    : value_(value), what_(std::move(what)) {
  if (value.kind != YamlValue::Kind::map)
    throw OrderError(
        value.at, fmt::format("{} is {}", what_, described(value)),
        fmt::format(
            "expected a map with keys such as {}",
            listed({keys.begin(), keys.begin() + static_cast<std::ptrdiff_t>(
                                                     std::min<std::size_t>(3, keys.size()))})));
  for (const YamlEntry& entry : value.entries) {
    if (std::find(keys.begin(), keys.end(), entry.key) != keys.end()) continue;
    const bool number = entry.key.find_first_not_of("0123456789") == std::string::npos;
    const std::string near = number ? "" : nearest_name(entry.key, keys);  // 13 is not "like" 1
    throw OrderError(entry.key_at, fmt::format("unknown key '{}' in {}", entry.key, what_),
                     near.empty() ? fmt::format("expected {}", listed(keys))
                                  : fmt::format("did you mean '{}'?", near));
  }
}

const YamlEntry* MapReader::entry(std::string_view key) const {
  for (const YamlEntry& entry : value_.entries)
    if (entry.key == key) return &entry;
  return nullptr;
}

const YamlValue* MapReader::find(std::string_view key) const {
  const YamlEntry* found = entry(key);
  return found == nullptr || found->value.kind == YamlValue::Kind::null ? nullptr : &found->value;
}

const YamlValue& MapReader::require(std::string_view key) const {
  const YamlEntry* found = entry(key);
  if (found == nullptr)
    throw OrderError(value_.at, fmt::format("{} has no '{}'", what_, key), "this key is needed");
  if (found->value.kind == YamlValue::Kind::null)
    throw OrderError(found->value.at,  // of an empty cell its own place, not its column's header
                     fmt::format("'{}' has no value", key), "this key is needed");
  return found->value;
}

const Location& MapReader::where(std::string_view key) const {
  const YamlEntry* found = entry(key);
  return found == nullptr ? value_.at : found->key_at;
}

std::string read_text(const YamlValue& value, std::string_view what) {
  const std::string& text = scalar(value, what, "text");
  if (text.find_first_not_of(" \n") == std::string::npos) refuse(value, what, "some text");
  for (const char c : text)  // YAML's escapes can write what the file itself may not hold
    if ((c >= 0 && c < ' ' && c != '\n' && c != '\t') || c == 0x7F)
      throw OrderError(
          value.at,
          fmt::format("{} has the control character 0x{:02X}", what, static_cast<unsigned>(c)),
          "plain text was expected");
  return text;
}

double read_number(const YamlValue& value, std::string_view what, double least, double most) {
  const std::string expected = fmt::format("a number from {} to {}", least, most);
  const std::string& text = scalar(value, what, expected);
  double number = 0;
  try {
    number = parse_number(text);
  } catch (const std::runtime_error&) {
    refuse(value, what, expected);
  }
  if (!std::isfinite(number) || number < least || number > most) refuse(value, what, expected);
  return number;
}

int read_integer(const YamlValue& value, std::string_view what, int least, int most) {
  const std::string expected = fmt::format("a whole number from {} to {}", least, most);
  const std::string& text = scalar(value, what, expected);
  int number = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), number);
  if (error != std::errc{} || end != text.data() + text.size() || number < least || number > most)
    refuse(value, what, expected);
  return number;
}

bool read_bool(const YamlValue& value, std::string_view what) {
  const std::string& text = scalar(value, what, "true or false");
  if (text != "true" && text != "false") refuse(value, what, "true or false");
  return text == "true";
}

std::size_t read_choice(const YamlValue& value, std::string_view what,
                        const std::vector<std::string_view>& choices) {
  const std::string& text = scalar(value, what, listed(choices));
  for (std::size_t i = 0; i < choices.size(); ++i)
    if (choices[i] == text) return i;
  const std::string near = nearest_name(text, choices);
  refuse(value, what,
         listed(choices) + (near.empty() ? "" : fmt::format(" (did you mean '{}'?)", near)));
}

Date read_date(const YamlValue& value, std::string_view what) {
  constexpr std::string_view expected = "a date such as 2027-03-19";
  const std::string& text = scalar(value, what, expected);
  const int year = digits_at(text, 0, 4), month = digits_at(text, 5, 2),
            day = digits_at(text, 8, 2);
  const bool shaped = text.size() == 10 && text[4] == '-' && text[7] == '-';
  if (!shaped || year < 1900 || year > 2101 || month < 1 || month > 12 || day < 1 ||
      day > days_in_month(year, month))
    refuse(value, what, expected);
  return make_date(year, month, day);
}

std::chrono::minutes read_clock(const YamlValue& value, std::string_view what) {
  constexpr std::string_view expected = "a time of day from 00:00 to 23:59";
  const std::string& text = scalar(value, what, expected);
  const std::size_t colon = text.find(':');
  const int hour = colon == 1 || colon == 2 ? digits_at(text, 0, colon) : -1;
  const int minute = hour >= 0 && text.size() == colon + 3 ? digits_at(text, colon + 1, 2) : -1;
  if (hour < 0 || hour > 23 || minute < 0 || minute > 59) refuse(value, what, expected);
  return std::chrono::minutes(hour * 60 + minute);
}

const std::vector<YamlValue>& read_list(const YamlValue& value, std::string_view what) {
  if (value.kind != YamlValue::Kind::list) refuse(value, what, "a list");
  return value.items;
}

}  // namespace duskleaf
