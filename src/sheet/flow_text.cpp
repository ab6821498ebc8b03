// Lines are filled greedily, as everywhere on these pages (common practice for short ragged text).
#include "sheet/flow_text.hpp"

namespace duskleaf {

double flow(Setter& set, double x, double top, double width, const std::vector<Run>& runs,
            double leading) {
  if (runs.empty()) return 0;
  const double size = runs.front().style.size_pt * mm_per_pt, pitch = size * leading;
  double baseline = top + size * 0.95, line_x = x;
  int lines = 1;
  for (const Run& run : runs) {
    const double space = set.width(" ", run.style);
    std::string piece;  // of this run on the current line, from line_x on
    const auto finish = [&] {
      if (piece.empty()) return;
      set.left(line_x, baseline, piece, run.style);
      line_x += set.width(piece, run.style) + space;
      piece.clear();
    };
    for (std::size_t at = 0; at < run.text.size();) {
      const std::size_t end = std::min(run.text.find(' ', at), run.text.size());
      const std::string word = run.text.substr(at, end - at);
      at = end + 1;
      if (word.empty()) continue;
      const std::string longer = piece.empty() ? word : piece + " " + word;
      const bool begins_line = piece.empty() && line_x <= x + 0.01;
      if (begins_line || line_x + set.width(longer, run.style) <= x + width + 0.01) {
        piece = longer;
        continue;
      }
      finish();
      piece = word;
      line_x = x;
      baseline += pitch;
      ++lines;
    }
    finish();
  }
  return lines * pitch;
}

}  // namespace duskleaf
