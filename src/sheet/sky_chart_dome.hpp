#pragma once

#include <optional>
#include <vector>

#include "sheet/sky_chart.hpp"

namespace duskleaf {

/// Half of the sky on paper: stereographic about the horizon's point that the observer faces. The
/// horizon is straight; east or west of it, and the zenith, stand 90 degrees from that point; the
/// outline 100 degrees from it.
class DomeView {
 public:
  static constexpr double reach_degrees = 100;

  /// `middle`: the faced point of the horizon on the page; `radius` mm of the outline.
  DomeView(Point middle, double radius, Angle facing)
      : middle_(middle), radius_(radius), facing_(facing) {}

  Point middle() const { return middle_; }
  double radius() const { return radius_; }
  Angle facing() const { return facing_; }
  /// mm from the middle to the zenith.
  double unit() const;
  /// Nothing for directions more than 130 degrees from the faced point: their places run off any
  /// page.
  std::optional<Point> project(const Horizontal&) const;
  /// Where up (towards the zenith) points there, counterclockwise from the page's top. Angles on
  /// the page are true.
  Angle up_at(const Horizontal&) const;
  /// The stretches of a curve that lie within the outline and above the horizon (with a little
  /// beyond, for the clip).
  std::vector<std::vector<Point>> trace(const std::vector<Horizontal>&) const;

  LabelRegion outline() const;
  LabelRegion label_region() const;
  Path outline_path() const;

 private:
  Point middle_;
  double radius_;
  Angle facing_;
};

enum class DomeFacing { equator, pole };

/// The azimuth that a dome faces: the equator's dome south at latitude 0 and north of it, north in
/// the south.
Angle dome_azimuth(DomeFacing, Angle latitude);

/// The pole's mark, which way the sky turns about it, and how to find it.
void add_pole(SkyChart&, const DomeView&);
/// For nights without stars: the Sun's and Moon's ways through the civil day and, if asked, when
/// stars come back.
void add_paths_of_day(SkyChart&, const DomeView&, bool with_message);

/// Whether the Moon stands above the horizon at some time of the evening's civil day.
bool moon_up_that_day(const BlockContext&);

/// The outline's radius of a dome that is fitted into `area`: it stands at the area's top, in the
/// middle of its width.
double dome_radius(const BlockContext&, const Box& area);

/// A dome with its direction letters and title, fitted into `area`: its labels, for checks, and the
/// height used.
struct DomeDrawing {
  double height;
  LabelRegion outline;
  std::vector<Box> label_boxes;
  std::vector<PlacedLabel> labels;
};
DomeDrawing compose_dome(const BlockContext&, DomeFacing, const Box& area, std::vector<Mark>& out);

}  // namespace duskleaf
