#pragma once

#include <optional>
#include <string>
#include <vector>

#include "almanac/site_year.hpp"
#include "catalogue/show_objects.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// By the hour angle: rising before -2 h; at its best to +2 h; after that last chance, where it
/// sets here and will be lower than the least height of the list (10 degrees for planets) in two
/// months at the same clock time, else still at its best as long as the sine of its altitude is 0.7
/// of that in the meridian; what is past that and does not go (near the pole) is left out until it
/// rises again. Bare-eye planets are never left out, and the Moon is always at its best.
enum class Standing { rising, at_its_best, last_chance };

/// Something to show through the evening: a planet, the Moon, or an object of show_objects().
struct ShowItem {
  std::optional<Body> body;
  int object = -1;  // index into show_objects(), where it is no body
  Standing standing;
  Horizontal place;   // at the evening's moment, refracted
  double magnitude;   // the Moon's is not given: NaN
  double opening_mm;  // least usual opening that shows it under this sky: 0 for the bare eye, 50
                      // for binoculars. Rule: show_list.cpp
  double worth;       // for choosing among many of one standing: falls along its part of the list
};
/// What there is to show at a moment: rising, at its best, last chance, the best first within each;
/// nothing behind the order's skyline, nor lower than 15 degrees but Uranus and Neptune (10),
/// bright planets and the Moon (5). Nothing before the Sun has set, no Moon that is less than a
/// hundredth lit; planets from planets_visible_below on, stars and the rest from the end of civil
/// twilight, those that no opening of 300 mm shows under that sky left out.
std::vector<ShowItem> show_list(const SiteSky&, const SiteYear&, Ut moment);

/// The least usual opening (0, 50, 80, 100, 150, 200, 250, 300 mm) that shows an object where the
/// faintest star for the bare eye is given; empty where none does.
std::optional<double> least_opening_mm(const ShowObject&, double faintest_star);

}  // namespace duskleaf
