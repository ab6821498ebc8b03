// What it takes to show something, this project's own rule out of common practice:
// - A star: an opening of D mm shows stars 5 log10(D / 7 mm) fainter than the bare eye, whose pupil
//   is 7 mm wide (common practice).
// - A double: both stars must be that bright, and the opening must part them: 116"/D (W. R. Dawes,
//   "Catalogue of Micrometrical Measurements of Double Stars", Memoirs of the RAS 35, 1867; from
//   memory) for stars alike; a difference of m magnitudes asks for 10^(0.13 m) times the opening
//   (own fit to common practice: Rigel 100 mm, Polaris 80 mm). Without a telescope the gap must
//   look 4' wide: to the bare eye, or ten times magnified in binoculars of 50 mm.
// - What is extended: its whole light must be that bright, with an allowance for what its mean
//   surface brightness lies below the sky's: half of the difference, and the whole too of what goes
//   beyond 3 magnitudes; past 3.8 magnitudes no opening shows it. Set so that the Andromeda Galaxy
//   is a bare-eye sight down to a limit of 4.7 and one for binoculars in town, M33 a bare-eye sight
//   at 6.5. Star clusters are seen star by star or by their cores: half of the difference without
//   end, for open ones 2 magnitudes at most. To be told from a star it must look half a degree
//   wide: ten times magnified in binoculars, D times in a telescope of D mm. The bare eye is given
//   only to what observers call bare-eye objects (ShowObject::bare_eye): enough light in all is not
//   yet a sight. What moonlight and twilight take counts 1.3 times for nebulae, galaxies and star
//   clouds, whose faint edges go first; and while a Moon more than three quarters lit is 5 degrees
//   up, no galaxy is offered, and no nebula fainter than 21 magnitudes a square arcsecond in the
//   mean (common practice; the number is this project's own). Doubles alone are offered until the
//   Sun is 10 degrees down; such glows, galaxies and star clouds wait until it is 13.
// The sky's brightness follows from the faintest star by B. E. Schaefer 1990, PASP 102, 212, as in
// sky/brightness.cpp, turned round. The faintest star is the zenith's; lower down an ordinary
// night takes 0.25 magnitude for each further air mass (common practice), 1 / sine of the altitude.
#include "almanac/show_list.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>
#include <limits>
#include <numbers>

#include "almanac/planets.hpp"
#include "almanac/skyline.hpp"
#include "catalogue/stars.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

constexpr std::array usual_openings_mm = {0.0, 50.0, 80.0, 100.0, 150.0, 200.0, 250.0, 300.0};
constexpr double binoculars_mm = 50.0, binoculars_magnify = 10.0, pupil_mm = 7.0;

constexpr Angle least_object_height = Angle::from_degrees(15.0);
// The first for what takes optics, and in two months for what shall not be called its last chance.
constexpr Angle least_planet_height = Angle::from_degrees(10.0);
constexpr Angle least_bright_height = Angle::from_degrees(5.0);
constexpr Angle two_hours = Angle::from_degrees(30.0);
constexpr Days two_months(60);
// A thinner crescent does not stand in a dark sky (common practice).
constexpr double moon_lit_from = 0.01;
constexpr double dimming_of_extended = 1.3;
constexpr double moon_hides_faint_things_from = 0.75;  // lit
constexpr double drowned_surface = 21.0;               // magnitudes per square arcsecond

/// Magnitudes that an opening gains on the bare eye.
double gain(double opening_mm) {
  return opening_mm > 0.0 ? 5.0 * std::log10(opening_mm / pupil_mm) : 0.0;
}

/// V magnitudes per square arcsecond of a sky whose faintest star is given.
double sky_surface_brightness(double faintest_star) {
  const double limit = std::min(faintest_star, 7.5);  // the relation ends at 7.93
  return 21.58 - 5.0 * std::log10(std::pow(10.0, 1.586 - limit / 5.0) - 1.0);
}

bool shows_double(const ShowObject& pair, double faintest_star, double opening_mm) {
  if (pair.second_magnitude > faintest_star + gain(opening_mm)) return false;
  constexpr double gap_arcsec = 240.0;  // as it must look to the eye
  const double separation = pair.size.arcseconds();
  if (opening_mm == 0.0) return separation >= gap_arcsec;
  const double unequal = std::pow(10.0, 0.13 * (pair.second_magnitude - pair.magnitude));
  if (opening_mm * separation < 116.0 * unequal) return false;
  return opening_mm > binoculars_mm || separation * binoculars_magnify >= gap_arcsec;
}

/// Mean over the object, V magnitudes per square arcsecond.
double surface_brightness(const ShowObject& object) {
  const double width = object.size.arcseconds();
  return object.magnitude +
         2.5 * std::log10(std::numbers::pi / 4.0 * width * width * object.axis_ratio);
}

bool drowns_in_moonlight(const ShowObject& object) {
  const bool nebula =
      object.sort == ShowClass::nebula || object.sort == ShowClass::planetary_nebula;
  return object.sort == ShowClass::galaxy ||
         (nebula && surface_brightness(object) > drowned_surface);
}

