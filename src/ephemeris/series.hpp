#pragma once

#include <vector>

namespace duskleaf {

/// The terms of one coordinate and one power of time, as columns, so that their sines can be taken
/// several at a time.
struct ElpTerms {
  std::vector<double> amplitude, phase0, phase1, phase2, phase3, phase4;
};
struct VsopTerms {
  std::vector<double> amplitude, phase, frequency;
};

/// Sum of amplitude * sin(phase0 + phase1 t + ... + phase4 t^4).
double sum(const ElpTerms&, double t);
/// Sum of amplitude * cos(phase + frequency t).
double sum(const VsopTerms&, double t);

}  // namespace duskleaf
