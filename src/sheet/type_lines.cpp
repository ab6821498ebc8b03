// Lines are filled greedily, word by word (common practice for short ragged texts).
#include <algorithm>

#include "sheet/type.hpp"

namespace duskleaf {
namespace {

void break_paragraph(const TypeSet& type, std::string_view text, Face face, double limit,
                     std::vector<std::string>& lines) {
  const std::vector<TypeSet::Position> line = type.positions(text, face);
  const auto byte = [&](std::size_t i) { return i < line.size() ? line[i].byte : text.size(); };
  std::size_t start = 0;
  while (true) {
    while (start < line.size() && line[start].space) ++start;
    if (start == line.size()) return;
    std::size_t end = start;  // behind the last character that fits
    std::size_t cut = start;  // behind the last whole word that fits
    while (end < line.size() && (line[end].space || line[end].right - line[start].left <= limit)) {
      if (line[end].space && !line[end - 1].space) cut = end;
      ++end;
    }
    if (end == line.size()) {
      cut = end;
      while (line[cut - 1].space) --cut;
    } else if (cut == start) {
      cut = end > start ? end : start + 1;  // a word wider than the line
    }
    lines.emplace_back(text.substr(byte(start), byte(cut) - byte(start)));
    start = cut;
  }
}

}  // namespace

std::vector<std::string> break_lines(const TypeSet& type, std::string_view text, Face face,
                                     double size_pt, double width_mm) {
  // A hair's breadth of tolerance, so that a text set into its own measured width stays whole.
  const double limit = width_mm / (size_pt * mm_per_pt) * 1000 + 1e-6;
  std::vector<std::string> lines;
  for (std::size_t start = 0; start <= text.size();) {
    const std::size_t end = std::min(text.find('\n', start), text.size());
    break_paragraph(type, text.substr(start, end - start), face, limit, lines);
    start = end + 1;
  }
  return lines;
}

}  // namespace duskleaf
