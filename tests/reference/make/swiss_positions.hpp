// What the generators here share: positions of the Swiss Ephemeris library in TT, universal time by
// the leap seconds (UT1 taken equal to UTC), sidereal time, bisection, and text.
#pragma once

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <functional>
#include <string>
#include <swephexp.h>

constexpr double pi = 3.14159265358979323846;
constexpr double degree = pi / 180.0;
constexpr double au_km = 149597870.7;  // IAU 2012 resolution B2
constexpr double j2000 = 2451545.0;
constexpr double second = 1.0 / 86400.0;  // days

// First day and TAI - UTC, s (IERS Bulletin C).
struct Leap {
  int year, month, tai_minus_utc;
};
const Leap leaps[] = {{1972, 1, 10}, {1972, 7, 11}, {1973, 1, 12}, {1974, 1, 13}, {1975, 1, 14},
                      {1976, 1, 15}, {1977, 1, 16}, {1978, 1, 17}, {1979, 1, 18}, {1980, 1, 19},
                      {1981, 7, 20}, {1982, 7, 21}, {1983, 7, 22}, {1985, 7, 23}, {1988, 1, 24},
                      {1990, 1, 25}, {1991, 1, 26}, {1992, 7, 27}, {1993, 7, 28}, {1994, 7, 29},
                      {1996, 1, 30}, {1997, 7, 31}, {1999, 1, 32}, {2006, 1, 33}, {2009, 1, 34},
                      {2012, 7, 35}, {2015, 7, 36}, {2017, 1, 37}};

inline double julian_day(int year, int month, int day) {
  return swe_julday(year, month, day, 0.0, SE_GREG_CAL);
}

// The latest step at or before an instant, universal or TT; the first also in the last hours of
// 1971, which only the search's margins touch.
inline double tt_minus_ut_days(double jd, bool jd_is_tt) {
  double result = 42.184 * second;
  for (const Leap& l : leaps) {
    const double offset = (l.tai_minus_utc + 32.184) * second;
    if (jd >= julian_day(l.year, l.month, 1) + (jd_is_tt ? offset : 0.0)) result = offset;
  }
  return result;
}
inline double tt_of(double ut) { return ut + tt_minus_ut_days(ut, false); }
inline double ut_of(double tt) { return tt - tt_minus_ut_days(tt, true); }

inline void calc(double tt, int body, int flags, double* xx) {
  char message[AS_MAXCH];
  const int got = swe_calc(tt, body, flags | SEFLG_SWIEPH, xx, message);
  // The library falls back on a built-in theory when its files are not found: that must not pass.
  if (got < 0 || !(got & SEFLG_SWIEPH)) {
    std::fprintf(stderr, "position not from the files: %s\n", message);
    std::exit(2);
  }
}

struct Place {
  double ra, dec, distance_km;
};
inline Place place(double ut, int body) {
  double xx[6], true_xx[6];
  const double tt = tt_of(ut);
  calc(tt, body, SEFLG_EQUATORIAL, xx);
  // The distance with light-time counts in the Solar System's frame, in which the Earth runs 40 km
  // before the Moon's light arrives; the parallax wants that between the centres.
  calc(tt, body, SEFLG_EQUATORIAL | SEFLG_TRUEPOS, true_xx);
  return {xx[0] * degree, xx[1] * degree, true_xx[2] * au_km};
}

// Greenwich apparent sidereal time, radians.
inline double sidereal_time(double ut) {
  double nut[6];
  char message[AS_MAXCH];
  const double tt = tt_of(ut);
  if (swe_calc(tt, SE_ECL_NUT, 0, nut, message) < 0) std::exit(2);
  const double du = ut - j2000, t = (tt - j2000) / 36525.0;
  const double turns = std::fmod(du, 1.0) + 0.7790572732640 + 0.00273781191135448 * du;
  const double precession_arcsec =
      0.014506 + t * (4612.156534 + t * (1.3915817 + t * (-0.00000044 + t * (-0.000029956))));
  // The largest complementary term of the equation of the equinoxes (IERS Conventions 2010,
  // table 5.2e).
  const double node = (125.04455501 - 1934.13626197 * t) * degree;
  const double equinoxes_arcsec =
      nut[2] * 3600.0 * std::cos(nut[0] * degree) + 0.00264096 * std::sin(node);
  return std::fmod(turns, 1.0) * 2 * pi + (precession_arcsec + equinoxes_arcsec) / 3600.0 * degree;
}

inline double wrap(double radians) { return std::remainder(radians, 2 * pi); }

inline double bisect(const std::function<double(double)>& f, double a, double b) {
  const bool sign = f(a) < 0;
  for (int i = 0; i < 40; ++i) {
    const double m = a + (b - a) / 2;
    ((f(m) < 0) == sign ? a : b) = m;
  }
  return a + (b - a) / 2;
}

inline std::string clock(double day, double ut) {
  const long hundredths = std::min(std::lround((ut - day) * 8640000.0), 8639999L);
  char text[80];
  std::snprintf(text, sizeof text, "%02ld:%02ld:%02ld.%02ld", hundredths / 360000,
                hundredths / 6000 % 60, hundredths / 100 % 60, hundredths % 100);
  return text;
}

inline std::string iso_date(double day) {
  int y, m, d;
  double h;
  swe_revjul(day, SE_GREG_CAL, &y, &m, &d, &h);
  char text[24];
  std::snprintf(text, sizeof text, "%04d-%02d-%02d", y, m, d);
  return text;
}

inline void write_source(std::FILE* out, const char* generator) {
  std::fprintf(out,
               "# Source: computed by tests/reference/make/%s with the Swiss Ephemeris library "
               "2.10 (DE431-based; Debian\n"
               "# libswe-dev 2.10.03, swe-standard-data), a general-purpose reference library, "
               "which only makes these test values\n"
               "# and is no part of the program. UT1 = UTC, TT = UTC + leap seconds + 32.184 s; "
               "definitions of the Explanatory\n"
               "# Supplement to the Astronomical Almanac, see the generator.\n",
               generator);
}

// The file that the one argument names, to be written; ends the program where there is none.
inline std::FILE* open_output(int argc, char** argv) {
  std::FILE* out = argc == 2 ? std::fopen(argv[1], "w") : nullptr;
  if (!out) {
    std::fprintf(stderr, "usage: %s OUT.csv\n", argv[0]);
    std::exit(2);
  }
  swe_set_ephe_path(const_cast<char*>("/usr/share/libswe/ephe"));
  return out;
}

// Two ways to the sidereal time must agree, s.
inline void check_sidereal_time() {
  double worst = 0;
  for (double ut = julian_day(1972, 1, 2); ut < julian_day(2036, 1, 1); ut += 97.37) {
    double nut[6];
    char message[AS_MAXCH];
    swe_calc(tt_of(ut), SE_ECL_NUT, 0, nut, message);
    const double theirs = swe_sidtime0(ut, nut[0], nut[2]) * 15 * degree;
    worst = std::max(worst, std::abs(wrap(theirs - sidereal_time(ut))) / (15 * degree) * 3600);
  }
  std::fprintf(stderr, "sidereal time, largest difference of the two ways: %.5f s\n", worst);
  if (worst > 0.003) std::exit(3);
}
