// Contacts of a planet's disc with the Sun's: J. Meeus, Transits (1989), ch. 2; here with vectors,
// centre to centre, from the Earth's centre or the site. Radii: Sun 959.63" at 1 au (A. Auwers
// 1891), the planets' as in sky/planet_disc.cpp; Venus's air, which widens it by 1 percent, is left
// out.
#include "events/sun_transits.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "ephemeris/constants.hpp"
#include "events/search.hpp"
#include "sky/planet_disc.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;

constexpr Angle equatorial_parallax_at_1_au = Angle::from_arcseconds(8.794143);  // IAU 1976
constexpr Seconds tolerance(0.02);

// What the tables hold, less a millisecond for the rounding from one time scale to the other.
constexpr Days rounding(1e-8);
Ut first_instant(const YearEphemeris& ephemeris) { return to_ut(ephemeris.from()) + rounding; }
Ut last_instant(const YearEphemeris& ephemeris) { return to_ut(ephemeris.to()) - rounding; }

/// Sun and planet as they stand to an eye at `here`.
struct Discs {
  Discs(const YearEphemeris& ephemeris, Body planet, Ut t, const Vector& here = Vector::Zero()) {
    sun = ephemeris.apparent(Body::sun, to_tt(t)) - here;
    const Vector other = ephemeris.apparent(planet, to_tt(t)) - here;
    in_front = other.norm() < sun.norm();
    separation = angle_between(sun, other).radians();
    sun_radius = sun_semidiameter / sun.norm();
    planet_distance = other.norm();
    planet_radius = disc_radius(planet, planet_distance).radians();
  }
  /// Smooth in time also where the centres meet; zero at the contact. side 1: exterior, -1:
  /// interior.
  double excess(double side) const {
    const double contact = sun_radius + side * planet_radius;
    return separation * separation - contact * contact;
  }
  Vector sun;
  bool in_front;
  double separation, sun_radius, planet_radius;  // radians
  double planet_distance;                        // au
};

/// When `separation(t)` is least between a and b.
template <class F>
Ut nearest(const F& separation, Ut a, Ut b) {
  const auto square = [&](double day) {
    const double s = separation(Ut(Days(day)));
    return s * s;
  };
  return Ut(Days(
      search_detail::least_between(square, a.days(), b.days(), 0.5 * (a.days() + b.days()), 1e-7)
          .at));
}

/// The two contacts about the greatest phase; empty where the discs do not reach so far into each
/// other.
template <class F>
std::optional<std::array<Ut, 2>> contacts(const F& excess, Ut from, Ut greatest, Ut to) {
  const auto at_day = [&](double day) { return excess(Ut(Days(day))); };
  const double before = excess(from), inside = excess(greatest), after = excess(to);
  if (!(inside < 0.0 && before > 0.0 && after > 0.0)) return {};
  const double day = tolerance / Days(1);
  return std::array{Ut(Days(search_detail::zero_between(at_day, from.days(), before,
                                                        greatest.days(), inside, day))),
                    Ut(Days(search_detail::zero_between(at_day, greatest.days(), inside, to.days(),
                                                        after, day)))};
}

/// Whether the Sun's centre rises above its limit at any moment between a and b.
bool sun_shows(const SiteSky& sky, Ut a, Ut b) {
  const double limit = sin(sun_rise_altitude);
  const auto depth = [&](double day) {
    return limit - sky.sight(Body::sun, Ut(Days(day))).altitude;
  };
  // A lap of half an hour turns the Sun by 7.5 degrees, so a noon within it shows beside a sample.
  const int laps = std::max(2, static_cast<int>(std::ceil((b - a).count() * 48.0)));
  const double lap = (b - a).count() / laps;
  int best = 0;
  for (int i = 1; i <= laps; ++i)
    if (depth(a.days() + i * lap) < depth(a.days() + best * lap)) best = i;
  const double at = a.days() + best * lap;
  return search_detail::least_between(depth, std::max(a.days(), at - lap),
                                      std::min(b.days(), at + lap), at, 1e-5)
             .value < 0.0;
}

}  // namespace

