// "In sight" is almanac/planets.hpp's rule for the bare eye: where it shows Jupiter, binoculars on
// a rest show its moons (common practice).
#include "sheet/jupiter_column.hpp"

#include <algorithm>

#include "almanac/evening_moment.hpp"
#include "almanac/planets.hpp"
#include "sky/jupiter_moons.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

constexpr auto fewest_nights = 7;

/// The hour of the first session that begins in the evening or the night, else of the charts.
ChartHour hour_of(const BlockContext& c) {
  using std::chrono::hours;
  for (const Session& session : c.site.sessions)
    if (session.from && (*session.from >= hours(16) || *session.from <= hours(6)))
      return {session.from};
  const int month = c.year.span.month(c.month_index).second;
  return c.year.place.chart_hours[static_cast<std::size_t>(month - 1)];
}

}  // namespace

std::optional<JupiterColumn> jupiter_column(const BlockContext& c,
                                            const std::vector<const Night*>& nights) {
  if (nights.empty()) return std::nullopt;
  const ChartHour hour = hour_of(c);
  const SiteSky sky(c.ephemeris, c.year.place.observer, nights.front()->from - Days(1),
                    nights.back()->to + Days(1));
  JupiterColumn column;
  column.hour =
      hour.after_midnight ? c.words.time_of_day(*hour.after_midnight) : c.words("night-bars.dusk");
  for (const Night* night : nights) {
    column.order.emplace_back();
    if (night->from == night->to) continue;  // a date that the zone skipped
    const Ut at = chart_moment(sky, c.year.place.zone, hour, *night);
    const Angle altitude = apparent_place(sky, Body::jupiter, at).altitude;
    if (altitude < least_height(Body::jupiter)) continue;
    const SkyLight light = sky_light(sky, c.year.place.limiting_magnitude, at);
    const double magnitude =
        planet_magnitude(Body::jupiter, planet_aspect(c.ephemeris, Body::jupiter, to_tt(at)));
    if (light.sun_altitude < planets_visible_below &&
        bare_eye_visible(Body::jupiter, magnitude, altitude, light.faintest_star))
      column.order.back() = moons_east_to_west(jupiter_moons(c.ephemeris, to_tt(at)));
  }
  const auto in_sight = std::count_if(column.order.begin(), column.order.end(),
                                      [](const std::string& order) { return !order.empty(); });
  if (in_sight < fewest_nights) return std::nullopt;
  return column;
}

}  // namespace duskleaf
