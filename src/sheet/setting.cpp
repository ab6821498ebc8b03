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
  const double first_baseline = top + s.size_pt * mm_per_pt * 0.95;
  const Style heavy = strong(s);
  double x_first = x;
  if (!bold.empty()) {
    left(x, first_baseline, bold, heavy);
    x_first += width(bold, heavy) + width(" ", s);
  }
  // The first line is shorter by the lead-in: break it by itself, then the rest at full width.
  const double first_room = x + width_mm - x_first;
  std::vector<std::string> lines =
      break_lines(context_.type, rest, s.face, s.size_pt, std::max(first_room, 1.0));
  std::size_t count = 0;
  if (!lines.empty() && !bold.empty() && width(lines.front(), s) > first_room) {
    lines = break_lines(context_.type, rest, s.face, s.size_pt,
                        width_mm);  // not even one word fits beside it
    x_first = x;
    count = 1;
  } else if (!lines.empty() && !bold.empty() && lines.size() > 1) {
    const std::string first = lines.front();
    std::string_view tail = rest.substr(std::min(rest.size(), first.size()));
    while (tail.starts_with(' ')) tail.remove_prefix(1);
    lines = break_lines(context_.type, tail, s.face, s.size_pt, width_mm);
    lines.insert(lines.begin(), first);
  }
  for (std::size_t i = 0; i < lines.size(); ++i, ++count)
    left(count == 0 ? x_first : x, first_baseline + static_cast<double>(count) * pitch, lines[i],
         s);
  return static_cast<double>(std::max<std::size_t>(count, bold.empty() ? 0 : 1)) * pitch;
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
