#include "sheet/setting.hpp"

#include <algorithm>

namespace duskleaf {

void Setter::left(double x, double baseline, std::string_view text, const Style& s) {
  if (text.empty()) return;
  out_.push_back(Text{{x, baseline}, std::string(text), s.face, s.size_pt, s.ink, s.tracking_em});
}
void Setter::right(double x, double baseline, std::string_view text, const Style& s) {
  left(x - width(text, s), baseline, text, s);
}
void Setter::centre(double x, double baseline, std::string_view text, const Style& s) {
  left(x - width(text, s) / 2, baseline, text, s);
}

void Setter::fitted(double x, double baseline, std::string_view text, const Style& s, double room) {
  Style fit = s;
  const double needed = width(text, s);
  if (needed > room) {
    fit.size_pt = std::max(s.size_pt * room / needed, s.size_pt * 0.8);
    if (width(text, fit) > room)
      context_.tally.notes.push_back("too wide for its room: " + std::string(text));
  }
  left(x, baseline, text, fit);
}

double Setter::paragraph(double x, double top, double width_mm, std::string_view text,
                         const Style& s, double leading) {
  return lead_in(x, top, width_mm, {}, text, s, leading);
}

double Setter::lead_in(double x, double top, double width_mm, std::string_view bold,
                       std::string_view rest, const Style& s, double leading) {
  const double pitch = s.size_pt * mm_per_pt * leading;
  double baseline = top + s.size_pt * mm_per_pt * 0.95;
  double line_x = x;
  if (!bold.empty()) {
    const Style heavy = strong(s);
    left(x, baseline, bold, heavy);
    line_x += width(bold, heavy) + width(" ", s);
  }
  // Word by word: the first line is shorter by the lead-in, which break_lines cannot know.
  int lines = 1;
  std::string line;
  const auto finish_line = [&] {
    left(line_x, baseline, line, s);
    line.clear();
  };
  for (std::size_t at = 0; at < rest.size();) {
    const std::size_t end = std::min(rest.find_first_of(" \n", at), rest.size());
    const std::string_view word = rest.substr(at, end - at);
    const bool new_line = end < rest.size() && rest[end] == '\n';
    at = end + 1;
    if (!word.empty()) {
      // A word wider than a whole line is cut, as break_lines does.
      for (const std::string& piece :
           break_lines(context_.type, word, s.face, s.size_pt, width_mm)) {
        const std::string longer = line.empty() ? piece : line + " " + piece;
        if (line_x + width(longer, s) <= x + width_mm + 0.01) {
          line = longer;
          continue;
        }
        finish_line();
        line = piece;
        line_x = x;
        baseline += pitch;
        ++lines;
      }
    }
    if (new_line) {
      finish_line();
      line_x = x;
      baseline += pitch;
      ++lines;
    }
  }
  finish_line();
  return lines * pitch;
}

double Setter::heading(double x, double top, double width_mm, std::string_view title,
                       std::string_view aside) {
  const Theme& theme = context_.theme;
  rule(x, x + width_mm, top, theme.blue, 0.25);
  const Style bold{Face::bold, 9.5, theme.blue};
  const double baseline = top + 4.3;
  left(x, baseline, title, bold);
  if (!aside.empty()) {
    const double room = width_mm - width(title, bold) - 3;
    Style quiet{Face::italic, theme.table_pt, theme.soft};
    if (width(aside, quiet) <= room) right(x + width_mm, baseline, aside, quiet);
  }
  return 5.6;
}

void Setter::rule(double x1, double x2, double y, const Ink& ink, double width_mm) {
  out_.push_back(Stroke{Path::polyline({{x1, y}, {x2, y}}), width_mm, ink, {}, false});
}

}  // namespace duskleaf
