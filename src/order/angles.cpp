// Coordinates as people write them: ISO 6709's sense of signs (north and east positive), degrees
// alone or sexagesimal.
#include "order/angles.hpp"

#include <fmt/format.h>
#include <optional>

#include "base/csv.hpp"

namespace duskleaf {
namespace {

struct Axis {
  std::string_view name;
  double limit;
  char positive, negative;
  std::string_view example;
};
constexpr Axis latitude_axis{"latitude", 90, 'N', 'S', "54 10 48 N"};
constexpr Axis longitude_axis{"longitude", 180, 'E', 'W', "4 37 12 W"};

std::optional<double> number_in(std::string_view text) {
  if (text.empty() || text.find_first_not_of("0123456789.+-") != std::string_view::npos)
    return std::nullopt;
  try {
    return parse_number(text);
  } catch (const std::runtime_error&) {
    return std::nullopt;
  }
}

/// Degree, minute and second marks become spaces, so that numbers and the letter stand apart.
std::vector<std::string> parts_of(std::string text) {
  for (const std::string_view mark : {"°", "′", "″", "’", "”", "'", "\"", "º"})
    for (std::size_t at; (at = text.find(mark)) != std::string::npos;)
      text.replace(at, mark.size(), 1, ' ');
  std::vector<std::string> parts;
  std::string part;
  const auto finish = [&] {
    if (!part.empty()) parts.push_back(std::move(part));
    part.clear();
  };
  for (const char c : text) {
    const bool letter = (c >= 'A' && c <= 'Z') || (c >= 'a' && c <= 'z');
    if (c == ' ' || letter) finish();
    if (letter)
      parts.push_back(std::string(1, c));
    else if (c != ' ')
      part += c;
  }
  finish();
  return parts;
}

/// Degrees with sign; nullopt when the text is not a coordinate of this axis.
std::optional<double> coordinate(const std::string& text, const Axis& axis) {
  std::vector<std::string> parts = parts_of(text);
  double sign = 1;
  bool lettered = false;
  if (!parts.empty() && parts.back().size() == 1) {
    const char letter = static_cast<char>(parts.back()[0] & ~0x20);
    if (letter == axis.positive || letter == axis.negative) {
      lettered = true;
      sign = letter == axis.negative ? -1 : 1;
      parts.pop_back();
    }
  }
  if (parts.empty() || parts.size() > 3) return std::nullopt;
  const bool minus = parts[0].starts_with('-');
  if (lettered && (minus || parts[0].starts_with('+'))) return std::nullopt;
  double degrees = 0, unit = 1;
  for (std::size_t i = 0; i < parts.size(); ++i, unit /= 60) {
    const std::optional<double> number = number_in(parts[i]);
    if (!number) return std::nullopt;
    const bool whole = *number == static_cast<double>(static_cast<long long>(*number));
    if (i + 1 < parts.size() && !whole) return std::nullopt;
    if (i > 0 && (*number < 0 || *number >= 60 || parts[i].starts_with('+'))) return std::nullopt;
    degrees += std::abs(*number) * unit;
  }
  return (minus ? -1 : 1) * sign * degrees;
}

Angle read_axis(const YamlValue& value, const Axis& axis) {
  const std::string expected =
      fmt::format("expected degrees from -{0} to {0}, or such as {1}", axis.limit, axis.example);
  const std::optional<double> degrees =
      value.kind == YamlValue::Kind::scalar && value.text.size() < 100
          ? coordinate(value.text, axis)
          : std::nullopt;
  if (!degrees || std::abs(*degrees) > axis.limit)
    throw OrderError(value.at, fmt::format("{} is {}", axis.name, described(value)), expected);
  return Angle::from_degrees(*degrees);
}

}  // namespace

Angle read_latitude(const YamlValue& value) { return read_axis(value, latitude_axis); }
Angle read_longitude(const YamlValue& value) { return read_axis(value, longitude_axis); }

double read_elevation(const YamlValue& value) {
  constexpr double metres_per_foot = 0.3048;  // international foot, exact
  std::string text = value.kind == YamlValue::Kind::scalar ? value.text : "";
  double unit = 1;
  for (const auto& [suffix, metres] : {std::pair{"ft", metres_per_foot}, std::pair{"m", 1.0}}) {
    if (!text.ends_with(suffix)) continue;
    text.resize(text.size() - std::string_view(suffix).size());
    unit = metres;
    break;
  }
  while (text.ends_with(' ')) text.pop_back();
  const std::optional<double> number = number_in(text);
  if (!number || *number * unit < -450 || *number * unit > 9000)
    throw OrderError(value.at, fmt::format("elevation is {}", described(value)),
                     "expected metres above the sea from -450 to 9000, such as 35 m");
  return *number * unit;
}

}  // namespace duskleaf
