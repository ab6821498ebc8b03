// The Sun against a local horizon. What an inclinometer shows is the apparent altitude: the true
// one of the Sun's upper edge (semidiameter 959.63" at 1 au, A. Auwers 1891; parallax from the
// site's place) raised by refraction (T. Saemundsson 1986, see sky/horizon.hpp). The skyline has
// corners, so the search samples where the Sun passes each of its points: between two samples the
// difference is smooth.
#include "almanac/skyline.hpp"

#include <algorithm>
#include <cmath>

#include "ephemeris/constants.hpp"
#include "events/search.hpp"

namespace duskleaf {
namespace {

constexpr Angle sun_radius_at_1_au = Angle::from_radians(sun_semidiameter);
constexpr Days step(20.0 / 1440.0);
// The altitude's curvature leaves a chord of `step` by 0.06 degree at most (15 degrees an hour); a
// steep piece of skyline by more, as the azimuth is curved too.
constexpr double graze_margin = Angle::from_degrees(0.2).radians();
constexpr Seconds tolerance(0.05);

/// The Sun's upper edge at an instant.
Horizontal upper_edge(const SiteSky& sky, Ut t) {
  const Observer& site = sky.observer();
  const Angle sidereal = sky.local_sidereal_time(t);
  const Eigen::Vector3d sun = sky.ephemeris().apparent(Body::sun, to_tt(t)) -
                              observer_vector_au(site.latitude, site.elevation_m, sidereal);
  Horizontal place = to_horizontal(sun, sidereal, site.latitude);
  place.altitude = place.altitude + sun_radius_at_1_au / sun.norm();
  place.altitude = place.altitude + refraction(place.altitude);
  return place;
}

/// The Sun against one skyline.
class Clearance {
 public:
  Clearance(const SiteSky& sky, const std::vector<SkylinePoint>& skyline)
      : sky_(sky), skyline_(skyline) {
    const auto [low, high] = std::minmax_element(
        skyline.begin(), skyline.end(), [](auto& a, auto& b) { return a.altitude < b.altitude; });
    // Refraction lifts by less than 0.7 degree and the edge stands 0.27 above the centre.
    behind_ = sin(low->altitude - Angle::from_degrees(1.2));
    clear_ = sin(high->altitude);
  }

  struct Look {
    Angle azimuth;
    double height;  // of the edge above the skyline, radians
  };
  Look look(Ut t) const {
    const Horizontal edge = upper_edge(sky_, t);
    return {edge.azimuth,
            edge.altitude.radians() - skyline_height(skyline_, edge.azimuth).radians()};
  }
  double operator()(Ut t) const { return look(t).height; }
  /// Above the whole skyline (1) or below all of it (-1), told cheaply; 0: it must be looked at.
  int certainly(Ut t) const {
    const double altitude = sky_.sight(Body::sun, t).altitude;
    return altitude > clear_ ? 1 : altitude < behind_ ? -1 : 0;
  }
  const std::vector<SkylinePoint>& skyline() const { return skyline_; }

