// Row counts and form of the series tables: terms as published (see each table's first lines).
#include <gtest/gtest.h>
#include <map>
#include <string>

#include "base/csv.hpp"
#include "base/embedded.hpp"

namespace duskleaf {
namespace {

TEST(SeriesTables, RowsOfEachCoordinate) {
  struct Row {
    const char* name;
    std::size_t longitude, latitude, radius;
  };
  // The Moon's are the whole of the package's short file: 1386 + 592 + 210 + 2, 785 + 235 + 46,
  // 1066 + 424 + 114 + 2 terms.
  const Row moon{"elp_mpp02", 2190, 1066, 1606};
  const CsvTable table(embedded_file("data/elp_mpp02.csv"));
  std::map<std::string_view, std::size_t> count;
  for (std::size_t i = 0; i < table.rows(); ++i) {
    ++count[table.cell(i, table.column("coordinate"))];
    EXPECT_LE(table.integer(i, table.column("power")), 3);
    for (const char* column : {"amplitude", "phase0", "phase1", "phase2", "phase3", "phase4"})
      EXPECT_NO_THROW(table.number(i, table.column(column))) << i;
  }
  EXPECT_EQ(count["L"], moon.longitude);
  EXPECT_EQ(count["B"], moon.latitude);
  EXPECT_EQ(count["R"], moon.radius);
}

TEST(SeriesTables, LeadingTermsAreThePublishedOnes) {
  // Chapront & Francou 2003: the Moon's mean distance 385000.5 km and mean motion 1732559343" a
  // century.
  const CsvTable moon(embedded_file("data/elp_mpp02.csv"));
  for (std::size_t i = 0; i < moon.rows(); ++i)
    if (moon.cell(i, 0) == "R") {
      EXPECT_NEAR(moon.number(i, moon.column("amplitude")), 385000.5, 0.1);
      break;
    }
  const CsvTable w1(embedded_file("data/elp_mpp02_w1.csv"));
  ASSERT_EQ(w1.rows(), 5u);
  EXPECT_NEAR(w1.number(1, 1) * 206264.80625, 1732559343.0, 5.0);

  // Mean motions, radians a millennium, as in Simon et al. 1994 (A&A 282, 663), table 5.8.
  struct Row {
    const char* planet;
    double radians_per_millennium, mean_distance_au;
  };
  for (const Row& row : {Row{"mercury", 26087.9031, 0.3953}, Row{"venus", 10213.2855, 0.7233},
                         Row{"mars", 3340.6124, 1.5303}, Row{"jupiter", 529.6910, 5.2089},
                         Row{"saturn", 213.2991, 9.5576}, Row{"uranus", 74.7816, 19.2126},
                         Row{"neptune", 38.1330, 30.0701}}) {
    const CsvTable table(embedded_file("data/vsop87b_" + std::string(row.planet) + ".csv"));
    EXPECT_GT(table.rows(), 1000u) << row.planet;
    bool motion = false, distance = false;
    for (std::size_t i = 0; i < table.rows(); ++i) {
      const double amplitude = table.number(i, table.column("amplitude"));
      if (table.number(i, table.column("frequency")) != 0.0) continue;
      if (table.cell(i, 0) == "L" && table.integer(i, 1) == 1 && !motion) {
        EXPECT_NEAR(amplitude, row.radians_per_millennium, 0.001) << row.planet;
        motion = true;
      }
      if (table.cell(i, 0) == "R" && table.integer(i, 1) == 0 && !distance) {
        EXPECT_NEAR(amplitude, row.mean_distance_au, 0.001) << row.planet;
        distance = true;
      }
    }
    EXPECT_TRUE(motion && distance) << row.planet;
  }
}

}  // namespace
}  // namespace duskleaf
