// Makes solar_eclipses_de431.csv, solar_eclipse_sites_de431.csv, lunar_eclipses_de431.csv and
// lunar_eclipse_sites_de431.csv: see README.md here for how to run it.
//
// Solar eclipses at a site are those of two discs as the site sees them, by topocentric vectors and
// bisection of their separation less the radii; no shadow cones. Radii: Sun 959.63" at 1 au; Moon
// 0.272488 of the Earth's equatorial radius for the outer contacts, 0.272281 for the inner ones, as
// Espenak & Meeus, NASA/TP-2006-214141. Lunar eclipses are those of a sphere and two cones in
// lengths: the cones of the Earth's sphere, moved out by a hundredth of its radius (Danjon's rule
// with 1 + 1/85 - 1/594 rounded to 1.01), the Moon's radius 0.2725076. Greatest eclipse: of the
// Sun, the axis nearest to the Earth's centre, at a site the greatest magnitude; of the Moon, its
// centre at the least angle from the axis. Nothing of the project's own code is used.
#include <Eigen/Dense>
#include <optional>
#include <vector>

#include "swiss_positions.hpp"

namespace {

using Vector = Eigen::Vector3d;

constexpr double equatorial_km = 6378.1366;  // IERS Conventions 2010
constexpr double minute = 60 * second, hour = 3600 * second;
const double sun_km = au_km * std::sin(959.63 / 3600 * degree);
constexpr double k1 = 0.272488, k2 = 0.272281, k_lunar = 0.2725076;

Vector vector_of(double ut, int body) {
  const Place p = place(ut, body);
  return p.distance_km * Vector(std::cos(p.dec) * std::cos(p.ra), std::cos(p.dec) * std::sin(p.ra),
                                std::sin(p.dec));
}

struct Sky {
  Vector sun, moon;
  double sidereal;
};
Sky sky_at(double ut) { return {vector_of(ut, SE_SUN), vector_of(ut, SE_MOON), sidereal_time(ut)}; }

struct Site {
  std::string name;
  double latitude, longitude, elevation_m;  // degrees
};

// WGS 84.
Vector site_km(const Site& s, double sidereal) {
  constexpr double a = 6378.137, f = 1 / 298.257223563;
  const double lat = s.latitude * degree, theta = sidereal + s.longitude * degree;
  const double n = a / std::sqrt(1 - f * (2 - f) * std::sin(lat) * std::sin(lat));
  const double h = s.elevation_m / 1000;
  const double out = (n + h) * std::cos(lat);
  return {out * std::cos(theta), out * std::sin(theta),
          (n * (1 - f) * (1 - f) + h) * std::sin(lat)};
}
Vector zenith(const Site& s, double sidereal) {
  const double lat = s.latitude * degree, theta = sidereal + s.longitude * degree;
  return {std::cos(lat) * std::cos(theta), std::cos(lat) * std::sin(theta), std::sin(lat)};
}
double angle(const Vector& a, const Vector& b) { return std::atan2(a.cross(b).norm(), a.dot(b)); }
double altitude(const Vector& v, const Site& s, double sidereal) {
  return pi / 2 - angle(v, zenith(s, sidereal));
}

struct Discs {
  double separation, sun, outer_moon, inner_moon;
  double magnitude() const {
    return (sun + outer_moon - separation) / (2 * sun + outer_moon - inner_moon);
  }
  double outer() const { return sun + outer_moon - separation; }
  double inner() const { return std::abs(sun - inner_moon) - separation; }
};
Discs discs(const Sky& k, const Site& s) {
  const Vector here = site_km(s, k.sidereal), sun = k.sun - here, moon = k.moon - here;
  const double d = moon.norm();
  return {angle(sun, moon), std::asin(sun_km / sun.norm()), std::asin(k1 * equatorial_km / d),
          std::asin(k2 * equatorial_km / d)};
}

// Part of the Sun's disc that is covered, by slices across the line of centres.
double obscuration(const Discs& d) {
  const double moon = 0.5 * (d.outer_moon + d.inner_moon);
  const int slices = 20000;
  double sum = 0;
  for (int i = 0; i < slices; ++i) {
    const double y = d.sun * (-1 + (2 * i + 1.0) / slices);
    if (std::abs(y) >= moon) continue;
    const double sun_half = std::sqrt(d.sun * d.sun - y * y),
                 moon_half = std::sqrt(moon * moon - y * y);
    const double left = std::max(-sun_half, d.separation - moon_half),
                 right = std::min(sun_half, d.separation + moon_half);
    sum += std::max(0.0, right - left);
  }
  return sum * (2 * d.sun / slices) / (pi * d.sun * d.sun);
}

double greatest(const std::function<double(double)>& f, double a, double b) {
  const double ratio = 0.6180339887498949;
  for (int i = 0; i < 50; ++i) {
    const double c = b - ratio * (b - a), d = a + ratio * (b - a);
    (f(c) > f(d) ? b : a) = f(c) > f(d) ? d : c;
  }
  return a + (b - a) / 2;
}

// Greatest sample on a grid, then refined.
double greatest_on_grid(const std::function<double(double)>& f, double from, double to,
                        double step) {
  double best = from, value = f(from);
  for (double t = from + step; t <= to; t += step)
    if (const double v = f(t); v > value) value = v, best = t;
  return greatest(f, best - step, best + step);
}

std::string instant(double ut) {
  if (ut == 0) return "";
  const double rounded = std::floor(ut * 864000.0 + 0.5) / 864000.0 + 1e-9;  // to 0.1 s
  const double day = std::floor(rounded - 0.5) + 0.5;
  return iso_date(day) + "T" + clock(day, rounded) + "Z";
}

std::vector<double> zeros(const std::function<double(double)>& f, double from, double to) {
  std::vector<double> found;
  const int steps = 60;
  double before = f(from), at = from;
  for (int i = 1; i <= steps; ++i) {
    const double next = from + (to - from) * i / steps, value = f(next);
    if ((before < 0) != (value < 0)) found.push_back(bisect(f, at, next));
    before = value, at = next;
  }
  return found;
}

const Site sites[] = {{"ice-cap", 89.5, 0, 0},           {"north-fjord", 78.2, 15.6, 20},
                      {"tundra", 69.1, -105.1, 30},      {"inlet", 61.2, -149.9, 40},
                      {"islet", 54.18, -4.62, 35},       {"plateau", 40.3, -3.7, 650},
                      {"harbour", 35.6, 139.8, 10},      {"high-town", 19.3, -99.2, 2240},
                      {"strait", 4.9, 100.3, 0},         {"equator", -0.9, 36.6, 1800},
                      {"altiplano", -15.9, -69.9, 3850}, {"outback", -23.7, 133.9, 580},
                      {"valley", -33.5, -70.6, 520},     {"south-bay", -45.9, 170.5, 5},
                      {"channel", -54.8, -68.3, 10},     {"ice-shore", -67.6, 62.9, 10},
                      {"ice-shelf", -77.8, 166.7, 20},   {"pole", -90, 0, 2835}};

// The place where the axis meets the ground (approximately: moved by a quarter of a degree on
// purpose, so that the line is not met exactly).
std::optional<Site> on_axis(double ut, const std::string& name) {
  const Sky k = sky_at(ut);
  const Vector stretch(1, 1, 1 / (1 - 1 / 298.257223563));
  const Vector m = k.moon.cwiseProduct(stretch), s = k.sun.cwiseProduct(stretch);
  const Vector u = (m - s).normalized();
  const double along = m.dot(u), rest = 6378.137 * 6378.137 - (m.squaredNorm() - along * along);
  if (rest < 0) return std::nullopt;
  const Vector p = m + (-along - std::sqrt(rest)) * u;
  const double parametric = std::asin(p.z() / p.norm());
  const double latitude = std::atan(std::tan(parametric) / (1 - 1 / 298.257223563)) / degree;
  const double longitude = wrap(std::atan2(p.y(), p.x()) - k.sidereal) / degree;
  const auto hundredths = [](double x) { return std::round(x * 100) / 100; };
  return Site{name, hundredths(latitude * 0.998), hundredths(longitude), 0};
}

void write_solar_site(std::FILE* out, double about, const Site& s) {
  const auto at = [&](double ut) { return discs(sky_at(ut), s); };
  const double from = about - 4 * hour, to = about + 4 * hour;
  const auto magnitude = [&](double ut) { return at(ut).magnitude(); };
  const double top = greatest_on_grid(magnitude, from, to, 4 * minute);
  std::fprintf(out, "%s,%s,%.4f,%.4f,%.0f,", iso_date(std::floor(about - 0.5) + 0.5).c_str(),
               s.name.c_str(), s.latitude, s.longitude, s.elevation_m);
  const Discs most = at(top);
  if (most.outer() <= 0) {
    std::fprintf(out, "none,,,,,,,,,,,%.6f,,\n", most.magnitude());
    return;
  }
  const auto outer = [&](double ut) { return at(ut).outer(); };
  const auto inner = [&](double ut) { return at(ut).inner(); };
  const double c1 = bisect(outer, from, top), c4 = bisect(outer, top, to);
  const double deep = greatest(inner, top - 2 * minute, top + 2 * minute);
  double c2 = 0, c3 = 0;
  if (inner(deep) > 0) c2 = bisect(inner, c1, deep), c3 = bisect(inner, deep, c4);
  const char* kind = c2 == 0 ? "partial" : most.inner_moon > most.sun ? "total" : "annular";
  const auto up = [&](double ut) {
    const Sky k = sky_at(ut);
    return altitude(k.sun, s, k.sidereal) / degree + 50.0 / 60;
  };
  double rise = 0, set = 0;
  const std::vector<double> horizon = zeros(up, c1, c4);
  for (const double t : horizon) {
    double& which = up(t + minute) > up(t - minute) ? rise : set;
    if (which == 0) which = t;
  }
  const auto height = [&](double ut) {
    const Sky k = sky_at(ut);
    return altitude(k.sun - site_km(s, k.sidereal), s, k.sidereal) / degree;
  };
  std::fprintf(out, "%s,%s,%s,%s,%s,%s,%s,%s,%d,%.3f,%.3f,%.6f,%.6f,%.5f\n", kind,
               instant(c1).c_str(), instant(c2).c_str(), instant(top).c_str(), instant(c3).c_str(),
               instant(c4).c_str(), instant(rise).c_str(), instant(set).c_str(),
               up(c1) > 0 || !horizon.empty() ? 1 : 0, height(c1), height(top), most.magnitude(),
               most.inner_moon / most.sun, obscuration(most));
}

// On a meridian, from where the eclipse is deepest towards where there is none: sites a twentieth
// of a degree on both sides of the partial zone's edge.
void write_edge(std::FILE* out, double about, double gamma) {
  const auto most = [&](const Site& s) {
    const auto f = [&](double ut) { return discs(sky_at(ut), s).magnitude(); };
    return f(greatest_on_grid(f, about - 3 * hour, about + 3 * hour, 10 * minute));
  };
  const Sky k = sky_at(about);
  const double noon = wrap(std::atan2(k.sun.y(), k.sun.x()) - k.sidereal) / degree;
  Site inside{"edge-inside", gamma > 0 ? 60.0 : -60.0, std::round(noon), 0};
  Site outside = inside;
  outside.latitude = gamma > 0 ? -75.0 : 75.0;
  if (most(inside) <= 0 || most(outside) >= 0) return;
  for (int i = 0; i < 16; ++i) {
    Site middle = inside;
    middle.latitude = 0.5 * (inside.latitude + outside.latitude);
    (most(middle) > 0 ? inside : outside).latitude = middle.latitude;
  }
  const double edge = std::round(inside.latitude * 100) / 100, away = gamma > 0 ? 0.05 : -0.05;
  write_solar_site(out, about, {"edge-inside", edge + away, inside.longitude, 0});
  write_solar_site(out, about, {"edge-outside", edge - away, inside.longitude, 0});
}

void write_solar(double from, double to, std::FILE* global, std::FILE* local) {
  const auto phase = [](double ut) {
    const Sky k = sky_at(ut);
    return angle(k.sun, k.moon);
  };
  for (double ut = from; ut < to; ut += 0.5) {
    const double before = phase(ut - 0.5), here = phase(ut), after = phase(ut + 0.5);
    if (!(here <= before && here < after && here < 12 * degree)) continue;
    const auto axis_distance = [](double t) {
      const Sky k = sky_at(t);
      return k.moon.cross((k.sun - k.moon).normalized()).norm() / equatorial_km;
    };
    const double top = greatest([&](double t) { return -axis_distance(t); }, ut - 0.5, ut + 0.5);
    const double least = axis_distance(top);
    if (least > 1.6) continue;  // the penumbra is 0.57 wide at most
    const Sky k = sky_at(top);
    const Vector axis = (k.sun - k.moon).normalized();
    const double north = (k.moon - k.moon.dot(axis) * axis).z();
    const double gamma = north > 0 ? least : -least;
    std::fprintf(global, "%s,%s,%.6f\n", iso_date(std::floor(top - 0.5) + 0.5).c_str(),
                 instant(top).c_str(), gamma);
    for (const Site& s : sites) write_solar_site(local, top, s);
    for (int h = -1; h <= 1; ++h)
      if (const auto s = on_axis(top + h * hour, h < 0   ? "path-before"
                                                 : h > 0 ? "path-after"
                                                         : "path-greatest"))
        write_solar_site(local, top, *s);
    write_edge(local, top, gamma);
    std::fprintf(stderr, "%s\n", instant(top).c_str());
  }
}

struct Cone {
  double umbra, penumbra;  // distance of the Moon's centre inside the cone, km
  double moon_angle, axis_km, north;
};
Cone cone_at(double ut) {
  const Sky k = sky_at(ut);
  const Vector axis = -k.sun.normalized();
  const double along = k.moon.dot(axis), away = (k.moon - along * axis).norm();
  const double wide = 1.01 * equatorial_km, d = k.sun.norm();
  const double f2 = std::asin((sun_km - equatorial_km) / d),
               f1 = std::asin((sun_km + equatorial_km) / d);
  return {wide - away * std::cos(f2) - along * std::sin(f2),
          wide - away * std::cos(f1) + along * std::sin(f1), angle(k.moon, axis), away,
          (k.moon - along * axis).z()};
}

void write_lunar(double from, double to, std::FILE* global, std::FILE* local) {
  constexpr double moon_km = k_lunar * equatorial_km;
  const auto away = [](double ut) { return cone_at(ut).moon_angle; };
  for (double ut = from; ut < to; ut += 0.5) {
    const double before = away(ut - 0.5), here = away(ut), after = away(ut + 0.5);
    if (!(here <= before && here < after && here < 12 * degree)) continue;
    const double top = greatest([&](double t) { return -away(t); }, ut - 0.5, ut + 0.5);
    const Cone most = cone_at(top);
    if (most.penumbra + moon_km <= 0) continue;
    const auto contact = [&](double Cone::*which, double radius, double side) {
      if (most.*which + radius <= 0) return 0.0;
      return bisect([&](double t) { return cone_at(t).*which + radius; },
                    side < 0 ? top - 4 * hour : top, side < 0 ? top : top + 4 * hour);
    };
    const double p1 = contact(&Cone::penumbra, moon_km, -1),
                 p4 = contact(&Cone::penumbra, moon_km, 1);
    const double u1 = contact(&Cone::umbra, moon_km, -1), u4 = contact(&Cone::umbra, moon_km, 1);
    const double u2 = contact(&Cone::umbra, -moon_km, -1), u3 = contact(&Cone::umbra, -moon_km, 1);
    const std::string date = iso_date(std::floor(top - 0.5) + 0.5);
    std::fprintf(global, "%s,%s,%s,%s,%s,%s,%s,%s,%.6f,%.6f,%.6f\n", date.c_str(),
                 instant(p1).c_str(), instant(u1).c_str(), instant(u2).c_str(),
                 instant(top).c_str(), instant(u3).c_str(), instant(u4).c_str(),
                 instant(p4).c_str(), (most.penumbra + moon_km) / (2 * moon_km),
                 (most.umbra + moon_km) / (2 * moon_km),
                 (most.north > 0 ? 1 : -1) * most.axis_km / equatorial_km);
    for (const Site& s : sites) {
      // Rise and set: the geocentric altitude of the centre at 0.7275 parallax - 34'.
      const auto excess = [&](double t) {
        const Sky k = sky_at(t);
        const double parallax = std::asin(equatorial_km / k.moon.norm());
        return altitude(k.moon, s, k.sidereal) - 0.7275 * parallax + 34.0 / 60 * degree;
      };
      const auto height = [&](double t) {
        const Sky k = sky_at(t);
        return altitude(k.moon - site_km(s, k.sidereal), s, k.sidereal) / degree;
      };
      double rise = 0, set = 0;
      const std::vector<double> horizon = zeros(excess, p1, p4);
      for (const double t : horizon) {
        double& which = excess(t + minute) > excess(t - minute) ? rise : set;
        if (which == 0) which = t;
      }
      std::fprintf(local, "%s,%s,%.4f,%.4f,%.0f,%.4f,%.4f,%.4f,%s,%s,%d\n", date.c_str(),
                   s.name.c_str(), s.latitude, s.longitude, s.elevation_m, height(p1), height(top),
                   height(p4), instant(rise).c_str(), instant(set).c_str(),
                   excess(p1) > 0 || !horizon.empty() ? 1 : 0);
    }
    std::fprintf(stderr, "%s\n", instant(top).c_str());
  }
}

std::FILE* open_table(const std::string& path, const char* what, const char* columns) {
  std::FILE* out = std::fopen(path.c_str(), "w");
  if (!out) std::exit(4);
  std::fprintf(out, "# %s\n", what);
  write_source(out, "eclipses.cpp");
  std::fprintf(out, "%s\n", columns);
  return out;
}

}  // namespace

