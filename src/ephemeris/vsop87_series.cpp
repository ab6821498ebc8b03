// The periodic sums of VSOP87: P. Bretagnon & G. Francou 1988, A&A 202, 309.
//
// Built with -ffast-math (see src/CMakeLists.txt), which lets the compiler take several cosines at
// a time. Nothing else may live here: no tests for NaN or infinity, and no templates that other
// files share.
#include <cmath>
#include <cstddef>

#include "ephemeris/series.hpp"

namespace duskleaf {

double sum(const VsopTerms& terms, double t) {
  const double* const a = terms.amplitude.data();
  const double* const phase = terms.phase.data();
  const double* const frequency = terms.frequency.data();
  const std::size_t count = terms.amplitude.size();
  double total = 0.0;
  for (std::size_t i = 0; i < count; ++i) total += a[i] * std::cos(phase[i] + frequency[i] * t);
  return total;
}

}  // namespace duskleaf
