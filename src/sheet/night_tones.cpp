#include "sheet/night_tones.hpp"

#include <optional>
#include <utility>

namespace duskleaf {
namespace {

/// The tones before and after an instant of the Sun; nullopt for other events.
std::optional<std::pair<SkyTone, SkyTone>> step_of(EventKind kind) {
  using enum SkyTone;
  switch (kind) {
    case EventKind::sunset:
      return std::pair(day, civil);
    case EventKind::civil_dusk:
      return std::pair(civil, nautical);
    case EventKind::nautical_dusk:
      return std::pair(nautical, astronomical);
    case EventKind::astronomical_dusk:
      return std::pair(astronomical, dark);
    case EventKind::astronomical_dawn:
      return std::pair(dark, astronomical);
    case EventKind::nautical_dawn:
      return std::pair(astronomical, nautical);
    case EventKind::civil_dawn:
      return std::pair(nautical, civil);
    case EventKind::sunrise:
      return std::pair(civil, day);
    default:
      return std::nullopt;
  }
}

SkyTone tone_at(Angle sun_altitude) {
  const double h = sun_altitude.degrees();
  if (h >= -50.0 / 60.0) return SkyTone::day;
  if (h >= -6) return SkyTone::civil;
  if (h >= -12) return SkyTone::nautical;
  return h >= -18 ? SkyTone::astronomical : SkyTone::dark;
}

}  // namespace

std::vector<ToneSpan> tone_spans(const Night& night) {
  std::vector<ToneSpan> spans;
  Ut from = night.from;
  SkyTone tone =
      tone_at(night.darkest_sun_altitude);  // holds all through where the Sun crosses no limit
  for (const Event& event : night.events) {
    const auto step = step_of(event.kind);
    if (!step) continue;
    if (event.at > from) spans.push_back({from, event.at, step->first});
    from = event.at;
    tone = step->second;
  }
  if (night.to > from) spans.push_back({from, night.to, tone});
  return spans;
}

std::vector<TimeSpan> moon_spans(const Night& night) {
  std::vector<TimeSpan> spans;
  bool up = night.moon_up_at_start;
  Ut from = night.from;
  for (const Event& event : night.events) {
    if (event.kind == EventKind::moonrise) {
      up = true;
      from = event.at;
    } else if (event.kind == EventKind::moonset) {
      if (up) spans.push_back({from, event.at});
      up = false;
    }
  }
  if (up) spans.push_back({from, night.to});
  return spans;
}

const Ink& tone_ink(const Theme& theme, SkyTone tone) {
  switch (tone) {
    case SkyTone::civil:
      return theme.civil;
    case SkyTone::nautical:
      return theme.nautical;
    case SkyTone::astronomical:
      return theme.astronomical;
    case SkyTone::dark:
      return theme.dark;
    case SkyTone::day:
      break;
  }
  return theme.day;
}

}  // namespace duskleaf
