// Least angular separation of apparent geocentric places (Meeus, Astronomical Algorithms, 2nd ed.
// 1998, ch. 17): where the rate of the chord's square goes from negative to positive. The rate is a
// difference over a short base, and looked at daily: a pair may come nearest three times within
// weeks where one of them is stationary, and each is a zero of its own.
//
// Largest differences from the DE431-based reference, 2,548 approaches of 1980-81 and 2020-2035,
// none missed, none extra: the Moon's (2,139) 3.5 s and 0.0001 degree; planets to Saturn with each
// other, stars and clusters (329) 103 s and 0.0001 degree; with Uranus or Neptune (80) 0.0004
// degree and 600 s but for three (up to 811 s), in which both hardly move: the planet's place is 1
// to 2 arcseconds off (ephemeris/year_ephemeris.hpp).
#include "events/approaches.hpp"

#include <algorithm>
#include <cmath>

#include "events/search.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;
using Directions = std::vector<Vector>;  // unit vectors, by index into targets()

constexpr Angle greatest_separation = Angle::from_degrees(5.0),
                least_from_sun = Angle::from_degrees(12.0);
constexpr double step_days = 1.0;

/// Which pairs a search looks at: the Moon with all, or all but the Moon with each other.
struct Company {
  bool with_moon;
  double half_base;  // days. The Moon's rate bends; the planets' must rise above the tables' noise
  Angle reach;       // more than half of what the separation changes in a step
};
constexpr Company moon_company{true, 0.02, Angle::from_degrees(8.0)},
    planet_company{false, 0.1, Angle::from_degrees(2.5)};

class Search {
 public:
  Search(const YearEphemeris& ephemeris, const Company& company)
      : ephemeris_(ephemeris), company_(company) {}

  void run(Ut from, Ut to, std::vector<Approach>& found) {
    const auto steps =
        static_cast<std::size_t>(std::max(2.0, std::ceil((to - from).count() / step_days)));
    for (std::size_t i = 0; i <= steps; ++i) {
      const double part = static_cast<double>(i) / static_cast<double>(steps);
      times_.push_back(i == steps ? to : from + (to - from) * part);
      before_.push_back(all_directions(times_.back(), -company_.half_base));
      after_.push_back(all_directions(times_.back(), company_.half_base));
    }
    const int n = static_cast<int>(targets().size());
    for (int a = 0; a < n; ++a) {
      const Target& first = target_at(a);
      if (!first.is_body() || first.is_moon() != company_.with_moon) continue;
      for (int b = a + 1; b < n; ++b)
        if (target_at(b).meets) search_pair(a, b, found);
    }
  }

 private:
  Tt shifted(Ut t, double days) const {
    return Tt(
        Days(std::clamp(to_tt(t).days() + days, ephemeris_.from().days(), ephemeris_.to().days())));
  }
  Vector direction(int i, Tt t) const {
    return apparent_direction(ephemeris_, target_at(i), t).normalized();
  }
  Directions all_directions(Ut at, double shift) const {
    const Tt t = shifted(at, shift);
    const SkyFrame frame = sky_frame(ephemeris_, t);
    Directions directions;
    directions.reserve(targets().size());
    for (const Target& x : targets()) {
      if (!x.meets || (x.is_moon() && !company_.with_moon))
        directions.emplace_back(Vector::Zero());
      else
        directions.push_back(x.is_body() ? ephemeris_.apparent(x.body, t).normalized()
                                         : apparent_direction(frame, x));
    }
    return directions;
  }
  double rate(int a, int b, Ut at) const {
    const Tt t = shifted(at, -company_.half_base), u = shifted(at, company_.half_base);
    return (direction(a, u) - direction(b, u)).squaredNorm() -
           (direction(a, t) - direction(b, t)).squaredNorm();
  }

  /// Only the stretches of samples in which the pair is near are searched, with a sample more at
  /// either end.
  void search_pair(int a, int b, std::vector<Approach>& found) {
    const auto i = static_cast<std::size_t>(a), k = static_cast<std::size_t>(b);
    const double limit =
        std::pow(2.0 * sin((greatest_separation + company_.reach) / 2.0), 2.0);  // of the chord
    const auto near = [&](std::size_t s) {
      return (before_[s][i] - before_[s][k]).squaredNorm() < limit;
    };
    const std::size_t n = times_.size();
    for (std::size_t s = 0; s < n; ++s) {
      if (!near(s)) continue;
      std::size_t first = s, last = s;
      while (last + 1 < n && near(last)) ++last;
      s = last;
      if (first > 0) --first;
      values_.clear();
      for (std::size_t m = first; m <= last; ++m)
        values_.push_back((after_[m][i] - after_[m][k]).squaredNorm() -
                          (before_[m][i] - before_[m][k]).squaredNorm());
      SearchOptions options;
      options.falling = false;
      options.tolerance = Seconds(0.5);
      const std::span<const Ut> times(times_.data() + first, last - first + 1);
      for (const Crossing& c :
           find_crossings_between([&](Ut t) { return rate(a, b, t); }, times, values_, options))
        add(a, b, c.at, found);
    }
  }

  void add(int a, int b, Ut at, std::vector<Approach>& found) const {
    const Tt t = to_tt(at);
    const Vector p = direction(a, t), q = direction(b, t),
                 sun = ephemeris_.apparent(Body::sun, t).normalized();
    const Angle separation = angle_between(p, q);
    if (separation < greatest_separation && angle_between(p, sun) >= least_from_sun &&
        angle_between(q, sun) >= least_from_sun)
      found.push_back({at, a, b, separation});
  }

  const YearEphemeris& ephemeris_;
  Company company_;
  std::vector<Ut> times_;
  std::vector<Directions> before_, after_;  // by sample
  std::vector<double> values_;
};

}  // namespace

std::vector<Approach> closest_approaches(const YearEphemeris& ephemeris, Ut from, Ut to) {
  std::vector<Approach> found;
  if (!(from < to)) return found;
  for (const Company& company : {moon_company, planet_company})
    Search(ephemeris, company).run(from, to, found);
  std::sort(found.begin(), found.end(), [](const Approach& x, const Approach& y) {
    return x.at != y.at ? x.at < y.at : pair_name(x.a, x.b) < pair_name(y.a, y.b);
  });
  return found;
}

Event approach_event(const Approach& approach) {
  return {EventKind::closest_approach, target_at(approach.a).body, approach.at,
          approach.separation.degrees(), pair_name(approach.a, approach.b)};
}

}  // namespace duskleaf
