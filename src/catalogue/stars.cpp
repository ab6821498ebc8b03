// D. Hoffleit & W. H. Warren 1991, The Bright Star Catalogue, 5th revised ed. (CDS V/50); names:
// IAU Catalog of Star Names. Stars nearer than a minute of arc to each other are one dot with the
// light of both: see data/README.md.
#include "catalogue/stars.hpp"

#include <algorithm>
#include <limits>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "catalogue/constellations.hpp"

namespace duskleaf {
namespace {

std::vector<Star> read_stars() {
  const CsvTable table(embedded_file("data/stars.csv"));
  const std::size_t hr = table.column("hr"), ra = table.column("ra_deg"),
                    dec = table.column("dec_deg"), pm_ra = table.column("pm_ra"),
                    pm_dec = table.column("pm_dec"), v = table.column("v"),
                    seen = table.column("v_seen"), b_v = table.column("b_v"),
                    bayer = table.column("bayer"), flamsteed = table.column("flamsteed"),
                    area = table.column("constellation"), name = table.column("name"),
                    uncharted = table.column("uncharted");
  std::vector<Star> all;
  all.reserve(table.rows());
  for (std::size_t i = 0; i < table.rows(); ++i) {
    const Angle a = Angle::from_degrees(table.number(i, ra)),
                d = Angle::from_degrees(table.number(i, dec));
    const Eigen::Vector3d east(-sin(a), cos(a), 0.0);
    const Eigen::Vector3d north(-sin(d) * cos(a), -sin(d) * sin(a), cos(d));
    Star star;
    star.hr = table.integer(i, hr);
    star.direction = Eigen::Vector3d(cos(d) * cos(a), cos(d) * sin(a), sin(d));
    star.proper_motion = Angle::from_arcseconds(table.number(i, pm_ra)).radians() * east +
                         Angle::from_arcseconds(table.number(i, pm_dec)).radians() * north;
    star.magnitude = table.number(i, table.cell(i, seen).empty() ? v : seen);
    star.colour_index = table.cell(i, b_v).empty() ? std::numeric_limits<double>::quiet_NaN()
                                                   : table.number(i, b_v);
    star.constellation = constellation_index(table.cell(i, area));
    star.bayer = table.cell(i, bayer);
    star.flamsteed = table.cell(i, flamsteed);
    star.name = table.cell(i, name);
    star.charted = table.cell(i, uncharted).empty();
    all.push_back(star);
  }
  return all;
}

}  // namespace

std::span<const Star> stars() {
  static const std::vector<Star> all = read_stars();
  return all;
}

int star_index(int hr) {
  const std::span<const Star> all = stars();
  const auto at = std::lower_bound(all.begin(), all.end(), hr,
                                   [](const Star& s, int key) { return s.hr < key; });
  return at != all.end() && at->hr == hr ? static_cast<int>(at - all.begin()) : -1;
}

std::vector<Eigen::Vector3d> star_directions(double years_since_j2000) {
  std::vector<Eigen::Vector3d> moved;
  moved.reserve(stars().size());
  for (const Star& s : stars())
    moved.push_back((s.direction + years_since_j2000 * s.proper_motion).normalized());
  return moved;
}

}  // namespace duskleaf
