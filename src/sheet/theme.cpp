#include "sheet/theme.hpp"

namespace duskleaf {

Theme Theme::colour() {
  Theme t;
  t.black = {0.07, 0.08, 0.12};
  t.soft = {0.33, 0.35, 0.40};
  t.faint = {0.74, 0.76, 0.80};
  t.blue = {0.10, 0.17, 0.36};
  t.blue_soft = {0.24, 0.32, 0.52};
  t.paper = {1, 1, 1};
  t.sky = {0.953, 0.961, 0.978};
  t.lap = {0.895, 0.910, 0.940};
  t.day = {1, 1, 1};
  t.civil = {0.87, 0.89, 0.93};
  t.nautical = {0.70, 0.74, 0.82};
  t.astronomical = {0.47, 0.53, 0.66};
  t.dark = {0.13, 0.19, 0.37};
  t.figure = {0.60, 0.63, 0.69};
  return t;
}

Theme Theme::grey() {
  Theme t = colour();
  // The luminance of ITU-R BT.709, so that a tone keeps its weight.
  const auto drain = [](Ink& ink) {
    const double y = 0.2126 * ink.r + 0.7152 * ink.g + 0.0722 * ink.b;
    ink = {y, y, y};
  };
  for (Ink* ink : {&t.black, &t.soft, &t.faint, &t.blue, &t.blue_soft, &t.sky, &t.lap, &t.civil,
                   &t.nautical, &t.astronomical, &t.dark, &t.figure})
    drain(*ink);
  return t;
}

}  // namespace duskleaf