/// Stars come out first; glows wait for the night (common practice).
bool fits_twilight(const ShowObject& object, Angle sun_altitude) {
  constexpr Angle clusters_from = Angle::from_degrees(-10), glows_from = Angle::from_degrees(-13);
  const bool glow = object.sort == ShowClass::galaxy || object.sort == ShowClass::star_cloud ||
                    surface_brightness(object) > drowned_surface;
  return object.sort == ShowClass::double_star ||
         sun_altitude < (glow ? glows_from : clusters_from);
}

bool shows_extended(const ShowObject& object, double faintest_star, double opening_mm) {
  const double width = object.size.arcseconds();
  const double below_sky =
      std::max(0.0, surface_brightness(object) - sky_surface_brightness(faintest_star));
  double allowance = 0.5 * below_sky;
  if (object.sort == ShowClass::open_cluster) {
    allowance = std::min(allowance, 2.0);
  } else if (object.sort != ShowClass::globular_cluster) {
    if (below_sky > 3.8) return false;
    allowance += std::max(0.0, below_sky - 3.0);
  }
  if (object.magnitude + allowance > faintest_star + gain(opening_mm)) return false;
  if (opening_mm == 0.0) return true;
  const double magnification = opening_mm > binoculars_mm ? opening_mm : binoculars_magnify;
  return width * magnification >= 1800.0;
}

/// How much a body rewards a look (own scale, as ShowObject::rank).
double rank_of(Body body) {
  switch (body) {
    case Body::moon:
      return 6.0;
    case Body::jupiter:
    case Body::saturn:
      return 4.0;
    case Body::venus:
    case Body::mars:
      return 3.0;
    case Body::mercury:
      return 2.0;
    default:
      return 1.0;
  }
}

/// Worth before variety: rank, height, and how little it takes.
double value_of(double rank, const ShowItem& item) {
  return rank + sin(item.place.altitude) + 0.4 - item.opening_mm / 300.0;
}

Horizontal refracted(Horizontal place) {
  place.altitude = place.altitude + refraction(place.altitude);
  return place;
}

/// From directions of date now and in two months. Empty for what is poorly placed, though not for
/// the last time. What never sets has no last chance.
std::optional<Standing> standing_of(const Eigen::Vector3d& now,
                                    const Eigen::Vector3d& in_two_months, Angle sidereal_time,
                                    Angle latitude, Angle least_height) {
  const Angle west = hour_angle(now, sidereal_time);
  if (west < -two_hours) return Standing::rising;
  if (west <= two_hours) return Standing::at_its_best;
  // At the same clock time; the Sun's mean motion, degrees a day.
  const Angle then = sidereal_time + Angle::from_degrees(0.98565 * two_months.count());
  const Angle height = to_horizontal(in_two_months, then, latitude).altitude;
  const Angle declination = arctan2(now.z(), std::hypot(now.x(), now.y()));
  const bool sets = cos(latitude + declination) > sin(refraction(Angle()));
  if (sets && height + refraction(height) < least_height) return Standing::last_chance;
  const double highest = cos(latitude - declination);  // sine of the altitude in the meridian
  if (sine_of_altitude(now.normalized(), sidereal_time, latitude) < 0.7 * highest) return {};
  return Standing::at_its_best;
}

/// With what the choice goes by.
struct Candidate {
  ShowItem item;
  double value;
  int kind;  // equal for what bores when repeated; -1 for bodies
};

void add_bodies(const SiteSky& sky, const std::vector<SkylinePoint>& skyline, const SkyLight& light,
                Ut moment, std::vector<Candidate>& candidates) {
  const YearEphemeris& ephemeris = sky.ephemeris();
  const Angle latitude = sky.observer().latitude, sidereal = sky.local_sidereal_time(moment);
  if (light.moon_lit > moon_lit_from) {
    ShowItem moon{};
    moon.body = Body::moon;
    moon.standing = Standing::at_its_best;
    moon.place = refracted(light.moon);
    moon.magnitude = std::numeric_limits<double>::quiet_NaN();
    if (moon.place.altitude >= least_bright_height && above_skyline(skyline, moon.place))
      candidates.push_back({moon, value_of(rank_of(Body::moon), moon), -1});
  }
  if (light.sun_altitude > planets_visible_below) return;
  const Tt now = to_tt(moment);
  for (const Body planet : planets) {
    ShowItem item{};
    item.body = planet;
    item.place = apparent_place(sky, planet, moment);
    if (item.place.altitude < least_bright_height || !above_skyline(skyline, item.place)) continue;
    item.magnitude = planet_magnitude(planet, planet_aspect(ephemeris, planet, now));
    if (!bare_eye_visible(planet, item.magnitude, item.place.altitude, light.faintest_star)) {
      // Uranus and Neptune are found with optics, in a dark sky; half a magnitude of margin, as
      // one has to look for them.
      const bool dark = light.sun_altitude < nautical_altitude;
      const auto opening = std::find_if(
          usual_openings_mm.begin() + 1, usual_openings_mm.end(),
          [&](double mm) { return item.magnitude + 0.5 < light.faintest_star + gain(mm); });
      if (!dark || item.place.altitude < least_planet_height || opening == usual_openings_mm.end())
        continue;
      item.opening_mm = *opening;
    }
    // Where the tables end earlier, their last place: it moves little in what is left.
    const Tt later = std::min(to_tt(moment + two_months), ephemeris.to());
    const auto standing =
        standing_of(ephemeris.apparent(planet, now), ephemeris.apparent(planet, later), sidereal,
                    latitude, least_planet_height);
    if (!standing && item.opening_mm > 0.0) continue;
    item.standing = standing.value_or(Standing::at_its_best);  // what all see is never passed over
    candidates.push_back({item, value_of(rank_of(planet), item), -1});
  }
}

