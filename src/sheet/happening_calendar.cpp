// Seasons, apsides, clock changes, the order's own dates, and the Sun's year at the site. Seasons
// are named by month, never by hemisphere (this project's conventions).
#include <cmath>
#include <tuple>

#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

constexpr double rank_own = 0, rank_clocks = 0, rank_season = 1.9, rank_no_night = 0.9,
                 rank_white_nights = 1.5, rank_extreme = 2.4, rank_length = 2.5;

double rank_of(EventKind kind) {
  switch (kind) {
    case EventKind::march_equinox:
    case EventKind::june_solstice:
    case EventKind::september_equinox:
    case EventKind::december_solstice:
      return rank_season;
    default:
      return fact_rank;
  }
}

/// A stretch of nights of one kind: a line on its first date, and one on the day after its last.
void write_stretch(HappeningWriter& w, const DateSpan& stretch, double rank, std::string_view key) {
  const auto& words = w.context().words;
  const std::string name(key);
  if (!stretch.begins_before) {
    if (stretch.first == stretch.last)
      w.on_date(stretch.first, rank, w.words(name + "-once"), w.words(name + "-brief"));
    else
      w.on_date(stretch.first, rank,
                stretch.ends_after
                    ? w.words(name + "-begins-long")
                    : w.words(name + "-begins", {{"date", words.day_month(stretch.last)}}),
                w.words(name + "-brief"));
  }
  if (!stretch.ends_after && (stretch.first != stretch.last || stretch.begins_before))
    w.on_date(stretch.last + std::chrono::days(1), rank, w.words(name + "-ends"),
              w.words(name + "-ends-brief"));
}

}  // namespace

void write_calendar(HappeningWriter& w) {
  const BlockContext& c = w.context();
  for (const Event& event : c.year.global) {
    switch (event.kind) {
      case EventKind::march_equinox:
      case EventKind::june_solstice:
      case EventKind::september_equinox:
      case EventKind::december_solstice:
      case EventKind::perihelion:
      case EventKind::aphelion:
      case EventKind::perigee:
      case EventKind::apogee: {
        const std::string key = event_name(event.kind);
        w.fact(event.at, rank_of(event.kind), w.words(key), w.words(key + "-brief"));
        break;
      }
      default:
        break;
    }
  }
  for (const ClockChange& change : c.year.clock_changes) {
    const double hours =
        std::chrono::duration<double, std::ratio<3600>>(change.after - change.before).count();
    const double size = std::abs(hours);
    const std::string amount =
        size == 1
            ? w.words("one-hour")
            : w.words("hours", {{"n", c.words.number(size, size == std::floor(size) ? 0 : 1)}});
    // The clock reads the old time until the change: that is when to turn it.
    const CivilMinute old = [&] {
      CivilMinute m = c.year.place.zone.civil(change.at);
      m.time += std::chrono::duration_cast<std::chrono::minutes>(change.before - m.offset);
      m.offset = change.before;
      return m;
    }();
    const bool of_night = hours < 24 && old.hour() < 12 && w.before_sunrise(change.at);
    const Date date = old.date() - std::chrono::days(of_night ? 1 : 0);
    HappeningLine* line = w.on_date(date, rank_clocks,
                                    w.words(hours >= 24 ? "date-skipped"
                                            : hours > 0 ? "clocks-forward"
                                                        : "clocks-back",
                                            {{"amount", amount}}),
                                    {});
    if (line != nullptr) {
      line->at = change.at;
      line->when = c.words.time(old);
      if (date != old.date()) line->after_midnight = old.date();
    }
  }
  for (const OwnDate& own : c.site.dates) {
    const Date date = std::max(own.from, w.first_of_month());
    if (own.to < date) continue;
    if (HappeningLine* line = w.on_date(date, rank_own, own.text, {})) {
      line->own = true;
      if (own.from != own.to) line->when = w.words("until", {{"date", c.words.day_month(own.to)}});
    }
  }
}

void write_year_extremes(HappeningWriter& w) {
  const BlockContext& c = w.context();
  const YearExtremes& extremes = c.happenings.extremes;
  // Near the equator the Sun's year is too even for anyone to notice.
  const bool notable =
      extremes.longest_day && extremes.shortest_day &&
      (extremes.longest_day->length - extremes.shortest_day->length) > std::chrono::hours(1);
  if (notable) {
    const std::tuple<const std::optional<DayExtreme>*, const char*, bool> of_sun[] = {
        {&extremes.earliest_sunset, "earliest-sunset", true},
        {&extremes.latest_sunset, "latest-sunset", true},
        {&extremes.earliest_sunrise, "earliest-sunrise", false},
        {&extremes.latest_sunrise, "latest-sunrise", false}};
    for (const auto& [extreme, key, is_sunset] : of_sun)
      if (*extreme) {
        // A sunset after midnight is still the evening's.
        const auto at = (*extreme)->at;
        const std::string text = w.words(key), brief = w.words(std::string(key) + "-brief");
        HappeningLine* line = is_sunset ? w.by_night(at, rank_extreme, text, brief)
                                        : w.by_day(at, rank_extreme, text, brief);
        if (line != nullptr) line->sight = false;
      }
    const std::pair<const std::optional<DayExtreme>*, const char*> of_day[] = {
        {&extremes.longest_day, "longest-day"}, {&extremes.shortest_day, "shortest-day"}};
    for (const auto& [extreme, key] : of_day)
      if (*extreme)
        w.on_date((*extreme)->date, rank_length,
                  w.words(key, {{"length", c.words.duration((*extreme)->length.count() * 1440)}}),
                  w.words(std::string(key) + "-brief"));
  }
  for (const DateSpan& s : extremes.no_astronomical_night)
    write_stretch(w, s, rank_white_nights, "never-dark");
  for (const DateSpan& s : extremes.midnight_sun)
    write_stretch(w, s, rank_no_night, "midnight-sun");
  for (const DateSpan& s : extremes.polar_night) write_stretch(w, s, rank_no_night, "polar-night");
}

}  // namespace duskleaf
