// Discs at the distances and directions that the circumstances give; directions are
// counterclockwise from the zenith, as the observer faces it. Elementary.
#include "sheet/eclipse_drawing.hpp"

#include <memory>

#include "sky/moon_look.hpp"
#include "sky/planet_disc.hpp"

namespace duskleaf {
namespace {

Point middle(const Box& box) { return {box.x + box.width / 2, box.y + box.height / 2}; }

/// From `centre` by `distance` mm, counterclockwise from the page's top.
Point towards(Point centre, Angle from_up, double distance) {
  return {centre.x - distance * sin(from_up), centre.y - distance * cos(from_up)};
}

void clipped(Path clip, std::vector<Mark> marks, std::vector<Mark>& out) {
  out.emplace_back(std::make_shared<ClipGroup>(ClipGroup{std::move(clip), std::move(marks)}));
}

constexpr double outline_mm = 0.25;

}  // namespace

void draw_solar_phase(const SiteSolarEclipse& e, const Box& box, const Theme& theme,
                      std::vector<Mark>& out) {
  const Point centre = middle(box);
  const double sun = box.width * 0.34;
  const double moon = sun * e.moon_radius;
  const Point there = towards(centre, e.moon_from_zenith, sun * e.moon_distance);
  const bool total = e.moon_distance + 1 <= e.moon_radius;
  if (total) {  // the corona, as a ring of tone
    out.emplace_back(Fill{Path::circle(centre, sun * 1.4), theme.civil});
    out.emplace_back(Fill{Path::circle(centre, sun * 1.18), theme.nautical});
  }
  out.emplace_back(Fill{Path::circle(centre, sun), theme.paper});
  clipped(Path::circle(centre, sun), {Fill{Path::circle(there, moon), theme.dark}}, out);
  clipped(Path::rectangle(box),
          {Stroke{Path::circle(there, moon), theme.hairline_mm, theme.soft, {0.6, 0.6}}}, out);
  out.emplace_back(Stroke{Path::circle(centre, sun), outline_mm, theme.black});
}

void draw_lunar_phase(const SiteLunarEclipse& e, const Box& box, const Theme& theme,
                      std::vector<Mark>& out) {
  const Point centre = middle(box);
  const double moon = box.width * 0.28;
  const Point shadow = towards(centre, e.shadow_from_zenith, moon * e.shadow_distance);
  const Path umbra = Path::circle(shadow, moon * e.umbra_radius);
  out.emplace_back(Fill{Path::circle(centre, moon), theme.paper});
  clipped(Path::circle(centre, moon),
          {Fill{Path::circle(shadow, moon * e.penumbra_radius), theme.civil},
           Fill{umbra, theme.astronomical}},
          out);
  clipped(Path::rectangle(box), {Stroke{umbra, theme.hairline_mm, theme.soft, {0.6, 0.6}}}, out);
  out.emplace_back(Stroke{Path::circle(centre, moon), outline_mm, theme.black});
}

void draw_sun_transit(const SiteSky& sky, const SiteSunTransit& transit, Ut at, const Box& box,
                      const Theme& theme, std::vector<Mark>& out) {
  const Point centre = middle(box);
  const double sun = box.width * 0.4;
  const Observer& o = sky.observer();
  const auto seen = [&](Body body, Ut t) {
    return topocentric(sky.ephemeris(), body, o.latitude, o.longitude, o.elevation_m, t);
  };
  // The sky turns meanwhile: all places stand as at the moment drawn.
  const Angle sidereal = sky.local_sidereal_time(at);
  const Eigen::Vector3d up = zenith(o.latitude, sidereal);
  const auto place = [&](Ut t) {
    const Eigen::Vector3d s = seen(Body::sun, t), p = seen(transit.planet, t);
    const double apart = angle_between(s, p) / disc_radius(Body::sun, s.norm());
    return towards(centre, position_angle(s, p, up), sun * apart);
  };
  out.emplace_back(Fill{Path::circle(centre, sun), theme.paper});
  out.emplace_back(Stroke{Path::circle(centre, sun), outline_mm, theme.black});
  clipped(Path::rectangle(box),
          {Stroke{Path::polyline({place(transit.begins.at), place(transit.greatest.at),
                                  place(transit.ends.at)}),
                  theme.hairline_mm,
                  theme.soft,
                  {0.6, 0.6}}},
          out);
  out.emplace_back(Fill{Path::circle(place(at), transit.planet == Body::venus ? sun * 0.04 : 0.35),
                        theme.black});
}

}  // namespace duskleaf
