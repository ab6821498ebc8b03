#include "base/csv.hpp"

#include <algorithm>
#include <charconv>
#include <stdexcept>

namespace duskleaf {

double parse_number(std::string_view text) {
  std::string_view t = text;
  if (t.starts_with('+')) t.remove_prefix(1);
  double value = 0.0;
  const auto [end, error] = std::from_chars(t.data(), t.data() + t.size(), value);
  if (error != std::errc{} || end != t.data() + t.size() || t.empty())
    throw std::runtime_error("not a number: '" + std::string(text) + "'");
  return value;
}

CsvTable::CsvTable(std::string_view text) {
  while (!text.empty()) {
    const std::size_t newline = text.find('\n');
    std::string_view line = text.substr(0, newline);
    text.remove_prefix(newline == std::string_view::npos ? text.size() : newline + 1);
    if (line.ends_with('\r')) line.remove_suffix(1);
    if (line.empty() || (header_.empty() && line.starts_with('#'))) continue;
    std::vector<std::string_view>& target = header_.empty() ? header_ : cells_;
    const std::size_t before = target.size();
    for (std::size_t at = 0; at <= line.size();) {
      std::size_t end;
      if (at < line.size() && line[at] == '"') {
        const std::size_t close = line.find('"', at + 1);
        if (close == std::string_view::npos)
          throw std::runtime_error("unclosed quote: " + std::string(line));
        target.push_back(line.substr(at + 1, close - at - 1));
        end = close + 1;
      } else {
        end = std::min(line.find(',', at), line.size());
        target.push_back(line.substr(at, end - at));
      }
      at = end + 1;
    }
    if (&target == &header_)
      columns_ = header_.size();
    else if (target.size() - before != columns_)
      throw std::runtime_error("row with another number of cells: " + std::string(line));
  }
}

std::size_t CsvTable::column(std::string_view name) const {
  const auto found = std::find(header_.begin(), header_.end(), name);
  if (found == header_.end()) throw std::out_of_range("no column " + std::string(name));
  return static_cast<std::size_t>(found - header_.begin());
}

double CsvTable::number(std::size_t row, std::size_t column) const {
  return parse_number(cell(row, column));
}

int CsvTable::integer(std::size_t row, std::size_t column) const {
  return static_cast<int>(number(row, column));
}

}  // namespace duskleaf
