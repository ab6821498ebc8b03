// Jupiter's bright moons against published worked examples and another program's values.
#include "sky/jupiter_moons.hpp"

#include <cmath>
#include <gtest/gtest.h>
#include <map>
#include <sstream>

#include "base/civil.hpp"
#include "base/csv.hpp"
#include "ephemeris/reference_text.hpp"

namespace duskleaf {
namespace {

std::array<JupiterMoon, 4> moons_at(Tt t) {
  return jupiter_moons(YearEphemeris(t - Days(0.5), t + Days(0.5)), t);
}

// J. Meeus, Astronomical Algorithms, 2nd ed. 1998, examples 44.a (p. 303, the short method: given
// to 0.01, itself good to some 0.1) and 44.b (the theory E5), 1992 December 16, 0h UT; as read in
// the test suites of npm astronomia (MIT) and of soniakeys/meeus (Go, MIT). All of VSOP87 moves the
// last digit of the book's shortened series.
TEST(JupiterMoons, MeeusExamples44aAnd44b) {
  const auto moons = moons_at(Tt::from_julian_date(2448972.50068));
  struct Row {
    double x, y, short_x, short_y;
  };
  constexpr std::array<Row, 4> rows = {{{-3.4503, 0.2137, -3.44, 0.21},
                                        {7.4418, 0.2752, 7.44, 0.25},
                                        {1.2010, 0.5900, 1.24, 0.65},
                                        {7.0720, 1.0290, 7.08, 1.10}}};
  for (std::size_t i = 0; i < rows.size(); ++i) {
    EXPECT_NEAR(moons[i].x, rows[i].x, 2e-4) << "moon " << i + 1;
    EXPECT_NEAR(moons[i].y, rows[i].y, 2e-4) << "moon " << i + 1;
    EXPECT_NEAR(moons[i].x, rows[i].short_x, 0.1) << "moon " << i + 1;
    EXPECT_NEAR(moons[i].y, rows[i].short_y, 0.1) << "moon " << i + 1;
  }
  // Europa and Callisto stand close together west of the planet: the order goes by a third of a
  // radius.
  EXPECT_EQ(moons_east_to_west(moons), "1 J 3 4 2");
}

// Same book, exercise of p. 314: Ganymede passes north to south of the disc's middle at 7h28m,
// Callisto at 5h15m UT, 1988 November 23. The dates of TT, as the suites above use them for their
// values x = +0.0032 and y = -0.8042, x = +0.0002 and y = +1.3990 by E5 (Delta T 56 s moves x by
// 0.006 and 0.003).
TEST(JupiterMoons, MeeusConjunctionsOf1988) {
  const Ut date = ut_midnight(make_date(1988, 11, 23));
  const auto three = moons_at(to_tt(date + Days((7 + 28.0 / 60) / 24)))[2];
  EXPECT_NEAR(three.x, 0.0, 0.02);
  EXPECT_NEAR(three.y, -0.8042, 1e-3);
  EXPECT_TRUE(three.hidden || three.in_front);
  const auto four = moons_at(to_tt(date + Days((5 + 15.0 / 60) / 24)))[3];
  EXPECT_NEAR(four.x, 0.0, 0.02);
  EXPECT_NEAR(four.y, 1.3990, 1e-3);
  EXPECT_FALSE(four.hidden || four.in_front);  // past the pole
}

TEST(JupiterMoons, AnotherProgramsPlaces2020To2035) {
  const std::string text = reference_text("jupiter_moons.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 256u);
  double worst = 0.0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto moon = moons_at(Tt::from_julian_date(
        table.number(r, 0)))[static_cast<std::size_t>(table.integer(r, 1) - 1)];
    worst = std::max(
        {worst, std::abs(moon.x - table.number(r, 2)), std::abs(moon.y - table.number(r, 3))});
    EXPECT_NEAR(moon.x, table.number(r, 2), 1e-3) << "row " << r;
    EXPECT_NEAR(moon.y, table.number(r, 3), 1e-3) << "row " << r;
    EXPECT_NEAR(moon.z, table.number(r, 4), 2e-3) << "row " << r;
  }
  RecordProperty("worst", std::to_string(worst));
}

JupiterMoon at(double x, bool hidden = false, bool in_front = false) {
  return {x, 0.0, hidden ? -5.0 : 5.0, hidden, in_front};
}

TEST(JupiterMoons, OrderFromEastToWestLeavesOutWhatTheDiscHides) {
  EXPECT_EQ(moons_east_to_west({at(-2.0), at(-8.0), at(3.0), at(20.0)}), "2 1 J 3 4");
  EXPECT_EQ(moons_east_to_west({at(0.3, true), at(-8.0), at(-0.2, false, true), at(-9.0)}),
            "4 2 J");
}

// A moon passes before the disc and behind it once in each of its revolutions (Io, 1.769 days,
// common knowledge): in 30 days 17 times each, and never both at once.
TEST(JupiterMoons, IoCrossesTheDiscOnBothSides) {
  const Tt start = to_tt(ut_midnight(make_date(2027, 2, 1)));
  const YearEphemeris ephemeris(start, start + Days(31.0));
  std::map<bool, int> entries;
  bool hidden = true, in_front = true;
  for (int step = 0; step < 30 * 96; ++step) {
    const auto io = jupiter_moons(ephemeris, start + Days(step / 96.0))[0];
    EXPECT_FALSE(io.hidden && io.in_front);
    entries[true] += io.hidden && !hidden;
    entries[false] += io.in_front && !in_front;
    hidden = io.hidden;
    in_front = io.in_front;
  }
  EXPECT_NEAR(entries[true], 17, 1);
  EXPECT_NEAR(entries[false], 17, 1);
}

}  // namespace
}  // namespace duskleaf
