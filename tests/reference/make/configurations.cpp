// Makes configurations_de431.csv: see README.md here for how to run it.
//
// Oppositions and conjunctions by bisection of the difference of apparent ecliptic longitudes from
// the Sun's (true ecliptic and equinox of date), stations and greatest elongations by bisection of
// a rate from four points (five-point rule). Nothing of the project's own code is used.
#include <vector>

#include "swiss_positions.hpp"

namespace {

struct Planet {
  int number;
  const char* name;
  bool inner;
};
const Planet planets[] = {{SE_MERCURY, "mercury", true}, {SE_VENUS, "venus", true},
                          {SE_MARS, "mars", false},      {SE_JUPITER, "jupiter", false},
                          {SE_SATURN, "saturn", false},  {SE_URANUS, "uranus", false},
                          {SE_NEPTUNE, "neptune", false}};

struct Seen {
  double longitude, latitude, distance;
};
Seen seen(double tt, int body) {
  double xx[6];
  calc(tt, body, 0, xx);
  return {xx[0] * degree, xx[1] * degree, xx[2]};
}
double beyond_sun(double tt, int body) {
  return wrap(seen(tt, body).longitude - seen(tt, SE_SUN).longitude);
}
// Spherical law by Vincenty's form, which is good at all angles.
double from_sun(double tt, int body) {
  const Seen p = seen(tt, body), s = seen(tt, SE_SUN);
  const double d = p.longitude - s.longitude;
  const double x = std::cos(p.latitude) * std::sin(d),
               y = std::cos(s.latitude) * std::sin(p.latitude) -
                   std::sin(s.latitude) * std::cos(p.latitude) * std::cos(d),
               z = std::sin(s.latitude) * std::sin(p.latitude) +
                   std::cos(s.latitude) * std::cos(p.latitude) * std::cos(d);
  return std::atan2(std::hypot(x, y), z);
}
// Radians a day.
double longitude_rate(double tt, int body) {
  const double h = 0.25;
  const auto step = [&](double k) {
    return wrap(seen(tt + k * h, body).longitude - seen(tt - k * h, body).longitude);
  };
  return (8 * step(1) - step(2)) / (12 * h);
}
double elongation_rate(double tt, int body) {
  const double h = 0.2;
  const auto step = [&](double k) {
    return from_sun(tt + k * h, body) - from_sun(tt - k * h, body);
  };
  return (8 * step(1) - step(2)) / (12 * h);
}

struct Found {
  double ut;
  std::string event;
  const char* body;
  std::string value;
};
std::string number(const char* format, double value) {
  char text[40];
  std::snprintf(text, sizeof text, format, value);
  return text;
}

void search(double first, double end, std::vector<Found>& all) {
  const double step = 1.0;
  for (const Planet& planet : planets) {
    const int body = planet.number;
    const auto add = [&](double tt, const char* event, const std::string& value) {
      const double ut = ut_of(tt);
      if (ut >= first && ut < end) all.push_back({ut, event, planet.name, value});
    };
    for (double tt = tt_of(first) - 1; tt < tt_of(end) + 1; tt += step) {
      for (const bool opposite : {false, true}) {
        const auto f = [&](double t) { return wrap(beyond_sun(t, body) - (opposite ? pi : 0)); };
        const double a = f(tt), b = f(tt + step);
        if ((a < 0) == (b < 0) || std::abs(a) > 1 || std::abs(b) > 1) continue;
        const double at = bisect(f, tt, tt + step);
        if (opposite)
          add(at, "opposition", number("%.7f", seen(at, body).distance));
        else if (!planet.inner)
          add(at, "conjunction", "");
        else
          add(at,
              seen(at, body).distance < seen(at, SE_SUN).distance ? "inferior-conjunction"
                                                                  : "superior-conjunction",
              "");
      }
      const auto rate = [&](double t) { return longitude_rate(t, body); };
      const double before = rate(tt), after = rate(tt + step);
      if ((before < 0) != (after < 0))
        add(bisect(rate, tt, tt + step),
            before < 0 ? "stationary-then-direct" : "stationary-then-retrograde", "");
      if (!planet.inner) continue;
      const auto growth = [&](double t) { return elongation_rate(t, body); };
      if (growth(tt) >= 0 && growth(tt + step) < 0) {
        const double at = bisect(growth, tt, tt + step);
        add(at, beyond_sun(at, body) > 0 ? "greatest-elongation-east" : "greatest-elongation-west",
            number("%.5f", from_sun(at, body) / degree));
      }
    }
  }
}

}  // namespace

int main(int argc, char** argv) {
  std::FILE* out = open_output(argc, argv);
  std::fputs(
      "# Every configuration of the planets in the UT years 2020 to 2035: oppositions (value au), "
      "conjunctions, stations,\n# greatest elongations (value deg).\n",
      out);
  write_source(out, "configurations.cpp");
  std::fputs("event,body,utc,value\n", out);
  std::vector<Found> all;
  search(julian_day(2020, 1, 1), julian_day(2036, 1, 1), all);
  std::sort(all.begin(), all.end(), [](const Found& a, const Found& b) { return a.ut < b.ut; });
  for (const Found& x : all) {
    const double day = std::floor(x.ut - 0.5) + 0.5;
    std::fprintf(out, "%s,%s,%sT%sZ,%s\n", x.event.c_str(), x.body, iso_date(day).c_str(),
                 clock(day, x.ut).c_str(), x.value.c_str());
  }
  return std::fclose(out) == 0 ? 0 : 4;
}
