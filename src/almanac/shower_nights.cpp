// Expected rate: ZHR a sin(h) r^(m - 6.5), the reduction of visual counts (R. Koschack & J. Rendtel
// 1990, WGN 18, 44; from memory) turned round: h the radiant's altitude, r the population index, m
// the faintest star that the sky shows then (almanac/planets.hpp: the site's limit, twilight and
// Moon), and a the activity at that hour beside the peak's, a = 10^(-B |d|), d degrees of the Sun's
// longitude from the peak at its mean rate, B from the table, unequal before and after (P.
// Jenniskens 1994, A&A 287, 990). One observer who sees the whole sky, without cloud. The radiant
// stays where it is at the peak; the Earth's pull and spin, which move that of slow meteors by
// some degrees, are left out.
//
// The night is that of the peak or the next nearest, whichever gives more; "night" is when the Sun
// is below -6 degrees. Its best moment is sought to five minutes.
//
// The best hours are those with half of the best moment's rate or more. Where the Moon is down at
// that moment but up in some of them, they end or begin with its rise or set, so long as 45 minutes
// are left whose mean rate is no less than that of the hours given up; else they stay, and the row
// says that the Moon is up.
//
// Verdict, this project's own: the worst of four grades. good / fair asks for
//   meteors an hour at best                       10 / 3
//   part of them that the Moon leaves           0.8 / 0.6  (best hours with and without it)
//   part that twilight leaves of the rest       0.8 / 0.6  (the same)
//   radiant's greatest altitude                   30 / 15 degrees
// and less is poor; not seen where the radiant is not up by night, or there is no night. A shower
// without a steady rate is poor, since there are too few: in nearly every year it gives a meteor an
// hour or none (International Meteor Organization, 2025 Meteor Shower Calendar: it lists their ZHR
// as variable), and an outburst cannot be promised.
// What spoils it: too few meteors where their number decides and this sky would not give the next
// better grade with the radiant overhead at the peak, without Moon or twilight, unless these take
// half of them or more; else what leaves
// least, of Moon, twilight, the altitude (its sine) and the hour's distance from the peak: of those
// whose own grade is the verdict, or, where the number decides, of those whose own grade is not
// good if there are any, so that a radiant 30 degrees high takes no blame from the Moon.
#include "almanac/shower_nights.hpp"

#include <algorithm>
#include <array>
#include <chrono>
#include <cmath>

#include "almanac/nights.hpp"
#include "almanac/planets.hpp"
#include "events/search.hpp"
#include "sky/brightness.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

constexpr double sun_degrees_a_day = 360.0 / 365.2422;
constexpr double dark_limit = 6.5;
constexpr Days least_window(45.0 / 1440), half_hour(30.0 / 1440), two_minutes(2.0 / 1440),
    one_second(1.0 / 86400);
// Shorter steps about the best of the coarse ones.
constexpr Days finer[] = {Days(15.0 / 1440), Days(5.0 / 1440), Days(5.0 / 1440)};

/// One shower in one night.
class ShowerNight {
 public:
  ShowerNight(const SiteSky& sky, double site_limit, const ShowerPeak& peak, const TimeSpan& night)
      : sky_(sky),
        limit_(site_limit),
        shower_(showers()[static_cast<std::size_t>(peak.shower)]),
        peak_(peak.at),
        night_(night),
        radiant_(sky.ephemeris().icrs_to_date(to_tt(night.from + (night.to - night.from) / 2)) *
                 shower_.direction()) {
    sample();
  }