std::vector<SunTransit> sun_transits(const YearEphemeris& ephemeris, Ut from, Ut to) {
  constexpr Days lap(1.0);
  // In a day a planet gains up to 2.3 degrees on the Sun about its inferior conjunction.
  constexpr double near = 0.03;  // radians
  const Ut first = std::max(from - lap, first_instant(ephemeris)),
           last = std::min(to + lap, last_instant(ephemeris));
  std::vector<SunTransit> found;
  for (const Body planet : {Body::mercury, Body::venus}) {
    const auto discs = [&](Ut t) { return Discs(ephemeris, planet, t); };
    const auto separation = [&](Ut t) { return discs(t).separation; };
    std::vector<Ut> times;
    std::vector<double> apart;
    for (Ut t = first; t < last + lap; t = t + lap) {
      times.push_back(std::min(t, last));
      const Discs d = discs(times.back());
      apart.push_back(d.in_front ? d.separation : 4.0);
    }
    for (std::size_t i = 0; i < times.size(); ++i) {
      const double before = i > 0 ? apart[i - 1] : 9.0,
                   after = i + 1 < apart.size() ? apart[i + 1] : 9.0;
      if (apart[i] > near || apart[i] > before || apart[i] >= after) continue;
      const Ut a = times[i > 0 ? i - 1 : i], b = times[i + 1 < times.size() ? i + 1 : i];
      const Ut greatest = nearest(separation, a, b);
      if (greatest < from || greatest >= to) continue;
      const Discs d = discs(greatest);
      const Angle parallax =
          equatorial_parallax_at_1_au * (1.0 / d.planet_distance - 1.0 / d.sun.norm());
      if (d.separation > d.sun_radius + d.planet_radius + parallax.radians()) continue;
      const auto seen = contacts([&](Ut t) { return discs(t).excess(1.0); },
                                 std::max(greatest - Days(0.5), first_instant(ephemeris)), greatest,
                                 std::min(greatest + Days(0.5), last_instant(ephemeris)));
      found.push_back({planet, seen ? (*seen)[0] : greatest, greatest, seen ? (*seen)[1] : greatest,
                       Angle::from_radians(d.separation)});
    }
  }
  std::sort(found.begin(), found.end(),
            [](const SunTransit& a, const SunTransit& b) { return a.greatest < b.greatest; });
  return found;
}

std::optional<SiteSunTransit> at_site(const SiteSky& sky, const SunTransit& transit) {
  const YearEphemeris& ephemeris = sky.ephemeris();
  const Observer& site = sky.observer();
  const auto discs = [&](Ut t) {
    return Discs(ephemeris, transit.planet, t,
                 observer_vector_au(site.latitude, site.elevation_m, sky.local_sidereal_time(t)));
  };
  // Parallax moves the contacts by ten minutes, and by more than an hour where the chord is short.
  constexpr Days reach(0.1);
  const Ut from = std::max(transit.begins - reach, first_instant(ephemeris)),
           to = std::min(transit.ends + reach, last_instant(ephemeris));
  const Ut greatest = nearest([&](Ut t) { return discs(t).separation; }, from, to);
  const auto exterior = contacts([&](Ut t) { return discs(t).excess(1.0); }, from, greatest, to);
  if (!exterior || !sun_shows(sky, (*exterior)[0], (*exterior)[1])) return {};
  const auto sighting = [&](Ut t) {
    const Horizontal place = to_horizontal(discs(t).sun, sky.local_sidereal_time(t), site.latitude);
    return Sighting{t, place, place.altitude > sun_rise_altitude};
  };
  SiteSunTransit seen{transit.planet,
                      sighting((*exterior)[0]),
                      sighting(greatest),
                      sighting((*exterior)[1]),
                      {},
                      {},
                      Angle::from_radians(discs(greatest).separation)};
  if (const auto interior = contacts([&](Ut t) { return discs(t).excess(-1.0); }, (*exterior)[0],
                                     greatest, (*exterior)[1])) {
    seen.fully_on = (*interior)[0];
    seen.begins_to_leave = (*interior)[1];
  }
  return seen;
}

std::vector<Event> transit_events(const SiteSunTransit& transit) {
  const auto event = [&](EventKind kind, const Sighting& s) {
    return Event{kind, transit.planet, s.at, s.place.altitude.degrees()};
  };
  return {event(EventKind::transit_begins, transit.begins),
          event(EventKind::transit_greatest, transit.greatest),
          event(EventKind::transit_ends, transit.ends)};
}

}  // namespace duskleaf
