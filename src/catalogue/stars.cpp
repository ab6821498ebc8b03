// D. Hoffleit & W. H. Warren 1991, The Bright Star Catalogue, 5th revised ed. (CDS V/50); names:
// IAU Catalog of Star Names. Stars nearer than a minute of arc to each other are one dot with the
// light of both: see data/README.md.
#include "catalogue/stars.hpp"

#include <algorithm>
#include <limits>
#include <stdexcept>
#include <string>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "catalogue/constellations.hpp"

namespace duskleaf {
namespace {

/// The largest table by far is read row by row into the stars, without CsvTable's store of all
/// cells: that halves the time. It holds no quoted cells.
void split(std::string_view line, std::vector<std::string_view>& cells) {
  cells.clear();
  for (std::size_t at = 0; at <= line.size();) {
    const std::size_t end = std::min(line.find(',', at), line.size());
    cells.push_back(line.substr(at, end - at));
    at = end + 1;
  }
}

std::string_view take_line(std::string_view& text) {
  const std::size_t end = std::min(text.find('\n'), text.size());
  const std::string_view line = text.substr(0, end);
  text.remove_prefix(std::min(text.size(), end + 1));
  return line;
}

std::vector<Star> read_stars() {
  std::string_view text = embedded_file("data/stars.csv");
  std::string_view line = take_line(text);
  while (line.starts_with('#')) line = take_line(text);
  const CsvTable header(line);
  const std::size_t hr = header.column("hr"), ra = header.column("ra_deg"),
                    dec = header.column("dec_deg"), pm_ra = header.column("pm_ra"),
                    pm_dec = header.column("pm_dec"), v = header.column("v"),
                    seen = header.column("v_seen"), b_v = header.column("b_v"),
                    bayer = header.column("bayer"), flamsteed = header.column("flamsteed"),
                    area = header.column("constellation"), name = header.column("name"),
                    uncharted = header.column("uncharted");
  std::vector<std::string_view> cells;
  split(line, cells);
  const std::size_t width = cells.size();
  std::vector<Star> all;
  all.reserve(9096);
  while (!text.empty()) {
    line = take_line(text);
    split(line, cells);
    if (cells.size() != width)
      throw std::runtime_error("stars.csv: row with another number of cells: " + std::string(line));
    const Angle a = Angle::from_degrees(parse_number(cells[ra])),
                d = Angle::from_degrees(parse_number(cells[dec]));
    const double sin_a = sin(a), cos_a = cos(a), sin_d = sin(d), cos_d = cos(d);
    Star& star = all.emplace_back();
    star.hr = static_cast<int>(parse_number(cells[hr]));
    star.direction = {cos_d * cos_a, cos_d * sin_a, sin_d};
    star.proper_motion = Angle::from_arcseconds(parse_number(cells[pm_ra])).radians() *
                             Eigen::Vector3d(-sin_a, cos_a, 0.0) +
                         Angle::from_arcseconds(parse_number(cells[pm_dec])).radians() *
                             Eigen::Vector3d(-sin_d * cos_a, -sin_d * sin_a, cos_d);
    star.magnitude = parse_number(cells[cells[seen].empty() ? v : seen]);
    star.colour_index =
        cells[b_v].empty() ? std::numeric_limits<double>::quiet_NaN() : parse_number(cells[b_v]);
    star.constellation = constellation_index(cells[area]);
    star.bayer = cells[bayer];
    star.flamsteed = cells[flamsteed];
    star.name = cells[name];
    star.charted = cells[uncharted].empty();
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
