// The meteor showers as a site sees them: almanac/shower_nights.hpp says how their hours and rates
// are found. Rounded as such numbers deserve (common practice).
#include <algorithm>
#include <array>
#include <cmath>

#include "almanac/nights.hpp"
#include "catalogue/showers.hpp"
#include "sheet/happening_writer.hpp"

namespace duskleaf {
namespace {

/// Meteors an hour to what is honest: fives from ten on, tens from fifty on.
double honest(double rate) {
  if (rate < 10) return std::round(rate);
  return rate < 50 ? 5 * std::round(rate / 5) : 10 * std::round(rate / 10);
}

// Of which people hear: always named where their radiant rises (common practice).
constexpr std::array<std::string_view, 8> famous = {"QUA", "LYR", "ETA", "PER",
                                                    "ORI", "LEO", "GEM", "URS"};
// Others are told from so many an hour on.
constexpr double least_rate = 5;
// How much a dark sky must show more than this one to be worth saying.
constexpr double much_more = 1.5;
// A Moon of which less is lit takes nothing away.
constexpr double thin_moon = 0.1;

double rank_of(const SiteShower& s) {
  switch (s.verdict) {
    case Verdict::good:
      return s.expected_per_hour >= 30 ? 0.3 : 1.2;
    case Verdict::fair:
      return s.expected_per_hour >= 15 ? 1.4 : 2.4;
    default:
      return s.expected_per_hour >= 15 ? 2.2 : 3.4;
  }
}

/// The shower's better hours while the Moon is down, if it is at the best, and the sky dark.
struct Hours {
  Ut from, to;
  bool moon_sets_first = false, moon_rises_after = false;
  bool moonless = false;  // all of them
};

Hours hours_of(const HappeningWriter& w, const SiteShower& s) {
  const SiteSky& sky = w.sky();
  const Hours whole{s.best_from.value_or(*s.best), s.best_to.value_or(*s.best)};
  const Days step(10.0 / 1440), fine(1.0 / 86400), moment(2.0 / 1440), worth_it(45.0 / 1440);
  const bool moon_matters = s.moon_lit >= thin_moon && !sky.moon_up(*s.best);
  const auto moon_allows = [&](Ut t) { return !moon_matters || !sky.moon_up(t); };
  /// From a moment on to both ends of the hours, as far as Moon and Sun allow.
  const auto stretch = [&](Ut middle, Angle sun_below) {
    const auto serves = [&](Ut t) {
      return moon_allows(t) && sky.altitude(Body::sun, t) <= sun_below;
    };
    const auto reach = [&](Ut end, int direction) {
      Ut inside = middle;
      while (inside != end) {
        Ut next = direction > 0 ? std::min(inside + step, end) : std::max(inside - step, end);
        if (serves(next)) {
          inside = next;
          continue;
        }
        while (std::abs((next - inside).count()) > fine.count()) {
          const Ut half = inside + (next - inside) / 2;
          (serves(half) ? inside : next) = half;
        }
        break;
      }
      return inside;
    };
    Hours h{reach(whole.from, -1), reach(whole.to, +1)};
    h.moon_sets_first = !moon_allows(h.from - moment);
    h.moon_rises_after = !moon_allows(h.to + moment);
    h.moonless = !sky.moon_up(middle) && !sky.moon_up(h.from) && !sky.moon_up(h.to);
    return h;
  };
  // The dark moment nearest to the best, which may be in the twilight.
  std::optional<Ut> dark;
  for (Ut t = whole.from; t <= whole.to; t = t + step)
    if (moon_allows(t) && sky.altitude(Body::sun, t) <= astronomical_altitude &&
        (!dark || std::abs((t - *s.best).count()) < std::abs((*dark - *s.best).count())))
      dark = t;
  if (dark)
    if (const Hours h = stretch(*dark, astronomical_altitude); h.to - h.from >= worth_it) return h;
  return stretch(*s.best, civil_altitude);
}

/// To ten minutes, inwards: the hours of a shower are no sharper.
Ut ten_minutes(Ut t, bool up) {
  const double tens = t.days() * 144;
  return Ut(Days((up ? std::ceil(tens - 1e-4) : std::floor(tens + 1e-4)) / 144));
}

std::string verdict(const HappeningWriter& w, const SiteShower& s, const Hours& hours) {
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
      why = hours.moon_sets_first    ? w.words("shower-moon-sets", {{"time", w.time(hours.from)}})
            : hours.moon_rises_after ? w.words("shower-moon-rises", {{"time", w.time(hours.to)}})
            : hours.moonless         ? w.words("shower-moon-down")
                                     : w.words("shower-moon-thin");
  }
  const std::string_view key = s.verdict == Verdict::good   ? "shower-good"
                               : s.verdict == Verdict::fair ? "shower-fair"
                                                            : "shower-poor";
  return w.words(key, {{"why", why}});
}

std::string source(const HappeningWriter& w, const Horizontal& radiant) {
  return radiant.altitude > Angle::from_degrees(80)
             ? w.words("out-of-overhead")
             : w.words("out-of",
                       {{"direction", w.context().words.direction_short(radiant.azimuth)}});
}

void write_shower(HappeningWriter& w, const SiteShower& s) {
  const Shower& shower = showers()[static_cast<std::size_t>(s.shower)];
  const std::string name(shower.name);
  const bool heard_of = std::find(famous.begin(), famous.end(), shower.code) != famous.end();
  if (!s.best) {
    if (heard_of && s.spoiler == Spoiler::bright_night)
      w.on_date(s.night, 3.4, w.words("shower-too-bright", {{"name", name}}), name);
    return;
  }
  if (!heard_of && shower.zhr && s.expected_per_hour < least_rate) return;
  const Hours hours = hours_of(w, s);
  const double rate = honest(s.expected_per_hour);
  const auto n = [&](double value) { return w.context().words.number(value, 0); };
  const std::string from = source(w, s.radiant);
  std::string text;
  if (!shower.zhr) {
    text = w.words("shower-varies", {{"name", name}, {"source", from}});
  } else if (rate < 2) {
    text = w.words("shower-single", {{"name", name}, {"source", from}});
  } else {
    const bool darker = s.expected_dark >= much_more * s.expected_per_hour;
    text = w.words(
        "shower",
        {{"name", name},
         {"n", n(rate)},
         {"dark", darker ? w.words("shower-dark", {{"n", n(honest(s.expected_dark))}}) : ""},
         {"source", from}});
  }
  // Hardly one an hour: why there are few needs no more words.
  if (rate >= 2 || !shower.zhr || s.spoiler != Spoiler::few_meteors)
    text += " " + verdict(w, s, hours);
  const Ut begins = ten_minutes(hours.from, true), ends = ten_minutes(hours.to, false);
  // Nobody knows whether one of no known rate comes.
  const double rank = shower.zhr ? rank_of(s) : fact_rank;
  if (HappeningLine* line = w.by_night(begins < ends ? begins : *s.best, rank, text, name);
      line != nullptr) {
    line->meteors = true;
    if (begins < ends)
      line->when =
          ends - begins < std::chrono::hours(23) ? w.span(begins, ends) : w.words("any-hour");
  }
}

}  // namespace

void write_showers(HappeningWriter& w) {
  for (const SiteShower& s : w.context().happenings.showers) write_shower(w, s);
}

}  // namespace duskleaf
