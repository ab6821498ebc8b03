#include <array>
#include <cmath>

#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "ephemeris/year_ephemeris.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/sky_chart_dome.hpp"
#include "sky/moon_look.hpp"

// The half of the sky that one faces. Stars stand at
// their true altitude; refraction, half a degree on the horizon, would move them by less than the
// smallest dot's width two degrees higher.

namespace duskleaf {
namespace {

/// Height of the direction letters and the title under the base.
double strip_height(const BlockContext& context) {
  return 3.4 + context.type.cap_height(Face::bold, context.theme.label_pt + 2);
}

void draw_ground(const DomeView& view, const Theme& theme, std::vector<Mark>& out) {
  out.push_back(Fill{view.outline_path(), theme.lap});
  Path within = Path::arc(view.middle(), view.unit(), 0, 180);
  out.push_back(Fill{within.close(), theme.sky});
}

/// Where the tone begins, for copies that have lost it; it makes way for names.
void add_lap_edge(SkyChart& chart, const DomeView& view) {
  std::vector<Point> arc;
  for (int i = 0; i <= 60; ++i) {
    const Angle a = Angle::from_degrees(3 * i);
    arc.push_back({view.middle().x + view.unit() * cos(a), view.middle().y - view.unit() * sin(a)});
  }
  chart.add_guide({arc}, {0.13, chart.context().theme.blue_soft, {}, 0.1});
}

void draw_frame(const DomeView& view, const BlockContext& context, std::vector<Mark>& out) {
  const Theme& theme = context.theme;
  const Point m = view.middle();
  // The ground is the firmest line of the page.
  out.push_back(Stroke{Path::arc(m, view.radius(), 0, 180), 0.3, theme.blue, {}, false});
  Path ground;
  ground.move({m.x - view.radius() - 0.15, m.y + 0.3})
      .line({m.x + view.radius() + 0.15, m.y + 0.3});
  out.push_back(Stroke{ground, 0.6, theme.blue, {}, false});
  const double letter_pt = theme.label_pt + 1;
  const double baseline = m.y + 1.5 + context.type.cap_height(Face::bold, letter_pt) + 0.9;
  Path ticks;
  for (int i = -6; i <= 6; ++i) {
    const double turn = i * 15.0;
    const auto p = view.project({Angle(), view.facing() + Angle::from_degrees(turn)});
    if (!p) continue;
    ticks.move({p->x, p->y + 0.6}).line({p->x, p->y + (i % 3 == 0 ? 1.9 : 1.3)});
  }
  out.push_back(Stroke{ticks, 0.2, theme.blue, {}, false});
  const auto set = [&](std::string words, double x, double size, Face face, double tracking) {
    const double width =
        context.type.width(words, face, size, tracking) - tracking * size * mm_per_pt;
    out.push_back(
        Text{{x - width / 2, baseline}, std::move(words), face, size, theme.blue, tracking});
  };
  const bool south = view.facing().degrees() > 90;
  set(context.words(south ? "dome.facing-south" : "dome.facing-north"), m.x, letter_pt + 1,
      Face::bold, 0.08);
  for (const double turn : {-90.0, -45.0, 45.0, 90.0}) {
    const Angle azimuth = (view.facing() + Angle::from_degrees(turn)).positive();
    const auto p = view.project({Angle(), azimuth});
    set(context.words.direction_short(azimuth), p->x, letter_pt, Face::regular, 0);
  }
}

void add_altitudes(SkyChart& chart, const DomeView& view) {
  const Theme& theme = chart.context().theme;
  for (const double altitude : {30.0, 60.0}) {
    std::vector<Horizontal> curve;
    for (int turn = -130; turn <= 130; turn += 2)
      curve.push_back({Angle::from_degrees(altitude), view.facing() + Angle::from_degrees(turn)});
    chart.add_guide(view.trace(curve), {theme.hairline_mm, theme.faint, {}, 0.08});
    std::vector<Point> places;
    for (const double turn : {-66.0, 66.0, -58.0, 58.0, -72.0, 72.0, -50.0, 50.0, -40.0, 40.0})
      if (const auto p = view.project(
              {Angle::from_degrees(altitude), view.facing() + Angle::from_degrees(turn)}))
        places.push_back(*p);
    chart.label_on_line(
        chart.context().words("dome.altitude",
                              {{"degrees", chart.context().words.number(altitude, 0)}}),
        places);
  }
}

void add_circles(SkyChart& chart, const DomeView& view) {
  const BlockContext& context = chart.context();
  const Theme& theme = context.theme;
  const Angle latitude = context.site.place.observer.latitude;
  const Angle sidereal = context.evening().local_sidereal_time;
  std::vector<Horizontal> equator, ecliptic;
  for (int i = 0; i <= 360; i += 2) {
    const Angle a = Angle::from_degrees(i);
    equator.push_back(horizontal_of(a, Angle(), latitude));
    const auto [ra, dec] = ecliptic_point(a);
    ecliptic.push_back(horizontal_of(sidereal - ra, dec, latitude));
  }
  // Begun where each is under the ground, so that no stretch is cut in two where the list closes.
  const auto from_below = [](std::vector<Horizontal>& curve) {
    std::size_t lowest = 0;
    for (std::size_t i = 0; i < curve.size(); ++i)
      if (curve[i].altitude < curve[lowest].altitude) lowest = i;
    curve.pop_back();
    std::rotate(curve.begin(), curve.begin() + static_cast<std::ptrdiff_t>(lowest % curve.size()),
                curve.end());
    curve.push_back(curve.front());
  };
  from_below(equator);
  from_below(ecliptic);
  chart.add_guide(view.trace(equator), {0.25, theme.blue, {1.7, 1.0}, 0.35},
                  context.words("dome.equator"));
  chart.add_guide(view.trace(ecliptic), {0.25, theme.blue_soft, {0.25, 0.85}, 0.3},
                  context.words("dome.ecliptic"));
}

void add_zenith(SkyChart& chart, const DomeView& view) {
  const BlockContext& context = chart.context();
  const Point z{view.middle().x, view.middle().y - view.unit()};
  const double arm = 1.2;
  Path cross;
  cross.move({z.x - arm, z.y}).line({z.x + arm, z.y}).move({z.x, z.y - arm}).line({z.x, z.y + arm});
  chart.add_mark(Stroke{cross, 0.25, context.theme.blue, {}, false}, z, 2 * arm);
  LabelRequest request;
  request.forms = {{{context.words("dome.overhead")}, Face::italic, context.theme.label_pt, 0}};
  request.importance = 960;
  request.point = z;
  request.clearance_mm = arm;
  request.cost_limit = 12;
  request.ink = context.theme.blue;
  chart.wish(std::move(request));
}

void add_bodies(SkyChart& chart, const DomeView& view) {
  const BlockContext& context = chart.context();
  const EveningSky& evening = context.evening();
  for (const PlanetEvening& planet : evening.planets) {
    if (planet.place.altitude.degrees() < 1) continue;
    if (!planet.visible && planet.magnitude > std::min(evening.faintest_star, 5.0)) continue;
    const auto p = view.project(planet.place);
    if (p && chart.holds(*p))
      chart.add_planet(*p, planet.magnitude,
                       context.words("body." + std::string(body_name(planet.planet))));
  }
  if (evening.moon.altitude.degrees() < 0.3) return;
  const auto p = view.project(evening.moon);
  if (!p || !chart.holds(*p)) return;
  const Observer& observer = context.site.place.observer;
  const Angle from_zenith =
      bright_limb_from_zenith(context.ephemeris, observer.latitude, observer.longitude,
                              observer.elevation_m, evening.moment);
  chart.add_moon(
      *p, evening.moon_lit, from_zenith + view.up_at(evening.moon),
      context.words(
          "dome.moon",
          {{"date", context.words("date.day-month", {{"day", std::to_string(day_of(evening.date))},
                                                     {"month", context.words.month_short(
                                                                   month_of(evening.date))}})}}));
}

}  // namespace

double dome_radius(const BlockContext& context, const Box& area) {
  return std::min(area.width / 2, area.height - strip_height(context));
}

DomeDrawing compose_dome(const BlockContext& context, DomeFacing facing, const Box& area,
                         std::vector<Mark>& out) {
  const double strip = strip_height(context);
  const double radius = dome_radius(context, area);
  const DomeView view({area.x + area.width / 2, area.y + radius}, radius,
                      dome_azimuth(facing, context.site.place.observer.latitude));
  const EveningSky& evening = context.evening();
  draw_ground(view, context.theme, out);
  SkyChart chart(context, view.outline(), view.label_region(), view.outline_path());
  chart.add_stars(std::min(evening.faintest_star, chart_limit), evening.faintest_star,
                  [&](int star) {
                    const Horizontal& place = evening.stars[static_cast<std::size_t>(star)];
                    return place.altitude.degrees() < -25 ? std::nullopt : view.project(place);
                  });
  add_lap_edge(chart, view);
  add_zenith(chart, view);
  add_bodies(chart, view);
  add_altitudes(chart, view);
  if (evening.shift == EveningShift::no_stars) {
    add_paths_of_day(chart, view, facing == DomeFacing::equator);
  } else {
    chart.add_figures();
    add_circles(chart, view);
    if (facing == DomeFacing::pole) add_pole(chart, view);
    const std::array<int, 3> finders = {424, 4301, 4295};  // Polaris, Dubhe, Merak
    chart.name_stars(
        2.5, 24,
        facing == DomeFacing::pole ? std::span<const int>(finders) : std::span<const int>());
    chart.name_constellations([](int) { return true; }, Face::regular, Face::light,
                              context.theme.label_pt, 600);
    chart.name_asterisms();
  }
  chart.finish(out);
  draw_frame(view, context, out);
  return {radius + strip, view.outline(), chart.label_boxes(), chart.labels()};
}

double draw_dome(const BlockContext& context, const BlockOptions& options, const Box& area,
                 std::vector<Mark>& out) {
  const DomeFacing facing =
      options.get("facing") == "pole" ? DomeFacing::pole : DomeFacing::equator;
  return compose_dome(context, facing, area, out).height;
}

}  // namespace duskleaf
