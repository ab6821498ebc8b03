#pragma once

#include <Eigen/Dense>
#include <optional>
#include <span>
#include <string_view>

#include "base/angle.hpp"

namespace duskleaf {

/// A meteor shower of the working list (data/showers.csv). Angles for the equinox J2000.
struct Shower {
  std::string_view code, name;  // IAU three letters; "Perseids"
  int start_month, start_day, end_month, end_day;
  Angle peak_longitude;                // of the Sun
  Angle right_ascension, declination;  // of the radiant at the peak
  double speed_km_s;
  double population_index;            // r
  std::optional<double> zhr;          // empty: varies from year to year
  bool daytime;                       // its radiant stands near the Sun
  Eigen::Vector3d direction() const;  // of the radiant, unit vector, J2000
};
std::span<const Shower> showers();

}  // namespace duskleaf
