// Boundaries (Roman 1987), areas (tests/reference/constellation_areas.csv names its source),
// figures and asterisms.
#include "catalogue/constellations.hpp"

#include <algorithm>
#include <gtest/gtest.h>
#include <map>
#include <numbers>
#include <set>
#include <string>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "catalogue/stars.hpp"
#include "reference_file.hpp"

namespace duskleaf {
namespace {

std::string_view abbreviation_at(const Eigen::Vector3d& p) {
  return constellations()[static_cast<std::size_t>(constellation_at(p))].abbreviation;
}

Eigen::Vector3d direction(Angle ra, Angle dec) {
  return {cos(dec) * cos(ra), cos(dec) * sin(ra), sin(dec)};
}

TEST(Constellations, EightyEight) {
  ASSERT_EQ(constellations().size(), 88u);
  int near = 0, on = 0;
  for (std::size_t i = 0; i < 88; ++i) {
    EXPECT_EQ(constellation_index(constellations()[i].abbreviation), static_cast<int>(i));
    near += constellations()[i].near_equator;
    on += constellations()[i].on_equator;
    EXPECT_EQ(constellations()[i].near_equator,
              std::abs(constellations()[i].mean_declination.degrees()) <= 30.0);
  }
  EXPECT_EQ(near, 35);  // conventions of the project: counted from the boundary table
  EXPECT_EQ(on, 16);
  EXPECT_EQ(constellation_index("Xyz"), -1);
  EXPECT_EQ(constellation_index(""), -1);
}

/// Areas by cutting the sphere along every boundary of the table.
std::map<std::string_view, double> areas_from_boundaries() {
  const CsvTable table(embedded_file("data/constellation_boundaries.csv"));
  EXPECT_EQ(table.rows(), 357u);
  struct Row {
    double from, to, lower;
    std::string_view name;
  };
  std::vector<Row> rows;
  std::set<double> decs = {90.0 * 60}, ras;
  for (std::size_t i = 0; i < table.rows(); ++i) {
    rows.push_back({table.number(i, 0), table.number(i, 1), table.number(i, 2), table.cell(i, 3)});
    decs.insert(rows.back().lower);
    ras.insert({rows.back().from, rows.back().to});
  }
  std::map<std::string_view, double> areas;
  for (auto south = decs.begin(); std::next(south) != decs.end(); ++south)
    for (auto west = ras.begin(); std::next(west) != ras.end(); ++west) {
      const double north = *std::next(south), east = *std::next(west);
      const auto row = std::find_if(rows.begin(), rows.end(), [&](const Row& r) {
        return r.lower <= *south && r.from <= *west && east <= r.to;
      });
      EXPECT_NE(row, rows.end());
      areas[row->name] +=
          (east - *west) / 240.0 * (180.0 / std::numbers::pi) *
          (sin(Angle::from_arcminutes(north)) - sin(Angle::from_arcminutes(*south)));
    }
  return areas;
}

TEST(Constellations, AreasAreThePublishedOnes) {
  const std::map<std::string_view, double> computed = areas_from_boundaries();
  const std::string text = reference_text("constellation_areas.csv");
  const CsvTable published(text);
  ASSERT_EQ(published.rows(), 88u);
  double sum = 0.0, sum_of_table = 0.0;
  for (std::size_t i = 0; i < published.rows(); ++i) {
    const std::string_view name = published.cell(i, 0);
    ASSERT_TRUE(computed.contains(name)) << name;
    sum += computed.at(name);
    const double own =
        constellations()[static_cast<std::size_t>(constellation_index(name))].area_square_degrees;
    sum_of_table += own;
    EXPECT_NEAR(own, computed.at(name), 0.001) << name;
    EXPECT_NEAR(published.number(i, 1), computed.at(name), name == "Sge" ? 0.01 : 0.0015) << name;
  }
  EXPECT_NEAR(sum, 129600.0 / std::numbers::pi, 1e-6);  // the whole sphere
  EXPECT_NEAR(sum_of_table, 41252.96, 0.02);
}

TEST(Constellations, BrightStarsStandWhereTheirNamesSay) {
  const CsvTable table(embedded_file("data/stars.csv"));
  std::set<int> moved;
  int designated = 0;
  for (std::size_t i = 0; i < table.rows(); ++i) {
    const Star& s = stars()[i];
    EXPECT_EQ(constellation_at(s.direction), s.constellation) << s.hr;
    if (s.bayer.empty() && s.flamsteed.empty()) continue;
    ++designated;
    if (!table.cell(i, table.column("designation_constellation")).empty()) moved.insert(s.hr);
  }
  EXPECT_GT(designated, 3000);
  // 67 rho Aquilae crossed into Delphinus by its own motion in 1992 (common knowledge of the
  // field).
  EXPECT_EQ(moved, std::set<int>{7724});
}

TEST(Constellations, WholeSphereHasAName) {
  EXPECT_EQ(abbreviation_at({0, 0, 1}), "UMi");
  EXPECT_EQ(abbreviation_at({0, 0, -1}), "Oct");
  std::set<int> seen;
  for (int dec = -900; dec <= 900; dec += 7)
    for (int ra = 0; ra < 3600; ra += 7) {
      const int found = constellation_at(
          direction(Angle::from_degrees(ra / 10.0), Angle::from_degrees(dec / 10.0)));
      ASSERT_GE(found, 0);
      seen.insert(found);
    }
  EXPECT_EQ(seen.size(), 88u);
}

TEST(Figures, EveryConstellationHasOneAndSerpensTwo) {
  std::map<std::string_view, int> parts;
  for (const Figure& f : figures())
    ++parts[constellations()[static_cast<std::size_t>(f.constellation)].abbreviation];
  EXPECT_EQ(parts.size(), 88u);
  for (const auto& [name, count] : parts) EXPECT_EQ(count, name == "Ser" ? 2 : 1) << name;
  for (const Figure& f : figures()) {
    const bool serpens = f.constellation == constellation_index("Ser");
    EXPECT_EQ(serpens, !f.part.empty());
    EXPECT_FALSE(f.lines.empty());
    EXPECT_TRUE(std::is_sorted(f.figure_stars.begin(), f.figure_stars.end()));
  }
}

/// True when the place, or one within 3 degrees of it, lies in the constellation.
bool in_or_beside(const Eigen::Vector3d& p, int constellation) {
  if (constellation_at(p) == constellation) return true;
  const Eigen::Vector3d u = p.unitOrthogonal(), v = p.cross(u);
  for (double radius = 0.25; radius <= 3.0; radius += 0.25)
    for (int step = 0; step < 72; ++step) {
      const Angle r = Angle::from_degrees(radius), a = Angle::from_degrees(5.0 * step);
      if (constellation_at(cos(r) * p + sin(r) * (cos(a) * u + sin(a) * v)) == constellation)
        return true;
    }
  return false;
}

TEST(Figures, StarsAreChartedBrightAndInOrBesideTheirConstellation) {
  int faint = 0, all = 0;
  for (const Figure& f : figures()) {
    const std::string_view name =
        constellations()[static_cast<std::size_t>(f.constellation)].abbreviation;
    for (const int index : f.figure_stars) {
      const Star& s = stars()[static_cast<std::size_t>(index)];
      EXPECT_TRUE(s.charted) << name << " HR " << s.hr;
      EXPECT_LE(s.magnitude, 5.7) << name << " HR " << s.hr;
      EXPECT_TRUE(in_or_beside(s.direction, f.constellation)) << name << " HR " << s.hr;
      ++all;
      faint += s.magnitude > 5.0;
    }
    EXPECT_GE(f.figure_stars.size(), 2u) << name;
  }
  EXPECT_GT(all, 500);
  EXPECT_LT(faint, all / 20);
}

TEST(Figures, LinesAreShortAndDoNotCross) {
  for (const Figure& f : figures()) {
    const std::string_view name =
        constellations()[static_cast<std::size_t>(f.constellation)].abbreviation;
    const auto place = [](int i) { return stars()[static_cast<std::size_t>(i)].direction; };
    const auto side = [&](int a, int b, int c) {
      return place(a).cross(place(b)).dot(place(c)) > 0.0;
    };
    int crossings = 0;
    for (std::size_t i = 0; i < f.lines.size(); ++i) {
      const auto [a, b] = f.lines[i];
      EXPECT_GT(place(a).dot(place(b)), cos(Angle::from_degrees(22.0)))
          << name << ' ' << a << ' ' << b;
      for (std::size_t j = i + 1; j < f.lines.size(); ++j) {
        const auto [c, d] = f.lines[j];
        EXPECT_FALSE((a == c && b == d) || (a == d && b == c)) << name << ": a line drawn twice";
        if (std::set<int>{a, b, c, d}.size() == 4 && side(a, b, c) != side(a, b, d) &&
            side(c, d, a) != side(c, d, b))
          ++crossings;
      }
    }
    EXPECT_EQ(crossings, name == "Cru" ? 1 : 0) << name;
  }
}

TEST(Asterisms, StarsOfTheNamedShapes) {
  std::map<std::string_view, std::size_t> count;
  for (const Asterism& a : asterisms()) {
    count[a.key] = a.asterism_stars.size();
    for (const int i : a.asterism_stars)
      EXPECT_TRUE(stars()[static_cast<std::size_t>(i)].charted) << a.key;
  }
  // Numbers of stars: common practice.
  EXPECT_EQ(count["plough"], 7u);
  EXPECT_EQ(count["belt"], 3u);
  EXPECT_EQ(count["great-square"], 4u);
  EXPECT_EQ(count["southern-cross"], 4u);
  EXPECT_EQ(count["keystone"], 4u);
  EXPECT_EQ(count["w"], 5u);
  EXPECT_EQ(count["teapot"], 8u);
  EXPECT_EQ(count["sickle"], 6u);
}

}  // namespace
}  // namespace duskleaf
