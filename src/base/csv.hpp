#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace duskleaf {

/// Our own bundled tables: UTF-8, "#" lines first, then a header row; commas; a cell in double
/// quotes may hold commas. Cells are views into the text, which must outlive the table. Throws
/// std::runtime_error when a row's width differs.
class CsvTable {
 public:
  explicit CsvTable(std::string_view text);
  std::size_t rows() const { return columns_ == 0 ? 0 : cells_.size() / columns_; }
  /// Index of a named column; throws std::out_of_range.
  std::size_t column(std::string_view name) const;
  std::string_view cell(std::size_t row, std::size_t column) const {
    return cells_[row * columns_ + column];
  }
  /// The cell as a number; throws std::runtime_error when it is not one.
  double number(std::size_t row, std::size_t column) const;
  int integer(std::size_t row, std::size_t column) const;

 private:
  std::size_t columns_ = 0;
  std::vector<std::string_view> header_, cells_;
};

/// Numbers as text without the process's locale. Throws std::runtime_error when the text is not
/// wholly a number.
double parse_number(std::string_view text);

}  // namespace duskleaf
