// Makes instants_de431.csv: see README.md here for how to run it.
//
// Positions come from the Swiss Ephemeris library with its DE431-based files. Everything else is
// plain text-book geometry written for this file: the altitude of the centre from the geodetic
// latitude, and the thresholds of the Explanatory Supplement that the project's conventions name.
// Events are found on a grid of two minutes, on which extrema near a threshold are refined, and
// then by bisection. Nothing of the project's own code is used.
#include <vector>

#include "swiss_positions.hpp"

namespace {

constexpr double earth_radius_km = 6378.14;  // IAU 1976, as the conventions' parallax takes it
constexpr double graze_altitude = 0.01;      // degrees
constexpr double graze_rate = 1e-4;  // degrees a second; slower than this an event is a graze

struct Site {
  const char* label;
  double latitude, longitude;
};
// Invented labels. Latitudes 67.4 and 48.56 put the Sun on a threshold at the solstices.
const Site sites[] = {
    {"north-80", 80.0, -41.7},    {"north-78", 78.2, 15.6},       {"north-69", 69.6, 18.9},
    {"noon-graze", 67.4, 26.6},   {"polar-circle", 66.6, -145.2}, {"mid-north", 54.18, -4.62},
    {"white-night", 48.56, 7.7},  {"odd-offset", 27.7, 85.3},     {"equator", 0.0, -78.4},
    {"date-line", -16.5, 179.97}, {"south-44", -43.95, -176.55},  {"south-55", -54.8, -68.3},
    {"south-78", -77.8, 166.7},   {"south-80", -80.0, 61.25},
};

// Degrees.
double altitude(const Site& s, const Place& p, double gast) {
  const double h = gast + s.longitude * degree - p.ra, phi = s.latitude * degree;
  return std::asin(std::sin(phi) * std::sin(p.dec) +
                   std::cos(phi) * std::cos(p.dec) * std::cos(h)) /
         degree;
}

struct Level {
  const char* name;
  int body;
  double degrees;
  int up_column, down_column;
};
enum Column {
  sunrise,
  sunset,
  civil_dawn,
  civil_dusk,
  nautical_dawn,
  nautical_dusk,
  astronomical_dawn,
  astronomical_dusk,
  sun_transit,
  moonrise,
  moonset,
  moon_transit,
  columns
};
const char* column_names[] = {
    "sunrise",       "sunset",        "civil-dawn",        "civil-dusk",
    "nautical-dawn", "nautical-dusk", "astronomical-dawn", "astronomical-dusk",
    "sun-transit",   "moonrise",      "moonset",           "moon-transit"};
const Level levels[] = {{"sun", SE_SUN, -50.0 / 60.0, sunrise, sunset},
                        {"civil", SE_SUN, -6, civil_dawn, civil_dusk},
                        {"nautical", SE_SUN, -12, nautical_dawn, nautical_dusk},
                        {"astronomical", SE_SUN, -18, astronomical_dawn, astronomical_dusk},
                        {"moon", SE_MOON, 0, moonrise, moonset}};

// Height above the level, degrees.
double above(const Site& s, const Level& level, const Place& p, double gast) {
  double threshold = level.degrees;
  if (level.body == SE_MOON)
    threshold = 0.7275 * std::asin(earth_radius_km / p.distance_km) / degree - 34.0 / 60.0;
  return altitude(s, p, gast) - threshold;
}

// Golden section: the extremum of sense +1 (maximum) or -1 within [a, b], to about 0.2 s.
double extremum(const std::function<double(double)>& f, int sense, double a, double b) {
  const double g = (std::sqrt(5.0) - 1) / 2;
  double c = b - g * (b - a), d = a + g * (b - a), fc = sense * f(c), fd = sense * f(d);
  while (b - a > 0.2 * second) {
    if (fc > fd) {
      b = d, d = c, fd = fc, c = b - g * (b - a), fc = sense * f(c);
    } else {
      a = c, c = d, fc = fd, d = a + g * (b - a), fd = sense * f(d);
    }
  }
  return a + (b - a) / 2;
}

constexpr int per_day = 720;
constexpr int margin = 3;  // grid steps before and after the day
struct Samples {
  double day;
  std::vector<double> ut, gast;
  std::vector<Place> sun, moon;
};
Samples sample(double day) {
  Samples s;
  s.day = day;
  for (int i = -margin; i <= per_day + margin; ++i) {
    const double ut = day + i / double(per_day);
    s.ut.push_back(ut);
    s.gast.push_back(sidereal_time(ut));
    s.sun.push_back(place(ut, SE_SUN));
    s.moon.push_back(place(ut, SE_MOON));
  }
  return s;
}

struct Row {
  std::string cells[columns], near_misses;
  double nearest = 1e9;  // least |extremum - level| of the day, degrees
};

// How far an event may be off, s: within a graze until the altitude is wrong by 0.01 degree.
int slack(const std::function<double(double)>& f, double at) {
  for (int s = 1; s < 7200; ++s)
    if (std::abs(f(at - s * second)) > graze_altitude ||
        std::abs(f(at + s * second)) > graze_altitude)
      return std::max(1, s - 1);
  return 7200;
}

Row day_row(const Site& site, const Samples& s) {
  struct Found {
    double ut;
    std::string suffix;
  };
  std::vector<Found> found[columns];
  Row row;
  const auto inside = [&](double ut) { return ut >= s.day && ut < s.day + 1; };
  for (const Level& level : levels) {
    const auto& body = level.body == SE_SUN ? s.sun : s.moon;
    const auto exact = [&](double ut) {
      return above(site, level, place(ut, level.body), sidereal_time(ut));
    };
    const int n = int(s.ut.size());
    // Turning points cut the day into stretches of one sense; far ones need no refining.
    struct Node {
      double ut, f;
      int turning;  // +1 a maximum, -1 a minimum, 0 neither
    };
    std::vector<Node> nodes;
    std::vector<double> f;
    for (int i = 0; i < n; ++i) f.push_back(above(site, level, body[i], s.gast[i]));
    for (int i = 0; i < n; ++i) {
      const bool top = i > 0 && i + 1 < n && f[i] >= f[i - 1] && f[i] > f[i + 1];
      const bool bottom = i > 0 && i + 1 < n && f[i] <= f[i - 1] && f[i] < f[i + 1];
      if ((top || bottom) && std::abs(f[i]) < 1.0) {
        const double at = extremum(exact, top ? 1 : -1, s.ut[i - 1], s.ut[i + 1]);
        nodes.push_back({at, exact(at), top ? 1 : -1});
        if (inside(at)) row.nearest = std::min(row.nearest, std::abs(nodes.back().f));
      } else {
        nodes.push_back({s.ut[i], f[i], 0});
      }
    }
    for (std::size_t i = 0; i + 1 < nodes.size(); ++i) {
      const Node &a = nodes[i], &b = nodes[i + 1];
      if (a.turning != 0 && std::abs(a.f) <= graze_altitude && inside(a.ut)) {
        const bool reached = (a.turning > 0) == (a.f >= 0);
        if (!reached)
          row.near_misses += (row.near_misses.empty() ? "" : " ") + std::string(level.name) + "@" +
                             clock(s.day, a.ut);
      }
      if ((a.f < 0) == (b.f < 0)) continue;
      const double at = bisect(exact, a.ut, b.ut);
      if (!inside(at)) continue;
      const double rate = (exact(at + second) - exact(at - second)) / 2;
      std::string suffix;
      if (std::abs(rate) < graze_rate) suffix = "~" + std::to_string(slack(exact, at));
      // A pair of crossings about a turning point this close to the level may also be missing, both
      // of them.
      for (const Node& t : nodes)
        if (t.turning != 0 && std::abs(t.f) <= graze_altitude && std::abs(t.ut - at) < 0.05) {
          if (suffix.empty()) suffix = "~" + std::to_string(slack(exact, at));
          suffix += "?";
          break;
        }
      found[a.f < 0 ? level.up_column : level.down_column].push_back({at, suffix});
    }
  }
  for (int b = 0; b < 2; ++b) {
    const auto& body = b == 0 ? s.sun : s.moon;
    const int id = b == 0 ? SE_SUN : SE_MOON;
    for (std::size_t i = 0; i + 1 < s.ut.size(); ++i) {
      const double before = wrap(s.gast[i] + site.longitude * degree - body[i].ra);
      const double after = wrap(s.gast[i + 1] + site.longitude * degree - body[i + 1].ra);
      if (!(before < 0 && after >= 0 && after - before < 1)) continue;
      const double at = bisect(
          [&](double ut) {
            return wrap(sidereal_time(ut) + site.longitude * degree - place(ut, id).ra);
          },
          s.ut[i], s.ut[i + 1]);
      if (inside(at)) found[b == 0 ? sun_transit : moon_transit].push_back({at, ""});
    }
  }
  for (int c = 0; c < columns; ++c)
    for (const Found& x : found[c])
      row.cells[c] += (row.cells[c].empty() ? "" : " ") + clock(s.day, x.ut) + x.suffix;
  return row;
}

int write_days(const char* path) {
  std::FILE* out = std::fopen(path, "w");
  if (!out) return 4;
  std::fputs(
      "# Complete lists of the instants of whole UT days [00:00, 24:00) at invented sites, "
      "hh:mm:ss.ss UTC.\n",
      out);
  write_source(out, "instants.cpp");
  std::fputs(
      "# An empty cell: it does not happen that day. Two times in a cell: it happens twice. After "
      "a time, ~N marks a graze\n"
      "# (altitude changes by less than 0.0001 degree a second): for N seconds either way the "
      "altitude is right to 0.01\n"
      "# degree. ~N? besides: the body turns within 0.01 degree of the level, so that the pair of "
      "instants may be missing.\n"
      "# near_misses: level@time where it turns within 0.01 degree of a level without reaching "
      "it.\n"
      "site,latitude,longitude,date",
      out);
  for (const char* name : column_names) std::fprintf(out, ",%s", name);
  std::fputs(",near_misses\n", out);

  std::vector<std::string> lines[std::size(sites)];
  for (int year = 1972; year <= 2035; ++year) {
    const bool whole = year == 1975 || year == 2004 || year == 2027;
    const bool sparse = year == 1972 || year == 1988 || year == 2016 || year == 2035;
    if (!whole && !sparse) continue;
    const double first = julian_day(year, 1, 1), end = julian_day(year + 1, 1, 1);
    for (double day = first; day < end; ++day) {
      const int index = int(day - first);
      // Besides the regular sample, both sides of a leap second.
      const bool regular =
          index % (whole ? 12 : 45) == 0 || (year == 1972 && (index == 181 || index == 182));
      if (!regular && !whole) continue;
      const Samples s = sample(day);
      for (std::size_t i = 0; i < std::size(sites); ++i) {
        const Row row = day_row(sites[i], s);
        if (!regular && row.nearest > 0.12) continue;
        char head[80];
        std::snprintf(head, sizeof head, "%s,%g,%g,%s", sites[i].label, sites[i].latitude,
                      sites[i].longitude, iso_date(day).c_str());
        std::string line = head;
        for (const std::string& cell : row.cells) line += "," + cell;
        lines[i].push_back(line + "," + row.near_misses);
      }
    }
    std::fprintf(stderr, "%d done\n", year);
  }
  for (const auto& site : lines) {
    for (const std::string& line : site) std::fprintf(out, "%s\n", line.c_str());
    std::fprintf(stderr, "%zu days\n", site.size());
  }
  return std::fclose(out) == 0 ? 0 : 4;
}

}  // namespace

int main(int argc, char** argv) {
  if (argc != 2) {
    std::fprintf(stderr, "usage: instants OUT.csv\n");
    return 2;
  }
  swe_set_ephe_path(const_cast<char*>("/usr/share/libswe/ephe"));
  check_sidereal_time();
  return write_days(argv[1]);
}
