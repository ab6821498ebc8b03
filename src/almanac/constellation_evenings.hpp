#pragma once

#include <Eigen/Dense>
#include <array>
#include <vector>

#include "almanac/site_year.hpp"

namespace duskleaf {

/// One star of a figure as a site's horizon cuts its circle.
struct DailyArc {
  double right_ascension;  // radians
  double half_arc;  // radians of hour angle from transit to set at -34'; 0: never rises, pi: never
                    // sets
};
DailyArc daily_arc(const Eigen::Vector3d& of_date, Angle latitude);

/// A figure's rise, highest and set as differences in sidereal time (radians, in [-pi, pi]) from a
/// moment, the nearest to it.
struct FigureTimes {
  std::optional<double> rises, highest, sets;
  bool circumpolar, never_rises;
  bool half_never_sets;  // half or more of the stars
};
/// A figure is risen while half or more of its stars are. `mean` is the mean place's direction.
FigureTimes figure_times(const std::vector<DailyArc>& stars, const Eigen::Vector3d& mean,
                         double sidereal_time);

/// The evening's constellations near the equator. `stars` are directions of date of the whole
/// catalogue; `evenings` the sidereal times of the year's twelve evenings by month of the year
/// (empty where no stars are seen), for evening_sight.
std::vector<ConstellationEvening> constellation_evenings(
    const std::vector<Eigen::Vector3d>& stars, Angle latitude, Ut moment, Angle local_sidereal_time,
    const std::array<std::optional<Angle>, 12>& evenings);

}  // namespace duskleaf
