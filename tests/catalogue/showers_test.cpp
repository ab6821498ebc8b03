// The list of meteor showers against the calendar it comes from and the following year's
// (reference/meteor_showers.csv), read apart from the table's own script.
#include "catalogue/showers.hpp"

#include <cmath>
#include <gtest/gtest.h>
#include <set>
#include <string>

#include "base/csv.hpp"
#include "catalogue/reference_file.hpp"

namespace duskleaf {
namespace {

const Shower& shower(std::string_view code) {
  const int index = shower_index(code);
  EXPECT_GE(index, 0) << code;
  return showers()[static_cast<std::size_t>(std::max(index, 0))];
}

TEST(Showers, CountsAndCodes) {
  std::set<std::string_view> codes;
  for (const Shower& s : showers()) {
    EXPECT_EQ(s.code.size(), 3U) << s.code;
    EXPECT_TRUE(codes.insert(s.code).second) << s.code << " twice";
    EXPECT_FALSE(s.name.empty()) << s.code;
  }
  EXPECT_EQ(showers().size(), 40U);  // 37 of the calendar, 3 southern ones
  for (const char* southern : {"GNO", "PAU", "SSG"})
    EXPECT_LT(shower(southern).declination, Angle()) << southern;
  EXPECT_EQ(shower_index("ANT"), -1);  // its radiant moves through the year
  EXPECT_EQ(shower_index(""), -1);
}

TEST(Showers, ValuesOfTheCalendars) {
  const std::string text = reference_text("meteor_showers.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 37U);
  int of_2026 = 0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](std::string_view name) { return table.cell(r, table.column(name)); };
    const auto number = [&](std::string_view name) { return parse_number(cell(name)); };
    const Shower& s = shower(cell("code"));
    EXPECT_NEAR(s.peak_longitude.degrees(), number("solar_longitude"), 1e-9) << s.code;
    EXPECT_NEAR(s.right_ascension.degrees(), number("ra_deg"), 1e-9) << s.code;
    EXPECT_NEAR(s.declination.degrees(), number("dec_deg"), 1e-9) << s.code;
    EXPECT_EQ(s.speed_km_s, number("speed_km_s")) << s.code;
    EXPECT_EQ(s.population_index, number("r")) << s.code;
    EXPECT_EQ(s.zhr.value_or(-1.0), cell("zhr") == "Var" ? -1.0 : number("zhr")) << s.code;
    if (cell("zhr_2026").empty()) continue;
    ++of_2026;
    // The Leonids alone are put higher for 2026 (15).
    EXPECT_EQ(s.zhr.value(), s.code == "LEO" ? 10.0 : number("zhr_2026")) << s.code;
  }
  EXPECT_EQ(of_2026, 12);
}

TEST(Showers, PlausibleInWhole) {
  double before = 0.0;
  for (const Shower& s : showers()) {
    EXPECT_GE(s.peak_longitude.degrees(), before) << s.code << " out of order";
    before = s.peak_longitude.degrees();
    EXPECT_GE(s.population_index, 1.8) << s.code;
    EXPECT_LE(s.population_index, 3.5) << s.code;
    // From the escape speed to that of a head-on meeting (common practice).
    EXPECT_GE(s.speed_km_s, 11.0) << s.code;
    EXPECT_LE(s.speed_km_s, 72.0) << s.code;
    EXPECT_GT(s.rise, 0.0) << s.code;
    EXPECT_GT(s.fall, 0.0) << s.code;
    EXPECT_NEAR(s.direction().norm(), 1.0, 1e-12) << s.code;
    EXPECT_NEAR(std::asin(s.direction().z()), s.declination.radians(), 1e-12) << s.code;
  }
}

TEST(Showers, DaytimeOnesAreThoseTheCalendarCallsSo) {
  for (const Shower& s : showers()) EXPECT_EQ(s.daytime, s.name.starts_with("Daytime")) << s.code;
}

// The Sun takes some 0.9856 degree a day: the peak's longitude falls within the activity. Dates and
// longitudes are given apart from each other.
TEST(Showers, PeakLiesWithinTheActivity) {
  const auto day_of_year = [](int month, int day) { return 30.44 * (month - 1) + day; };
  for (const Shower& s : showers()) {
    // The Sun's mean longitude is 0 near March 20; two days for its uneven motion and the months.
    const double peak =
        std::fmod(day_of_year(3, 20) + s.peak_longitude.degrees() / 0.98565, 365.24);
    double start = day_of_year(s.start_month, s.start_day),
           end = day_of_year(s.end_month, s.end_day);
    if (end < start) start -= 365.24;
    const bool within = (peak > start - 4 && peak < end + 4) ||
                        (peak - 365.24 > start - 4 && peak - 365.24 < end + 4);
    EXPECT_TRUE(within) << s.code << ": " << peak << " not in " << start << " to " << end;
  }
}

}  // namespace
}  // namespace duskleaf
