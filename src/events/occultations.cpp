// Occultations by vectors, in the sense of the Explanatory Supplement to the Astronomical Almanac
// (1992), ch. 8: the Moon's disc from the site against the target's direction from there. Both
// carry the Earth's aberration; that of the site's own motion (0.3") is common to both and left
// out. Mean limb of radius k = 0.2725076 equatorial radii of the Earth (IAU 1982).
//
// Dark or bright limb: the cusps stand 90 degrees from the middle of the bright limb, whatever the
// phase, so a contact further than that from it is at the dark limb. During a lunar eclipse the
// rule is the same.
#include "events/occultations.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "ephemeris/constants.hpp"
#include "events/search.hpp"
#include "sky/moon_look.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;

constexpr double moon_radius_au = moon_k * earth_radius_au;
// The Moon's parallax and radius together are at most 1.31 degree.
constexpr double geocentric_reach = Angle::from_degrees(1.35).radians();
constexpr Days coarse(0.25);
// Between coarse samples the Moon leaves a great circle by less than this, radians.
constexpr double path_bend = Angle::from_degrees(0.05).radians();
constexpr Days fine(20.0 / 1440.0);
constexpr Seconds tolerance(0.01);

/// The Moon and one target as a site sees them through some hours.
class Encounter {
 public:
  Encounter(const SiteSky& sky, const Target& target, Ut from, Ut to)
      : sky_(sky), target_(target), from_(from), to_(to) {
    if (target.sort == Target::Sort::body) return;
    // A star moves by 0.05" in these hours, and evenly.
    at_from_ = apparent_direction(sky.ephemeris(), target, to_tt(from));
    at_to_ = apparent_direction(sky.ephemeris(), target, to_tt(to));
  }

  Vector seen(Body body, Ut t) const {
    const Observer& site = sky_.observer();
    return sky_.ephemeris().apparent(body, to_tt(t)) -
           observer_vector_au(site.latitude, site.elevation_m, sky_.local_sidereal_time(t));
  }
  Vector target(Ut t) const {
    if (target_.sort == Target::Sort::body) return seen(target_.body, t);
    return at_from_ + (at_to_ - at_from_) * ((t - from_) / (to_ - from_));
  }
  /// Squared chord between target and the Moon's centre less that of the limb: smooth, negative
  /// while covered.
  double excess(Ut t) const {
    const Vector moon = seen(Body::moon, t);
    const double limb = 2.0 * std::sin(0.5 * std::asin(moon_radius_au / moon.norm()));
    return (target(t).normalized() - moon.normalized()).squaredNorm() - limb * limb;
  }
  double altitude(Ut t) const {  // sine
    return sine_of_altitude(target(t).normalized(), sky_.local_sidereal_time(t),
                            sky_.observer().latitude);
  }

  LimbContact contact(Ut t) const {
    const Vector moon = seen(Body::moon, t), sun = seen(Body::sun, t), other = target(t);
    const Angle sidereal = sky_.local_sidereal_time(t), latitude = sky_.observer().latitude;
    LimbContact c;
    c.at = t;
    c.place = to_horizontal(other, sidereal, latitude);
    c.position_angle = position_angle(moon, other, Vector::UnitZ());
    const Angle from_bright = c.position_angle - position_angle(moon, sun, Vector::UnitZ());
    c.dark_limb = cos(from_bright) < 0.0;
    c.up = c.place.altitude > star_rise_altitude;
    c.sun_altitude = to_horizontal(sun, sidereal, latitude).altitude;
    return c;
  }

  /// Disappearance and reappearance; empty where the Moon passes by.
  std::optional<std::array<Ut, 2>> covered() const {
    std::vector<Ut> times;
    std::vector<double> values;
    bool up = false;
    const double limit = sin(star_rise_altitude) - 0.01;
    const int laps = std::max(2, static_cast<int>(std::ceil((to_ - from_) / fine)));
    for (int i = 0; i <= laps; ++i) {
      times.push_back(from_ + (to_ - from_) * (static_cast<double>(i) / laps));
      up = up || altitude(times.back()) > limit;
    }
    if (!up) return {};
    for (const Ut t : times) values.push_back(excess(t));
    SearchOptions options;
    options.tolerance = tolerance;
    const auto crossings =
        find_crossings_between([&](Ut t) { return excess(t); }, times, values, options);
    for (std::size_t i = 0; i + 1 < crossings.size(); ++i)
      if (!crossings[i].rising && crossings[i + 1].rising)
        return std::array{crossings[i].at, crossings[i + 1].at};
    return {};
  }

  Occultation described(int index, Ut disappears, Ut reappears) const {
    const auto distance = [&](double day) {
      const Ut t{Days(day)};
      return (target(t).normalized() - seen(Body::moon, t).normalized()).squaredNorm();
    };
    const double a = disappears.days(), b = reappears.days();
    const search_detail::Least least =
        search_detail::least_between(distance, a, b, 0.5 * (a + b), 1e-6);
    const Ut deepest{Days(least.at)};
    return {index,
            contact(disappears),
            contact(reappears),
            arcsin(0.5 * std::sqrt(least.value)) * 2.0,
            arcsin(moon_radius_au / seen(Body::moon, deepest).norm()),
            moon_lit_fraction(sky_.ephemeris(), to_tt(deepest))};
  }

