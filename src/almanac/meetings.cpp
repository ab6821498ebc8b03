// When to look: this project's rule. Each night from a day (Moon) or three days (planets) before
// the closest moment to as long after it offers up to three moments at which both stand 5 degrees
// high or more (apparent, topocentric) and the Sun is 6 degrees down or more:
//   in the evening, from dusk to an hour past the chart hour: the chart hour, else the nearest to
//   it; in the morning, within two hours before dawn: the latest; in the middle of the night,
//   between the two: the nearest to the closest moment.
// Dusk and dawn are here the Sun 8 degrees down, to the five minutes within; other moments go by
// quarters of an hour from dusk. The moment with the least separation is taken, where a morning
// counts as 1 degree worse, the middle of a night as 2, and each day off the closest moment as
// 0.05. Moments at which the skyline hides one of the two are used only where no other is left.
// Where the Sun stays below -8 degrees all day, evenings begin at 16:00 and mornings end at 8:00
// civil time; where it sinks below -6 but not to -8, the darkest moment is the night's only one.
//
// A cluster's light is spread: it counts as seen by the bare eye when the sky shows stars 1.5
// magnitudes fainter than all its light (common practice).
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
constexpr Days hour(1h), quarter(15min);
constexpr double moon_reach = 1.0, planet_reach = 3.0;                       // days
constexpr double morning_worse = 1.0, middle_worse = 2.0, day_worse = 0.05;  // degrees
constexpr double cluster_margin = 1.5;

const Target& target(int i) { return targets()[static_cast<std::size_t>(i)]; }
bool is_body(const Target& t) { return t.sort == Target::Sort::body; }
bool is_moon(const Target& t) { return is_body(t) && t.body == Body::moon; }

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

/// Two targets as a site sees them.
class Pair {
 public:
  Pair(const SiteSky& sky, int a, int b) : sky_(sky), index_{a, b} {}

  /// Stars and clusters stand still for a night: their directions are those of this moment.
  void set_night(Ut t) {
    const SkyFrame frame = sky_frame(sky_.ephemeris(), to_tt(t));
    for (std::size_t k = 0; k < 2; ++k)
      if (!is_body(target(index_[k]))) fixed_[k] = apparent_direction(frame, target(index_[k]));
  }
  void set_time(Ut t) {
    const Observer& site = sky_.observer();
    const Angle sidereal = sky_.local_sidereal_time(t);
    const Vector here = observer_vector_au(site.latitude, site.elevation_m, sidereal);
    for (std::size_t k = 0; k < 2; ++k) {
      const Target& x = target(index_[k]);
      seen_[k] = is_body(x)
                     ? Vector((sky_.ephemeris().apparent(x.body, to_tt(t)) - here).normalized())
                     : fixed_[k];
    }
    sidereal_ = sidereal;
  }
  Angle separation() const {
    return arctan2(seen_[0].cross(seen_[1]).norm(), seen_[0].dot(seen_[1]));
  }
  /// Refracted.
  Horizontal place(std::size_t k) const {
    Horizontal p = to_horizontal(seen_[k], sidereal_, sky_.observer().latitude);
    p.altitude = p.altitude + refraction(p.altitude);
    return p;
  }
  bool up() const {
    // Refraction lifts by 0.17 degree at 5: the cheap look first.
    static const double surely_down = sin(least_altitude - Angle::from_degrees(0.3));
    for (const Vector& v : seen_)
      if (sine_of_altitude(v, sidereal_, sky_.observer().latitude) < surely_down) return false;
    return place(0).altitude >= least_altitude && place(1).altitude >= least_altitude;
  }
  bool clear(const std::vector<SkylinePoint>& skyline) const {
    return skyline.empty() ||
           (above_skyline(skyline, place(0)) && above_skyline(skyline, place(1)));
  }

