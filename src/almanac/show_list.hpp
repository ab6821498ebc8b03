#pragma once

#include <string>
#include <vector>

#include "almanac/site_year.hpp"
#include "catalogue/show_objects.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

enum class Standing { rising, at_its_best, last_chance };

/// Something to show through the evening: a planet, the Moon, or an object of show_objects().
struct ShowItem {
  std::optional<Body> body;
  int object = -1;  // index into show_objects(), where it is no body
  Standing standing;
  Horizontal place;  // at the evening's moment, refracted
  double magnitude;
  double opening_mm;  // least opening that shows it under this sky: 0 for the bare eye. Rule:
                      // show_list.cpp
  double worth;       // for choosing among many: falls along the list
};
/// What there is to show at a moment, the best first within each standing; nothing lower than 15
/// degrees but planets (10) and the Moon.
std::vector<ShowItem> show_list(const SiteSky&, const SiteYear&, Ut moment);

}  // namespace duskleaf
