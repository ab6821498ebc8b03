// TT - UTC: IERS leap seconds as ERFA's eraDat holds them (TAI - UTC), plus 32.184 s.
// TT - UT1 before 1972: L. V. Morrison, F. R. Stephenson, C. Y. Hohenkerk & M. Zawilski, "Addendum
// 2020 to 'Measurement of the Earth's rotation'", Proc. R. Soc. A 477 (2021) 20200776, cubic
// spline; data/delta_t_spline.csv.
#include "base/time.hpp"

#include <algorithm>
#include <erfa.h>
#include <vector>

#include "base/csv.hpp"
#include "base/embedded.hpp"

namespace duskleaf {
namespace {

constexpr double utc_begins = -10227.5;  // 1972-01-01T00:00 UTC, days since J2000.0
constexpr double tt_minus_tai = 32.184;  // s, by definition of TT (IAU 1991)

struct LeapStep {
  double from_day;  // UTC days since J2000.0
  double tai_minus_utc;
};

const std::vector<LeapStep>& leap_steps() {
  static const std::vector<LeapStep> steps = [] {
    std::vector<LeapStep> list;
    // Leap seconds come at the ends of June and December alone so far; status 1 ("dubious year")
    // past the table is expected.
    for (int year = 1972; year <= 2100; ++year)
      for (int month : {1, 7}) {
        double tai_minus_utc = 0, mjd0 = 0, mjd = 0;
        eraDat(year, month, 1, 0.0, &tai_minus_utc);
        eraCal2jd(year, month, 1, &mjd0, &mjd);
        if (list.empty() || list.back().tai_minus_utc != tai_minus_utc)
          list.push_back({mjd0 + mjd - 2451545.0, tai_minus_utc});
      }
    return list;
  }();
  return steps;
}

struct SplinePiece {
  double from_year, to_year, a0, a1, a2, a3;
};

double spline_delta_t(double year) {
  static const std::vector<SplinePiece> pieces = [] {
    const CsvTable table(embedded_file("data/delta_t_spline.csv"));
    std::vector<SplinePiece> list;
    for (std::size_t r = 0; r < table.rows(); ++r)
      list.push_back({table.number(r, table.column("from_year")),
                      table.number(r, table.column("to_year")), table.number(r, table.column("a0")),
                      table.number(r, table.column("a1")), table.number(r, table.column("a2")),
                      table.number(r, table.column("a3"))});
    return list;
  }();
  const SplinePiece* piece = &pieces.front();
  for (const SplinePiece& p : pieces)
    if (p.from_year <= year) piece = &p;
  const double t = (year - piece->from_year) / (piece->to_year - piece->from_year);
  return piece->a0 + t * (piece->a1 + t * (piece->a2 + t * piece->a3));
}

}  // namespace

Seconds tt_minus_ut(Ut t) {
  if (t.days() < utc_begins) return Seconds(spline_delta_t(2000.0 + (t.days() - 0.5) / 365.2425));
  const auto& steps = leap_steps();
  const auto after =
      std::upper_bound(steps.begin(), steps.end(), t.days(),
                       [](double day, const LeapStep& s) { return day < s.from_day; });
  return Seconds((after == steps.begin() ? steps.front() : *(after - 1)).tai_minus_utc +
                 tt_minus_tai);
}

Tt to_tt(Ut t) { return Tt(t.since_j2000() + Days(tt_minus_ut(t))); }

Ut to_ut(Tt t) {
  Ut guess(t.since_j2000());
  // Twice, since the difference is read at the UT sought; it moves by a second at most.
  for (int i = 0; i < 2; ++i) guess = Ut(t.since_j2000() - Days(tt_minus_ut(guess)));
  return guess;
}

}  // namespace duskleaf
