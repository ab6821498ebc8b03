// When to look: this project's rule. Each night from a day (Moon) or three days (planets) before
// the closest moment to as long after it offers up to three moments. At all of them both stand 5
// degrees high or more (apparent, topocentric), the Sun is 6 degrees down or more, and the two are
// no more than 7 degrees apart nor 4 degrees further than at the closest.
//   In the evening, from dusk to an hour past the chart hour, by five minutes: the chart hour where
//   both stand 15 degrees high or more then, else the moment at which the lower one is highest.
//   In the morning, within two hours before dawn, by five minutes: that at which the lower one is
//   highest. In the middle of the night, between the two, by quarters of an hour from dusk: the
//   nearest to the closest moment where both stand 15 degrees high then, else the highest.
// "Highest" is sought among the moments whose separation is within a degree of that stretch's
// least. Dusk and dawn are here the Sun 8 degrees down, to the five minutes within. The moment with
// the least separation is taken, where a morning counts as 1 degree worse, the middle of a night as
// 2, each day off the closest moment as 0.05, and each degree that the lower one lacks of 15 as
// 0.15. Moments at which the skyline hides one of the two are used only where no other is left.
// Where the Sun stays below -8 degrees all day, evenings begin at 16:00 and mornings end at 8:00
// civil time; where it sinks below -6 but not to -8, the darkest moment is the night's only one.
//
// Uranus, Neptune and clusters must be within reach of binoculars of 50 mm, which show stars 5
// log10(50 / 7) fainter than the bare eye (common practice), or there is no look: the air takes
// 0.25 magnitude for each further air mass, 1 / sine of the altitude (common practice; as in
// show_list.cpp). A planet needs half a magnitude of margin to be told from the stars. A cluster's
// light is spread: it counts as seen when the sky shows stars 1.5 magnitudes fainter than all its
// light (common practice). The same without binoculars decides for the bare eye.
//
// Separation and places are topocentric (sky/horizon.hpp): within 0.0005 degree of the DE431-based
// reference in 69 pairs at five sites, 1980-2035.
#include "almanac/meetings.hpp"

#include <algorithm>
#include <array>
#include <chrono>
#include <cmath>

#include "almanac/evening_moment.hpp"
#include "almanac/planets.hpp"
#include "almanac/skyline.hpp"
#include "events/search.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

using namespace std::chrono_literals;
using Vector = Eigen::Vector3d;

constexpr Angle least_altitude = Angle::from_degrees(5.0), twilight = Angle::from_degrees(-8.0);
// The Sun needs a second's grace, since dusk itself is found to a hundredth of one.
constexpr Angle sun_limit = civil_altitude + Angle::from_arcseconds(15.0);
constexpr Days hour(1h), quarter(15min), five_minutes(5min);
constexpr double moon_reach = 1.0, planet_reach = 3.0;                                   // days
constexpr double morning_worse = 1.0, middle_worse = 2.0, day_worse = 0.05;              // degrees
constexpr double low_worse = 0.15, highest_within = 1.0, furthest = 7.0, further = 4.0;  // degrees
constexpr double comfortable = 15.0;                                                     // degrees
constexpr double cluster_margin = 1.5, planet_margin = 0.5;  // magnitudes
constexpr double air_mass_takes = 0.25, binoculars_gain = 4.27;

Ut on_five_minutes(const Zone& zone, Ut t, bool up) {
  const double offset = static_cast<double>(zone.offset_at(t).count()), step = 300.0;
  const double reading = ((t.days() - 0.5) * 86400.0 + offset) / step;
  return Ut(Days(Seconds((up ? std::ceil(reading - 1e-4) : std::floor(reading + 1e-4)) * step -
                         offset))) +
         Days(0.5);
}

/// The hours of a night in which one may look.
struct Hours {
  bool any = false;
  Ut dusk, chart, evening_end, morning_begin, dawn;
};

/// The Sun at `twilight` between two instants, one above and one below.
Ut sun_at_twilight(const SiteSky& sky, Ut a, Ut b) {
  const auto f = [&](double day) {
    return (sky.altitude(Body::sun, Ut(Days(day))) - twilight).radians();
  };
  return Ut(Days(search_detail::zero_between(f, a.days(), f(a.days()), b.days(), f(b.days()),
                                             Days(1s).count())));
}