int main(int argc, char** argv) {
  if (argc != 2) {
    std::fprintf(stderr, "usage: eclipses FOLDER\n");
    return 2;
  }
  swe_set_ephe_path(const_cast<char*>("/usr/share/libswe/ephe"));
  check_sidereal_time();
  const std::string folder = std::string(argv[1]) + "/";
  const double from = julian_day(2020, 1, 1), to = julian_day(2036, 1, 1);
  std::FILE* lunar = open_table(
      folder + "lunar_eclipses_de431.csv",
      "Every eclipse of the Moon of 2020-2035 (Danjon's rule): contacts, greatest, magnitudes.",
      "date,p1,u1,u2,greatest,u3,u4,p4,penumbral_magnitude,umbral_magnitude,gamma");
  std::FILE* lunar_sites = open_table(
      folder + "lunar_eclipse_sites_de431.csv",
      "The same from eighteen invented sites: the Moon's topocentric altitude (degrees, no "
      "refraction), and its rise and set within the eclipse.",
      "date,site,latitude,longitude,elevation_m,altitude_p1,altitude_greatest,altitude_p4,moonrise,"
      "moonset,up");
  write_lunar(from, to, lunar, lunar_sites);
  std::FILE* solar = open_table(
      folder + "solar_eclipses_de431.csv",
      "Every new Moon of 2020-2035 at which the axis passes the Earth's centre within 1.6 radii.",
      "date,greatest,gamma");
  std::FILE* solar_sites = open_table(
      folder + "solar_eclipse_sites_de431.csv",
      "Those eclipses from eighteen invented sites, from the central line and from both sides of "
      "the partial zone's edge; `none`: no contact.",
      "date,site,latitude,longitude,elevation_m,kind,c1,c2,greatest,c3,c4,sunrise,sunset,up,"
      "altitude_c1,altitude_greatest,magnitude,ratio,obscuration");
  write_solar(from, to, solar, solar_sites);
  bool good = true;
  for (std::FILE* f : {lunar, lunar_sites, solar, solar_sites}) good = std::fclose(f) == 0 && good;
  return good ? 0 : 4;
}
