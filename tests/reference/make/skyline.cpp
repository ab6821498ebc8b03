// Makes skyline_de431.csv: see README.md here for how to run it.
//
// When the top of the Sun first clears an invented skyline on a date and when it is last gone:
// every fourth UT date of 2027 at five invented sites, looked at second by second. Top of the Sun:
// topocentric centre, 959.63" at 1 au, refraction by T. Saemundsson (1986) brought to nothing at
// the zenith, its value at -1 degree below that. A date begins half a minute before midnight, as
// rounded minutes print. Between places 20 minutes apart the Sun's vector and the sidereal time go
// evenly (the chord misses 0.00001 degree). Nothing of the project's own code is used.
#include "topocentric_site.hpp"

namespace {

struct Point {
  double azimuth, altitude;
};
const std::vector<std::vector<Point>> skylines = {
    // A notch in the east, a needle in the west.
    {{20, 4},
     {60, 12},
     {85, 9.5},
     {90, 3},
     {95, 9},
     {140, 15},
     {200, 6},
     {240, 11},
     {255, 5},
     {262, 13},
     {300, 8}},
    // A tower that the Sun passes in the morning.
    {{60, 2}, {70, 2.5}, {70.4, 20}, {71.6, 20}, {72, 2.5}, {110, 6}, {250, 7}, {290, 4}},
    // A wall to the north as high as the midwinter Sun.
    {{0, 24.5}, {30, 23}, {60, 9}, {180, 3}, {300, 10}, {330, 24}},
    {{0, 5}, {90, 7}, {150, 6}, {180, 12}, {210, 4}, {270, 9}},
    {{0, 2}, {120, 3}, {240, -1}}};

double height(const std::vector<Point>& line, double azimuth) {
  for (std::size_t i = 0; i < line.size(); ++i) {
    const Point a = line[i], b = line[(i + 1) % line.size()];
    double width = b.azimuth - a.azimuth, along = azimuth - a.azimuth;
    if (width <= 0) width += 360;
    if (along < 0) along += 360;
    if (along <= width) return a.altitude + (b.altitude - a.altitude) * along / width;
  }
  std::exit(5);
}

double refracted(double altitude) {  // degrees
  const double h = std::max(altitude, -1.0);
  return altitude + (1.02 / std::tan((h + 10.3 / (h + 5.11)) * degree) + 0.0019279) / 60;
}

double excess(const Site& site, const std::vector<Point>& line, Vec sun, double theta) {
  const Vec seen = sun - site_vector(site, theta);
  const double altitude =
      altitude_of(seen, site, theta) / degree + 959.63 / 3600 / (length(seen) / au_km);
  const double hour = theta + site.longitude * degree - std::atan2(seen.y, seen.x);
  const double dec = std::asin(seen.z / length(seen)), phi = site.latitude * degree;
  // From north through east.
  double azimuth =
      std::atan2(-std::sin(hour) * std::cos(dec),
                 std::cos(phi) * std::sin(dec) - std::sin(phi) * std::cos(dec) * std::cos(hour)) /
      degree;
  if (azimuth < 0) azimuth += 360;
  return refracted(altitude) - height(line, azimuth);
}

}  // namespace

int main(int argc, char** argv) {
  std::FILE* out = open_output(argc, argv);
  check_sidereal_time();
  std::fputs(
      "# When the top of the Sun first clears an invented skyline (azimuth:altitude, degrees) on a "
      "UT date and when it is last gone.\n"
      "# all_day: behind or above, where it does neither. graze: it turns within 0.003 degree of "
      "the skyline (either may be found).\n"
      "# crossings: how many there are.\n",
      out);
  write_source(out, "skyline.cpp");
  std::fputs(
      "site,latitude,longitude,elevation_m,skyline,date,clears,gone,all_day,graze,crossings\n",
      out);
  for (std::size_t s = 0; s < skylines.size(); ++s) {
    const Site& site = sites[s];
    const std::vector<Point>& line = skylines[s];
    std::string spelled;
    for (const Point& p : line) {
      char text[40];
      std::snprintf(text, sizeof text, "%s%g:%g", spelled.empty() ? "" : " ", p.azimuth,
                    p.altitude);
      spelled += text;
    }
    for (int day = 0; day < 365; day += 4) {
      const double start = julian_day(2027, 1, 1) + day - 30 * second;
      double clears = 0, gone = 0, before = 0, last = 0;
      int crossings = 0;
      bool graze = false;
      constexpr int lap = 1200;
      for (int from = 0; from < 86400; from += lap) {
        const double a = start + from * second, b = a + lap * second;
        const Vec at_a = vector_of(place(a, SE_SUN)), at_b = vector_of(place(b, SE_SUN));
        const double theta_a = sidereal_time(a);
        double turned = sidereal_time(b) - theta_a;
        if (turned < 0) turned += 2 * pi;
        for (int i = 0; i < lap; ++i) {
          const double part = static_cast<double>(i) / lap;
          const Vec sun{at_a.x + part * (at_b.x - at_a.x), at_a.y + part * (at_b.y - at_a.y),
                        at_a.z + part * (at_b.z - at_a.z)};
          const double here = excess(site, line, sun, theta_a + part * turned);
          const int n = from + i;
          if (n >= 1 && (here < 0) != (last < 0)) {
            const double at = start + (n - 1 + last / (last - here)) * second;
            if (here > 0 && clears == 0) clears = at;
            if (here < 0) gone = at;
            ++crossings;
          }
          if (n >= 2 && std::abs(last) < 0.003 && (last - before) * (here - last) <= 0)
            graze = true;
          before = last;
          last = here;
        }
      }
      std::fprintf(out, "%s,%g,%g,%g,%s,%s,%s,%s,%s,%d,%d\n", site.name, site.latitude,
                   site.longitude, site.elevation_m, spelled.c_str(), iso_date(start + 0.5).c_str(),
                   clears > 0 ? iso_instant(clears).c_str() : "",
                   gone > 0 ? iso_instant(gone).c_str() : "",
                   crossings > 0 ? ""
                   : last < 0    ? "behind"
                                 : "above",
                   graze ? 1 : 0, crossings);
    }
  }
  return std::fclose(out) == 0 ? 0 : 4;
}