Hours hours_of(const SiteSky& sky, const Place& place, const Night& night) {
  Hours h;
  if (!(night.from < night.to) || night.darkest_sun_altitude > civil_altitude) return h;
  h.any = true;
  const ChartHour& chart_hour =
      place.chart_hours[static_cast<std::size_t>(month_of(night.date) - 1)];
  if (night.darkest_sun_altitude > twilight) {
    h.dusk = h.dawn = night.darkest;
  } else {
    h.dusk = night.from + 4.0 * hour;
    h.dawn = std::min(night.to, night.from + 20.0 * hour);
    if (night.civil_dusk && *night.civil_dusk < night.darkest)
      h.dusk =
          on_five_minutes(place.zone, sun_at_twilight(sky, *night.civil_dusk, night.darkest), true);
    if (night.civil_dawn && *night.civil_dawn > night.darkest)
      h.dawn = on_five_minutes(place.zone, sun_at_twilight(sky, *night.civil_dawn, night.darkest),
                               false);
    if (!(h.dusk <= h.dawn)) h.dusk = h.dawn = night.darkest;
  }
  h.chart = std::clamp(chart_moment(sky, place.zone, chart_hour, night), h.dusk, h.dawn);
  h.evening_end = std::min(h.chart + hour, h.dawn);
  h.morning_begin = std::max(h.evening_end, h.dawn - 2.0 * hour);
  return h;
}

/// What needs a dark place in the sky.
bool is_faint(const Target& t) {
  return t.sort == Target::Sort::cluster ||
         (t.is_body() && (t.body == Body::uranus || t.body == Body::neptune));
}

// Refraction lifts by 0.17 degree at 5: the cheap look first.
const double surely_down = sin(least_altitude - Angle::from_degrees(0.3));

/// Two targets as a site sees them.
class Pair {
 public:
  Pair(const SiteSky& sky, int a, int b)
      : sky_(sky),
        index_{a, b},
        site_(observer_vector_au(sky.observer().latitude, sky.observer().elevation_m, Angle())),
        zenith_(cos(sky.observer().latitude), 0.0, sin(sky.observer().latitude)) {}

  /// Stars and clusters stand still for a night: their directions are those of this moment.
  void set_night(Ut t) {
    const SkyFrame frame = sky_frame(sky_.ephemeris(), to_tt(t));
    for (std::size_t k = 0; k < 2; ++k)
      if (!target(k).is_body()) fixed_[k] = apparent_direction(frame, target(k));
  }
  void set_time(Ut t) {
    sidereal_ = sky_.local_sidereal_time(t);
    const double c = cos(sidereal_), s = sin(sidereal_);
    const auto turned = [&](const Vector& v) { return Vector(c * v.x(), s * v.x(), v.z()); };
    const Vector here = turned(site_), up = turned(zenith_);
    for (std::size_t k = 0; k < 2; ++k) {
      const Target& x = target(k);
      seen_[k] = x.is_body()
                     ? Vector((sky_.ephemeris().apparent(x.body, to_tt(t)) - here).normalized())
                     : fixed_[k];
    }
    lower_sine_ = std::min(seen_[0].dot(up), seen_[1].dot(up));
  }
  const Target& target(std::size_t k) const { return target_at(index_[k]); }
  Angle separation() const { return angle_between(seen_[0], seen_[1]); }
  /// Refracted.
  Horizontal place(std::size_t k) const {
    Horizontal p = to_horizontal(seen_[k], sidereal_, sky_.observer().latitude);
    p.altitude = p.altitude + refraction(p.altitude);
    return p;
  }
  /// Refracted altitude of the lower one; empty where that is certainly not enough.
  std::optional<Angle> lower() const {
    if (lower_sine_ < surely_down) return {};
    const Angle altitude = arcsin(lower_sine_);
    return altitude + refraction(altitude);
  }
  /// A time through which one of the two stays too low, by the sky's turn; 0 where it may not.
  Days surely_down_for() const {
    // Radians an hour; the Moon's own way northward adds a little.
    const double fastest = 0.263 * zenith_.x() + 0.006;
    return hour * (std::max(0.0, surely_down - lower_sine_) / fastest);
  }
  bool clear(const std::vector<SkylinePoint>& skyline) const {
    return skyline.empty() ||
           (above_skyline(skyline, place(0)) && above_skyline(skyline, place(1)));
  }

 private:
  const SiteSky& sky_;
  std::array<int, 2> index_;
  Vector site_, zenith_;  // at a local sidereal time of 0
  std::array<Vector, 2> fixed_, seen_;
  Angle sidereal_;
  double lower_sine_ = 0.0;  // of the lower one's altitude
};

