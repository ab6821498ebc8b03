// N. G. Roman 1987, "Identification of a Constellation from a Position", PASP 99, 695 (CDS VI/42):
// the place precessed to B1875, then the first row that holds it. Precession: IAU 1976 (Lieske et
// al. 1977) from J2000; the rotation between FK4 and FK5 and the E-terms, together below 1.5
// arcseconds, are left out: a place is right up to that distance from a border.
#include "catalogue/constellations.hpp"

#include <algorithm>
#include <cmath>
#include <erfa.h>
#include <numbers>

#include "base/csv.hpp"
#include "base/embedded.hpp"

namespace duskleaf {
namespace {

std::vector<Constellation> read_constellations() {
  const CsvTable table(embedded_file("data/constellations.csv"));
  const std::size_t abbreviation = table.column("abbreviation"), name = table.column("name"),
                    genitive = table.column("genitive"), area = table.column("area_sqdeg"),
                    mean = table.column("mean_declination_deg"),
                    near = table.column("near_equator"), on = table.column("on_equator");
  std::vector<Constellation> all;
  for (std::size_t i = 0; i < table.rows(); ++i)
    all.push_back({table.cell(i, abbreviation), table.cell(i, name), table.cell(i, genitive),
                   table.number(i, area), Angle::from_degrees(table.number(i, mean)),
                   table.integer(i, near) == 1, table.integer(i, on) == 1});
  return all;
}

struct Boundary {
  double ra_from, ra_to, sine_dec_lower;  // radians, radians, sine
  int constellation;
};

std::vector<Boundary> read_boundaries() {
  const CsvTable table(embedded_file("data/constellation_boundaries.csv"));
  const std::size_t from = table.column("ra_from_seconds"), to = table.column("ra_to_seconds"),
                    lower = table.column("dec_lower_arcmin"), name = table.column("abbreviation");
  std::vector<Boundary> all;
  for (std::size_t i = 0; i < table.rows(); ++i)
    all.push_back({Angle::from_hours(table.number(i, from) / 3600.0).radians(),
                   Angle::from_hours(table.number(i, to) / 3600.0).radians(),
                   sin(Angle::from_arcminutes(table.number(i, lower))),
                   constellation_index(table.cell(i, name))});
  return all;
}

Eigen::Matrix3d matrix_j2000_to_b1875() {
  double day0 = 0.0, day = 0.0, r[3][3];
  eraEpb2jd(1875.0, &day0, &day);
  eraPmat76(day0, day, r);
  Eigen::Matrix3d m;
  for (int i = 0; i < 3; ++i)
    for (int j = 0; j < 3; ++j) m(i, j) = r[i][j];
  return m;
}

}  // namespace

std::span<const Constellation> constellations() {
  static const std::vector<Constellation> all = read_constellations();
  return all;
}

int constellation_index(std::string_view abbreviation) {
  const std::span<const Constellation> all = constellations();
  const auto at = std::lower_bound(
      all.begin(), all.end(), abbreviation,
      [](const Constellation& c, std::string_view key) { return c.abbreviation < key; });
  return at != all.end() && at->abbreviation == abbreviation ? static_cast<int>(at - all.begin())
                                                             : -1;
}

int constellation_at(const Eigen::Vector3d& icrs) {
  static const Eigen::Matrix3d to_b1875 = matrix_j2000_to_b1875();
  static const std::vector<Boundary> boundaries = read_boundaries();
  constexpr double turn = 2.0 * std::numbers::pi;
  const Eigen::Vector3d p = to_b1875 * icrs.normalized();
  double ra = std::atan2(p.y(), p.x());
  if (ra < 0.0) ra = std::min(ra + turn, std::nextafter(turn, 0.0));
  for (const Boundary& b : boundaries)
    if (p.z() >= b.sine_dec_lower && ra >= b.ra_from && ra < b.ra_to) return b.constellation;
  return boundaries.back().constellation;  // the south pole itself, by rounding below -90
}

}  // namespace duskleaf
