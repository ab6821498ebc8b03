// Which stars, by this project's rule. They meet Moon and planets: V 1.5 or brighter and within 7
// degrees of the ecliptic (Aldebaran, Pollux, Regulus, Spica, Antares). The Moon can cover them
// somewhere on the Earth: V 3.5 or brighter and within 6.6 degrees of the ecliptic in 1900 or in
// 2100 (the Moon's greatest latitude 5.30, its greatest parallax 1.03 and radius 0.28 degrees;
// common practice). Places: proper motion, annual aberration (relativistic), IAU 2006 precession
// and IAU 2000B nutation; no parallax (below 0.1 arcsecond for these). Explanatory Supplement to
// the Astronomical Almanac, 3rd ed. (2012), ch. 7.
#include "events/targets.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <memory>
#include <stdexcept>
#include <string>
#include <vector>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"
#include "ephemeris/reduction.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;

constexpr double meeting_magnitude = 1.5, covered_magnitude = 3.5;
constexpr Angle meeting_latitude = Angle::from_degrees(7.0),
                covered_latitude = Angle::from_degrees(6.6);

struct Letter {
  std::string_view sign, spelled;
};
constexpr std::array<Letter, 24> greek = {{
    {"α", "alpha"},  {"β", "beta"}, {"γ", "gamma"}, {"δ", "delta"}, {"ε", "epsilon"},
    {"ζ", "zeta"},   {"η", "eta"},  {"θ", "theta"}, {"ι", "iota"},  {"κ", "kappa"},
    {"λ", "lambda"}, {"μ", "mu"},   {"ν", "nu"},    {"ξ", "xi"},    {"ο", "omicron"},
    {"π", "pi"},     {"ρ", "rho"},  {"σ", "sigma"}, {"τ", "tau"},   {"υ", "upsilon"},
    {"φ", "phi"},    {"χ", "chi"},  {"ψ", "psi"},   {"ω", "omega"},
}};
constexpr std::array<std::string_view, 9> superscripts = {"¹", "²", "³", "⁴", "⁵",
                                                          "⁶", "⁷", "⁸", "⁹"};

/// "π³" -> "pi3".
std::string spelled_bayer(std::string_view bayer) {
  std::string text;
  for (const Letter& letter : greek)
    if (bayer.starts_with(letter.sign)) {
      text = letter.spelled;
      bayer.remove_prefix(letter.sign.size());
    }
  for (std::size_t i = 0; i < superscripts.size(); ++i)
    if (bayer == superscripts[i]) return text + std::to_string(i + 1);
  return text + std::string(bayer);
}

/// Lower case, spaces to hyphens, anything but letters, digits and hyphens dropped.
std::string plain(std::string_view text) {
  std::string result;
  for (const char c : text) {
    if (c >= 'A' && c <= 'Z')
      result += static_cast<char>(c - 'A' + 'a');
    else if (c == ' ')
      result += '-';
    else if ((c >= 'a' && c <= 'z') || (c >= '0' && c <= '9') || c == '-')
      result += c;
  }
  return result;
}

std::string star_name(const Star& star) {
  if (!star.name.empty()) return plain(star.name);
  const auto area = static_cast<std::size_t>(star.constellation);
  const std::string letter =
      star.bayer.empty() ? std::string(star.flamsteed) : spelled_bayer(star.bayer);
  if (letter.empty()) return "hr-" + std::to_string(star.hr);
  return plain(letter + "-" + std::string(constellations()[area].abbreviation));
}

/// Distance from the mean ecliptic of an instant.
Angle from_ecliptic(const Star& star, Tt t) {
  const Vector v =
      rotation_to_date(t, 0.0, 0.0) *
      (star.direction + t.julian_centuries() * 100.0 * star.proper_motion).normalized();
  const Angle obliquity = Angle::from_radians(mean_obliquity(t));
  const Angle latitude = arcsin(v.z() * cos(obliquity) - v.y() * sin(obliquity));
  return latitude < Angle() ? -latitude : latitude;
}

struct Table {
  std::vector<std::string> names;  // what the targets' names point to
  std::vector<Target> targets;
  std::vector<std::string> pairs;  // row by row, all of them
};