 private:
  const SiteSky& sky_;
  const Target& target_;
  Ut from_, to_;
  Vector at_from_ = Vector::Zero(), at_to_ = Vector::Zero();
};

/// A stretch of time in which the Moon, seen from the Earth's centre, comes within reach of a
/// target.
struct Visit {
  Ut from, to;
};

/// Coarse geocentric samples of the Moon: unit vectors.
struct MoonPath {
  std::vector<Ut> times;
  std::vector<Vector> moon;
};

MoonPath moon_path(const YearEphemeris& ephemeris, Ut from, Ut to) {
  MoonPath path;
  for (Ut t = from;; t = t + coarse) {
    path.times.push_back(std::min(t, to));
    path.moon.push_back(ephemeris.apparent(Body::moon, to_tt(path.times.back())).normalized());
    if (t >= to) return path;
  }
}

/// `direction(i)` is the target's unit vector at the path's i-th sample.
template <class F>
void add_visits(const MoonPath& path, const F& direction, std::vector<Visit>& visits) {
  // The Moon and a target part by at most 4 degrees in a lap.
  const double near = std::cos(geocentric_reach + Angle::from_degrees(4.2).radians());
  for (std::size_t i = 0; i + 1 < path.times.size(); ++i) {
    const Vector& here = direction(i);
    if (path.moon[i].dot(here) < near) continue;
    const Vector before = path.moon[i] - here, after = path.moon[i + 1] - direction(i + 1);
    const Vector moved = after - before;
    const double step2 = moved.squaredNorm(), part = -before.dot(moved) / step2;
    // Each passage belongs to the lap that holds its least distance, or to both laps that meet
    // there (the path is bent); the path's ends take what is nearest outside.
    constexpr double overlap = 0.03;
    const bool first = i == 0, last = i + 2 == path.times.size();
    if ((part < -overlap && !first) || (part > 1.0 + overlap && !last)) continue;
    const double least = (before + part * moved).norm(), reach = geocentric_reach + path_bend;
    if (least > reach) continue;
    const Days lap = path.times[i + 1] - path.times[i];
    const Days half = lap * (std::sqrt(reach * reach - least * least) / std::sqrt(step2)) + fine;
    const Ut middle = path.times[i] + lap * part;
    const Ut from = std::max(middle - half, path.times.front()),
             to = std::min(middle + half, path.times.back());
    const bool again = !visits.empty() && from < visits.back().to;
    if (from < to && !again) visits.push_back({from, to});
  }
}

}  // namespace

std::vector<Occultation> occultations(const SiteSky& sky, Ut from, Ut to) {
  const YearEphemeris& ephemeris = sky.ephemeris();
  constexpr Days rounding(1e-8);  // from one time scale to the other and back
  // Half a day more holds the whole of an occultation with one contact in [from, to).
  const Ut first = std::max(from - Days(0.5), to_ut(ephemeris.from()) + rounding),
           last = std::min(to + Days(0.5), to_ut(ephemeris.to()) - rounding);
  std::vector<Occultation> found;
  if (!(first < last)) return found;
  const MoonPath path = moon_path(ephemeris, first, last);
  const Tt middle = to_tt(first + (last - first) * 0.5);
  const std::span<const Target> all = targets();
  for (std::size_t index = 0; index < all.size(); ++index) {
    const Target& target = all[index];
    std::vector<Visit> visits;
    if (target.sort == Target::Sort::star) {
      // Over a year aberration and precession move it by less than path_bend.
      const Vector direction = apparent_direction(ephemeris, target, middle);
      add_visits(
          path, [&](std::size_t) -> const Vector& { return direction; }, visits);
    } else if (target.sort == Target::Sort::body && target.body != Body::moon &&
               target.body != Body::sun) {
      add_visits(
          path,
          [&](std::size_t i) {
            return Vector(ephemeris.apparent(target.body, to_tt(path.times[i])).normalized());
          },
          visits);
    }
    for (const Visit& visit : visits) {
      const Encounter encounter(sky, target, visit.from, visit.to);
      const auto times = encounter.covered();
      if (!times) continue;
      const Occultation o = encounter.described(static_cast<int>(index), (*times)[0], (*times)[1]);
      const auto counts = [&](const LimbContact& c) { return c.up && c.at >= from && c.at < to; };
      if (counts(o.disappears) || counts(o.reappears)) found.push_back(o);
    }
  }
  std::sort(found.begin(), found.end(), [](const Occultation& a, const Occultation& b) {
    return a.disappears.at < b.disappears.at;
  });
  return found;
}

std::vector<Event> occultation_events(const Occultation& occultation) {
  const std::string_view subject = pair_name(target_index(Body::moon), occultation.target);
  std::vector<Event> events;
  const auto add = [&](EventKind kind, const LimbContact& c) {
    if (c.up) events.push_back(Event{kind, Body::moon, c.at, c.place.altitude.degrees(), subject});
  };
  add(EventKind::occultation_disappears, occultation.disappears);
  add(EventKind::occultation_reappears, occultation.reappears);
  return events;
}

}  // namespace duskleaf
