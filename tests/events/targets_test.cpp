// The project's rule for targets and their spelling; places of stars against
// reference/bright_stars_2016.csv are catalogue/stars_test.cpp's matter.
#include "events/targets.hpp"

#include <gtest/gtest.h>
#include <set>
#include <string>
#include <vector>

#include "catalogue/stars.hpp"

namespace duskleaf {
namespace {

std::vector<std::string> names_of(bool stars_alone, bool meets) {
  std::vector<std::string> names;
  for (const Target& t : targets())
    if ((t.sort == Target::Sort::star) == stars_alone && t.meets == meets)
      names.emplace_back(t.name);
  return names;
}

TEST(Targets, MeetBodiesFiveStarsAndThreeClusters) {
  EXPECT_EQ(names_of(true, true),
            (std::vector<std::string>{"aldebaran", "pollux", "regulus", "spica", "antares"}));
  EXPECT_EQ(names_of(false, true),
            (std::vector<std::string>{"moon", "mercury", "venus", "mars", "jupiter", "saturn",
                                      "uranus", "neptune", "pleiades", "hyades", "praesepe"}));
  EXPECT_TRUE(names_of(false, false).empty());
}

// Stars that the Moon is known to cover, or never to (common practice): Pollux, Castor and Hamal
// stand too far north.
TEST(Targets, TheMoonCoversBrightStarsNearTheEcliptic) {
  for (const char* covered : {"elnath", "alcyone", "zubenelgenubi", "dschubba", "nunki", "porrima",
                              "fang", "theta-oph", "tau-sgr"})
    EXPECT_GE(target_index(covered), 0) << covered;
  for (const char* not_covered : {"castor", "hamal", "sirius", "denebola"})
    EXPECT_EQ(target_index(not_covered), -1) << not_covered;
  for (const Target& t : targets())
    if (t.sort == Target::Sort::star && !t.meets) {
      EXPECT_LE(t.magnitude, 3.5) << t.name;
      EXPECT_TRUE(stars()[static_cast<std::size_t>(t.star)].charted) << t.name;
    }
}

TEST(Targets, HaveOneSpellingEachAndStandOnce) {
  std::set<std::string_view> names;
  std::set<int> star_rows;
  for (const Target& t : targets()) {
    EXPECT_TRUE(names.insert(t.name).second) << t.name;
    if (t.sort == Target::Sort::star) {
      EXPECT_TRUE(star_rows.insert(t.star).second) << t.name;
    }
    EXPECT_EQ(t.name.find_first_not_of("abcdefghijklmnopqrstuvwxyz0123456789-"),
              std::string_view::npos)
        << t.name;
    EXPECT_FALSE(t.name.empty());
    EXPECT_EQ(targets()[static_cast<std::size_t>(target_index(t.name))].name, t.name);
    // Each place is a degree of arc minute or more from any other.
    for (const Target& u : targets())
      if (&u != &t && t.sort != Target::Sort::body && u.sort != Target::Sort::body) {
        EXPECT_GT((t.direction - u.direction).norm(), 3e-4) << t.name << ' ' << u.name;
      }
  }
}

TEST(Targets, PairsAreSpelledInTheirOrder) {
  const int moon = target_index(Body::moon), venus = target_index(Body::venus),
            spica = target_index("spica"), pleiades = target_index("pleiades");
  EXPECT_EQ(pair_name(moon, venus), "moon+venus");
  EXPECT_EQ(pair_name(venus, moon), "moon+venus");
  EXPECT_EQ(pair_name(spica, moon), "moon+spica");
  EXPECT_EQ(pair_name(pleiades, spica), "spica+pleiades");
  EXPECT_EQ(target_index(Body::sun), -1);
  EXPECT_EQ(target_index("no-such-star"), -1);
  EXPECT_THROW(pair_name(-1, moon), std::out_of_range);
  EXPECT_THROW(pair_name(moon, static_cast<int>(targets().size())), std::out_of_range);
}

// Members from memory; their places are the Bright Star Catalogue's.
TEST(Targets, ClustersStandAmongTheirStars) {
  struct Row {
    const char* cluster;
    std::vector<int> members;  // HR
    double within_degrees;
  };
  const Row rows[] = {{"pleiades", {1142, 1145, 1149, 1156, 1165, 1178, 1180}, 0.15},
                      {"hyades", {1346, 1373, 1409, 1411, 1412}, 1.2},
                      {"praesepe", {3427, 3428, 3429}, 0.3}};
  for (const Row& row : rows) {
    Eigen::Vector3d sum = Eigen::Vector3d::Zero();
    for (const int hr : row.members) {
      ASSERT_GE(star_index(hr), 0) << hr;
      sum += stars()[static_cast<std::size_t>(star_index(hr))].direction;
    }
    const Target& cluster = targets()[static_cast<std::size_t>(target_index(row.cluster))];
    EXPECT_LT(arccos(sum.normalized().dot(cluster.direction)).degrees(), row.within_degrees)
        << row.cluster;
    EXPECT_GT(cluster.radius.degrees(), 0.5) << row.cluster;
  }
}

}  // namespace
}  // namespace duskleaf