 private:
  const SiteSky& sky_;
  const std::vector<SkylinePoint>& skyline_;
  double behind_, clear_;  // sines of the centre's geocentric altitude
};

/// Adds the crossings within a stretch on which the clearance is smooth.
void cross_smooth(const Clearance& f, Ut a, double fa, Ut b, double fb,
                  std::vector<Crossing>& found) {
  using namespace search_detail;
  const auto at_day = [&](double day) { return f(Ut(Days(day))); };
  const auto zero = [&](double from, double f_from, double to, double f_to) {
    found.push_back({Ut(Days(zero_between(at_day, from, f_from, to, f_to, tolerance / Days(1)))),
                     f_from < f_to});
  };
  if ((fa < 0.0) != (fb < 0.0)) return zero(a.days(), fa, b.days(), fb);
  if (std::min(std::abs(fa), std::abs(fb)) > graze_margin) return;
  const double sign = fa < 0.0 ? -1.0 : 1.0;
  const Least least = least_between([&](double day) { return sign * at_day(day); }, a.days(),
                                    b.days(), 0.5 * (a.days() + b.days()), tolerance / Days(1));
  if (least.value >= 0.0) return;
  zero(a.days(), fa, least.at, sign * least.value);
  zero(least.at, sign * least.value, b.days(), fb);
}

/// The instants between a and b at which the Sun passes a point of the skyline, in order.
std::vector<Ut> corners(const Clearance& f, Ut a, Angle from, Ut b, Angle to) {
  const double turned = (to - from).centred().radians();
  std::vector<Ut> at;
  for (const SkylinePoint& point : f.skyline()) {
    const double ahead = (point.azimuth - from).centred().radians();
    if (turned == 0.0 || ahead / turned <= 0.0 || ahead / turned >= 1.0) continue;
    const auto short_of = [&](double day) {
      return (f.look(Ut(Days(day))).azimuth - point.azimuth).centred().radians();
    };
    at.push_back(Ut(Days(search_detail::zero_between(short_of, a.days(), -ahead, b.days(),
                                                     turned - ahead, tolerance / Days(1)))));
  }
  std::sort(at.begin(), at.end());
  return at;
}

/// Every crossing of the skyline in [from, to), in order.
std::vector<Crossing> skyline_crossings(const Clearance& f, Ut from, Ut to) {
  std::vector<Crossing> found;
  Ut a = from;
  int sure_a = f.certainly(a);
  std::optional<Clearance::Look> look_a;
  while (a < to) {
    const Ut b = std::min(a + step, to);
    const int sure_b = f.certainly(b);
    std::optional<Clearance::Look> look_b;
    if (sure_a == 0 || sure_b != sure_a) {
      if (!look_a) look_a = f.look(a);
      look_b = f.look(b);
      Ut before = a;
      double height = look_a->height;
      for (const Ut t : corners(f, a, look_a->azimuth, b, look_b->azimuth)) {
        const double here = f(t);
        cross_smooth(f, before, height, t, here, found);
        before = t;
        height = here;
      }
      cross_smooth(f, before, height, b, look_b->height, found);
    }
    a = b;
    sure_a = sure_b;
    look_a = look_b;
  }
  return found;
}

}  // namespace

Angle skyline_height(const std::vector<SkylinePoint>& points, Angle azimuth) {
  if (points.empty()) return Angle();
  const Angle turn = Angle::from_degrees(360.0), at = azimuth.positive();
  const auto after = std::upper_bound(points.begin(), points.end(), at,
                                      [](Angle a, const SkylinePoint& p) { return a < p.azimuth; });
  // Through north the last point stands a turn before the first.
  const bool first = after == points.begin(), last = after == points.end();
  const SkylinePoint& left = first ? points.back() : *(after - 1);
  const SkylinePoint& right = last ? points.front() : *after;
  const Angle begins = first ? left.azimuth - turn : left.azimuth,
              ends = last ? right.azimuth + turn : right.azimuth;
  if (!(ends > begins)) return left.altitude;
  return left.altitude + (right.altitude - left.altitude) * ((at - begins) / (ends - begins));
}

bool above_skyline(const std::vector<SkylinePoint>& points, const Horizontal& apparent) {
  return apparent.altitude > skyline_height(points, apparent.azimuth);
}

std::vector<SkylineDay> skyline_days(const SiteSky& sky, const SiteYear& year) {
  const Place& place = year.place;
  if (place.skyline.empty()) return {};
  const Date first = year.span.first_day(), end = year.span.end_day() + std::chrono::days(1);
  std::vector<SkylineDay> days;
  for (Date date = first; date < end; date += std::chrono::days(1))
    days.push_back({date, {}, {}, false});

  // An instant belongs to the date that its rounded minute prints, so the search reaches a minute
  // further.
  const Clearance clearance(sky, place.skyline);
  const Days minute(1.0 / 1440.0);
  const Ut from = place.zone.start_of(first) - minute, to = place.zone.start_of(end) + minute;
  const std::vector<Crossing> crossings = skyline_crossings(clearance, from, to);
  for (const Crossing& c : crossings) {
    const Date date = place.zone.civil(c.at).date();
    if (date < first || date >= end) continue;
    SkylineDay& day = days[static_cast<std::size_t>((date - first).count())];
    if (c.rising && !day.clears) day.clears = c.at;
    if (!c.rising) day.gone = c.at;
  }
  for (SkylineDay& day : days) {
    const Ut starts = place.zone.start_of(day.date),
             ends = place.zone.start_of(day.date + std::chrono::days(1));
    if (day.clears || day.gone || !(starts < ends)) continue;
    day.never_clears = clearance(starts + Days(0.5 * (ends - starts))) < 0.0;
  }
  return days;
}

}  // namespace duskleaf
