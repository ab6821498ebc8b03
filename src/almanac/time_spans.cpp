// Sets of spans on the line of time; elementary.
#include "almanac/time_spans.hpp"

namespace duskleaf {

std::vector<TimeSpan> intersection(const std::vector<TimeSpan>& a, const std::vector<TimeSpan>& b) {
  std::vector<TimeSpan> common;
  for (const TimeSpan& x : a)
    for (const TimeSpan& y : b) {
      const TimeSpan both{std::max(x.from, y.from), std::min(x.to, y.to)};
      if (both.from < both.to) common.push_back(both);
    }
  return common;
}

std::vector<TimeSpan> spans_below(const std::vector<Event>& events, EventKind up, EventKind down,
                                  Ut from, Ut to, bool below_if_none) {
  std::vector<TimeSpan> spans;
  const auto first = std::find_if(events.begin(), events.end(),
                                  [&](const Event& e) { return e.kind == up || e.kind == down; });
  // The first instant itself says what was before it: no second opinion is asked, which could
  // differ within the tolerance.
  bool below = first == events.end() ? below_if_none : first->kind == up;
  Ut since = from;
  for (auto e = first; e != events.end(); ++e) {
    if (e->kind == up && below) spans.push_back({since, e->at});
    if (e->kind == up) below = false;
    if (e->kind == down && !below) {
      below = true;
      since = e->at;
    }
  }
  if (below && since < to) spans.push_back({since, to});
  return spans;
}

Days length(const std::vector<TimeSpan>& spans) {
  Days sum{0};
  for (const TimeSpan& s : spans) sum += s.to - s.from;
  return sum;
}

bool contains(const std::vector<TimeSpan>& spans, Ut t) {
  return std::any_of(spans.begin(), spans.end(),
                     [&](const TimeSpan& s) { return s.from <= t && t < s.to; });
}

}  // namespace duskleaf
