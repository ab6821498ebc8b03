#pragma once

#include <functional>
#include <vector>

#include "base/time.hpp"

namespace duskleaf {

/// A zero of a function of time: `rising` when the function goes from negative to positive there.
struct Crossing {
  Ut at;
  bool rising;
};

struct SearchOptions {
  Days step{1.0 / 24.0};          // the function has at most one extremum between two samples
  Seconds tolerance{0.01};        // of the instant found
  bool look_for_grazes = true;    // refine extrema near zero, so that two crossings within a step are not missed
};

/// The one search routine that all events use: every zero of `f` in [from, to), in order of time. A touch of zero without a
/// crossing is not a crossing.
std::vector<Crossing> find_crossings(const std::function<double(Ut)>& f, Ut from, Ut to, const SearchOptions& = {});

}  // namespace duskleaf
