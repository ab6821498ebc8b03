// Analytic functions whose zeros are known in closed form: no outside source is needed.
#include "events/search.hpp"

#include <cmath>
#include <gtest/gtest.h>
#include <numbers>

namespace duskleaf {
namespace {

constexpr double pi = std::numbers::pi;
Ut day(double d) { return Ut(Days(d)); }

struct Row {
  const char* label;
  std::function<double(double)> f;  // of days
  double from, to;
  std::vector<double> zeros;
  bool first_rises;
};

class Search : public testing::TestWithParam<Row> {};

TEST_P(Search, FindsEveryZero) {
  const Row& row = GetParam();
  const auto found =
      find_crossings([&](Ut t) { return row.f(t.days()); }, day(row.from), day(row.to));
  ASSERT_EQ(found.size(), row.zeros.size()) << row.label;
  bool rising = row.first_rises;
  for (std::size_t i = 0; i < found.size(); ++i, rising = !rising) {
    EXPECT_NEAR(found[i].at.days() * 86400, row.zeros[i] * 86400, 0.011)
        << row.label << " zero " << i;
    EXPECT_EQ(found[i].rising, rising) << row.label << " zero " << i;
  }
}

// A day's wave around `level`, like a body's altitude; its extremum at noon is 1 - level.
std::function<double(double)> wave(double level) {
  return [level](double d) { return std::cos(2 * pi * (d - 0.5)) - level; };
}
// Half the time that the wave is above 1 - depth.
double half_width(double depth) { return std::acos(1 - depth) / (2 * pi); }

INSTANTIATE_TEST_SUITE_P(
    Analytic, Search,
    testing::Values(
        Row{"a straight line", [](double d) { return d - 0.3; }, 0, 1, {0.3}, true},
        Row{"a falling line over a century's day number",
            [](double d) { return 36000.123 - d; },
            36000,
            36001,
            {36000.123},
            false},
        Row{"one sine",
            [](double d) { return std::sin(2 * pi * (d - 0.1)); },
            0,
            2,
            {0.1, 0.6, 1.1, 1.6},
            true},
        Row{"two zeros 40 minutes apart around a sample",
            wave(1 - 0.003806),
            0,
            1,
            {0.5 - half_width(0.003806), 0.5 + half_width(0.003806)},
            true},
        Row{"two zeros 20 seconds apart",
            wave(1 - 2.6e-7),
            0.02,
            1.02,
            {0.5 - half_width(2.6e-7), 0.5 + half_width(2.6e-7)},
            true},
        Row{"two zeros at the bottom of the wave",
            [](double d) { return -wave(1 - 1e-5)(d); },
            0.011,
            1.011,
            {0.5 - half_width(1e-5), 0.5 + half_width(1e-5)},
            false},
        Row{"misses by a hair", wave(1 + 1e-9), 0.013, 1.013, {}, true},
        Row{"a touch on a sample is no crossing",
            [](double d) { return (d - 0.5) * (d - 0.5); },
            0,
            1,
            {},
            true},
        Row{"a crossing on a sample is one", [](double d) { return d - 0.5; }, 0, 1, {0.5}, true},
        Row{"both zeros before the second sample",
            [](double d) { return (d - 0.005) * (d - 0.03); },
            0,
            1,
            {0.005, 0.03},
            false},
        Row{"both zeros after the last but one",
            [](double d) { return (d - 0.97) * (d - 0.995); },
            0,
            1,
            {0.97, 0.995},
            false},
        Row{"both zeros in a range shorter than a step",
            [](double d) { return (d - 0.01) * (d - 0.02); },
            0,
            0.03,
            {0.01, 0.02},
            false},
        Row{"steep on one side",
            [](double d) { return std::exp(40 * (d - 0.51)) - 1; },
            0,
            1,
            {0.51},
            true},
        Row{"flat through zero",
            [](double d) { return std::pow(d - 0.512, 3); },
            0,
            1,
            {0.512},
            true},
        Row{"never", [](double d) { return 2 + std::sin(d); }, 0, 3, {}, true}),
    [](const auto& row) {
      std::string name = row.param.label;
      for (char& c : name)
        if (!std::isalnum(static_cast<unsigned char>(c))) c = '_';
      return name;
    });

TEST(SearchRange, BeginsWithItsStartAndEndsBeforeItsEnd) {
  const auto line = [](Ut t) { return t.days() - 0.5; };
  EXPECT_EQ(find_crossings(line, day(0.5), day(1)).size(), 1u);
  EXPECT_EQ(find_crossings(line, day(0), day(0.5)).size(), 0u);
  EXPECT_EQ(find_crossings(line, day(1), day(0)).size(), 0u);
}

TEST(SearchRange, NeighbouringRangesShareEachZeroOut) {
  const auto wave_at = [](Ut t) { return std::sin(2 * pi * 3.1 * t.days()); };
  std::size_t parts = 0;
  for (int i = 0; i < 50; ++i)
    parts += find_crossings(wave_at, day(0.031 + i * 0.1), day(0.031 + (i + 1) * 0.1)).size();
  EXPECT_EQ(parts, find_crossings(wave_at, day(0.031), day(5.031)).size());
  EXPECT_EQ(parts, 31u);
}

TEST(SearchOptions, RisingOnlyAndWithoutGrazes) {
  SearchOptions rising;
  rising.falling = false;
  const auto sine = [](Ut t) { return std::sin(2 * pi * (t.days() - 0.1)); };
  EXPECT_EQ(find_crossings(sine, day(0), day(2), rising).size(), 2u);
  SearchOptions blind;
  blind.look_for_grazes = false;
  EXPECT_EQ(
      find_crossings([](Ut t) { return wave(1 - 1e-6)(t.days()); }, day(0.02), day(1.02), blind)
          .size(),
      0u);
}

TEST(SearchCost, AnHourlyBracketOfAWaveTakesFewEvaluations) {
  int calls = 0;
  const auto f = [&](Ut t) {
    ++calls;
    return std::sin(2 * pi * t.days()) - 0.3;
  };
  ASSERT_EQ(find_crossings(f, day(0), day(10)).size(), 20u);
  EXPECT_LE(calls, 241 + 20 * 7);
}

}  // namespace
}  // namespace duskleaf
