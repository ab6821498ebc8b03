// Makes sun_transits_de431.csv: see README.md here for how to run it.
//
// Every transit of Mercury and Venus over the Sun of 1972-2060, for the Earth's centre (site "-")
// and at five invented sites, whether or not the Sun is up. Radii: Sun 959.63" at 1 au, Mercury
// 2439.7 km, Venus 6051.8 km. Contacts by bisection of the distance of the centres less the sum
// (difference) of the radii. Nothing of the project's own code is used.
#include <array>

#include "topocentric_site.hpp"

namespace {

const double sun_radius_km = 959.63 / 3600 * degree * au_km;

struct Discs {
  Vec sun;
  double apart, sun_radius, planet_radius, theta;
};
Discs discs(const Site* site, int planet, double ut) {
  const double theta = sidereal_time(ut);
  const Vec here = site ? site_vector(*site, theta) : Vec{0, 0, 0};
  const Vec sun = vector_of(place(ut, SE_SUN)) - here, other = vector_of(place(ut, planet)) - here;
  return {sun, angle_between(sun, other), sun_radius_km / length(sun),
          (planet == SE_MERCURY ? 2439.7 : 6051.8) / length(other), theta};
}

int written = 0;

void write(std::FILE* out, const Site* site, int planet, double about) {
  const auto apart = [&](double ut) { return discs(site, planet, ut).apart; };
  double a = about - 0.3, b = about + 0.3;
  for (int i = 0; i < 60; ++i) {  // golden section
    const double third = 0.381966 * (b - a);
    if (apart(a + third) < apart(b - third))
      b -= third;
    else
      a += third;
  }
  const double middle = (a + b) / 2;
  const auto contact = [&](double side, bool before) -> std::string {
    const auto f = [&](double ut) {
      const Discs d = discs(site, planet, ut);
      return d.apart - d.sun_radius - side * d.planet_radius;
    };
    if (f(middle) >= 0) return "";
    return iso_instant(bisect(f, before ? middle - 0.4 : middle, before ? middle : middle + 0.4));
  };
  const Discs d = discs(site, planet, middle);
  if (d.apart >= d.sun_radius + d.planet_radius) return;
  std::string highest;
  if (site) {
    double most = -pi;
    const auto outside = [&](double ut) {
      const Discs at = discs(site, planet, ut);
      return at.apart > at.sun_radius + at.planet_radius;
    };
    for (double ut = middle - 0.4; ut < middle + 0.4; ut += 1.0 / 1440)
      if (!outside(ut)) {
        const Discs at = discs(site, planet, ut);
        most = std::max(most, altitude_of(at.sun, *site, at.theta));
      }
    char text[40];
    std::snprintf(text, sizeof text, "%.3f", most / degree);
    highest = text;
  }
  char altitude[40] = "";
  if (site)
    std::snprintf(altitude, sizeof altitude, "%.3f", altitude_of(d.sun, *site, d.theta) / degree);
  if (site)
    std::fprintf(out, "%s,%g,%g,%g", site->name, site->latitude, site->longitude,
                 site->elevation_m);
  else
    std::fputs("-,,,", out);
  std::fprintf(out, ",%s,%s,%s,%s,%s,%s,%.2f,%s,%s\n", planet == SE_MERCURY ? "mercury" : "venus",
               contact(1, true).c_str(), contact(-1, true).c_str(), iso_instant(middle).c_str(),
               contact(-1, false).c_str(), contact(1, false).c_str(), d.apart / degree * 3600,
               altitude, highest.c_str());
  ++written;
}

}  // namespace

int main(int argc, char** argv) {
  std::FILE* out = open_output(argc, argv);
  check_sidereal_time();
  std::fputs(
      "# Transits of Mercury and Venus over the Sun, 1972-2060, from the Earth's centre (site -) "
      "and from invented sites, the Sun up or\n"
      "# down: exterior contacts, interior ones (empty where there are none), least distance of "
      "the "
      "centres, the Sun's altitude then\n"
      "# and its greatest from first to last contact (no refraction).\n",
      out);
  write_source(out, "sun_transits.cpp");
  std::fputs(
      "site,latitude,longitude,elevation_m,planet,begins,fully_on,greatest,begins_to_leave,ends,"
      "separation_arcsec,sun_altitude,highest_sun\n",
      out);
  for (const int planet : {SE_MERCURY, SE_VENUS}) {
    const double step = 0.25;
    std::array<double, 3> apart{9, 9, 9};
    for (double ut = julian_day(1972, 1, 1); ut < julian_day(2061, 1, 1); ut += step) {
      const Place sun = place(ut, SE_SUN), other = place(ut, planet);
      apart = {apart[1], apart[2],
               other.distance_km < sun.distance_km ? angle_between(vector_of(sun), vector_of(other))
                                                   : 9.0};
      if (apart[1] < 0.6 * degree && apart[1] <= apart[0] && apart[1] < apart[2]) {
        write(out, nullptr, planet, ut - step);
        for (const Site& site : sites) write(out, &site, planet, ut - step);
      }
    }
  }
  std::fprintf(stderr, "%d rows\n", written);
  return std::fclose(out) == 0 ? 0 : 4;
}
