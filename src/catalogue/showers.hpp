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
  double population_index;    // r
  std::optional<double> zhr;  // empty: varies from year to year
  bool daytime;               // its radiant is within 35 degrees of the Sun at the peak
  double rise, fall;  // log10 of the rate per degree of the Sun's longitude, before and after the
                      // peak
  Eigen::Vector3d direction() const;  // of the radiant, unit vector, J2000
};
/// In order of the Sun's longitude from the March equinox on.
std::span<const Shower> showers();
/// Index by code; -1 when there is none.
int shower_index(std::string_view code);

}  // namespace duskleaf
