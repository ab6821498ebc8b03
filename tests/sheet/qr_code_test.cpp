// The code is read back by the steps of ISO/IEC 18004: format bits, mask, the zigzag of codewords,
// byte mode.
#include "sheet/qr_code.hpp"

#include <algorithm>
#include <cstdlib>
#include <gtest/gtest.h>
#include <stdexcept>
#include <string>
#include <vector>

namespace duskleaf {
namespace {

using Grid = std::vector<std::vector<bool>>;

/// Samples the path at the middle of each module of a code `size` modules wide in a square box.
Grid sample(const Path& path, const Box& box, int size) {
  const double module = box.width / (size + 8);
  Grid grid(static_cast<std::size_t>(size), std::vector<bool>(static_cast<std::size_t>(size)));
  for (std::size_t i = 0; i + 3 < path.points.size(); i += 4) {
    const Point a = path.points[i], b = path.points[i + 2];
    for (int row = 0; row < size; ++row)
      for (int column = 0; column < size; ++column) {
        const double x = box.x + (column + 4.5) * module, y = box.y + (row + 4.5) * module;
        if (x > a.x && x < b.x && y > a.y && y < b.y)
          grid[static_cast<std::size_t>(row)][static_cast<std::size_t>(column)] = true;
      }
  }
  return grid;
}

/// Reads a version 2 code (25 modules, 28 data codewords at level M in one block).
std::string read_version_2(const Grid& grid) {
  constexpr int size = 25;
  const auto dark = [&](int row, int column) {
    return grid[static_cast<std::size_t>(row)][static_cast<std::size_t>(column)];
  };
  unsigned format = 0;  // 15 bits, the first copy, from (8,0) along the row, then up the column
  const int row_columns[] = {0, 1, 2, 3, 4, 5, 7, 8};
  for (const int column : row_columns) format = format << 1 | (dark(8, column) ? 1U : 0U);
  const int column_rows[] = {7, 5, 4, 3, 2, 1, 0};
  for (const int row : column_rows) format = format << 1 | (dark(row, 8) ? 1U : 0U);
  format ^= 0x5412;
  EXPECT_EQ(format >> 13, 0U) << "00 is level M";
  const unsigned mask = format >> 10 & 7;
  const auto masked = [&](int r, int c) {
    switch (mask) {
      case 0:
        return (r + c) % 2 == 0;
      case 1:
        return r % 2 == 0;
      case 2:
        return c % 3 == 0;
      case 3:
        return (r + c) % 3 == 0;
      case 4:
        return (r / 2 + c / 3) % 2 == 0;
      case 5:
        return r * c % 2 + r * c % 3 == 0;
      case 6:
        return (r * c % 2 + r * c % 3) % 2 == 0;
      default:
        return ((r + c) % 2 + r * c % 3) % 2 == 0;
    }
  };
  const auto reserved = [&](int r, int c) {
    const bool corners = (r < 9 && c < 9) || (r < 9 && c >= size - 8) || (r >= size - 8 && c < 9);
    return corners || r == 6 || c == 6 || (std::abs(r - 18) <= 2 && std::abs(c - 18) <= 2);
  };
  std::vector<bool> bits;
  bool upward = true;
  for (int right = size - 1; right > 0; right -= 2, upward = !upward) {
    if (right == 6) --right;
    for (int i = 0; i < size; ++i)
      for (const int column : {right, right - 1}) {
        const int row = upward ? size - 1 - i : i;
        if (!reserved(row, column)) bits.push_back(dark(row, column) != masked(row, column));
      }
  }
  std::size_t next = 0;
  const auto take = [&](int count) {
    unsigned value = 0;
    for (int i = 0; i < count; ++i) value = value << 1 | (bits.at(next++) ? 1U : 0U);
    return value;
  };
  EXPECT_EQ(take(4), 4U) << "byte mode";
  std::string text(take(8), ' ');
  for (char& c : text) c = static_cast<char>(take(8));
  return text;
}

TEST(QrCode, ReadsBackAsTheTextWithItsQuietZone) {
  const Box box{100, 50, 33, 33};
  const Path path = qr_code("https://example.org/tern", box);
  EXPECT_EQ(read_version_2(sample(path, box, 25)), "https://example.org/tern");
  double left = 1e9, right = 0, top = 1e9, bottom = 0;
  for (const Point& p : path.points) {
    left = std::min(left, p.x);
    right = std::max(right, p.x);
    top = std::min(top, p.y);
    bottom = std::max(bottom, p.y);
  }
  EXPECT_NEAR(left, 104, 1e-9);
  EXPECT_NEAR(right, 129, 1e-9);
  EXPECT_NEAR(top, 54, 1e-9);
  EXPECT_NEAR(bottom, 79, 1e-9);
}

TEST(QrCode, SitsInTheMiddleOfAnOblongBox) {
  const Path path = qr_code("https://example.org/tern", {0, 0, 53, 33});
  double left = 1e9;
  for (const Point& p : path.points) left = std::min(left, p.x);
  EXPECT_NEAR(left, 14, 1e-9);
}

TEST(QrCode, TooLongATextIsRefused) {
  EXPECT_THROW(qr_code(std::string(4000, 'a'), {0, 0, 30, 30}), std::runtime_error);
}

}  // namespace
}  // namespace duskleaf
