#include <cmath>

#include "ephemeris/year_ephemeris.hpp"
#include "sheet/sky_chart_dome.hpp"

// Where the Sun never sinks 6 degrees that night, no chart of stars helps: the dome then carries
// the way of the Sun and of the Moon through that civil day, hour by hour, and the date on which
// stars come back.

namespace duskleaf {
namespace {

struct Step {
  Ut at;
  Horizontal place;
};

std::vector<Step> way_of(const BlockContext& context, Body body, Date date) {
  const Place& place = context.site.place;
  const Ut from = place.zone.start_of(date), to = place.zone.start_of(date + std::chrono::days(1));
  std::vector<Step> way;
  const int steps = static_cast<int>(std::lround((to - from).count() * 96));
  for (int i = 0; i <= steps; ++i) {
    const Ut at = from + Days(i / 96.0);
    const EquatorialPlace where = context.ephemeris.place(body, to_tt(at));
    const Angle sidereal = context.ephemeris.apparent_sidereal_time(at) + place.observer.longitude;
    way.push_back({at, horizontal_of(sidereal - where.right_ascension, where.declination,
                                     place.observer.latitude)});
  }
  return way;
}

}  // namespace

bool moon_up_that_day(const BlockContext& context) {
  for (const Step& step : way_of(context, Body::moon, context.evening().date))
    if (step.place.altitude.degrees() > 0) return true;
  return false;
}

void add_paths_of_day(SkyChart& chart, const DomeView& view, bool with_message) {
  const BlockContext& context = chart.context();
  const Theme& theme = context.theme;
  const EveningSky& evening = context.evening();
  const Place& place = context.site.place;

  for (const Body body : {Body::sun, Body::moon}) {
    const bool sun = body == Body::sun;
    const std::vector<Step> way = way_of(context, body, evening.date);
    std::vector<Horizontal> curve;
    for (const Step& step : way) curve.push_back(step.place);
    const GuideStyle style = sun ? GuideStyle{0.4, theme.black, {}, 0.8, 0.5}
                                 : GuideStyle{0.25, theme.blue_soft, {1.6, 0.8}, 0.4, 0.3};
    chart.add_guide(view.trace(curve), style,
                    context.words(sun ? "dome.way-of-sun" : "dome.way-of-moon"), true);
    // A dot at each full hour, its civil time at every second one.
    for (std::size_t i = 0; i < way.size(); i += 4) {
      const auto p = view.project(way[i].place);
      if (!p || !chart.holds(*p)) continue;
      const double size = sun ? 1.1 : 0.7;
      chart.add_mark(Fill{Path::circle(*p, size / 2), sun ? theme.black : theme.blue_soft}, *p,
                     size);
      if (!sun || i % 8 != 0) continue;
      LabelRequest hour;
      hour.forms = {
          {{context.words.time(place.zone.civil(way[i].at))}, Face::regular, theme.label_pt, 0}};
      hour.importance = 700;
      hour.point = *p;
      hour.clearance_mm = size / 2;
      hour.ink = theme.black;
      chart.wish(std::move(hour));
    }
  }

  const EquatorialPlace sun = context.ephemeris.place(Body::sun, to_tt(evening.moment));
  const Horizontal now = horizontal_of(evening.local_sidereal_time - sun.right_ascension,
                                       sun.declination, place.observer.latitude);
  const auto p = view.project(now);
  if (now.altitude.degrees() > 0 && p && chart.holds(*p))
    chart.add_sun(*p, context.words("body.sun"));

  if (!with_message) return;
  LabelRequest message;
  const std::string back =
      evening.stars_return
          ? context.words("dome.stars-return",
                          {{"date", context.words.day_month(*evening.stars_return)}})
          : context.words("dome.no-return");
  message.forms = {{{context.words("dome.no-stars"), back}, Face::regular, theme.body_pt + 0.5, 0}};
  message.importance = 1200;
  const Point middle = view.middle();
  for (const double share : {0.78, 0.7, 0.84, 0.6, 0.5, 0.4, 0.3, 0.2})
    message.places.push_back({middle.x, middle.y - share * view.unit()});
  message.cost_limit = 30;
  message.ink = theme.blue;
  chart.wish(std::move(message));
}

}  // namespace duskleaf
