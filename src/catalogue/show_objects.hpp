#pragma once

#include <Eigen/Dense>
#include <span>
#include <string_view>

#include "base/angle.hpp"

namespace duskleaf {

enum class ShowClass {
  double_star,
  open_cluster,
  globular_cluster,
  nebula,
  planetary_nebula,
  galaxy,
  star_cloud
};

/// A thing beyond the Solar System worth showing (data/show_objects.csv).
struct ShowObject {
  std::string_view code;  // "M42", "NGC 104"; a double's Bayer name ("γ And")
  std::string_view
      name;  // key of words/LANG.yaml after "show." where it has a common name, or empty
  ShowClass sort;
  Eigen::Vector3d direction;  // ICRS unit vector, J2000
  double magnitude;           // whole light, V; a double's brighter star
  double second_magnitude;    // a double's other star; NaN otherwise
  Angle size;                 // greatest diameter; a double's separation
  int constellation;          // index into constellations()
  bool by_memory;             // kind or choice not read in a source
};
std::span<const ShowObject> show_objects();

}  // namespace duskleaf
