#pragma once

#include <Eigen/Dense>
#include <span>
#include <string_view>
#include <utility>
#include <vector>

#include "base/angle.hpp"

namespace duskleaf {

struct Constellation {
  std::string_view abbreviation;  // IAU three letters, "Ori"
  std::string_view name;          // Latin nominative
  std::string_view genitive;
  double area_square_degrees;
  Angle mean_declination;  // of the IAU area
  bool near_equator;  // mean declination within 30 degrees of the celestial equator (35 of them)
  bool on_equator;    // its area contains declination 0 (16)
};

/// The 88, by abbreviation in ASCII order.
std::span<const Constellation> constellations();
/// Index by abbreviation; -1 when there is none.
int constellation_index(std::string_view abbreviation);
/// Index of the constellation whose IAU area (Roman 1987, equinox B1875) holds the direction (ICRS
/// axes, J2000).
int constellation_at(const Eigen::Vector3d& icrs);

/// One constellation's figure, or a part of it: Serpens has two ("Ser" caput, cauda), all others
/// one. Lines join stars by index into stars(). The figures are this project's own
/// (data/README.md).
struct Figure {
  int constellation;
  std::string_view part;  // "caput", "cauda" or empty
  std::vector<std::pair<int, int>> lines;
  std::vector<int> figure_stars;  // each star of the lines once, by HR order
};
std::span<const Figure> figures();

/// Asterisms that the trade names: the Plough, the Sickle ... : name key for words files and the
/// stars it spans.
struct Asterism {
  std::string_view key;
  std::vector<int> asterism_stars;
};
std::span<const Asterism> asterisms();

}  // namespace duskleaf
