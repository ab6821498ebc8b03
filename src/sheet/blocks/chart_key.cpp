#include <array>
#include <functional>

#include "sheet/blocks/blocks.hpp"
#include "sheet/sky_chart.hpp"

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

  // Stars of magnitude 0 to 5, each over its number.
  Dots dots;
  dots.ink = theme.black;
  for (int magnitude = 0; magnitude <= 5; ++magnitude) {
    const double x = 1.0 + 4.6 * magnitude;
    dots.dots.push_back({{across(x), y}, star_dot_mm(magnitude)});
    set(x, y + 3.6, context.words.number(magnitude, 0), true);
  }
  out.emplace_back(dots);
  set(27.5, y + 3.6, context.words("key.magnitudes"), false);
  y += 3.6 + row + 0.6;

  const auto line = [&](double width, Ink ink, std::vector<double> dash) {
    Path path;
    path.move({across(0), y}).line({across(sample), y});
    out.emplace_back(Stroke{path, width, ink, std::move(dash), false});
  };
  const std::array<std::pair<const char*, std::function<void()>>, 5> rows = {{
      {"key.lap",
       [&] {
         out.emplace_back(
             Fill{Path::rectangle({std::min(across(0), across(sample)), y - 1.2, sample, 2.4}),
                  theme.lap});
       }},
      {"key.figure", [&] { line(0.18, theme.figure, {}); }},
      {"key.equator",
       [&] {
         line(0.25, theme.blue, {1.7, 1.0});
       }},
      {"key.ecliptic",
       [&] {
         line(0.25, theme.blue_soft, {0.25, 0.85});
       }},
      {"key.planet",
       [&] {
         out.emplace_back(
             Stroke{Path::circle({across(sample / 2), y}, 0.75), 0.36, theme.black, {}, false});
       }},
  }};
  for (const auto& [key, draw_sample] : rows) {
    draw_sample();
    set(sample + 1.6, y, context.words(key), false);
    y += row;
  }
  return y - area.y;
}

}  // namespace duskleaf
