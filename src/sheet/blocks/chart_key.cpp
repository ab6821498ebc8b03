#include <array>
#include <functional>

#include "sheet/blocks/blocks.hpp"
#include "sheet/sky_chart_dome.hpp"

// The charts' key, made to stand in the corner that a dome leaves free: its rows grow shorter
// downward.

namespace duskleaf {

double draw_chart_key(const BlockContext& context, const BlockOptions& options, const Box& area,
                      std::vector<Mark>& out) {
  const Theme& theme = context.theme;
  const auto corner = options.values.find("corner");
  const bool right = corner != options.values.end() && corner->second == "top-right";
  const double size = theme.label_pt, row = 3.9, sample = 6.0;
  const double edge = right ? area.right() : area.x;
  const auto across = [&](double from_edge) { return right ? edge - from_edge : edge + from_edge; };
  double y = area.y + 2.0;
  const double half_capital = context.type.cap_height(Face::regular, size) / 2;
  const auto set = [&](double from_edge, double middle, const std::string& words, bool centred) {
    const double width = context.type.width(words, Face::regular, size);
    const double left = centred ? across(from_edge) - width / 2
                        : right ? across(from_edge) - width
                                : across(from_edge);
    out.emplace_back(Text{{left, middle + half_capital}, words, Face::regular, size, theme.soft});
  };

  const bool no_stars = context.evening().shift == EveningShift::no_stars;
  const bool moons_way = no_stars && moon_up_that_day(context);
  // Stars of magnitude 0 to 5, each over its number.
  Dots dots;
  dots.ink = theme.black;
  for (int magnitude = 0; magnitude <= 5 && !no_stars; ++magnitude) {
    const double x = 1.0 + 4.6 * magnitude;
    dots.dots.push_back({{across(x), y}, star_dot_mm(magnitude)});
    set(x, y + 3.6, context.words.number(magnitude, 0), true);
  }
  if (!no_stars) {
    out.emplace_back(dots);
    set(27.5, y + 3.6, context.words("key.magnitudes"), false);
    y += 3.6 + row + 0.6;
  }

  const auto line = [&](double width, Ink ink, std::vector<double> dash) {
    Path path;
    path.move({across(0), y}).line({across(sample), y});
    out.emplace_back(Stroke{path, width, ink, std::move(dash), false});
  };
  struct Row {
    const char* key;
    bool shown;
    std::function<void()> draw;
  };
  const std::array<Row, 7> rows = {{
      {"key.lap", true,
       [&] {
         const Path swatch =
             Path::rectangle({std::min(across(0), across(sample)), y - 1.2, sample, 2.4});
         out.emplace_back(Fill{swatch, theme.lap});
         out.emplace_back(Stroke{swatch, 0.13, theme.blue_soft, {}, false});
       }},
      {"dome.way-of-sun", no_stars, [&] { line(0.4, theme.black, {}); }},
      {"dome.way-of-moon", moons_way,
       [&] {
         line(0.25, theme.blue_soft, {1.6, 0.8});
       }},
      {"key.figure", !no_stars, [&] { line(figure_line_mm, figure_ink(theme), {}); }},
      {"key.equator", !no_stars,
       [&] {
         line(0.25, theme.blue, {1.7, 1.0});
       }},
      {"key.ecliptic", !no_stars,
       [&] {
         line(0.25, theme.blue_soft, {0.25, 0.85});
       }},
      {"key.planet", true,
       [&] {
         out.emplace_back(
             Stroke{Path::circle({across(sample / 2), y}, 0.75), 0.36, theme.black, {}, false});
       }},
  }};
  for (const auto& [key, shown, draw_sample] : rows) {
    if (!shown) continue;
    draw_sample();
    set(sample + 1.6, y, context.words(key), false);
    y += row;
  }
  return y - area.y;
}

}  // namespace duskleaf
