// Makes global_instants_de431.csv: see README.md here for how to run it.
//
// Phases and seasons by bisection of apparent ecliptic longitudes (true ecliptic and equinox of
// date), apsides from the geometric distance of the centres. The library's files hold the Sun's
// distance in pieces that meet with jumps of up to 6e-9 au, which would move a perihelion by
// minutes: the Earth's apsides therefore come from a least-squares polynomial of degree 6 over
// eight days, which leaves about 40 s (found by other widths and degrees). Nothing of the project's
// own code is used.
#include <Eigen/Dense>
#include <vector>

#include "swiss_positions.hpp"

namespace {

double ecliptic_longitude(double tt, int body) {
  double xx[6];
  calc(tt, body, 0, xx);
  return xx[0] * degree;
}
double geometric_distance(double tt, int body) {
  double xx[6];
  calc(tt, body, SEFLG_TRUEPOS, xx);
  return xx[2];
}
// au a day; five points with a step of half an hour.
double moon_rate(double tt) {
  const double h = 0.02;
  const auto r = [](double t) { return geometric_distance(t, SE_MOON); };
  return (8 * (r(tt + h) - r(tt - h)) - (r(tt + 2 * h) - r(tt - 2 * h))) / (12 * h);
}

// The turning point of the Earth's distance from the Sun near a date: first the least (greatest)
// daily sample, then the fit.
double earth_apsis(double about, bool nearest) {
  double at = about;
  for (double t = about - 8; t <= about + 8; t += 0.25)
    if ((geometric_distance(t, SE_SUN) < geometric_distance(at, SE_SUN)) == nearest) at = t;
  constexpr int degree_of_fit = 6, samples = 401;
  constexpr double half_width = 4;  // days
  for (int pass = 0; pass < 4; ++pass) {
    Eigen::MatrixXd powers(samples, degree_of_fit + 1);
    Eigen::VectorXd distance(samples);
    const double centre = geometric_distance(at, SE_SUN);
    for (int i = 0; i < samples; ++i) {
      const double u = -1 + 2.0 * i / (samples - 1);
      for (int k = 0; k <= degree_of_fit; ++k) powers(i, k) = std::pow(u, k);
      distance(i) = geometric_distance(at + half_width * u, SE_SUN) - centre;
    }
    const Eigen::VectorXd c = powers.colPivHouseholderQr().solve(distance);
    at -= half_width * c(1) / (2 * c(2));
  }
  return at;
}

int write_global(const char* path) {
  std::FILE* out = std::fopen(path, "w");
  if (!out) return 4;
  std::fputs(
      "# Every phase, season and apsis of the UT years listed, with the distance of an apsis (km, "
      "au).\n",
      out);
  write_source(out, "global_instants.cpp");
  std::fputs("event,utc,value\n", out);
  struct Found {
    double ut;
    const char* name;
    double value;
    const char* format;
  };
  const char* phases[] = {"new-moon", "first-quarter", "full-moon", "last-quarter"};
  const char* seasons[] = {"march-equinox", "june-solstice", "september-equinox",
                           "december-solstice"};
  for (int year :
       {1972, 1975, 1981, 1988, 1996, 2004, 2011, 2016, 2020, 2024, 2026, 2027, 2028, 2031, 2035}) {
    std::vector<Found> all;
    const double first = julian_day(year, 1, 1), end = julian_day(year + 1, 1, 1);
    const double step = 0.25, from = tt_of(first) - 1, to = tt_of(end) + 1;
    const auto add = [&](double tt, const char* name, double value, const char* format) {
      const double ut = ut_of(tt);
      if (ut >= first && ut < end) all.push_back({ut, name, value, format});
    };
    const auto phase = [](double tt, int q) {
      return wrap(ecliptic_longitude(tt, SE_MOON) - ecliptic_longitude(tt, SE_SUN) - q * pi / 2);
    };
    const auto season = [](double tt, int q) {
      return wrap(ecliptic_longitude(tt, SE_SUN) - q * pi / 2);
    };
    for (double tt = from; tt < to; tt += step) {
      for (int q = 0; q < 4; ++q) {
        const double a = phase(tt, q), b = phase(tt + step, q);
        if (a < 0 && b >= 0 && b - a < 1)
          add(bisect([&](double t) { return phase(t, q); }, tt, tt + step), phases[q], 0, "");
        const double c = season(tt, q), d = season(tt + step, q);
        if (c < 0 && d >= 0 && d - c < 1)
          add(bisect([&](double t) { return season(t, q); }, tt, tt + step), seasons[q], 0, "");
      }
      const double before = moon_rate(tt), after = moon_rate(tt + step);
      if ((before < 0) != (after < 0)) {
        const double at = bisect(moon_rate, tt, tt + step);
        add(at, before < 0 ? "perigee" : "apogee", geometric_distance(at, SE_MOON) * au_km, "%.2f");
      }
    }
    for (const bool near : {true, false}) {
      const double at = earth_apsis(tt_of(first) + (near ? 3 : 185), near);
      add(at, near ? "perihelion" : "aphelion", geometric_distance(at, SE_SUN), "%.9f");
    }
    std::sort(all.begin(), all.end(), [](const Found& a, const Found& b) { return a.ut < b.ut; });
    for (const Found& x : all) {
      const double day = std::floor(x.ut - 0.5) + 0.5;
      std::fprintf(out, "%s,%sT%sZ,", x.name, iso_date(day).c_str(), clock(day, x.ut).c_str());
      if (*x.format) std::fprintf(out, x.format, x.value);
      std::fputs("\n", out);
    }
  }
  return std::fclose(out) == 0 ? 0 : 4;
}

}  // namespace

int main(int argc, char** argv) {
  if (argc != 2) {
    std::fprintf(stderr, "usage: global_instants OUT.csv\n");
    return 2;
  }
  swe_set_ephe_path(const_cast<char*>("/usr/share/libswe/ephe"));
  return write_global(argv[1]);
}