void add_stars(std::vector<Target>& list, std::vector<std::string>& names, bool meets) {
  const Tt first = Tt::from_julian_date(2415020.5), last = Tt::from_julian_date(2488069.5);
  for (std::size_t i = 0; i < stars().size(); ++i) {
    const Star& star = stars()[i];
    if (!star.charted || star.magnitude > covered_magnitude) continue;
    const Angle latitude = std::min(from_ecliptic(star, first), from_ecliptic(star, last));
    const bool bright = star.magnitude <= meeting_magnitude && latitude <= meeting_latitude;
    if (meets ? !bright : bright || latitude > covered_latitude) continue;
    Target target{};
    target.sort = Target::Sort::star;
    target.star = static_cast<int>(i);
    target.direction = star.direction;
    target.proper_motion = star.proper_motion;
    target.magnitude = star.magnitude;
    target.meets = meets;
    list.push_back(target);
    names.push_back(star_name(star));
  }
}

void add_clusters(std::vector<Target>& list, std::vector<std::string>& names) {
  const CsvTable table(embedded_file("data/clusters.csv"));
  for (std::size_t row = 0; row < table.rows(); ++row) {
    const Angle ra = Angle::from_degrees(table.number(row, table.column("ra_deg"))),
                dec = Angle::from_degrees(table.number(row, table.column("dec_deg")));
    Target target{};
    target.sort = Target::Sort::cluster;
    target.direction = {cos(dec) * cos(ra), cos(dec) * sin(ra), sin(dec)};
    target.magnitude = table.number(row, table.column("magnitude"));
    target.radius =
        Angle::from_arcminutes(table.number(row, table.column("diameter_arcmin")) / 2.0);
    list.push_back(target);
    names.emplace_back(table.cell(row, table.column("name")));
  }
}

std::unique_ptr<const Table> make_table() {
  auto table = std::make_unique<Table>();
  const auto add_body = [&](Body body) {
    Target target{};
    target.sort = Target::Sort::body;
    target.body = body;
    table->targets.push_back(target);
    table->names.emplace_back(body_name(body));
  };
  add_body(Body::moon);
  for (Body planet : planets) add_body(planet);
  add_stars(table->targets, table->names, true);
  add_stars(table->targets, table->names, false);
  add_clusters(table->targets, table->names);
  const std::size_t n = table->targets.size();
  for (std::size_t i = 0; i < n; ++i) table->targets[i].name = table->names[i];
  for (std::size_t a = 0; a < n; ++a)
    for (std::size_t b = 0; b < n; ++b)
      table->pairs.push_back(table->names[std::min(a, b)] + "+" + table->names[std::max(a, b)]);
  return table;
}

const Table& table() {
  static const std::unique_ptr<const Table> made = make_table();
  return *made;
}

}  // namespace

std::span<const Target> targets() { return table().targets; }

const Target& target_at(int index) { return targets()[static_cast<std::size_t>(index)]; }

int target_index(Body body) {
  const std::span<const Target> all = targets();
  for (std::size_t i = 0; i < all.size(); ++i)
    if (all[i].sort == Target::Sort::body && all[i].body == body) return static_cast<int>(i);
  return -1;
}

int target_index(std::string_view name) {
  const std::span<const Target> all = targets();
  for (std::size_t i = 0; i < all.size(); ++i)
    if (all[i].name == name) return static_cast<int>(i);
  return -1;
}

std::string_view pair_name(int a, int b) {
  const std::size_t n = targets().size(), row = static_cast<std::size_t>(a),
                    column = static_cast<std::size_t>(b);
  if (a < 0 || b < 0 || row >= n || column >= n) throw std::out_of_range("no such target");
  return table().pairs[row * n + column];
}

SkyFrame sky_frame(const YearEphemeris& ephemeris, Tt t) {
  return {ephemeris.icrs_to_date(t), ephemeris.earth_velocity(t), t.julian_centuries() * 100.0};
}

Vector apparent_direction(const SkyFrame& frame, const Target& target) {
  const Vector natural =
      (target.direction + frame.years_since_j2000 * target.proper_motion).normalized();
  // Special relativity (Explanatory Supplement 2012, ch. 7): the second order in v/c is 0.001".
  const Vector& v = frame.earth_velocity;
  const double inverse_gamma = std::sqrt(1.0 - v.squaredNorm()), along = natural.dot(v);
  const Vector seen = inverse_gamma * natural + (1.0 + along / (1.0 + inverse_gamma)) * v;
  return frame.icrs_to_date * seen.normalized();
}

Vector apparent_direction(const YearEphemeris& ephemeris, const Target& target, Tt t) {
  if (target.sort == Target::Sort::body) return ephemeris.apparent(target.body, t);
  return apparent_direction(sky_frame(ephemeris, t), target);
}

}  // namespace duskleaf
