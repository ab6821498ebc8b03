// Gathers the month's lines, orders them and chooses. Nights by the date of their evening: common
// practice of observers' logs.
#include "sheet/happening_lines.hpp"

#include <algorithm>
#include <cmath>

#include "almanac/skyline.hpp"
#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "order/order.hpp"
#include "sheet/happening_writer.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {

HappeningWriter::HappeningWriter(const BlockContext& c)
    : c_(c),
      first_([&] {
        const auto [year, month] = c.year.span.month(c.month_index);
        return make_date(year, month, 1);
      }()),
      end_(first_ + std::chrono::days(days_in_month(year_of(first_), month_of(first_)))),
      sky_(c.ephemeris, c.year.place.observer, ut_midnight(first_) - Days(3),
           ut_midnight(end_) + Days(3)) {}

bool HappeningWriter::in_month(Date date) const { return first_ <= date && date < end_; }

Date HappeningWriter::civil_date(Ut t) const { return c_.year.place.zone.civil(t).date(); }

Date HappeningWriter::evening_of(Ut t) const {
  const CivilMinute civil = c_.year.place.zone.civil(t);
  Date date = civil.date();
  if (civil.hour() >= 12) return date;
  date -= std::chrono::days(1);
  // A zone that has skipped a date goes on from the one before it.
  while (c_.year.place.zone.start_of(date) ==
         c_.year.place.zone.start_of(date + std::chrono::days(1)))
    date -= std::chrono::days(1);
  return date;
}

const Night* HappeningWriter::night(Date date) const {
  const auto at = (date - c_.year.span.first_day()).count();
  if (at < 0 || at >= static_cast<long>(c_.year.nights.size())) return nullptr;
  return &c_.year.nights[static_cast<std::size_t>(at)];
}

std::string HappeningWriter::words(std::string_view key, Values values) const {
  return c_.words("happening." + std::string(key), values);
}
std::string HappeningWriter::time(Ut t) const { return c_.words.time(c_.year.place.zone.civil(t)); }
std::string HappeningWriter::span(Ut from, Ut to) const {
  return words("span", {{"from", time(from)}, {"to", time(to)}});
}
std::string HappeningWriter::minutes_seconds(Ut from, Ut to) const {
  const long seconds = std::lround(Seconds(to - from).count());
  return words("minutes-seconds",
               {{"m", std::to_string(seconds / 60)}, {"s", std::to_string(seconds % 60)}});
}
std::string HappeningWriter::percent(double fraction) const {
  const double shown = fraction < 1 ? std::min(std::round(100 * fraction), 99.0) : 100.0;
  return words("percent", {{"n", c_.words.number(shown, 0)}});
}
std::string HappeningWriter::body(Body b) const {
  return c_.words("body." + std::string(body_name(b)));
}

std::string HappeningWriter::place(const Horizontal& h) const {
  const double altitude = std::max(h.altitude.degrees(), 0.0);
  if (altitude >= 80) return words("overhead");
  return words("place", {{"altitude", c_.words.number(altitude, 0)},
                         {"direction", c_.words.direction_short(h.azimuth)}});
}

std::string HappeningWriter::target(const Target& target) const {
  constexpr double well_known = 1.7;  // magnitude; common practice
  if (target.sort == Target::Sort::body) return body(target.body);
  const std::string key = "happening.target-" + std::string(target.name);
  if (c_.words.has(key)) return c_.words(key);
  if (target.star < 0) return std::string(target.name);
  const Star& star = stars()[static_cast<std::size_t>(target.star)];
  const std::string_view letter = star.bayer.empty() ? star.flamsteed : star.bayer;
  std::string designation =
      std::string(letter) + "\u00A0" +
      std::string(constellations()[static_cast<std::size_t>(star.constellation)].genitive);
  if (star.name.empty()) return designation;
  // Fainter stars are known by their letters: their names were given lately.
  if (target.magnitude <= well_known) return std::string(star.name);
  return words("star-with-name", {{"star", designation}, {"name", std::string(star.name)}});
}

bool HappeningWriter::behind_skyline(const Horizontal& apparent) const {
  return !c_.year.place.skyline.empty() && !above_skyline(c_.year.place.skyline, apparent);
}
Horizontal HappeningWriter::apparent(const Horizontal& h) {
  return {h.altitude + refraction(h.altitude), h.azimuth};
}

PlanetSight HappeningWriter::planet_sight(Body planet, Date evening) const {
  const Night* of = night(evening);
  if (of == nullptr) return PlanetSight::not_visible;
  auto& samples = planet_nights_[evening];
  if (!samples) samples = std::make_unique<const PlanetNight>(sky_, c_.year, *of);
  const double magnitude =
      planet_magnitude(planet, planet_aspect(c_.ephemeris, planet, to_tt(of->darkest)));
  const bool optics = planet == Body::uranus || planet == Body::neptune;
  return see_planet(sky_, *samples, planet, magnitude, optics).sight;
}

