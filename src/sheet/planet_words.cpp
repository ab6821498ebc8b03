// Where and when to look for a planet, in whole sentences (words: planet-words.*). What is worth
// saying is this project's own choice.
#include "sheet/planet_words.hpp"

#include <chrono>
#include <optional>

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

// A stay after sunset (before sunrise) is told as a length up to this, then by the clock.
constexpr std::chrono::minutes longest_length = 150min;
// A planet that stands highest so much later than it comes into sight is worth coming back for.
constexpr Days later(1.5 / 24.0);
constexpr Angle near_the_sun = Angle::from_degrees(28);
// What almanac/planet_months.hpp asks of the Sun for the bare eye and for binoculars.
constexpr Angle eyes_need_sun = Angle::from_degrees(-5), optics_need_sun = Angle::from_degrees(-12);

struct Teller {
  const Words& words;
  const Zone& zone;
  int days;  // of the month
};

/// "Low in the west"; within a sentence "low in the west".
std::string place_words(const Teller& c, const Horizontal& place, bool begins_sentence) {
  const std::string direction = c.words.direction(place.azimuth);
  switch (height_word(place.altitude)) {
    case HeightWord::low:
      return c.words(begins_sentence ? "planet-words.start-low" : "planet-words.low",
                     {{"direction", direction}});
    case HeightWord::fairly_low:
      return c.words(begins_sentence ? "planet-words.start-fairly-low" : "planet-words.fairly-low",
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

std::string clock(const Teller& c, Ut t) { return c.words.time(c.zone.civil(t)); }

/// By the clock, for what neither dusk nor dawn bounds.
std::string by_the_clock(const Teller& c, const PlanetWindow& w) {
  const std::string from = clock(c, w.from), to = clock(c, w.to);
  if (w.highest)
    return c.words("planet-words.from-to-highest",
                   {{"from", from},
                    {"to", to},
                    {"time", clock(c, *w.highest)},
                    {"place", place_words(c, *w.at_highest, false)}});
  const Horizontal& higher = w.at_from.altitude > w.at_to.altitude ? w.at_from : w.at_to;
  return c.words("planet-words.from-to",
                 {{"place", place_words(c, higher, true)}, {"from", from}, {"to", to}});
}

/// "Low in the west for an hour after sunset"; `brief`: without the length.
std::string beside_the_sun(const Teller& c, const PlanetWindow& w, bool evening,
                           std::chrono::minutes length, bool brief) {
  const std::string place = place_words(c, w.at_best, true);
  if (brief)
    return c.words(
        evening ? "planet-words.after-sunset-brief" : "planet-words.before-sunrise-brief",
        {{"place", place}});
  return c.words(evening ? "planet-words.after-sunset" : "planet-words.before-sunrise",
                 {{"place", place},
                  {"length", c.words("planet-words.length-" + std::to_string(length.count()))}});
}

std::string window_words(const Teller& c, const PlanetWindow& w, bool brief = false) {
  const bool climbs = w.highest && *w.highest - w.from > later;
  const bool from_dusk = w.begins != WindowEdge::height, to_dawn = w.ends != WindowEdge::height;
  if (from_dusk && to_dawn) {
    if (!w.highest) {
      // Without a transit in it, it stands highest at an end, if not when it is best looked at.
      const Horizontal* highest = &w.at_best;
      for (const Horizontal* end : {&w.at_from, &w.at_to})
        if (end->altitude > highest->altitude) highest = end;
      return c.words("planet-words.all-night-best", {{"place", place_words(c, *highest, false)}});
    }
    return c.words(
        "planet-words.all-night-highest",
        {{"time", clock(c, *w.highest)}, {"place", place_words(c, *w.at_highest, false)}});
  }
  if (w.begins == WindowEdge::twilight) {
    if (w.sunset) {
      const std::chrono::minutes length = spoken_length(w.to - *w.sunset);
      if (length <= longest_length) return beside_the_sun(c, w, true, length, brief);
    }
    const std::string place = place_words(c, w.at_from, true);
    if (climbs)
      return c.words("planet-words.nightfall-highest",
                     {{"place", place}, {"time", clock(c, *w.highest)}});
    return c.words(w.sets ? "planet-words.nightfall-sets" : "planet-words.nightfall-low",
                   {{"place", place}, {"time", clock(c, w.sets.value_or(w.to))}});
  }
  if (w.ends == WindowEdge::twilight) {
    if (w.sunrise) {
      const std::chrono::minutes length = spoken_length(*w.sunrise - w.from);
      if (length <= longest_length) return beside_the_sun(c, w, false, length, brief);
    }
    const std::string direction = c.words.direction(w.at_from.azimuth), from = clock(c, w.from);
    return climbs && w.to - *w.highest > later
               ? c.words("planet-words.from-highest",
                         {{"direction", direction}, {"from", from}, {"time", clock(c, *w.highest)}})
               : c.words("planet-words.from-dawn", {{"direction", direction},
                                                    {"from", from},
                                                    {"place", place_words(c, w.at_to, false)}});
  }
  return by_the_clock(c, w);
}

/// ", until the 20th"
std::string with_dates(const Teller& c, const std::string& phrase, const std::optional<Date>& first,
                       const std::optional<Date>& last) {
  const auto day_words = [&](Date date) {
    return c.words("planet-words.day-" + std::to_string(day_of(date)));
  };
  const bool late = first && day_of(*first) > 1;
  const bool early = last && day_of(*last) < c.days;
  if (first && last && *first == *last)
    return c.words("planet-words.on", {{"phrase", phrase}, {"day", day_words(*first)}});
  if (late && early)
    return c.words("planet-words.between",
                   {{"phrase", phrase}, {"from", day_words(*first)}, {"to", day_words(*last)}});
  if (late) return c.words("planet-words.from", {{"phrase", phrase}, {"day", day_words(*first)}});
  if (early) return c.words("planet-words.until", {{"phrase", phrase}, {"day", day_words(*last)}});
  return phrase;
}

bool is_cut(const PlanetWindow& w) {
  return w.begins == WindowEdge::open || w.ends == WindowEdge::open;
}

/// Whether two windows, of one date or of two, are the same stretch of the night's hours.
bool overlap(const PlanetWindow& a, const PlanetWindow& b) {
  const Days apart((b.date - a.date).count());
  return b.from - apart < a.to && a.from < b.to - apart;
}

}  // namespace

std::string planet_sentence(const Words& words, const Zone& zone, const PlanetMonth& p) {
  const Teller c{words, zone, days_in_month(year_of(p.best_date), month_of(p.best_date))};
  const auto sentence = [&](const std::string& phrase) {
    return c.words(p.optics_only ? "planet-words.sentence-optics" : "planet-words.sentence",
                   {{"phrase", phrase}});
  };
  if (p.sight == PlanetSight::not_visible) {
    if (p.darkest_sun > (p.optics_only ? optics_need_sun : eyes_need_sun))
      return c.words("planet-words.not-seen-bright");
    const bool beside_sun = p.elongation < near_the_sun && -p.elongation < near_the_sun;
    return c.words(beside_sun ? "planet-words.not-seen-sun" : "planet-words.not-seen-low");
  }
  std::optional<PlanetWindow> evening = p.evening_window, morning = p.morning_window;
  if (evening && morning && overlap(*evening, *morning))
    return sentence(with_dates(
        c, window_words(c, p.sight == PlanetSight::morning ? *morning : *evening),
        std::min(p.first_evening, p.first_morning), std::max(p.last_evening, p.last_morning)));
  // Where the Sun stays down a stretch may run on past the noon at which nights are cut.
  if (evening && morning && is_cut(*evening) != is_cut(*morning))
    (is_cut(*evening) ? evening : morning).reset();
  const bool brief = evening && morning;
  std::string text;
  if (evening)
    text =
        sentence(with_dates(c, window_words(c, *evening, brief), p.first_evening, p.last_evening));
  if (morning) {
    if (brief) text += ' ';
    text +=
        sentence(with_dates(c, window_words(c, *morning, brief), p.first_morning, p.last_morning));
  }
  return text;
}

std::string planet_sentence(const BlockContext& c, const PlanetMonth& p) {
  return planet_sentence(c.words, c.year.place.zone, p);
}

}  // namespace duskleaf