 private:
  const SiteSky& sky_;
  std::array<int, 2> index_;
  std::array<Vector, 2> fixed_, seen_;
  Angle sidereal_;
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
    result.bare_eye = seen_by_eye(target(approach.a), pair.place(0).altitude, at, faintest) &&
                      seen_by_eye(target(approach.b), pair.place(1).altitude, at, faintest);
    return result;
  }

 private:
  bool seen_by_eye(const Target& x, Angle altitude, Ut at, double faintest) const {
    if (is_moon(x)) return true;
    if (!is_body(x))
      return x.magnitude + (x.sort == Target::Sort::cluster ? cluster_margin : 0.0) < faintest;
    const double magnitude =
        planet_magnitude(x.body, planet_aspect(sky_.ephemeris(), x.body, to_tt(at)));
    return bare_eye_visible(x.body, magnitude, altitude, faintest);
  }

  const Hours& hours(std::size_t night) {
    std::optional<Hours>& h = hours_[night];
    if (!h) h = hours_of(sky_, year_.place, year_.nights[night]);
    return *h;
  }

  std::optional<Look> best_look(Pair& pair, const Approach& approach, bool clear) {
    const Days reach(is_moon(target(approach.a)) ? moon_reach : planet_reach);
    const Ut first = approach.at - reach, last = approach.at + reach;
    std::optional<Look> best;
    double least = 0.0;
    const auto night_at = std::partition_point(year_.nights.begin(), year_.nights.end(),
                                               [&](const Night& n) { return !(first < n.to); });
    for (auto n = night_at; n != year_.nights.end() && n->from <= last; ++n) {
      const Hours& h = hours(static_cast<std::size_t>(n - year_.nights.begin()));
      if (!h.any) continue;
      pair.set_night(n->darkest);
      const auto serves = [&](Ut t) {
        if (t < first || last < t) return false;
        pair.set_time(t);
        return pair.up() && (!clear || pair.clear(year_.place.skyline)) &&
               sky_.altitude(Body::sun, t) <= sun_limit;
      };
      const auto offer = [&](std::optional<Ut> t, double worse) {
        if (!t) return;
        pair.set_time(*t);
        const double cost =
            pair.separation().degrees() + worse + day_worse * std::abs((*t - approach.at).count());
        if (best && cost >= least) return;
        least = cost;
        best = Look{*t,
                    {},
                    n->date,
                    h.evening_end < *t && year_.place.zone.civil(*t).date() > n->date,
                    false};
      };
      offer(nearest(serves, h.chart, h.dusk, h.evening_end, h.dusk), 0.0);
      if (h.evening_end < h.dawn) {
        offer(nearest(serves, h.dawn, h.morning_begin, h.dawn, h.dusk), morning_worse);
        const Ut middle = std::clamp(approach.at, h.evening_end, h.morning_begin);
        offer(nearest(serves, on_quarter(middle, h), h.evening_end, h.morning_begin, h.dusk),
              middle_worse);
      }
    }
    return best;
  }

  static Ut on_quarter(Ut t, const Hours& h) {
    return h.dusk + quarter * std::round((t - h.dusk) / quarter);
  }

  /// The moment nearest to the wished one that serves: itself, else quarters of an hour from `dusk`
  /// within [from, to].
  template <class Serves>
  static std::optional<Ut> nearest(const Serves& serves, Ut wished, Ut from, Ut to, Ut dusk) {
    if (from <= wished && wished <= to && serves(wished)) return wished;
    const double middle = (wished - dusk) / quarter,
                 low = std::ceil((from - dusk) / quarter - 1e-6),
                 high = std::floor((to - dusk) / quarter + 1e-6);
    double below = std::min(std::ceil(middle - 1e-6) - 1.0, high),
           above = std::max(std::floor(middle + 1e-6) + 1.0, low);
    while (below >= low || above <= high) {
      const bool take_below = below >= low && (above > high || middle - below <= above - middle);
      double& k = take_below ? below : above;
      const Ut t = dusk + quarter * k;
      if (serves(t)) return t;
      k += take_below ? -1.0 : 1.0;
    }
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
