// Seasons, apsides, clock changes, the order's own dates, and the Sun's year at the site. Seasons
// are named by month, never by hemisphere (this project's conventions).
#include <cmath>

#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

constexpr int rank_own = 0, rank_clocks = 0, rank_season = 1, rank_white_nights = 2,
              rank_extreme = 4, rank_apsis = 5;

int rank_of(EventKind kind) {
  switch (kind) {
    case EventKind::march_equinox:
    case EventKind::june_solstice:
    case EventKind::september_equinox:
    case EventKind::december_solstice:
      return rank_season;
    default:
      return rank_apsis;
  }
}

/// A stretch of nights of one kind: a line on its first date, and one on the day after its last.
void write_stretch(HappeningWriter& w, const DateSpan& stretch, std::string_view key) {
  const auto& words = w.context().words;
  const std::string name(key);
  if (!stretch.begins_before) {
    if (stretch.first == stretch.last)
      w.on_date(stretch.first, rank_white_nights, w.words(name + "-once"),
                w.words(name + "-brief"));
    else
      w.on_date(stretch.first, rank_white_nights,
                stretch.ends_after
                    ? w.words(name + "-begins-long")
                    : w.words(name + "-begins", {{"date", words.day_month(stretch.last)}}),
                w.words(name + "-brief"));
  }
  if (!stretch.ends_after && (stretch.first != stretch.last || stretch.begins_before))
    w.on_date(stretch.last + std::chrono::days(1), rank_white_nights, w.words(name + "-ends"),
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
        w.by_day(event.at, rank_of(event.kind), w.words(key), w.words(key + "-brief"));
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
    HappeningLine* line = w.on_date(old.date(), rank_clocks,
                                    w.words(hours >= 24 ? "date-skipped"
                                            : hours > 0 ? "clocks-forward"
                                                        : "clocks-back",
                                            {{"amount", amount}}),
                                    {});
    if (line != nullptr) {
      line->at = change.at;
      line->when = c.words.time(old);
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
    const std::pair<const std::optional<DayExtreme>*, const char*> of_sun[] = {
        {&extremes.earliest_sunset, "earliest-sunset"},
        {&extremes.latest_sunset, "latest-sunset"},
        {&extremes.earliest_sunrise, "earliest-sunrise"},
        {&extremes.latest_sunrise, "latest-sunrise"}};
    for (const auto& [extreme, key] : of_sun)
      if (*extreme) {
        HappeningLine* line = w.on_date((*extreme)->date, rank_extreme, w.words(key),
                                        w.words(std::string(key) + "-brief"));
        if (line != nullptr) {
          line->at = (*extreme)->at;
          line->when = w.time((*extreme)->at);
        }
      }
    const std::pair<const std::optional<DayExtreme>*, const char*> of_day[] = {
        {&extremes.longest_day, "longest-day"}, {&extremes.shortest_day, "shortest-day"}};
    for (const auto& [extreme, key] : of_day)
      if (*extreme)
        w.on_date((*extreme)->date, rank_extreme,
                  w.words(key, {{"length", c.words.duration((*extreme)->length.count() * 1440)}}),
                  w.words(std::string(key) + "-brief"));
  }
  for (const DateSpan& s : extremes.no_astronomical_night) write_stretch(w, s, "never-dark");
  for (const DateSpan& s : extremes.midnight_sun) write_stretch(w, s, "midnight-sun");
  for (const DateSpan& s : extremes.polar_night) write_stretch(w, s, "polar-night");
}

}  // namespace duskleaf
