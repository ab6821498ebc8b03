#pragma once

#include <Eigen/Dense>
#include <span>
#include <string_view>

#include "events/events.hpp"

namespace duskleaf {

/// Something that the Moon and the planets meet or that the Moon covers.
struct Target {
  enum class Sort { body, star, cluster };
  std::string_view name;  // as the tables spell it: "moon", "venus", "regulus", "pleiades"
  Sort sort;
  Body body = Body::moon;                               // of a body
  int star = -1;                                        // index into stars(), of a star
  Eigen::Vector3d direction = Eigen::Vector3d::Zero();  // star, cluster: ICRS unit vector, J2000
  Eigen::Vector3d proper_motion = Eigen::Vector3d::Zero();  // radians per Julian year
  double magnitude = 0.0;                                   // star, cluster; a planet's changes
  Angle radius;                                             // of a cluster as the eye sees it
  bool meets = true;                                        // closest approaches are sought with it

  bool is_body() const { return sort == Sort::body; }
  bool is_moon() const { return is_body() && body == Body::moon; }
};

/// In the order of pair names: the Moon, the planets outward, the stars (those that meet: bright
/// and near the ecliptic; then those that the Moon alone can cover, to V 3.5), the clusters of
/// Taurus and Cancer.
std::span<const Target> targets();
const Target& target_at(int index);
/// Index into targets() of a body or a name; -1 when there is none.
int target_index(Body);
int target_index(std::string_view name);
/// "moon+venus": the names of two targets in the order of targets(). Lives as long as the program.
std::string_view pair_name(int a, int b);
/// Geocentric apparent direction, true equator and equinox of date: a unit vector for a star or
/// cluster (proper motion, aberration; no parallax), au for a body.
Eigen::Vector3d apparent_direction(const YearEphemeris&, const Target&, Tt);

/// What the directions of stars and clusters at an instant have in common: for whoever wants many.
struct SkyFrame {
  Eigen::Matrix3d icrs_to_date;
  Eigen::Vector3d earth_velocity;  // of the speed of light, ICRS axes
  double years_since_j2000;
};
SkyFrame sky_frame(const YearEphemeris&, Tt);
/// The same as above, of a star or cluster.
Eigen::Vector3d apparent_direction(const SkyFrame&, const Target&);

}  // namespace duskleaf
