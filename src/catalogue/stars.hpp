#pragma once

#include <Eigen/Dense>
#include <span>
#include <string_view>
#include <vector>

namespace duskleaf {

/// One star of the Yale Bright Star Catalogue (5th rev. ed.), place and proper motion FK5 = ICRS at
/// this accuracy, epoch J2000. Places of 2016.5 within 5 arcseconds of The Astronomical Almanac's
/// (median 0.6; fast doubles up to 16: 61 Cygni).
struct Star {
  int hr;                         // Harvard Revised number
  Eigen::Vector3d direction;      // unit vector, J2000
  Eigen::Vector3d proper_motion;  // radians per Julian year, tangent
  double magnitude;     // Johnson V as the eye sees it (combined for close doubles); see `charted`
  double colour_index;  // B-V; NaN when not given
  int constellation;    // index into constellations(): where the star stands (IAU area)
  std::string_view
      bayer;  // Greek letter, superscript digit appended ("α", "π³"); empty when it has none
  std::string_view flamsteed;  // number as text, or empty
  std::string_view name;       // IAU proper name, or empty
  bool
      charted;  // false: its catalogue magnitude is an outburst or maximum (T CrB ...): never drawn
};

/// All stars, in order of HR number.
std::span<const Star> stars();
/// Index into stars() of an HR number; -1 when there is none.
int star_index(int hr);
/// Unit vectors of all stars moved to the epoch (Julian years since J2000), ICRS axes.
std::vector<Eigen::Vector3d> star_directions(double years_since_j2000);

}  // namespace duskleaf
