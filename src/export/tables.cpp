// CSV: RFC 4180 (Y. Shafranovich 2005). JSON: RFC 8259. Times: ISO 8601. Numbers are written
// without the process's locale.
#include "export/tables.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>
#include <nlohmann/json.hpp>

namespace duskleaf {
namespace {

constexpr std::array<std::string_view, 4> names = {"instants", "nights", "constellations",
                                                   "planets"};

double rounded(const Number& n) {
  const double scale = std::pow(10.0, n.decimals);
  return std::round(n.value * scale) / scale + 0.0;  // + 0.0: no minus zero
}

std::string quoted(const std::string& text) {
  if (text.find_first_of(",\"\r\n") == std::string::npos) return text;
  std::string result = "\"";
  for (char c : text) {
    if (c == '"') result += '"';
    result += c;
  }
  return result + '"';
}

std::string csv_cell(const Cell& cell) {
  if (const auto* text = std::get_if<std::string>(&cell)) return quoted(*text);
  if (const auto* number = std::get_if<Number>(&cell))
    return fmt::format("{:.{}f}", rounded(*number), number->decimals);
  if (const auto* flag = std::get_if<bool>(&cell)) return *flag ? "true" : "false";
  return {};
}

nlohmann::ordered_json json_value(const Cell& cell) {
  if (const auto* text = std::get_if<std::string>(&cell)) return *text;
  if (const auto* flag = std::get_if<bool>(&cell)) return *flag;
  if (const auto* number = std::get_if<Number>(&cell)) {
    if (number->decimals == 0) return static_cast<std::int64_t>(std::llround(number->value));
    return rounded(*number);
  }
  return nullptr;
}

}  // namespace

std::optional<TableName> find_table(std::string_view name) {
  const auto found = std::find(names.begin(), names.end(), name);
  if (found == names.end()) return {};
  return static_cast<TableName>(found - names.begin());
}

std::vector<std::string_view> table_names() { return {names.begin(), names.end()}; }

bool table_needs_evenings(TableName name) { return name == TableName::constellations; }

const std::vector<std::string_view>& table_columns(TableName name) {
  static const std::array<std::vector<std::string_view>, 4> columns = {{
      {"site", "event", "body", "utc", "local", "value", "unit"},
      {"site", "date", "sunset", "civil_dusk", "nautical_dusk", "astronomical_dusk",
       "astronomical_dawn", "nautical_dawn", "civil_dawn", "sunrise", "moonrise", "moonset",
       "moon_lit_percent", "dark_from", "dark_to", "dark_minutes", "note"},
      {"site", "month", "constellation", "on_equator", "altitude_deg", "azimuth_deg", "state",
       "rises", "highest", "sets"},
      {"site", "date", "planet", "ra_deg", "dec_deg", "magnitude", "elongation_deg",
       "constellation", "rises", "highest", "sets", "altitude_at_chart_hour_deg"},
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
  const std::vector<std::string_view>& columns = table_columns(name_);
  for (const Row& row : rows) {
    if (format_ == TableFormat::csv) {
      for (std::size_t i = 0; i < row.size(); ++i) {
        if (i > 0) text += ',';
        text += csv_cell(row[i]);
      }
      text += "\r\n";
    } else {
      nlohmann::ordered_json object = nlohmann::ordered_json::object();
      for (std::size_t i = 0; i < row.size(); ++i)
        object[std::string(columns[i])] = json_value(row[i]);
      text += any_ ? ",\n" : "\n";
      text += object.dump();
    }
    any_ = true;
  }
  out_.write(text.data(), static_cast<std::streamsize>(text.size()));
}

void TableWriter::finish() {
  if (format_ == TableFormat::json) out_ << "\n]\n";
  out_.flush();
}

}  // namespace duskleaf