  enum class Sky { actual, moonless, dark };
  /// Moment and value of the greatest rate in the night; value 0 where there is none.
  struct Greatest {
    Ut at;
    double value = 0.0;
  };
  /// Only what is greater than `floor` matters to the caller.
  Greatest best(Sky sky, double floor = 0.0) const {
    Greatest greatest{night_.from, 0.0};
    // The samples stand by what the sky can only take from.
    for (const Sample& s : samples_) {
      if (s.most <= std::max(floor, greatest.value)) break;
      take(greatest, s.at, sky);
    }
    if (greatest.value <= 0.0) return greatest;
    for (const Days step : finer) {
      const Ut middle = greatest.at;
      for (const int side : {-1, 1})
        take(greatest, std::clamp(middle + step * side, night_.from, night_.to - one_second), sky);
    }
    return greatest;
  }

  double activity(Ut t) const {
    const double days = (t - peak_).count();
    const double steepness = days < 0.0 ? shower_.rise : shower_.fall;
    return std::pow(10.0, -steepness * std::abs(days) * sun_degrees_a_day);
  }
  /// Meteors an hour for a ZHR of 1; 0 where the radiant is down or the Sun is not below -6.
  double rate(Ut t, Sky sky) const {
    if (!is_night(t)) return 0.0;
    double faintest = limit_;  // Sky::dark
    if (sky == Sky::actual) faintest = sky_light(sky_, limit_, t).faintest_star;
    if (sky == Sky::moonless)
      faintest = faintest_star(limit_, sky_.altitude(Body::sun, t), Angle::from_degrees(-90), 0.0);
    return most(t) * std::pow(shower_.population_index, faintest - limit_);
  }
  Horizontal radiant(Ut t) const {
    return to_horizontal(radiant_, sky_.local_sidereal_time(t), sky_.observer().latitude);
  }
  /// Where the stretch about `best` with half of its rate or more begins (ends), to two minutes.
  Ut half_rate(const Greatest& best, int direction) const {
    Ut inside = best.at, outside = inside;
    do {
      inside = outside;
      outside = std::clamp(inside + half_hour * direction, night_.from, night_.to);
      if (outside == inside) return inside;
    } while (rate(outside, Sky::actual) >= 0.5 * best.value);
    while (std::abs((outside - inside).count()) > two_minutes.count()) {
      const Ut middle = inside + (outside - inside) / 2;
      (rate(middle, Sky::actual) >= 0.5 * best.value ? inside : outside) = middle;
    }
    return inside;
  }

  /// Whether the mean rate in [from, to] is no less than in the rest of [all_from, all_to].
  bool no_less_within(Ut from, Ut to, Ut all_from, Ut all_to) const {
    constexpr int samples = 24;
    double sum[2] = {}, count[2] = {};
    for (int i = 0; i < samples; ++i) {
      const Ut t = all_from + (all_to - all_from) * ((i + 0.5) / samples);
      const bool within = from <= t && t <= to;
      sum[within] += rate(t, Sky::actual);
      count[within] += 1.0;
    }
    return count[0] == 0.0 || sum[1] * count[0] >= sum[0] * count[1];
  }

  bool has_night() const { return has_night_; }
  Angle highest() const { return highest_; }

 private:
  struct Sample {
    Ut at;
    double most;
  };

  double radiant_sine(Ut t) const {
    return sine_of_altitude(radiant_, sky_.local_sidereal_time(t), sky_.observer().latitude);
  }
  /// The rate under the site's limit without Moon and twilight.
  double most(Ut t) const {
    return activity(t) * std::max(0.0, radiant_sine(t)) *
           std::pow(shower_.population_index, limit_ - dark_limit);
  }
  void take(Greatest& greatest, Ut t, Sky sky) const {
    const double value = rate(t, sky);
    if (value > greatest.value) greatest = {t, value};
  }
  bool is_night(Ut t) const { return sky_.altitude(Body::sun, t) < civil_altitude; }
  /// Where night and day meet between two moments, on the night's side, to a few seconds.
  Ut edge(Ut night, Ut day) const {
    for (int i = 0; i < 8; ++i) {
      const Ut middle = night + (day - night) / 2;
      (is_night(middle) ? night : day) = middle;
    }
    return night;
  }
  void sample() {
    const DarkestMoment darkest = darkest_moment(sky_, night_.from, night_.to);
    has_night_ = darkest.sun_altitude < civil_altitude;
    highest_ = radiant(darkest.at).altitude;
    if (!has_night_) return;
    std::vector<Ut> times = {darkest.at};
    Ut last = night_.from;
    bool last_is_night = is_night(last);
    for (Ut t = last; t < night_.to; t = t + half_hour) {
      const bool now = is_night(t);
      if (now != last_is_night) times.push_back(now ? edge(t, last) : edge(last, t));
      if (now) times.push_back(t);
      last = t;
      last_is_night = now;
    }
    double highest = sin(highest_);
    for (const Ut t : times) {
      const double sine = radiant_sine(t);
      highest = std::max(highest, sine);
      if (sine > 0.0) samples_.push_back({t, most(t)});
    }
    highest_ = arcsin(highest);
    std::sort(samples_.begin(), samples_.end(),
              [](const Sample& a, const Sample& b) { return a.most > b.most; });
  }

