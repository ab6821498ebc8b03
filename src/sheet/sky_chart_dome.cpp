#include "sheet/sky_chart_dome.hpp"

#include <algorithm>
#include <cmath>

#include "sky/projection.hpp"

// The projection is sky/projection.hpp's, stereographic about the horizon's point that one faces.

namespace duskleaf {
double DomeView::unit() const { return radius_ / tan(Angle::from_degrees(reach_degrees / 2)); }

std::optional<Point> DomeView::project(const Horizontal& place) const {
  if (cos(place.altitude) * cos(place.azimuth - facing_) < -0.6428)  // cosine of 130 degrees
    return std::nullopt;
  const Eigen::Vector2d p = unit() * FacingProjection(facing_)(place);
  return Point{middle_.x + p.x(), middle_.y - p.y()};
}

Angle DomeView::up_at(const Horizontal& place) const {
  const Angle step = Angle::from_degrees(0.01);
  const auto low = project({place.altitude - step, place.azimuth});
  const auto high = project({place.altitude + step, place.azimuth});
  if (!low || !high) return {};
  return arctan2(low->x - high->x, low->y - high->y);
}

std::vector<std::vector<Point>> DomeView::trace(const std::vector<Horizontal>& curve) const {
  std::vector<std::vector<Point>> stretches;
  std::vector<Point> stretch;
  const auto end_stretch = [&] {
    if (stretch.size() > 1) stretches.push_back(stretch);
    stretch.clear();
  };
  for (const Horizontal& place : curve) {
    const auto p = project(place);
    const bool near =
        p && p->y < middle_.y + 5 && std::hypot(p->x - middle_.x, p->y - middle_.y) < radius_ + 5;
    if (near)
      stretch.push_back(*p);
    else
      end_stretch();
  }
  end_stretch();
  return stretches;
}

LabelRegion DomeView::outline() const {
  return {{middle_.x - radius_, middle_.y - radius_, 2 * radius_, radius_}, middle_, radius_};
}

LabelRegion DomeView::label_region() const {
  const double edge = 0.5;
  const double r = radius_ - edge;
  return {{middle_.x - r, middle_.y - r, 2 * r, r - edge * 0.4}, middle_, r};
}

Path DomeView::outline_path() const {
  Path path = Path::arc(middle_, radius_, 0, 180);
  path.close();
  return path;
}

Angle dome_azimuth(DomeFacing facing, Angle latitude) {
  const bool south = (latitude.radians() >= 0) == (facing == DomeFacing::equator);
  return Angle::from_degrees(south ? 180 : 0);
}

}  // namespace duskleaf