/// Chooses among a site's nights.
class Chooser {
 public:
  Chooser(const SiteSky& sky, const SiteYear& year)
      : sky_(sky), year_(year), hours_(year.nights.size()) {}

  Meeting meeting(const Approach& approach) {
    Meeting result{approach, {}, Angle(), false};
    Pair pair(sky_, approach.a, approach.b);
    result.look = best_look(pair, approach, true);
    if (!result.look && !year_.place.skyline.empty())
      result.look = best_look(pair, approach, false);
    const Ut at = result.look ? result.look->at : approach.at;
    pair.set_night(at);
    pair.set_time(at);
    result.separation = pair.separation();
    if (!result.look) return result;
    result.look->place = pair.place(0);
    result.look->above_skyline = pair.clear(year_.place.skyline);
    const double faintest = sky_light(sky_, year_.place.limiting_magnitude, at).faintest_star;
    result.bare_eye = true;
    for (std::size_t k = 0; k < 2; ++k)
      result.bare_eye =
          result.bare_eye && seen(pair.target(k), pair.place(k).altitude, at, faintest, 0.0);
    return result;
  }

 private:
  struct Moment {
    Ut at;
    double separation, lower;  // degrees
  };

  /// Whether the sky shows it at that height, with what an opening gains on the bare eye.
  bool seen(const Target& x, Angle altitude, Ut at, double faintest, double gain) const {
    if (x.is_moon()) return true;
    if (is_faint(x)) faintest -= air_mass_takes * (1.0 / sin(altitude) - 1.0);
    if (x.sort == Target::Sort::cluster) return x.magnitude + cluster_margin < faintest + gain;
    if (!x.is_body()) return x.magnitude < faintest + gain;
    const double magnitude =
        planet_magnitude(x.body, planet_aspect(sky_.ephemeris(), x.body, to_tt(at)));
    return gain > 0.0 ? magnitude + planet_margin < faintest + gain
                      : bare_eye_visible(x.body, magnitude, altitude, faintest);
  }
  /// Whether nothing faint of the pair is lost in the air or a bright sky.
  bool within_reach(Pair& pair, Ut t) const {
    if (!is_faint(pair.target(0)) && !is_faint(pair.target(1))) return true;
    pair.set_time(t);
    const double faintest = sky_light(sky_, year_.place.limiting_magnitude, t).faintest_star;
    for (std::size_t k = 0; k < 2; ++k)
      if (is_faint(pair.target(k)) &&
          !seen(pair.target(k), pair.place(k).altitude, t, faintest, binoculars_gain))
        return false;
    return true;
  }

  const Hours& hours(std::size_t night) {
    std::optional<Hours>& h = hours_[night];
    if (!h) h = hours_of(sky_, year_.place, year_.nights[night]);
    return *h;
  }

  /// Part of a night.
  enum class Part { evening, morning, middle };
  struct Stretch {
    Ut from, to;
    double worse = 0.0;
    std::optional<Ut> wished;
    Ut anchor;
    Days step = five_minutes;
  };
  static Stretch stretch_of(const Hours& h, Part part, Ut closest) {
    if (part == Part::evening) return {h.dusk, h.evening_end, 0.0, h.chart, h.dusk};
    if (part == Part::morning) return {h.morning_begin, h.dawn, morning_worse, {}, h.dawn};
    const Ut middle = std::clamp(closest, h.evening_end, h.morning_begin);
    return {h.evening_end, h.morning_begin,
            middle_worse,  h.dusk + quarter * std::round((middle - h.dusk) / quarter),
            h.dusk,        quarter};
  }

