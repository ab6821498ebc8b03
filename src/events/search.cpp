// T. R. Chandrupatla, "A new hybrid quadratic/bisection algorithm for finding the zero of a
// nonlinear function without using derivatives", Advances in Engineering Software 28 (1997) 145; R.
// P. Brent, "Algorithms for Minimization without Derivatives" (1973), ch. 5. Departures: the first
// step is a secant instead of a bisection (the functions here are nearly straight within a step),
// and the minimisation ends as soon as zero is crossed.
#include "events/search.hpp"

#include <algorithm>

namespace duskleaf {

std::vector<Crossing> find_crossings(const std::function<double(Ut)>& f, Ut from, Ut to,
                                     const SearchOptions& options) {
  if (!(from < to)) return {};
  const double length = (to - from).count();
  const auto steps =
      static_cast<std::size_t>(std::max(2.0, std::ceil(length / options.step.count() - 1e-9)));
  std::vector<Ut> times(steps + 1);
  std::vector<double> values(steps + 1);
  for (std::size_t i = 0; i <= steps; ++i) {
    times[i] =
        i == steps ? to : from + Days(length * static_cast<double>(i) / static_cast<double>(steps));
    values[i] = f(times[i]);
  }
  return find_crossings_between(f, times, values, options);
}

}  // namespace duskleaf
