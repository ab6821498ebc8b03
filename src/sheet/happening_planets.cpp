// The planets' turning points and the meteor showers, as a site sees them. Definitions of the
// instants: events/configurations.hpp, almanac/shower_nights.hpp.
#include <algorithm>
#include <cmath>

#include "almanac/planets.hpp"
#include "catalogue/showers.hpp"
#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

constexpr int rank_bright_opposition = 1, rank_elongation = 2, rank_faint_opposition = 4,
              rank_dull = 5;
// Lower than this a beginner finds no planet (common practice).
constexpr Angle least_useful_height = Angle::from_degrees(3);

void write_opposition(HappeningWriter& w, const Event& event) {
  const std::string name = w.body(event.body);
  const std::string brief = w.words("opposition-brief", {{"body", name}});
  const Date date = w.civil_date(event.at);
  const bool optics = event.body == Body::uranus || event.body == Body::neptune;
  const int rank = optics ? rank_faint_opposition : rank_bright_opposition;
  const Night* night = w.night(date);
  if (night == nullptr || !w.in_month(date)) return;
  const PlanetEvening evening =
      planet_evening(w.sky(), event.body, night->darkest, 6.0, {night->from, night->to});
  if (!evening.highest) return;
  const Horizontal place = apparent_place(w.sky(), event.body, *evening.highest);
  HappeningLine* line = nullptr;
  if (place.altitude < least_useful_height) {
    line = w.on_date(date, rank_dull, w.words("opposition-low", {{"body", name}}), brief);
  } else {
    line = w.on_date(
        date, rank,
        w.words(optics ? "opposition-optics" : "opposition",
                {{"body", name}, {"time", w.time(*evening.highest)}, {"place", w.place(place)}}),
        brief);
    if (line != nullptr && w.behind_skyline(place)) line->text += w.words("behind-skyline");
  }
  if (line != nullptr) line->at = event.at;
}

/// In the twilight of the evening (east of the Sun) or the morning (west) of its civil date.
void write_elongation(HappeningWriter& w, const Event& event) {
  const bool east = event.kind == EventKind::greatest_elongation_east;
  const Date date = w.civil_date(event.at);
  if (!w.in_month(date)) return;
  const Night* night = w.night(east ? date : date - std::chrono::days(1));
  const std::string name = w.body(event.body);
  const std::string brief = w.words("elongation-brief", {{"body", name}});
  const std::optional<Ut> when = night == nullptr ? std::nullopt
                                 : east           ? night->civil_dusk
                                                  : night->civil_dawn;
  if (when) {
    const Horizontal place = apparent_place(w.sky(), event.body, *when);
    if (place.altitude >= least_useful_height) {
      const std::string text =
          w.words(east ? "elongation-evening" : "elongation-morning",
                  {{"body", name},
                   {"degrees", w.context().words.number(event.value.value_or(0), 0)},
                   {"place", w.place(place)}});
      // A morning on the 1st is in the last night of the month before: it goes by its date.
      HappeningLine* line = w.in_month(w.evening_of(*when))
                                ? w.by_night(*when, rank_elongation, text, brief)
                                : w.by_day(*when, rank_elongation, text, brief);
      if (line != nullptr && w.behind_skyline(place)) line->text += w.words("behind-skyline");
      return;
    }
  }
  w.on_date(date, rank_dull, w.words("elongation-low", {{"body", name}}), brief);
}

/// Meteors an hour to what is honest: fives from ten on, tens from fifty on.
double honest(double rate) {
  if (rate < 10) return std::round(rate);
  return rate < 50 ? 5 * std::round(rate / 5) : 10 * std::round(rate / 10);
}

/// To ten minutes: the hours of a shower are no sharper.
Ut to_ten_minutes(Ut t) { return Ut(Days(std::round(t.days() * 144) / 144)); }

int rank_of(const SiteShower& s) {
  if (!showers()[static_cast<std::size_t>(s.shower)].zhr)
    return 4;  // nobody knows whether it comes
  switch (s.verdict) {
    case Verdict::good:
      return s.expected_per_hour >= 30 ? 0 : 1;
    case Verdict::fair:
      return s.expected_per_hour >= 15 ? 1 : 2;
    default:
      return s.expected_dark >= 40 ? 2 : 5;
  }
}

std::string verdict(const HappeningWriter& w, const SiteShower& s) {
  std::string why;
  switch (s.spoiler) {
    case Spoiler::moon:
      why = w.words("shower-moon", {{"lit", w.percent(s.moon_lit)}});
      break;
    case Spoiler::low_radiant:
      why =
          w.words(s.radiant.altitude < Angle::from_degrees(25) ? "shower-low" : "shower-not-high");
      break;
    case Spoiler::bright_night:
      why = w.words("shower-bright-night");
      break;
    case Spoiler::peak_by_day:
      why = w.words("shower-by-day");
      break;
    case Spoiler::few_meteors:
      why = w.words("shower-few");
      break;
    default:
      why = w.words(s.moon_up ? "shower-moon-thin" : "shower-moon-down");
  }
  const std::string_view key = s.verdict == Verdict::good   ? "shower-good"
                               : s.verdict == Verdict::fair ? "shower-fair"
                                                            : "shower-poor";
  return w.words(key, {{"why", why}});
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
            w.civil_date(event.at), rank_dull, w.words(key, {{"body", w.body(event.body)}}),
            w.words(turns ? "stands-brief" : "near-sun-brief", {{"body", w.body(event.body)}}));
        if (line != nullptr) line->at = event.at;
        break;
      }
      default:
        break;
    }
  }
}

void write_showers(HappeningWriter& w) {
  for (const SiteShower& s : w.context().happenings.showers) {
    if (s.verdict == Verdict::not_seen || !s.best) continue;
    const Shower& shower = showers()[static_cast<std::size_t>(s.shower)];
    const std::string name(shower.name), place = w.place(HappeningWriter::apparent(s.radiant));
    const Ut from = to_ten_minutes(s.best_from.value_or(*s.best)),
             to = to_ten_minutes(s.best_to.value_or(*s.best));
    const double rate = honest(s.expected_per_hour);
    std::string text =
        !shower.zhr ? w.words("shower-varies", {{"name", name}, {"place", place}})
        : rate < 2.0
            ? w.words("shower-single", {{"name", name}, {"place", place}})
            : w.words("shower",
                      {{"name", name}, {"n", w.context().words.number(rate, 0)}, {"place", place}});
    text += " " + verdict(w, s);
    if (HappeningLine* line = w.by_night(from, rank_of(s), text, name);
        line != nullptr && to > from)
      line->when = to - from < std::chrono::hours(23) ? w.span(from, to) : w.words("any-hour");
  }
}

}  // namespace duskleaf
