#include <algorithm>

#include "sheet/blocks/blocks.hpp"
#include "sheet/flow_text.hpp"
#include "sheet/happening_lines.hpp"

namespace duskleaf {
namespace {

// Named in the closing line; the others are counted alone.
constexpr std::size_t most_named = 5;

std::string closing_line(const BlockContext& c, std::vector<HappeningLine> left_out) {
  const std::size_t count = left_out.size();
  if (count > most_named) {  // the most important of them, still by date
    std::stable_sort(left_out.begin(), left_out.end(),
                     [](const auto& a, const auto& b) { return a.rank < b.rank; });
    left_out.resize(most_named);
    std::stable_sort(left_out.begin(), left_out.end(),
                     [](const auto& a, const auto& b) { return a.date < b.date; });
  }
  std::string list;
  for (const HappeningLine& line : left_out)
    list += (list.empty() ? std::string() : c.words("happening.list-comma")) +
            c.words("happening.lesser-item",
                    {{"brief", line.brief}, {"day", std::to_string(day_of(line.date))}});
  return c.words(count > most_named ? "happening.lesser-many" : "happening.lesser",
                 {{"n", std::to_string(count)}, {"list", list}});
}

/// A five-pointed star; the points of its inner corners by the pentagram's own proportion.
Path star(Point centre, double radius) {
  std::vector<Point> points;
  for (int i = 0; i < 10; ++i) {
    const Angle turn = Angle::from_degrees(36.0 * i);
    const double r = i % 2 == 0 ? radius : radius * 0.382;
    points.push_back({centre.x + r * sin(turn), centre.y - r * cos(turn)});
  }
  return Path::polyline(points, true);
}

/// What the lines above take for granted.
std::string help(const BlockContext& c, const std::vector<HappeningLine>& shown) {
  std::string text;
  const auto add = [&](bool wanted, std::string_view key) {
    if (wanted) text += (text.empty() ? "" : " ") + c.words(key);
  };
  add(std::any_of(shown.begin(), shown.end(), [](const auto& l) { return l.best; }),
      "happening.starred");
  add(std::any_of(shown.begin(), shown.end(), [](const auto& l) { return l.meteors; }),
      "happening.meteors");
  add(std::any_of(shown.begin(), shown.end(), [](const auto& l) { return l.sight; }),
      "happening.fist");
  return text;
}

}  // namespace

double draw_happenings(const BlockContext& c, const BlockOptions& options, const Box& area,
                       std::vector<Mark>& out) {
  const HappeningChoice choice =
      choose_lines(happening_lines(c), static_cast<std::size_t>(options.number("most")));
  if (choice.shown.empty()) return 0;
  const bool across_midnight = std::any_of(choice.shown.begin(), choice.shown.end(),
                                           [](const auto& l) { return l.after_midnight; });
  Setter set(c, out);
  double y =
      area.y + set.heading(area.x, area.y, area.width, c.words("happenings.title"),
                           across_midnight ? c.words("happenings.aside") : std::string_view());
  Style body = set.table();  // the narrow face: the list is long
  body.size_pt = c.theme.body_pt;
  const Style day = body;
  const double day_right = area.x + 14.6, text_x = area.x + 18.4;
  std::optional<HappeningLine> before;
  for (const HappeningLine& line : choice.shown) {
    const double baseline = y + body.size_pt * mm_per_pt * 0.95;
    // A date is told once.
    if (!before || before->date != line.date || before->after_midnight != line.after_midnight) {
      const std::string evening = std::to_string(day_of(line.date));
      set.left(area.x, baseline, c.words.weekday_short(weekday_of(line.date)), day);
      set.right(day_right, baseline,
                line.after_midnight
                    ? c.words("happening.night-dates",
                              {{"evening", evening},
                               {"morning", std::to_string(day_of(*line.after_midnight))}})
                    : evening,
                set.strong(day));
    }
    before = line;
    if (line.best)
      out.emplace_back(Fill{star({day_right + 1.9, baseline - 0.95}, 1.15), c.theme.black});
    std::vector<Run> runs;
    if (!line.when.empty()) runs.push_back({line.when, set.strong(body)});
    runs.push_back({line.text, body});
    if (!line.caution.empty()) runs.push_back({line.caution, set.strong(body)});
    y += flow(set, text_x, y, area.right() - text_x, runs, 1.22) + 0.35;
  }
  Style small = set.table();
  small.ink = c.theme.soft;
  if (!choice.left_out.empty())
    y += set.paragraph(text_x, y, area.right() - text_x, closing_line(c, choice.left_out), small,
                       1.22);
  if (const std::string text = help(c, choice.shown); !text.empty())
    y += set.paragraph(text_x, y, area.right() - text_x, text, small, 1.22);
  return y - area.y + 0.8;
}

}  // namespace duskleaf
