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
std::string_view show_class_name(ShowClass);  // "double-star", "open-cluster" ...

/// A thing beyond the Solar System worth showing (data/show_objects.csv).
struct ShowObject {
  std::string_view code;  // "M42", "NGC 104"; a double's Bayer name ("γ And")
  std::string_view name;  // key of words/LANG.yaml after "show-object." where it has a common name
                          // ("m42", "gamma-and"), or empty
  ShowClass sort;
  int rank;                   // 3 showpiece, 2, 1
  Eigen::Vector3d direction;  // ICRS unit vector, J2000
  double magnitude;           // whole light, V; a double's brighter star
  double second_magnitude;    // a double's other star; NaN otherwise
  Angle size;                 // greatest diameter; a double's separation
  double axis_ratio;          // least over greatest diameter; 1 of doubles
  int constellation;          // index into constellations()
  int star;                   // a double's brighter star, index into stars(); -1 otherwise
  std::string_view look;      // of a double, key of words/LANG.yaml after "show.look-" where its
                              // colours or the like are known ("gold-blue"), or empty
  bool bare_eye;              // of all but doubles: observers call it a bare-eye object (dark sky)
  bool by_memory;             // place, magnitude, size or look not read in a source (choice, kind,
                              // rank, axis ratio and bare_eye never are)
};
/// About 140, of both hemispheres.
std::span<const ShowObject> show_objects();

}  // namespace duskleaf