  const SiteSky& sky_;
  double limit_;
  const Shower& shower_;
  Ut peak_;
  TimeSpan night_;
  Eigen::Vector3d radiant_;
  bool has_night_ = false;
  Angle highest_;
  std::vector<Sample> samples_;  // while the radiant is up by night, the greatest first
};

Verdict grade(double value, double good, double fair) {
  return value >= good ? Verdict::good : value >= fair ? Verdict::fair : Verdict::poor;
}
Verdict grade_of_rate(double an_hour) { return grade(an_hour, 10.0, 3.0); }
Verdict grade_of_part(double part) { return grade(part, 0.8, 0.6); }

/// The date whose night, noon to noon, holds the instant.
Date night_date(const Zone& zone, Ut t) {
  Date date = zone.civil(t).date() + std::chrono::days(1);
  while (night_span(zone, date).from > t || is_skipped(zone, date)) date -= std::chrono::days(1);
  return date;
}
/// The nearest date in a direction that the zone has.
Date next_date(const Zone& zone, Date date, int direction) {
  do date += std::chrono::days(direction);
  while (is_skipped(zone, date));
  return date;
}

/// Fits the best hours to the Moon: header.
void fit_to_moon(const SiteSky& sky, const ShowerNight& night, SiteShower& row) {
  const auto excess = [&](Ut t) { return SiteSky::moon_excess(sky.sight(Body::moon, t)); };
  const std::vector<Crossing> crossings =
      find_crossings(excess, *row.best_from, *row.best_to, {half_hour, Seconds(1.0)});
  if (crossings.empty()) return;
  if (!row.moon_up) {
    Ut from = *row.best_from, to = *row.best_to;
    for (const Crossing& c : crossings) {
      if (c.at <= *row.best) from = c.at;
      if (c.at > *row.best) to = std::min(to, c.at);
    }
    if (to - from >= least_window && night.no_less_within(from, to, *row.best_from, *row.best_to)) {
      row.best_from = from;
      row.best_to = to;
      return;
    }
  }
  row.moon_up = true;
  for (const Crossing& c : crossings) {
    std::optional<Ut>& first = c.rising ? row.moon_rises : row.moon_sets;
    if (!first) first = c.at;
  }
}

