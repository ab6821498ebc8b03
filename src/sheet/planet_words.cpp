// Where and when to look for a planet, in whole sentences (words: planet-words.*). What is worth
// saying is this project's own choice.
#include "sheet/planet_words.hpp"

#include <array>
#include <chrono>
#include <optional>

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

// A stay after sunset (before sunrise) is told as a length up to this, then by the clock.
constexpr std::chrono::minutes longest_length = 150min;
// A planet that stands highest so much later than it comes into sight is worth coming back for.
constexpr Days later(1.5 / 24.0);
constexpr Angle near_the_sun = Angle::from_degrees(25);

/// "Low in the west"; within a sentence "low in the west".
std::string place_words(const BlockContext& c, const Horizontal& place, bool begins_sentence) {
  const std::string direction = c.words.direction(place.azimuth);
  switch (height_word(place.altitude)) {
    case HeightWord::low:
      return c.words(begins_sentence ? "planet-words.start-low" : "planet-words.low",
                     {{"direction", direction}});
    case HeightWord::halfway:
      return c.words(begins_sentence ? "planet-words.start-halfway" : "planet-words.halfway",
                     {{"direction", direction}});
    case HeightWord::high:
      return c.words(begins_sentence ? "planet-words.start-high" : "planet-words.high",
                     {{"direction", direction}});
    case HeightWord::overhead:
      break;
  }
  return c.words(begins_sentence ? "planet-words.start-overhead" : "planet-words.overhead");
}

std::string clock(const BlockContext& c, Ut t) { return c.words.time(c.year.place.zone.civil(t)); }

std::string length_words(const BlockContext& c, std::chrono::minutes length) {
  return c.words("planet-words.length-" + std::to_string(length.count()));
}

bool by_light(WindowEdge edge) { return edge == WindowEdge::twilight; }

/// From one moment to another by the clock.
std::string by_the_clock(const BlockContext& c, const PlanetWindow& w) {
  return c.words("planet-words.from-to", {{"place", place_words(c, w.at_best, true)},
                                          {"from", clock(c, w.from)},
                                          {"to", clock(c, w.to)}});
}

/// Seen from dusk to dawn, or around the clock.
std::string all_night(const BlockContext& c, const PlanetWindow& w) {
  if (!w.highest) return c.words("planet-words.all-night");
  return c.words("planet-words.all-night-highest",
                 {{"time", clock(c, *w.highest)}, {"place", place_words(c, *w.at_highest, false)}});
}

std::string evening_words(const BlockContext& c, const PlanetWindow& w) {
  const bool to_dawn = w.ends == WindowEdge::twilight || w.ends == WindowEdge::open;
  const bool from_dusk = w.begins == WindowEdge::twilight || w.begins == WindowEdge::open;
  if (from_dusk && to_dawn) return all_night(c, w);
  const bool climbs = w.highest && *w.highest - w.from > later;
  if (by_light(w.begins) && w.ends == WindowEdge::height) {
    if (w.sunset) {
      const std::chrono::minutes length = spoken_length(w.to - *w.sunset);
      if (length <= longest_length)
        return c.words("planet-words.after-sunset", {{"place", place_words(c, w.at_best, true)},
                                                     {"length", length_words(c, length)}});
    }
    const std::string place = place_words(c, w.at_from, true);
    if (climbs)
      return c.words("planet-words.nightfall-highest",
                     {{"place", place}, {"time", clock(c, *w.highest)}});
    return c.words("planet-words.nightfall-sets",
                   {{"place", place}, {"time", clock(c, w.sets.value_or(w.to))}});
  }
  if (w.begins == WindowEdge::height && to_dawn) {
    const std::string direction = c.words.direction(w.at_from.azimuth), from = clock(c, w.from);
    if (climbs)
      return c.words("planet-words.from-highest",
                     {{"direction", direction}, {"from", from}, {"time", clock(c, *w.highest)}});
    return c.words(
        "planet-words.from-dawn",
        {{"direction", direction}, {"from", from}, {"place", place_words(c, w.at_to, false)}});
  }
  return by_the_clock(c, w);
}

std::string morning_words(const BlockContext& c, const PlanetWindow& w) {
  if (w.begins == WindowEdge::height && by_light(w.ends) && w.sunrise) {
    const std::chrono::minutes length = spoken_length(*w.sunrise - w.from);
    if (length <= longest_length)
      return c.words("planet-words.before-sunrise", {{"place", place_words(c, w.at_best, true)},
                                                     {"length", length_words(c, length)}});
    return c.words("planet-words.from-dawn", {{"direction", c.words.direction(w.at_from.azimuth)},
                                              {"from", clock(c, w.from)},
                                              {"place", place_words(c, w.at_to, false)}});
  }
  return evening_words(c, w);
}

/// ", until the 20th"
std::string with_dates(const BlockContext& c, const std::string& phrase,
                       const std::optional<Date>& first, const std::optional<Date>& last) {
  const auto [year, month] = c.year.span.month(c.month_index);
  const auto day_words = [&](Date date) {
    return c.words("planet-words.day-" + std::to_string(day_of(date)));
  };
  const bool late = first && day_of(*first) > 1;
  const bool early = last && day_of(*last) < days_in_month(year, month);
  if (late && early && *first == *last)
    return c.words("planet-words.on", {{"phrase", phrase}, {"day", day_words(*first)}});
  if (late && early)
    return c.words("planet-words.between",
                   {{"phrase", phrase}, {"from", day_words(*first)}, {"to", day_words(*last)}});
  if (late) return c.words("planet-words.from", {{"phrase", phrase}, {"day", day_words(*first)}});
  if (early) return c.words("planet-words.until", {{"phrase", phrase}, {"day", day_words(*last)}});
  return phrase;
}

/// Whether two windows, of one date or of two, are the same stretch of the night's hours.
bool overlap(const PlanetWindow& a, const PlanetWindow& b) {
  const Days apart((b.date - a.date).count());
  return b.from - apart < a.to && a.from < b.to - apart;
}

}  // namespace

std::string planet_sentence(const BlockContext& c, const PlanetMonth& p) {
  const auto sentence = [&](const std::string& phrase) {
    return c.words(p.optics_only ? "planet-words.sentence-optics" : "planet-words.sentence",
                   {{"phrase", phrase}});
  };
  if (p.sight == PlanetSight::not_visible) {
    if (p.optics_only) return c.words("planet-words.too-faint");
    const bool beside_sun = p.elongation < near_the_sun && -p.elongation < near_the_sun;
    return c.words(beside_sun ? "planet-words.near-sun" : "planet-words.not-visible");
  }
  const auto& evening = p.evening_window;
  const auto& morning = p.morning_window;
  if (evening && morning && overlap(*evening, *morning)) {
    const bool by_evening = p.sight != PlanetSight::morning;
    return sentence(with_dates(
        c, by_evening ? evening_words(c, *evening) : morning_words(c, *morning),
        std::min(p.first_evening, p.first_morning), std::max(p.last_evening, p.last_morning)));
  }
  std::string text;
  if (evening)
    text = sentence(with_dates(c, evening_words(c, *evening), p.first_evening, p.last_evening));
  if (morning) {
    if (!text.empty()) text += ' ';
    text += sentence(with_dates(c, morning_words(c, *morning), p.first_morning, p.last_morning));
  }
  return text;
}

}  // namespace duskleaf
