#pragma once

#include <chrono>
#include <compare>

namespace duskleaf {

using Seconds = std::chrono::duration<double>;
using Days = std::chrono::duration<double, std::ratio<86400>>;

/// An instant on one time scale, counted in days of 86400 s from J2000.0 (Julian date 2451545.0 of
/// that scale). Resolution better than a microsecond within a century. Scales do not mix: see to_tt
/// and to_ut.
template <class Scale>
class InstantOf {
 public:
  constexpr InstantOf() = default;
  explicit constexpr InstantOf(Days since_j2000) : days_(since_j2000.count()) {}
  static constexpr InstantOf from_julian_date(double jd) { return InstantOf(Days(jd - 2451545.0)); }

  constexpr Days since_j2000() const { return Days(days_); }
  /// Days since J2000.0 as a bare number, for polynomials and ERFA (whose two-part date is
  /// {2451545.0, days()}).
  constexpr double days() const { return days_; }
  constexpr double julian_centuries() const { return days_ / 36525.0; }

  constexpr auto operator<=>(const InstantOf&) const = default;
  friend constexpr InstantOf operator+(InstantOf t, Days d) { return InstantOf(Days(t.days_) + d); }
  friend constexpr InstantOf operator-(InstantOf t, Days d) { return InstantOf(Days(t.days_) - d); }
  friend constexpr Days operator-(InstantOf a, InstantOf b) { return Days(a.days_ - b.days_); }

 private:
  double days_ = 0.0;
};

/// Terrestrial Time: the scale of the dynamics.
using Tt = InstantOf<struct TerrestrialTime>;
/// Universal time: UTC from 1972-01-01 on (UT1 is taken equal to it; they differ by less than 0.9
/// s), UT1 before.
using Ut = InstantOf<struct UniversalTime>;

/// TT - UT. From 1972 on exact (leap seconds; after the table's end its last value holds); before,
/// the spline of Morrison, Stephenson, Hohenkerk & Zawilski (2021), some 0.1 s in the 20th century.
Seconds tt_minus_ut(Ut t);
Tt to_tt(Ut t);
Ut to_ut(Tt t);

}  // namespace duskleaf
