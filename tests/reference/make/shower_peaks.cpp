// Makes shower_peaks_de431.csv: see README.md here for how to run it.
//
// When the Sun's geometric longitude (mean ecliptic and equinox J2000) reaches that of each
// shower's peak, by bisection. The library turns the vector to the ecliptic of J2000 itself.
// Nothing of the project's own code is used; the table of showers gives codes and longitudes alone.
#include <fstream>
#include <iostream>
#include <sstream>
#include <vector>

#include "swiss_positions.hpp"

namespace {

double geometric_longitude(double tt) {
  double xx[6];
  calc(tt, SE_SUN, SEFLG_TRUEPOS | SEFLG_J2000 | SEFLG_NONUT, xx);
  return xx[0] * degree;
}

struct Peak {
  double ut;
  std::string code;
};

std::vector<std::pair<std::string, double>> read_showers(const char* path) {
  std::ifstream in(path);
  std::vector<std::pair<std::string, double>> showers;
  std::string line;
  bool header = true;
  while (std::getline(in, line)) {
    if (line.starts_with('#')) continue;
    if (header) {
      header = false;
      continue;
    }
    std::vector<std::string> cells;
    std::istringstream row(line);
    for (std::string cell; std::getline(row, cell, ',');) cells.push_back(cell);
    showers.emplace_back(cells.at(0), std::stod(cells.at(6)));
  }
  return showers;
}

int write_peaks(const char* showers_path, const char* path) {
  std::FILE* out = std::fopen(path, "w");
  if (!out) return 4;
  std::fputs("# Every peak of a shower of src/data/showers.csv in the UT years 2020-2035.\n", out);
  write_source(out, "shower_peaks.cpp");
  std::fputs("code,utc\n", out);
  const double first = julian_day(2020, 1, 1), end = julian_day(2036, 1, 1);
  std::vector<Peak> all;
  for (const auto& [code, longitude] : read_showers(showers_path)) {
    const auto ahead = [&, wanted = longitude * degree](double tt) {
      return wrap(geometric_longitude(tt) - wanted);
    };
    for (double tt = tt_of(first) - 10; tt < tt_of(end) + 10; tt += 5) {
      const double a = ahead(tt), b = ahead(tt + 5);
      if (!(a < 0 && b >= 0 && b - a < 1)) continue;
      const double ut = ut_of(bisect(ahead, tt, tt + 5));
      if (ut >= first && ut < end) all.push_back({ut, code});
    }
  }
  std::sort(all.begin(), all.end(), [](const Peak& a, const Peak& b) {
    return std::pair(a.ut, a.code) < std::pair(b.ut, b.code);
  });
  for (const Peak& p : all) {
    const double day = std::floor(p.ut - 0.5) + 0.5;
    std::fprintf(out, "%s,%sT%sZ\n", p.code.c_str(), iso_date(day).c_str(),
                 clock(day, p.ut).c_str());
  }
  return std::fclose(out) == 0 ? 0 : 4;
}

}  // namespace

int main(int argc, char** argv) {
  if (argc != 3) {
    std::fprintf(stderr, "usage: shower_peaks SHOWERS.csv OUT.csv\n");
    return 2;
  }
  swe_set_ephe_path(const_cast<char*>("/usr/share/libswe/ephe"));
  return write_peaks(argv[1], argv[2]);
}
