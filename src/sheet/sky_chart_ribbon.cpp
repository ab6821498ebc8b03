#include "sheet/sky_chart_ribbon.hpp"

#include <cmath>

// The horizon in hour angle and declination: altitude 0 in the transformation of the Explanatory
// Supplement to the Astronomical Almanac, 3rd ed. 2013, ch. 7. It is followed along azimuth, which
// no latitude makes ill-behaved: at the equator it is two lines of constant hour angle, at a pole
// the celestial equator itself.

namespace duskleaf {

Point RibbonView::at(Angle hour_angle, Angle declination) const {
  const double sense = faces_south() ? 1 : -1;
  const double across = band_.width / 360, up = band_.height / (2 * reach_degrees);
  return {band_.x + band_.width / 2 + sense * across * hour_angle.degrees(),
          band_.y + band_.height / 2 - sense * up * declination.degrees()};
}

namespace {

/// Half of the horizon from its northern to its southern point (or back), hour angles on one side
/// of the meridian.
std::vector<std::pair<Angle, Angle>> half_horizon(bool east, Angle latitude) {
  std::vector<std::pair<Angle, Angle>> half;
  for (int i = 0; i <= 90; ++i) {
    const double azimuth = east ? 2.0 * i : 360 - 2.0 * i;
    auto [hour_angle, declination] =
        equatorial_of({Angle(), Angle::from_degrees(azimuth)}, latitude);
    // The ends lie on the meridian, where rounding must not choose the side.
    const double h = std::abs(hour_angle.degrees());
    half.push_back({Angle::from_degrees(east ? -h : h), declination});
  }
  return half;
}

}  // namespace

std::vector<std::vector<Point>> RibbonView::above_horizon() const {
  const auto east = half_horizon(true, latitude_), west = half_horizon(false, latitude_);
  std::vector<Point> region;
  // From lower meridian to lower meridian, then round by the elevated pole.
  const bool north = faces_south();
  const Angle pole = Angle::from_degrees(north ? 90 : -90);
  const auto push = [&](const std::pair<Angle, Angle>& p) {
    region.push_back(at(p.first, p.second));
  };
  if (north) {
    for (const auto& p : east) push(p);
    for (auto p = west.rbegin(); p != west.rend(); ++p) push(*p);
  } else {
    for (auto p = east.rbegin(); p != east.rend(); ++p) push(*p);
    for (const auto& p : west) push(p);
  }
  region.push_back(at(Angle::from_degrees(180), pole));
  region.push_back(at(Angle::from_degrees(-180), pole));
  if (std::abs(latitude_.degrees()) < 1e-6) {
    // On the equator the elevated pole lies on the horizon: the region is a plain stripe.
    const Angle six = Angle::from_hours(6), top = Angle::from_degrees(90);
    region = {at(-six, -top), at(-six, top), at(six, top), at(six, -top)};
  }
  return {region};
}

std::vector<std::vector<Point>> RibbonView::horizon(bool east, Angle moved_by) const {
  std::vector<std::vector<Point>> stretches;
  // Moved curves leave the band at one end and come in at the other.
  for (const double turn : {-360.0, 0.0, 360.0}) {
    std::vector<Point> stretch;
    const auto end_stretch = [&] {
      if (stretch.size() > 1) stretches.push_back(stretch);
      stretch.clear();
    };
    for (const auto& [hour_angle, declination] : half_horizon(east, latitude_)) {
      const Angle h = hour_angle + moved_by + Angle::from_degrees(turn);
      if (std::abs(declination.degrees()) > reach_degrees + 3 || std::abs(h.degrees()) > 186) {
        end_stretch();
        continue;
      }
      stretch.push_back(at(h, declination));
    }
    end_stretch();
  }
  return stretches;
}

}  // namespace duskleaf
