// Makes site_pairs_de431.csv: see README.md here for how to run it.
//
// What five invented sites see of pairs near their closest approaches (every 25th of the Moon's and
// every 8th of the planets' in approaches_de431.csv, some hours off): the library's own
// topocentric places and horizon, and the angle between. Stars do not occur here: their places are
// approaches.cpp's matter. Nothing of the project's own code is used.
#include <cstring>
#include <fstream>
#include <sstream>

#include "swiss_positions.hpp"

namespace {

struct Site {
  double latitude, longitude, elevation;
};
const Site sites[] = {{54.18, -4.62, 35},
                      {35.2, -106.6, 1900},
                      {-41.3, 174.8, 10},
                      {69.65, 18.96, 0},
                      {0.5, 36.8, 1800}};

int body_of(const std::string& name) {
  const char* names[] = {"moon",    "mercury", "venus",  "mars",
                         "jupiter", "saturn",  "uranus", "neptune"};
  const int numbers[] = {SE_MOON,    SE_MERCURY, SE_VENUS,  SE_MARS,
                         SE_JUPITER, SE_SATURN,  SE_URANUS, SE_NEPTUNE};
  for (int i = 0; i < 8; ++i)
    if (name == names[i]) return numbers[i];
  return -1;
}

struct Seen {
  double x[3];
  double altitude, azimuth;  // degrees, no refraction; from north through east
};
Seen seen(double ut, const Site& site, int body) {
  double xx[6], in[3], out[3], geopos[3] = {site.longitude, site.latitude, site.elevation};
  swe_set_topo(site.longitude, site.latitude, site.elevation);
  calc(tt_of(ut), body, SEFLG_EQUATORIAL | SEFLG_TOPOCTR, xx);
  const double ra = xx[0] * degree, dec = xx[1] * degree;
  std::memcpy(in, xx, sizeof in);
  swe_azalt(ut, SE_EQU2HOR, geopos, 0, 0, in, out);
  return {{std::cos(dec) * std::cos(ra), std::cos(dec) * std::sin(ra), std::sin(dec)},
          out[1],
          std::fmod(out[0] + 180, 360)};
}

}  // namespace

int main(int argc, char** argv) {
  if (argc != 3) return 2;
  swe_set_ephe_path(const_cast<char*>("/usr/share/libswe/ephe"));
  std::ifstream in(argv[1]);
  std::FILE* out = std::fopen(argv[2], "w");
  if (!in || !out) return 4;
  std::fputs(
      "# Pairs as sites see them: topocentric places without refraction (azimuth from north "
      "through "
      "east), topocentric separation, degrees.\n",
      out);
  write_source(out, "site_pairs.cpp");
  std::fputs(
      "body,utc,latitude,longitude,elevation_m,altitude_a,azimuth_a,altitude_b,azimuth_b,"
      "separation_"
      "deg\n",
      out);
  int moon = 0, others = 0, written = 0;
  for (std::string line; std::getline(in, line);) {
    const std::size_t plus = line.find('+'), comma = line.find(',');
    if (line[0] == '#' || plus == std::string::npos || comma == std::string::npos) continue;
    const int a = body_of(line.substr(0, plus)),
              b = body_of(line.substr(plus + 1, comma - plus - 1));
    if (a < 0 || b < 0) continue;
    if (a == SE_MOON ? moon++ % 25 != 0 : others++ % 8 != 0) continue;
    int y, m, d, hh, mm;
    if (std::sscanf(line.c_str() + comma + 1, "%d-%d-%dT%d:%d", &y, &m, &d, &hh, &mm) != 5)
      return 5;
    // Whole minutes, from 8 hours before to 8 after.
    const double day = julian_day(y, m, d);
    const double minutes = std::floor(hh * 60 + mm + 480 * std::sin(1.7 * written));
    const double ut = day + minutes / 1440;
    const Site& site = sites[written % 5];
    swe_set_delta_t_userdef(tt_minus_ut_days(ut, false));
    const Seen p = seen(ut, site, a), q = seen(ut, site, b);
    double chord = 0;
    for (int i = 0; i < 3; ++i) chord += (p.x[i] - q.x[i]) * (p.x[i] - q.x[i]);
    const double date = std::floor(ut - 0.5) + 0.5;
    std::fprintf(out, "%s,%sT%sZ,%g,%g,%g,%.5f,%.5f,%.5f,%.5f,%.5f\n",
                 line.substr(0, comma).c_str(), iso_date(date).c_str(), clock(date, ut).c_str(),
                 site.latitude, site.longitude, site.elevation, p.altitude, p.azimuth, q.altitude,
                 q.azimuth, 2 * std::asin(std::sqrt(chord) / 2) / degree);
    ++written;
  }
  return std::fclose(out) == 0 ? 0 : 4;
}
