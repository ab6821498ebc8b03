// QR codes after ISO/IEC 18004, encoded by libqrencode; the quiet zone of four modules is that
// standard's.
#include "sheet/qr_code.hpp"

#include <algorithm>
#include <memory>
#include <qrencode.h>
#include <stdexcept>
#include <string>

namespace duskleaf {

Path qr_code(std::string_view text, const Box& box) {
  const std::unique_ptr<QRcode, decltype(&QRcode_free)> code(
      QRcode_encodeString8bit(std::string(text).c_str(), 0, QR_ECLEVEL_M), &QRcode_free);
  if (!code) throw std::runtime_error("the text does not fit a QR code: " + std::string(text));
  constexpr int quiet = 4;
  const int size = code->width;
  const double module = std::min(box.width, box.height) / (size + 2 * quiet);
  const double left = box.x + (box.width - module * size) / 2;
  const double top = box.y + (box.height - module * size) / 2;
  const auto dark = [&](int row, int column) { return (code->data[row * size + column] & 1) != 0; };
  Path path;
  // One rectangle for each run along a row: a single fill leaves no seams between rows.
  for (int row = 0; row < size; ++row)
    for (int column = 0; column < size; ++column) {
      if (!dark(row, column)) continue;
      const int first = column;
      while (column < size && dark(row, column)) ++column;
      const Path run = Path::rectangle(
          {left + first * module, top + row * module, (column - first) * module, module});
      path.verbs.insert(path.verbs.end(), run.verbs.begin(), run.verbs.end());
      path.points.insert(path.points.end(), run.points.begin(), run.points.end());
    }
  return path;
}

}  // namespace duskleaf
