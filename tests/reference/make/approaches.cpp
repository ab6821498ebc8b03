// Makes approaches_de431.csv: see README.md here for how to run it.
//
// Separations are invariant under rotation, so all places stay in ICRS axes: those of Moon and
// planets apparent but neither precessed nor nutated, those of stars and clusters from J2000 places
// with proper motion and the aberration of the Earth's barycentric velocity. Local least values of
// the separation itself among samples every 2 hours (Moon) or 12 hours (others), then bisection of
// its rate. Nothing of the project's own code is used.
#include <array>
#include <vector>

#include "swiss_positions.hpp"

namespace {

using Vector = std::array<double, 3>;
double dot(const Vector& a, const Vector& b) { return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]; }
Vector scaled(const Vector& a, double k) { return {a[0] * k, a[1] * k, a[2] * k}; }
double angle(const Vector& a, const Vector& b) {
  double chord = 0;
  for (int i = 0; i < 3; ++i) chord += (a[i] - b[i]) * (a[i] - b[i]);
  return 2 * std::asin(std::min(1.0, std::sqrt(chord) / 2));
}

constexpr int frame = SEFLG_EQUATORIAL | SEFLG_XYZ | SEFLG_J2000 | SEFLG_NONUT | SEFLG_ICRS;

// J2000 places, degrees, and proper motions, arcseconds a year (mu_alpha cos delta, mu_delta): the
// Bright Star Catalogue (HR 1457, 2990, 3982, 5056, 6134); clusters as src/data/clusters.csv.
struct Thing {
  const char* name;
  int body;  // -1: a fixed place
  double ra, dec, pm_ra, pm_dec;
};
const Thing things[] = {{"moon", SE_MOON, 0, 0, 0, 0},
                        {"mercury", SE_MERCURY, 0, 0, 0, 0},
                        {"venus", SE_VENUS, 0, 0, 0, 0},
                        {"mars", SE_MARS, 0, 0, 0, 0},
                        {"jupiter", SE_JUPITER, 0, 0, 0, 0},
                        {"saturn", SE_SATURN, 0, 0, 0, 0},
                        {"uranus", SE_URANUS, 0, 0, 0, 0},
                        {"neptune", SE_NEPTUNE, 0, 0, 0, 0},
                        {"aldebaran", -1, 68.98, 16.50917, 0.063, -0.19},
                        {"pollux", -1, 116.32875, 28.02611, -0.628, -0.046},
                        {"regulus", -1, 152.09292, 11.96722, -0.248, 0.006},
                        {"spica", -1, 201.29833, -11.16139, -0.041, -0.028},
                        {"antares", -1, 247.35167, -26.43194, -0.01, -0.02},
                        {"pleiades", -1, 56.85, 24.1167, 0, 0},
                        {"hyades", -1, 66.725, 15.867, 0, 0},
                        {"praesepe", -1, 130.1, 19.6667, 0, 0}};
constexpr int count = sizeof things / sizeof things[0];

Vector unit_of_body(double tt, int body) {
  double xx[6];
  calc(tt, body, frame, xx);
  const Vector v = {xx[0], xx[1], xx[2]};
  return scaled(v, 1 / std::sqrt(dot(v, v)));
}

Vector unit(double tt, const Thing& thing) {
  if (thing.body >= 0) return unit_of_body(tt, thing.body);
  const double years = (tt - j2000) / 365.25;
  const double dec = (thing.dec + years * thing.pm_dec / 3600) * degree,
               ra = thing.ra * degree + years * thing.pm_ra / 3600 * degree / std::cos(dec);
  Vector place = {std::cos(dec) * std::cos(ra), std::cos(dec) * std::sin(ra), std::sin(dec)};
  double earth[6];
  calc(tt, SE_EARTH, frame | SEFLG_BARYCTR | SEFLG_TRUEPOS | SEFLG_SPEED, earth);
  const double light = 299792.458 * 86400 / au_km;  // au a day
  const Vector v = {earth[3] / light, earth[4] / light, earth[5] / light};
  // The relativistic sum of velocities, written out.
  const double gamma_inverse = std::sqrt(1 - dot(v, v)), along = dot(place, v);
  for (int i = 0; i < 3; ++i)
    place[i] = (gamma_inverse * place[i] + v[i] + along * v[i] / (1 + gamma_inverse)) / (1 + along);
  return scaled(place, 1 / std::sqrt(dot(place, place)));
}

struct Found {
  double ut;
  std::string body;
  double separation, from_sun;
};

void search(double first, double end, std::vector<Found>& all) {
  for (int a = 0; a < 8; ++a) {
    const bool moon = a == 0;
    const double step = moon ? 1.0 / 12 : 0.5, h = moon ? 0.01 : 0.2;
    const double from = tt_of(first) - 1.5, to = tt_of(end) + 1.5;
    std::vector<double> times;
    for (double tt = from; tt < to; tt += step) times.push_back(tt);
    std::vector<Vector> mine;
    for (const double tt : times) mine.push_back(unit(tt, things[a]));
    for (int b = a + 1; b < count; ++b) {
      const auto separation = [&](double tt) {
        return angle(unit(tt, things[a]), unit(tt, things[b]));
      };
      const auto rate = [&](double tt) {
        return (8 * (separation(tt + h) - separation(tt - h)) -
                (separation(tt + 2 * h) - separation(tt - 2 * h)));
      };
      std::vector<double> sampled;
      for (std::size_t i = 0; i < times.size(); ++i)
        sampled.push_back(angle(mine[i], unit(times[i], things[b])));
      for (std::size_t i = 1; i + 1 < times.size(); ++i) {
        if (sampled[i] > 6 * degree || sampled[i] > sampled[i - 1] || sampled[i] >= sampled[i + 1])
          continue;
        const double at = bisect(rate, times[i - 1], times[i + 1]), ut = ut_of(at);
        const double least = separation(at);
        const double from_sun = std::min(angle(unit(at, things[a]), unit_of_body(at, SE_SUN)),
                                         angle(unit(at, things[b]), unit_of_body(at, SE_SUN)));
        if (ut >= first && ut < end && least < 5.001 * degree && from_sun > 11.999 * degree)
          all.push_back({ut, std::string(things[a].name) + "+" + things[b].name, least / degree,
                         from_sun / degree});
      }
    }
  }
}

}  // namespace

int main(int argc, char** argv) {
  std::FILE* out = open_output(argc, argv);
  std::fputs(
      "# Every least geocentric separation below 5.001 degrees, both 11.999 degrees or more from "
      "the "
      "Sun (the lesser distance is given),\n# in the UT years 1980, 1981 and 2020 to 2035: the "
      "Moon "
      "and the planets with each other and with eight stars and clusters.\n",
      out);
  write_source(out, "approaches.cpp");
  std::fputs("body,utc,separation_deg,from_sun_deg\n", out);
  std::vector<Found> all;
  search(julian_day(1980, 1, 1), julian_day(1982, 1, 1), all);
  search(julian_day(2020, 1, 1), julian_day(2036, 1, 1), all);
  std::sort(all.begin(), all.end(), [](const Found& a, const Found& b) { return a.ut < b.ut; });
  for (const Found& x : all) {
    const double day = std::floor(x.ut - 0.5) + 0.5;
    std::fprintf(out, "%s,%sT%sZ,%.5f,%.5f\n", x.body.c_str(), iso_date(day).c_str(),
                 clock(day, x.ut).c_str(), x.separation, x.from_sun);
  }
  return std::fclose(out) == 0 ? 0 : 4;
}
