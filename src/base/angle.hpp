#pragma once

#include <cmath>
#include <compare>
#include <numbers>

namespace duskleaf {

/// A plane angle. Its unit is named wherever a number goes in or comes out.
class Angle {
 public:
  constexpr Angle() = default;
  static constexpr Angle from_radians(double value) { return Angle(value); }
  static constexpr Angle from_degrees(double value) { return Angle(value * per_degree); }
  static constexpr Angle from_hours(double value) { return Angle(value * 15.0 * per_degree); }
  static constexpr Angle from_arcminutes(double value) { return Angle(value / 60.0 * per_degree); }
  static constexpr Angle from_arcseconds(double value) {
    return Angle(value / 3600.0 * per_degree);
  }

  constexpr double radians() const { return radians_; }
  constexpr double degrees() const { return radians_ / per_degree; }
  constexpr double hours() const { return radians_ / per_degree / 15.0; }
  constexpr double arcminutes() const { return radians_ / per_degree * 60.0; }
  constexpr double arcseconds() const { return radians_ / per_degree * 3600.0; }

  /// The same direction in [0, 360) degrees.
  Angle positive() const {
    const double turn = 2.0 * std::numbers::pi;
    double r = std::fmod(radians_, turn);
    if (r < 0.0) r += turn;
    return Angle(r >= turn ? 0.0 : r);
  }
  /// The same direction in [-180, 180] degrees.
  Angle centred() const { return Angle(std::remainder(radians_, 2.0 * std::numbers::pi)); }

  constexpr auto operator<=>(const Angle&) const = default;
  constexpr Angle operator-() const { return Angle(-radians_); }
  friend constexpr Angle operator+(Angle a, Angle b) { return Angle(a.radians_ + b.radians_); }
  friend constexpr Angle operator-(Angle a, Angle b) { return Angle(a.radians_ - b.radians_); }
  friend constexpr Angle operator*(Angle a, double k) { return Angle(a.radians_ * k); }
  friend constexpr Angle operator*(double k, Angle a) { return a * k; }
  friend constexpr Angle operator/(Angle a, double k) { return Angle(a.radians_ / k); }
  friend constexpr double operator/(Angle a, Angle b) { return a.radians_ / b.radians_; }

 private:
  static constexpr double per_degree = std::numbers::pi / 180.0;
  explicit constexpr Angle(double radians) : radians_(radians) {}
  double radians_ = 0.0;
};

inline double sin(Angle a) { return std::sin(a.radians()); }
inline double cos(Angle a) { return std::cos(a.radians()); }
inline double tan(Angle a) { return std::tan(a.radians()); }
inline Angle arcsin(double x) {
  return Angle::from_radians(std::asin(x > 1 ? 1 : x < -1 ? -1 : x));
}
inline Angle arccos(double x) {
  return Angle::from_radians(std::acos(x > 1 ? 1 : x < -1 ? -1 : x));
}
inline Angle arctan2(double y, double x) { return Angle::from_radians(std::atan2(y, x)); }

}  // namespace duskleaf