  std::optional<Look> best_look(Pair& pair, const Approach& approach, bool clear) {
    const bool moon = target_at(approach.a).is_moon();
    const Days reach(moon ? moon_reach : planet_reach);
    const Ut first = approach.at - reach, last = approach.at + reach;
    // No site sees them closer than this.
    const double at_least = approach.separation.degrees() - (moon ? 1.1 : 0.02);
    std::vector<std::size_t> nights;  // the nearest first
    for (auto n = std::partition_point(year_.nights.begin(), year_.nights.end(),
                                       [&](const Night& x) { return !(first < x.to); });
         n != year_.nights.end() && n->from <= last; ++n)
      nights.push_back(static_cast<std::size_t>(n - year_.nights.begin()));
    const auto away = [&](std::size_t n) {
      return std::abs((year_.nights[n].darkest - approach.at).count());
    };
    std::stable_sort(nights.begin(), nights.end(),
                     [&](std::size_t a, std::size_t b) { return away(a) < away(b); });
    std::optional<Look> best;
    double least = 0.0;
    for (const Part part : {Part::evening, Part::morning, Part::middle})
      for (const std::size_t i : nights) {
        const Hours& h = hours(i);
        if (!h.any || (part != Part::evening && !(h.evening_end < h.dawn))) continue;
        Stretch stretch = stretch_of(h, part, approach.at);
        stretch.from = std::max(stretch.from, first);
        stretch.to = std::min(stretch.to, last);
        if (stretch.to < stretch.from) continue;
        const Days wait = std::clamp(approach.at, stretch.from, stretch.to) - approach.at;
        if (best && at_least + stretch.worse + day_worse * std::abs(wait.count()) > least) continue;
        pair.set_night(year_.nights[i].darkest);
        const std::optional<Moment> m = choose(pair, approach, stretch, clear);
        if (!m) continue;
        const double cost = m->separation + stretch.worse +
                            day_worse * std::abs((m->at - approach.at).count()) +
                            low_worse * std::max(0.0, comfortable - m->lower);
        if (best && cost >= least) continue;
        least = cost;
        const Date date = year_.nights[i].date;
        best = Look{m->at,
                    {},
                    date,
                    h.evening_end < m->at && year_.place.zone.civil(m->at).date() > date,
                    false};
      }
    return best;
  }

  /// The pair at a moment, where it may be shown then.
  std::optional<Moment> moment(Pair& pair, const Approach& approach, Ut t, bool clear) const {
    pair.set_time(t);
    const std::optional<Angle> lower = pair.lower();
    if (!lower || *lower < least_altitude || (clear && !pair.clear(year_.place.skyline))) return {};
    const double separation = pair.separation().degrees();
    if (separation > std::min(furthest, approach.separation.degrees() + further) ||
        sky_.altitude(Body::sun, t) > sun_limit)
      return {};
    return Moment{t, separation, lower->degrees()};
  }

  /// The wished moment where both stand comfortably high then, else that at which the lower one is
  /// highest.
  std::optional<Moment> choose(Pair& pair, const Approach& approach, const Stretch& stretch,
                               bool clear) const {
    const std::optional<Ut>& wished = stretch.wished;
    if (wished && stretch.from <= *wished && *wished <= stretch.to) {
      const std::optional<Moment> m = moment(pair, approach, *wished, clear);
      if (m && m->lower >= comfortable && within_reach(pair, m->at)) return m;
    }
    std::vector<Moment> moments;
    const double begin = std::ceil((stretch.from - stretch.anchor) / stretch.step - 1e-6),
                 end = std::floor((stretch.to - stretch.anchor) / stretch.step + 1e-6);
    for (double k = begin; k <= end; ++k) {
      const Ut t = stretch.anchor + stretch.step * k;
      if (const std::optional<Moment> m = moment(pair, approach, t, clear))
        moments.push_back(*m);
      else
        k += std::max(0.0, std::floor(pair.surely_down_for() / stretch.step) - 1.0);
    }
    if (moments.empty()) return {};
    const auto closest = std::min_element(
        moments.begin(), moments.end(),
        [](const Moment& a, const Moment& b) { return a.separation < b.separation; });
    const double widest = closest->separation + highest_within;
    std::stable_sort(moments.begin(), moments.end(),
                     [](const Moment& a, const Moment& b) { return a.lower > b.lower; });
    for (const Moment& m : moments)
      if (m.separation <= widest && within_reach(pair, m.at)) return m;
    return {};
  }

  const SiteSky& sky_;
  const SiteYear& year_;
  std::vector<std::optional<Hours>> hours_;  // by night, made when first asked for
};

}  // namespace

std::vector<Meeting> meetings(const SiteSky& sky, const SiteYear& year,
                              const std::vector<Approach>& approaches) {
  std::vector<Meeting> result;
  result.reserve(approaches.size());
  Chooser chooser(sky, year);
  for (const Approach& approach : approaches) result.push_back(chooser.meeting(approach));
  return result;
}

PairSight pair_sight(const SiteSky& sky, int a, int b, Ut t) {
  Pair pair(sky, a, b);
  pair.set_night(t);
  pair.set_time(t);
  return {pair.place(0), pair.place(1), pair.separation()};
}

}  // namespace duskleaf
