// Makes occultations_de431.csv: see README.md here for how to run it.
//
// Every occultation of 2020-2035 by the Moon of a planet's centre, or of a star of V 3.5 or
// brighter with a Bayer letter in sefstars.txt (but eta Leonis: V 3.41 there, 3.52 in the Bright
// Star Catalogue), with a contact at which the target stands above -34', at five invented sites;
// and every pass within 0.003 degree outside the limb. Mean limb of k = 0.2725076 (IAU 1982) times
// 6378.137 km. First the geocentric distance every two hours, then the topocentric one every two
// minutes, then bisection. Nothing of the project's own code is used.
#include <fstream>
#include <map>
#include <regex>
#include <set>
#include <sstream>

#include "topocentric_site.hpp"

namespace {

constexpr double moon_radius_km = 0.2725076 * 6378.137;
constexpr double faintest = 3.5, limit = -34.0 / 60 * degree, graze = 0.003 * degree;

struct Target {
  std::string name, designation;  // of a star: "α Leo", "alLeo"
  int body = -1;
};

std::vector<Target> all_targets(const char* stars) {
  std::vector<Target> list = {{"mercury", "", SE_MERCURY}, {"venus", "", SE_VENUS},
                              {"mars", "", SE_MARS},       {"jupiter", "", SE_JUPITER},
                              {"saturn", "", SE_SATURN},   {"uranus", "", SE_URANUS},
                              {"neptune", "", SE_NEPTUNE}};
  const std::map<std::string, std::string> letters = {
      {"al", "α"}, {"be", "β"}, {"ga", "γ"}, {"de", "δ"}, {"ep", "ε"},  {"ze", "ζ"},
      {"et", "η"}, {"th", "θ"}, {"io", "ι"}, {"ka", "κ"}, {"la", "λ"},  {"mu", "μ"},
      {"nu", "ν"}, {"xi", "ξ"}, {"pi", "π"}, {"rh", "ρ"}, {"omi", "ο"}, {"si", "σ"},
      {"ta", "τ"}, {"up", "υ"}, {"ph", "φ"}, {"ch", "χ"}, {"ps", "ψ"},  {"ome", "ω"}};
  const char* digits[] = {"", "¹", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹"};
  std::ifstream file(stars);
  std::set<std::string> seen;
  const std::regex form("([a-z]{2,3})(?:-([0-9]))?([A-Z][A-Za-z]{2})");
  for (std::string line; std::getline(file, line);) {
    std::vector<std::string> cells;
    std::istringstream row(line);
    for (std::string cell; std::getline(row, cell, ',');) {
      cell.erase(0, cell.find_first_not_of(' '));
      cell.erase(cell.find_last_not_of(" \r") + 1);
      cells.push_back(cell);
    }
    std::smatch parts;
    if (line.empty() || line[0] == '#' || cells.size() < 14 || cells[2] != "ICRS" ||
        cells[1] == "etLeo" || !std::regex_match(cells[1], parts, form) ||
        !letters.count(parts[1]) || std::atof(cells[13].c_str()) > faintest ||
        !seen.insert(cells[3] + cells[4] + cells[5] + cells[6] + cells[7] + cells[8]).second)
      continue;
    const Vec v = star_of(cells[1], julian_day(2028, 1, 1));
    const double obliquity = 23.437 * degree;
    const double latitude =
        std::asin(v.z * std::cos(obliquity) - v.y * std::sin(obliquity)) / degree;
    if (std::abs(latitude) > 6.9) continue;
    const int digit = parts[2].matched ? std::atoi(parts[2].str().c_str()) : 0;
    list.push_back({letters.at(parts[1]) + digits[digit] + " " + parts[3].str(), cells[1]});
  }
  if (list.size() < 30) {
    std::fprintf(stderr, "too few stars\n");
    std::exit(4);
  }
  return list;
}

Vec geocentric(const Target& target, double ut) {
  return target.body >= 0 ? vector_of(place(ut, target.body)) : star_of(target.designation, ut);
}

// One site's view of Moon and target.
struct View {
  Vec moon, sun, target;
  double theta;
  double over_limb() const {
    return angle_between(moon, target) - std::asin(moon_radius_km / length(moon));
  }
};
View view_from(const Site& site, const Target& target, double ut) {
  const double theta = sidereal_time(ut);
  const Vec here = site_vector(site, theta);
  const Vec other = geocentric(target, ut);
  return {vector_of(place(ut, SE_MOON)) - here, vector_of(place(ut, SE_SUN)) - here,
          target.body >= 0 ? other - here : other, theta};
}

// Places for every two minutes of an encounter, shared by all sites.
struct Step {
  double ut, theta;
  Vec moon, target;
};

std::string contact_cells(const Site& site, const Target& target, double ut) {
  const View v = view_from(site, target, ut);
  const double h = 5 * second;
  const double speed =
      (view_from(site, target, ut + h).over_limb() - view_from(site, target, ut - h).over_limb()) /
      10 / degree * 3600;
  const double pa = position_angle_of(v.moon, v.target), bright = position_angle_of(v.moon, v.sun);
  char text[160];
  std::snprintf(text, sizeof text, "%s,%.4f,%.4f,%.3f,%.3f,%.3f", iso_instant(ut).c_str(),
                altitude_of(v.target, site, v.theta) / degree,
                altitude_of(v.sun, site, v.theta) / degree, pa / degree, wrap(pa - bright) / degree,
                std::abs(speed));
  return text;
}

int found = 0, near_misses = 0;

void encounter(std::FILE* out, const Target& target, double about) {
  std::vector<Step> steps;
  for (double ut = about - 4.5 / 24; ut <= about + 4.5 / 24; ut += 2.0 / 1440)
    steps.push_back({ut, sidereal_time(ut), vector_of(place(ut, SE_MOON)), {}});
  // A planet or star goes evenly through these hours, but the least of it is asked anew.
  for (Step& s : steps) s.target = geocentric(target, s.ut);
  for (const Site& site : sites) {
    std::vector<double> over;
    for (const Step& s : steps) {
      const Vec here = site_vector(site, s.theta), moon = s.moon - here,
                other = target.body >= 0 ? s.target - here : s.target;
      over.push_back(angle_between(moon, other) - std::asin(moon_radius_km / length(moon)));
    }
    const std::size_t least =
        static_cast<std::size_t>(std::min_element(over.begin(), over.end()) - over.begin());
    if (least == 0 || least + 1 == over.size()) continue;
    if (over[least] > 0.05 * degree) continue;
    const auto f = [&](double ut) { return view_from(site, target, ut).over_limb(); };
    double a = steps[least - 1].ut, b = steps[least + 1].ut;
    for (int i = 0; i < 60; ++i) {  // golden section
      const double third = 0.381966 * (b - a);
      if (f(a + third) < f(b - third))
        b -= third;
      else
        a += third;
    }
    const double middle = (a + b) / 2;
    const View at_least = view_from(site, target, middle);
    const double depth = at_least.over_limb();
    if (depth > graze) continue;
    char head[200];
    std::snprintf(head, sizeof head, "%s,%g,%g,%g,%s,%s,%.5f,%.5f", site.name, site.latitude,
                  site.longitude, site.elevation_m, target.name.c_str(),
                  iso_instant(middle).c_str(),
                  angle_between(at_least.moon, at_least.target) / degree,
                  std::asin(moon_radius_km / length(at_least.moon)) / degree);
    if (depth >= 0) {
      if (altitude_of(at_least.target, site, at_least.theta) < limit) continue;
      ++near_misses;
      std::fprintf(out, "%s,,,,,,,,,,,,\n", head);
      continue;
    }
    const double in = bisect(f, steps.front().ut, middle),
                 leave = bisect(f, middle, steps.back().ut);
    const auto up = [&](double ut) {
      const View v = view_from(site, target, ut);
      return altitude_of(v.target, site, v.theta) > limit;
    };
    if (!up(in) && !up(leave)) continue;
    ++found;
    std::fprintf(out, "%s,%s,%s\n", head, contact_cells(site, target, in).c_str(),
                 contact_cells(site, target, leave).c_str());
  }
}

}  // namespace

int main(int argc, char** argv) {
  std::FILE* out = open_output(argc, argv);
  check_sidereal_time();
  std::fputs(
      "# Occultations by the Moon of planets' centres and stars (V <= 3.5) at invented sites, "
      "2020-2035: all with a contact at which the\n"
      "# target stands above -34', and passes within 0.003 degree outside the limb (cells empty). "
      "least: distance of the centres,\n"
      "# radius: of the Moon, degrees. Of each contact: altitude of the target and of the Sun (no "
      "refraction), position angle on the\n"
      "# Moon's limb, the same from the middle of the bright limb, degrees; speed: arcseconds a "
      "second at which the limb is crossed.\n",
      out);
  write_source(out, "occultations.cpp");
  std::fputs(
      "site,latitude,longitude,elevation_m,target,nearest,least_deg,radius_deg,"
      "disappears,d_altitude,d_sun,d_angle,d_from_bright,d_speed,"
      "reappears,r_altitude,r_sun,r_angle,r_from_bright,r_speed\n",
      out);
  const std::vector<Target> targets = all_targets("/usr/share/libswe/ephe/sefstars.txt");
  const double first = julian_day(2020, 1, 1), end = julian_day(2036, 1, 1), step = 2.0 / 24;
  std::vector<Vec> moon;
  for (double ut = first; ut < end + step; ut += step)
    moon.push_back(vector_of(place(ut, SE_MOON)));
  for (const Target& target : targets) {
    const Vec fixed = geocentric(target, julian_day(2028, 1, 1));
    std::vector<double> apart;
    for (std::size_t i = 0; i < moon.size(); ++i) {
      const double ut = first + step * static_cast<double>(i);
      // Only near the Moon is the exact place worth asking for.
      Vec at = fixed;
      if (target.body >= 0) at = vector_of(place(ut, target.body));
      apart.push_back(angle_between(moon[i], at));
    }
    for (std::size_t i = 1; i + 1 < apart.size(); ++i)
      if (apart[i] < 2.2 * degree && apart[i] <= apart[i - 1] && apart[i] < apart[i + 1])
        encounter(out, target, first + step * static_cast<double>(i));
  }
  std::fprintf(stderr, "%d occultations, %d near misses, %zu targets\n", found, near_misses,
               targets.size());
  return std::fclose(out) == 0 ? 0 : 4;
}
