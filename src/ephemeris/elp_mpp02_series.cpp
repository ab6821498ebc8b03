// The periodic sums of ELP/MPP02: J. Chapront & G. Francou 2003, A&A 404, 735.
//
// Built with -ffast-math (see src/CMakeLists.txt), which lets the compiler take several sines at a
// time. Nothing else may live here: no tests for NaN or infinity, and no templates that other files
// share.
#include <cmath>
#include <cstddef>

#include "ephemeris/series.hpp"

namespace duskleaf {

double sum(const ElpTerms& terms, double t) {
  const double* const a = terms.amplitude.data();
  const double* const p0 = terms.phase0.data();
  const double* const p1 = terms.phase1.data();
  const double* const p2 = terms.phase2.data();
  const double* const p3 = terms.phase3.data();
  const double* const p4 = terms.phase4.data();
  const std::size_t count = terms.amplitude.size();
  double total = 0.0;
  for (std::size_t i = 0; i < count; ++i)
    total += a[i] * std::sin(p0[i] + t * (p1[i] + t * (p2[i] + t * (p3[i] + t * p4[i]))));
  return total;
}

}  // namespace duskleaf