void add_objects(const SiteSky& sky, const Place& site, const SkyLight& light, Ut moment,
                 std::vector<Candidate>& candidates) {
  const Tt now = to_tt(moment);
  const Angle latitude = sky.observer().latitude, sidereal = sky.local_sidereal_time(moment);
  const Eigen::Matrix3d to_date = sky.ephemeris().icrs_to_date(now);
  const Eigen::Vector3d velocity = sky.ephemeris().earth_velocity(now);
  const double years = now.julian_centuries() * 100.0;
  const bool bright_moon = light.moon_lit > moon_hides_faint_things_from &&
                           refracted(light.moon).altitude >= least_bright_height;
  const std::span<const ShowObject> objects = show_objects();
  for (std::size_t i = 0; i < objects.size(); ++i) {
    const ShowObject& object = objects[i];
    if (bright_moon && drowns_in_moonlight(object)) continue;
    if (!fits_twilight(object, light.sun_altitude)) continue;
    Eigen::Vector3d place = object.direction;
    if (object.star >= 0)
      place += years * stars()[static_cast<std::size_t>(object.star)].proper_motion;
    const Eigen::Vector3d of_date = to_date * (place + velocity).normalized();
    ShowItem item{};
    item.object = static_cast<int>(i);
    item.place = refracted(to_horizontal(of_date, sidereal, latitude));
    if (item.place.altitude < least_object_height || !above_skyline(site.skyline, item.place))
      continue;
    const double extinction = 0.25 * (1.0 / sin(item.place.altitude) - 1.0);
    const bool faint_edges = object.sort == ShowClass::nebula || object.sort == ShowClass::galaxy ||
                             object.sort == ShowClass::star_cloud;
    const double dimmed = site.limiting_magnitude - light.faintest_star;
    const double limit = site.limiting_magnitude - dimmed * (faint_edges ? dimming_of_extended : 1);
    const std::optional<double> opening = least_opening_mm(object, limit - extinction);
    if (!opening) continue;
    item.opening_mm = *opening;
    item.magnitude = object.magnitude;
    const auto standing = standing_of(of_date, of_date, sidereal, latitude, least_object_height);
    if (!standing) continue;
    item.standing = *standing;
    candidates.push_back({item, value_of(object.rank, item), static_cast<int>(object.sort)});
  }
}

/// The best first; each further one of a kind counts 0.7 less than the one before, so that kinds
/// alternate.
void take_in_turn(std::vector<Candidate> candidates, std::vector<ShowItem>& list) {
  std::array<int, 7> taken{};
  const auto worth = [&](const Candidate& c) {
    return c.kind < 0 ? c.value : c.value - 0.7 * taken[static_cast<std::size_t>(c.kind)];
  };
  while (!candidates.empty()) {
    const auto best = std::max_element(
        candidates.begin(), candidates.end(),
        [&](const Candidate& a, const Candidate& b) { return worth(a) < worth(b); });
    best->item.worth = worth(*best);
    list.push_back(best->item);
    if (best->kind >= 0) ++taken[static_cast<std::size_t>(best->kind)];
    candidates.erase(best);
  }
}

}  // namespace

std::optional<double> least_opening_mm(const ShowObject& object, double faintest_star) {
  const bool is_double = object.sort == ShowClass::double_star;
  for (const double opening : usual_openings_mm) {
    if (opening == 0.0 && !is_double && !object.bare_eye) continue;
    if (is_double ? shows_double(object, faintest_star, opening)
                  : shows_extended(object, faintest_star, opening))
      return opening;
  }
  return {};
}

std::vector<ShowItem> show_list(const SiteSky& sky, const SiteYear& year, Ut moment) {
  const SkyLight light = sky_light(sky, year.place.limiting_magnitude, moment);
  std::vector<ShowItem> list;
  if (light.sun_altitude > sun_rise_altitude) return list;
  std::vector<Candidate> candidates;
  add_bodies(sky, year.place.skyline, light, moment, candidates);
  if (light.sun_altitude < civil_altitude) add_objects(sky, year.place, light, moment, candidates);
  for (const Standing standing : {Standing::rising, Standing::at_its_best, Standing::last_chance}) {
    std::vector<Candidate> part;
    std::copy_if(candidates.begin(), candidates.end(), std::back_inserter(part),
                 [&](const Candidate& c) { return c.item.standing == standing; });
    take_in_turn(std::move(part), list);
  }
  return list;
}

}  // namespace duskleaf
