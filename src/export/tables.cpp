// CSV: RFC 4180 (Y. Shafranovich 2005). JSON: RFC 8259. Times: ISO 8601. Numbers are written
// without the process's locale.
#include "export/tables.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>
#include <iterator>
#include <nlohmann/json.hpp>

namespace duskleaf {
namespace {

constexpr std::array<std::string_view, 6> names = {"instants", "nights",  "constellations",
                                                   "planets",  "showers", "eclipses"};

double rounded(const Number& n) {
  const double scale = std::pow(10.0, n.decimals);
  return std::round(n.value * scale) / scale + 0.0;  // + 0.0: no minus zero
}

void append_csv(std::string& out, const Cell& cell) {
  if (const auto* text = std::get_if<std::string>(&cell)) {
    if (text->find_first_of(",\"\r\n") == std::string::npos) {
      out += *text;
      return;
    }
    out += '"';
    for (char c : *text) {
      if (c == '"') out += '"';
      out += c;
    }
    out += '"';
  } else if (const auto* number = std::get_if<Number>(&cell)) {
    fmt::format_to(std::back_inserter(out), "{:.{}f}", rounded(*number), number->decimals);
  } else if (const auto* flag = std::get_if<bool>(&cell)) {
    out += *flag ? "true" : "false";
  }
}

void append_json(std::string& out, const Cell& cell) {
  if (const auto* text = std::get_if<std::string>(&cell)) {
    out += nlohmann::json(*text).dump();
  } else if (const auto* number = std::get_if<Number>(&cell)) {
    // The shortest text of the rounded value: a whole number has no decimals.
    fmt::format_to(std::back_inserter(out), "{}", rounded(*number));
  } else if (const auto* flag = std::get_if<bool>(&cell)) {
    out += *flag ? "true" : "false";
  } else {
    out += "null";
  }
}

}  // namespace

std::optional<TableName> find_table(std::string_view name) {
  const auto found = std::find(names.begin(), names.end(), name);
  if (found == names.end()) return {};
  return static_cast<TableName>(found - names.begin());
}

std::vector<std::string_view> table_names() { return {names.begin(), names.end()}; }

bool table_needs_evenings(TableName name) { return name == TableName::constellations; }
bool table_needs_happenings(TableName name) {
  return name == TableName::instants || name == TableName::showers || name == TableName::eclipses;
}

const std::vector<std::string_view>& table_columns(TableName name) {
  static const std::array<std::vector<std::string_view>, 6> columns = {{
      {"site", "event", "body", "utc", "local", "value", "unit"},
      {"site", "date", "sunset", "civil_dusk", "nautical_dusk", "astronomical_dusk",
       "astronomical_dawn", "nautical_dawn", "civil_dawn", "sunrise", "moonrise", "moonset",
       "moon_lit_percent", "dark_from", "dark_to", "dark_minutes", "note"},
      {"site", "month", "constellation", "on_equator", "altitude_deg", "azimuth_deg", "state",
       "rises", "highest", "sets"},
      {"site", "date", "planet", "ra_deg", "dec_deg", "magnitude", "elongation_deg",
       "constellation", "rises", "highest", "sets", "altitude_at_chart_hour_deg"},
      {"site", "shower", "name", "peak", "solar_longitude_deg", "zhr", "radiant_altitude_deg",
       "best_from", "best_to", "moon_lit_percent", "expected_per_hour", "verdict"},
      {"site", "kind", "body", "contact", "utc", "local", "altitude_deg", "azimuth_deg",
       "magnitude", "obscuration_percent", "visible"},
  }};
  return columns[static_cast<std::size_t>(name)];
}

TableWriter::TableWriter(std::ostream& out, TableName name, TableFormat format)
    : out_(out), name_(name), format_(format) {
  if (format_ == TableFormat::csv)
    out_ << fmt::format("{}\r\n", fmt::join(table_columns(name), ","));
  else
    out_ << '[';
}

void TableWriter::add(const std::vector<Row>& rows) {
  std::string text;
  text.reserve(rows.size() * (format_ == TableFormat::csv ? 128 : 256));
  const std::vector<std::string_view>& columns = table_columns(name_);
  for (const Row& row : rows) {
    if (format_ == TableFormat::json) text += any_ ? ",\n{" : "\n{";
    any_ = true;
    for (std::size_t i = 0; i < row.size(); ++i) {
      if (i > 0) text += ',';
      if (format_ == TableFormat::csv) {
        append_csv(text, row[i]);
      } else {
        text += '"';
        text += columns[i];
        text += "\":";
        append_json(text, row[i]);
      }
    }
    text += format_ == TableFormat::csv ? "\r\n" : "}";
  }
  out_.write(text.data(), static_cast<std::streamsize>(text.size()));
}

void TableWriter::finish() {
  if (format_ == TableFormat::json) out_ << "\n]\n";
  out_.flush();
}

}  // namespace duskleaf