SiteShower judge(const SiteSky& sky, double limit, const ShowerPeak& peak, Date date,
                 const ShowerNight& night, const ShowerNight::Greatest& best) {
  using Sky = ShowerNight::Sky;
  const Shower& shower = showers()[static_cast<std::size_t>(peak.shower)];
  SiteShower row{};
  row.shower = peak.shower;
  row.peak = peak.at;
  row.night = date;
  row.radiant_highest = night.highest();
  const Ut at = best.value > 0.0 ? best.at : peak.at;
  row.radiant = night.radiant(at);
  row.moon_lit = moon_lit_fraction(sky.ephemeris(), to_tt(at));
  row.moon_up = sky.moon_up(at);
  if (best.value <= 0.0) {
    row.verdict = Verdict::not_seen;
    const Angle from_zenith = sky.observer().latitude - shower.declination;
    const bool never_up = std::abs(from_zenith.degrees()) >= 90.0;
    row.spoiler = night.has_night() || never_up ? Spoiler::radiant_down : Spoiler::bright_night;
    return row;
  }
  row.best = best.at;
  row.best_from = night.half_rate(best, -1);
  row.best_to = night.half_rate(best, +1);
  fit_to_moon(sky, night, row);
  if (!shower.zhr) {
    row.verdict = Verdict::poor;
    row.spoiler = Spoiler::few_meteors;
    return row;
  }
  const double zhr = *shower.zhr;
  row.expected_per_hour = zhr * best.value;
  row.expected_dark = zhr * night.activity(best.at) * sin(row.radiant.altitude);

  const double moonless = night.best(Sky::moonless).value, dark = night.best(Sky::dark).value;
  struct Part {
    double left;
    Verdict grade;
    Spoiler spoiler;
  };
  const double moon = best.value / moonless, twilight = moonless / dark;
  const Part parts[] = {{moon, grade_of_part(moon), Spoiler::moon},
                        {sin(row.radiant_highest), grade(row.radiant_highest.degrees(), 30.0, 15.0),
                         Spoiler::low_radiant},
                        {twilight, grade_of_part(twilight), Spoiler::bright_night},
                        {night.activity(best.at), Verdict::good, Spoiler::peak_by_day}};
  const Verdict by_rate = grade_of_rate(row.expected_per_hour);
  Verdict worst_part = Verdict::good;
  for (const Part& part : parts) worst_part = std::max(worst_part, part.grade);
  row.verdict = std::max(by_rate, worst_part);
  row.spoiler = Spoiler::none;
  if (row.verdict == Verdict::good) return row;
  const bool rate_decides = by_rate == row.verdict;
  const double overhead = zhr * std::pow(shower.population_index, limit - dark_limit);
  // Where the Moon or twilight takes most of them, people ask for that, few as they are.
  const double taken = std::min(moon, twilight);
  if (rate_decides && grade_of_rate(overhead) >= row.verdict && taken > 0.5) {
    row.spoiler = Spoiler::few_meteors;
    return row;
  }
  const Verdict blamed = !rate_decides ? row.verdict : std::min(Verdict::fair, worst_part);
  double least = 2.0;
  for (const Part& part : parts)
    if (part.grade >= blamed && part.left < least) {
      least = part.left;
      row.spoiler = part.spoiler;
    }
  return row;
}

}  // namespace

std::string_view verdict_name(Verdict verdict) {
  constexpr std::array<std::string_view, 4> names = {"good", "fair", "poor", "not-seen"};
  return names[static_cast<std::size_t>(verdict)];
}

std::vector<SiteShower> shower_nights(const SiteSky& sky, const SiteYear& year,
                                      const std::vector<ShowerPeak>& peaks) {
  const Zone& zone = year.place.zone;
  const double limit = year.place.limiting_magnitude;
  std::vector<SiteShower> rows;
  rows.reserve(peaks.size());
  for (const ShowerPeak& peak : peaks) {
    const Date own = night_date(zone, peak.at);
    const TimeSpan span = night_span(zone, own);
    const bool late = peak.at - span.from > (span.to - span.from) / 2;
    const Date other = next_date(zone, own, late ? 1 : -1);
    const ShowerNight first(sky, limit, peak, span);
    const ShowerNight second(sky, limit, peak, night_span(zone, other));
    const auto a = first.best(ShowerNight::Sky::actual),
               b = second.best(ShowerNight::Sky::actual, a.value);
    rows.push_back(a.value >= b.value ? judge(sky, limit, peak, own, first, a)
                                      : judge(sky, limit, peak, other, second, b));
  }
  return rows;
}

}  // namespace duskleaf
