#pragma once

#include <vector>

#include "sheet/sky_chart.hpp"

namespace duskleaf {

/// The band of sky within 40 degrees of the celestial equator, right ascension along it, what
/// crosses the meridian in its middle. Turned as the reader sees the sky: at latitude 0 and north
/// of it east to the left and north up, south of it east to the right and north down.
class RibbonView {
 public:
  static constexpr double reach_degrees = 40;

  RibbonView(const Box& band, Angle local_sidereal_time, Angle latitude)
      : band_(band), sidereal_(local_sidereal_time), latitude_(latitude) {}

  const Box& band() const { return band_; }
  bool faces_south() const { return latitude_.radians() >= 0; }
  /// -180..180 degrees, west positive.
  Angle hour_angle(Angle right_ascension) const { return (sidereal_ - right_ascension).centred(); }
  Point at(Angle hour_angle, Angle declination) const;

  /// The regions of the band's plane that stand above the horizon, as closed outlines (they may run
  /// beyond the band).
  std::vector<std::vector<Point>> above_horizon() const;
  /// The eastern (or western) half of the horizon, moved in hour angle, as stretches within the
  /// band.
  std::vector<std::vector<Point>> horizon(bool east, Angle moved_by) const;

 private:
  Box band_;
  Angle sidereal_, latitude_;
};

/// The ribbon with its scales, fitted into `area`: its labels, for checks, and the height used.
struct RibbonDrawing {
  double height;
  LabelRegion outline;
  std::vector<Box> label_boxes;
  std::vector<PlacedLabel> labels;
};
RibbonDrawing compose_ribbon(const BlockContext&, const Box& area, std::vector<Mark>& out);

}  // namespace duskleaf