HappeningLine* HappeningWriter::by_night(Ut at, double rank, std::string text, std::string brief) {
  const Date evening = evening_of(at), date = civil_date(at);
  if (!in_month(evening)) return nullptr;
  HappeningLine line{evening, std::nullopt,     at,  time(at), std::move(text),
                     {},      std::move(brief), rank};
  if (date != evening) line.after_midnight = date;
  line.sight = true;
  return &lines_.emplace_back(std::move(line));
}

bool HappeningWriter::before_sunrise(Ut at) const {
  return c_.year.place.zone.civil(at).hour() < 12 &&
         sky_.altitude(Body::sun, at) < sun_rise_altitude;
}

HappeningLine* HappeningWriter::fact(Ut at, double rank, std::string text, std::string brief) {
  HappeningLine* line = before_sunrise(at) ? by_night(at, rank, std::move(text), std::move(brief))
                                           : by_day(at, rank, std::move(text), std::move(brief));
  if (line != nullptr) line->sight = false;
  return line;
}

HappeningLine* HappeningWriter::by_day(Ut at, double rank, std::string text, std::string brief) {
  const Date date = civil_date(at);
  if (!in_month(date)) return nullptr;
  return &lines_.emplace_back(
      HappeningLine{date, std::nullopt, at, time(at), std::move(text), {}, std::move(brief), rank});
}

HappeningLine* HappeningWriter::on_date(Date date, double rank, std::string text,
                                        std::string brief) {
  if (!in_month(date)) return nullptr;
  return &lines_.emplace_back(HappeningLine{date,
                                            std::nullopt,
                                            c_.year.place.zone.start_of(date),
                                            {},
                                            std::move(text),
                                            {},
                                            std::move(brief),
                                            rank});
}

namespace {
void sort_by_date(std::vector<HappeningLine>& lines) {
  std::stable_sort(lines.begin(), lines.end(), [](const HappeningLine& a, const HappeningLine& b) {
    return a.date != b.date ? a.date < b.date : a.at < b.at;
  });
}

/// The best sight of the month, and a second one as rare as a great shower or an opposition.
void mark_best(std::vector<HappeningLine>& lines) {
  constexpr double worth_it = 3, rare = 1.01;
  std::vector<HappeningLine*> sights;
  for (HappeningLine& line : lines)
    if (line.sight && line.rank < worth_it) sights.push_back(&line);
  std::stable_sort(sights.begin(), sights.end(),
                   [](const auto* a, const auto* b) { return a->rank < b->rank; });
  for (std::size_t i = 0; i < std::min<std::size_t>(sights.size(), 2); ++i)
    sights[i]->best = i == 0 || sights[i]->rank < rare;
}

/// What falls on a night on which the group meets comes before its like.
void prefer_own_nights(const BlockContext& c, std::vector<HappeningLine>& lines) {
  for (const Session& session : c.site.sessions)
    for (const Date date : session_dates(session, c.year.span))
      for (HappeningLine& line : lines)
        if (line.sight && line.date == date && line.rank < fact_rank - 1) line.rank *= 0.25;
}

}  // namespace

std::vector<HappeningLine> happening_lines(const BlockContext& c) {
  HappeningWriter writer(c);
  write_calendar(writer);
  write_year_extremes(writer);
  write_eclipses(writer);
  write_showers(writer);
  write_configurations(writer);
  write_meetings(writer);
  std::vector<HappeningLine> lines = writer.take();
  sort_by_date(lines);
  mark_best(lines);
  prefer_own_nights(c, lines);
  return lines;
}

HappeningChoice choose_lines(std::vector<HappeningLine> lines, std::size_t most) {
  constexpr std::size_t most_own = 16;  // a sheet of nights is no diary
  HappeningChoice choice;
  const auto is_fact = [](const HappeningLine& l) {
    return l.rank >= fact_rank && !l.brief.empty() && !l.own;
  };
  const auto facts = static_cast<std::size_t>(std::count_if(lines.begin(), lines.end(), is_fact));
  // The closing line takes a line itself: a single one is told rather than counted.
  if (facts == 0 && lines.size() <= most + 1) most = lines.size();
  std::stable_sort(lines.begin(), lines.end(), [](const HappeningLine& a, const HappeningLine& b) {
    if (a.own != b.own) return a.own;
    return a.rank < b.rank;
  });
  std::size_t own = 0;
  for (HappeningLine& line : lines) {
    const bool stays = line.own
                           ? ++own <= most_own
                           : line.brief.empty() || (choice.shown.size() < most && !is_fact(line));
    if (!stays && line.own) line.brief = line.text;
    (stays ? choice.shown : choice.left_out).push_back(std::move(line));
  }
  sort_by_date(choice.shown);
  sort_by_date(choice.left_out);
  return choice;
}

}  // namespace duskleaf
