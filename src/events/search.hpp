#pragma once

#include <algorithm>
#include <cmath>
#include <functional>
#include <span>
#include <vector>

#include "base/time.hpp"

namespace duskleaf {

/// A zero of a function of time: `rising` when the function goes from negative to positive there.
struct Crossing {
  Ut at;
  bool rising;
};

struct SearchOptions {
  Days step{1.0 / 24.0};    // the function has at most one extremum within two steps
  Seconds tolerance{0.01};  // of the instant found
  bool look_for_grazes =
      true;  // refine extrema near zero, so that two crossings within a step are not missed
  bool falling = true;  // false: only rising crossings are wanted
};

/// The one search routine that all events use: every zero of `f` in [from, to), in order of time. A
/// touch of zero without a crossing is not a crossing. `f` is asked within [from, to] alone; a zero
/// at `from` itself counts as a crossing.
std::vector<Crossing> find_crossings(const std::function<double(Ut)>& f, Ut from, Ut to,
                                     const SearchOptions& = {});

/// The same on samples that the caller already has (several searches can share them): `values[i]`
/// is f(times[i]), times ascend, and the search is over [times.front(), times.back()). `f` is asked
/// only where a bracket is refined.
template <class F>
std::vector<Crossing> find_crossings_between(const F& f, std::span<const Ut> times,
                                             std::span<const double> values,
                                             const SearchOptions& options = {});

namespace search_detail {

/// Zero of f between a and b, where fa and fb have opposite signs (fa may be 0): Chandrupatla's
/// method, begun by a secant.
template <class F>
double zero_between(const F& f, double a, double fa, double b, double fb, double tolerance) {
  if (fa == 0.0) return a;
  if (fb == 0.0) return b;
  double c = a, fc = fa, t = fa / (fa - fb);
  for (int i = 0; i < 200; ++i) {
    const double x = a + t * (b - a), fx = f(x);
    if ((fx < 0.0) == (fa < 0.0)) {
      c = a, fc = fa;
    } else {
      c = b, fc = fb;
      b = a, fb = fa;
    }
    a = x, fa = fx;
    const double best = std::abs(fa) < std::abs(fb) ? a : b;
    const double least = 0.5 * tolerance / std::abs(b - a);
    if (least > 0.5 || fa == 0.0 || fb == 0.0) return best;
    const double xi = (a - b) / (c - b), phi = (fa - fb) / (fc - fb);
    if (phi * phi < xi && (1.0 - phi) * (1.0 - phi) < 1.0 - xi)
      t = fa / (fb - fa) * fc / (fb - fc) + (c - a) / (b - a) * fa / (fc - fa) * fb / (fc - fb);
    else
      t = 0.5;
    t = std::min(1.0 - least, std::max(least, t));
  }
  return a;
}

/// Least value of f in [a, b] by Brent's method (golden section with parabolas); ends early once it
/// falls below zero.
struct Least {
  double at, value;
};
template <class F>
Least least_between(const F& f, double a, double b, double start, double tolerance) {
  constexpr double golden = 0.3819660112501051;  // (3 - sqrt 5) / 2
  double x = start, w = x, v = x, fx = f(x), fw = fx, fv = fx, d = 0.0, e = 0.0;
  for (int i = 0; i < 100 && fx >= 0.0; ++i) {
    const double middle = 0.5 * (a + b);
    if (std::abs(x - middle) <= 2.0 * tolerance - 0.5 * (b - a)) break;
    bool parabola = false;
    if (std::abs(e) > tolerance) {
      const double r = (x - w) * (fx - fv);
      double q = (x - v) * (fx - fw), p = (x - v) * q - (x - w) * r;
      q = 2.0 * (q - r);
      if (q > 0.0) p = -p;
      q = std::abs(q);
      if (std::abs(p) < std::abs(0.5 * q * e) && p > q * (a - x) && p < q * (b - x)) {
        e = d;
        d = p / q;
        parabola = true;
      }
    }
    if (!parabola) {
      e = x < middle ? b - x : a - x;
      d = golden * e;
    }
    const double u = x + (std::abs(d) >= tolerance ? d
                          : d > 0.0                ? tolerance
                                                   : -tolerance),
                 fu = f(u);
    if (fu <= fx) {
      (u < x ? b : a) = x;
      v = w, fv = fw, w = x, fw = fx, x = u, fx = fu;
    } else {
      (u < x ? a : b) = u;
      if (fu <= fw || w == x) {
        v = w, fv = fw, w = u, fw = fu;
      } else if (fu <= fv || v == x || v == w) {
        v = u, fv = fu;
      }
    }
  }
  return {x, fx};
}

/// Extreme value of the parabola through three samples at equal steps, and a bound of what it
/// leaves out.
struct Vertex {
  double value, margin;
};
inline Vertex vertex(double f0, double f1, double f2) {
  const double bend = f0 - 2.0 * f1 + f2, slope = 0.5 * (f2 - f0);
  return {bend == 0.0 ? f1 : f1 - 0.5 * slope * slope / bend, std::abs(bend)};
}

}  // namespace search_detail

template <class F>
std::vector<Crossing> find_crossings_between(const F& f, std::span<const Ut> times,
                                             std::span<const double> values,
                                             const SearchOptions& options) {
  using namespace search_detail;
  std::vector<Crossing> found;
  const std::size_t n = values.size();
  if (n < 2) return found;
  const double tolerance = Days(options.tolerance).count(), end = times.back().days();
  const auto at_day = [&](double day) { return f(Ut(Days(day))); };
  const auto add = [&](double a, double fa, double b, double fb, bool rising) {
    if (!rising && !options.falling) return;
    // The sign of the last sample says that the zero is before the end: rounding may not put it
    // there.
    const double at =
        std::min(zero_between(at_day, a, fa, b, fb, tolerance), std::nextafter(end, -1e9));
    found.push_back({Ut(Days(at)), rising});
  };
  // The extremum between samples `from` and `to` on the side of zero where `sign` is; crossed, it
  // is two zeros.
  const auto graze = [&](std::size_t from, std::size_t to, double start, double sign) {
    const double a = times[from].days(), b = times[to].days();
    const Least least =
        least_between([&](double day) { return sign * at_day(day); }, a, b, start, tolerance);
    if (least.value >= 0.0) return;
    add(a, values[from], least.at, sign * least.value, sign < 0.0);
    add(least.at, sign * least.value, b, values[to], sign > 0.0);
  };
  // A zero sample has the sign of the one before it (the opposite of the next at the very start),
  // so that a touch is none.
  double sign = 0.0;
  for (std::size_t i = 0; i < n && sign == 0.0; ++i)
    if (values[i] != 0.0) sign = (values[i] > 0.0) == (i == 0) ? 1.0 : -1.0;
  for (std::size_t i = 1; i < n; ++i) {
    const double before = values[i - 1], here = values[i];
    if (here * sign < 0.0) {
      add(times[i - 1].days(), before, times[i].days(), here, sign < 0.0);
      sign = -sign;
    } else if (options.look_for_grazes && n > 2) {
      // Same sign on both sides. An extremum towards zero shows in three samples; the first and
      // last step have but two.
      const auto near = [&](std::size_t middle) {
        const Vertex v = vertex(values[middle - 1], values[middle], values[middle + 1]);
        return v.value * sign < v.margin;
      };
      const double a = before * sign, b = here * sign;
      if (i + 1 < n && b <= a && values[i + 1] * sign > b && near(i) && b > 0.0)
        graze(i - 1, i + 1, times[i].days(), sign);
      else if (i == 1 && a < b && a > 0.0 && near(1))
        graze(0, 1, 0.5 * (times[0].days() + times[1].days()), sign);
      else if (i + 1 == n && b < a && b > 0.0 && near(i - 1))
        graze(i - 1, i, 0.5 * (times[i - 1].days() + times[i].days()), sign);
    }
  }
  return found;
}

}  // namespace duskleaf
