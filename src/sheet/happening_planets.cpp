// The planets' turning points as a site sees them. Definitions of the instants:
// events/configurations.hpp.
#include <algorithm>

#include "almanac/planets.hpp"
#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

constexpr double rank_bright_opposition = 1, rank_elongation = 2, rank_faint_opposition = 4;

/// Nobody sees it behind the hills.
void hide(const HappeningWriter& w, HappeningLine& line) {
  line.text += w.words("behind-skyline");
  line.rank = fact_rank;
}

void write_opposition(HappeningWriter& w, const Event& event) {
  const std::string name = w.body(event.body);
  const std::string brief = w.words("opposition-brief", {{"body", name}});
  const Date date = w.civil_date(event.at);
  const bool optics = event.body == Body::uranus || event.body == Body::neptune;
  const double rank = optics ? rank_faint_opposition : rank_bright_opposition;
  const Night* night = w.night(date);
  if (night == nullptr || !w.in_month(date)) return;
  const PlanetEvening evening =
      planet_evening(w.sky(), event.body, night->darkest, 6.0, {night->from, night->to});
  if (!evening.highest) return;
  const Horizontal place = apparent_place(w.sky(), event.body, *evening.highest);
  HappeningLine* line = nullptr;
  if (w.planet_sight(event.body, date) == PlanetSight::not_visible) {
    line = w.on_date(date, fact_rank, w.words("opposition-low", {{"body", name}}), brief);
  } else {
    line = w.on_date(
        date, rank,
        w.words(optics ? "opposition-optics" : "opposition",
                {{"body", name}, {"time", w.time(*evening.highest)}, {"place", w.place(place)}}),
        brief);
    if (line != nullptr) line->sight = true;
    if (line != nullptr && w.behind_skyline(place)) hide(w, *line);
  }
  if (line != nullptr) line->at = event.at;
}

/// In the twilight of the evening (east of the Sun) or the morning (west) of its civil date.
void write_elongation(HappeningWriter& w, const Event& event) {
  const bool east = event.kind == EventKind::greatest_elongation_east;
  const Date date = w.civil_date(event.at);
  const Date evening = east ? date : date - std::chrono::days(1);
  if (!w.in_month(date) && !w.in_month(evening)) return;
  const Night* night = w.night(evening);
  const std::string name = w.body(event.body);
  const std::string brief = w.words("elongation-brief", {{"body", name}});
  const std::optional<Ut> when = night == nullptr ? std::nullopt
                                 : east           ? night->civil_dusk
                                                  : night->civil_dawn;
  if (when) {
    const Horizontal place = apparent_place(w.sky(), event.body, *when);
    const PlanetSight sight = w.planet_sight(event.body, evening);
    if (sight == PlanetSight::evening_and_morning || sight == PlanetSight::all_night ||
        sight == (east ? PlanetSight::evening : PlanetSight::morning)) {
      const std::string text =
          w.words(east ? "elongation-evening" : "elongation-morning",
                  {{"body", name},
                   {"degrees", w.context().words.number(event.value.value_or(0), 0)},
                   {"place", w.place(place)}});
      HappeningLine* line = w.by_night(*when, rank_elongation, text, brief);
      if (line != nullptr && w.behind_skyline(place)) hide(w, *line);
      return;
    }
  }
  w.on_date(date, fact_rank, w.words("elongation-low", {{"body", name}}), brief);
}

}  // namespace

void write_configurations(HappeningWriter& w) {
  for (const Event& event : w.context().sky_year.configurations) {
    switch (event.kind) {
      case EventKind::opposition:
        write_opposition(w, event);
        break;
      case EventKind::greatest_elongation_east:
      case EventKind::greatest_elongation_west:
        write_elongation(w, event);
        break;
      case EventKind::conjunction:
      case EventKind::superior_conjunction:
      case EventKind::inferior_conjunction:
      case EventKind::stationary_then_retrograde:
      case EventKind::stationary_then_direct: {
        if (event.body == Body::uranus || event.body == Body::neptune) break;  // nobody notices
        const bool before = event.kind == EventKind::inferior_conjunction;
        const bool turns = event.kind == EventKind::stationary_then_retrograde ||
                           event.kind == EventKind::stationary_then_direct;
        const std::string_view key =
            event.kind == EventKind::stationary_then_retrograde ? "stands-then-west"
            : event.kind == EventKind::stationary_then_direct   ? "stands-then-east"
            : before                                            ? "before-sun"
                                                                : "behind-sun";
        HappeningLine* line = w.on_date(
            w.civil_date(event.at), fact_rank, w.words(key, {{"body", w.body(event.body)}}),
            w.words(turns ? "stands-brief" : "near-sun-brief", {{"body", w.body(event.body)}}));
        if (line != nullptr) line->at = event.at;
        break;
      }
      default:
        break;
    }
  }
}

}  // namespace duskleaf
