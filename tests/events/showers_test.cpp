// Peaks of meteor showers: against reference/shower_peaks_de431.csv (an outside library on
// DE431-based files), the dates of two years' calendars and the instants of one.
#include "events/showers.hpp"

#include <cmath>
#include <gtest/gtest.h>
#include <iostream>
#include <map>
#include <memory>
#include <numbers>
#include <string>

#include "events/published.hpp"

namespace duskleaf {
namespace {

Ut first_of(int year) { return ut_midnight(make_date(year, 1, 1)); }
const YearEphemeris& ephemeris_of(int year) {
  static std::map<int, std::unique_ptr<YearEphemeris>> years;
  auto& made = years[year];
  if (!made)
    made = std::make_unique<YearEphemeris>(to_tt(first_of(year) - Days(40)),
                                           to_tt(first_of(year + 1) + Days(40)));
  return *made;
}
std::vector<ShowerPeak> peaks_of(int year) {
  return shower_peaks(ephemeris_of(year), first_of(year), first_of(year + 1));
}
std::string_view code_of(const ShowerPeak& p) {
  return showers()[static_cast<std::size_t>(p.shower)].code;
}
Ut peak_of(int year, std::string_view code) {
  for (const ShowerPeak& p : peaks_of(year))
    if (code_of(p) == code) return p.at;
  ADD_FAILURE() << "no peak of " << code << " in " << year;
  return {};
}

TEST(ShowerPeaks, AgreeWithTheReferenceAndNoneBesides) {
  const std::string text = reference_text("shower_peaks_de431.csv");
  const CsvTable table(text);
  std::map<int, std::vector<std::pair<std::string_view, Ut>>> years;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const std::string_view utc = table.cell(r, table.column("utc"));
    const double midnight = table_day(std::string(utc.substr(0, 10)) + "T00:00");
    const double at = midnight + parse_number(utc.substr(11, 2)) / 24 +
                      parse_number(utc.substr(14, 2)) / 1440 +
                      parse_number(utc.substr(17, 5)) / 86400;
    years[static_cast<int>(parse_number(utc.substr(0, 4)))].emplace_back(
        table.cell(r, table.column("code")), Ut(Days(at)));
  }
  EXPECT_EQ(years.size(), 16U);
  double worst = 0.0;
  int count = 0;
  for (const auto& [year, wanted] : years) {
    const std::vector<ShowerPeak> found = peaks_of(year);
    ASSERT_EQ(found.size(), wanted.size()) << year;
    std::map<std::string_view, Ut> by_code;
    for (const ShowerPeak& p : found) by_code[code_of(p)] = p.at;
    for (const auto& [code, at] : wanted) {
      ASSERT_EQ(by_code.count(code), 1U) << code << " " << year;
      const double off = Seconds(by_code[code] - at).count();
      EXPECT_LE(std::abs(off), 2.0) << code << " " << year;
      worst = std::max(worst, std::abs(off));
      ++count;
    }
  }
  EXPECT_EQ(count, 640);
  std::cout << "Shower peaks: " << count << ", largest difference " << worst << " s\n";
}

TEST(ShowerPeaks, FallOnTheDatesOfTheCalendars) {
  const std::string text = reference_text("meteor_showers.csv");
  const CsvTable table(text);
  int same = 0, count = 0;
  for (std::size_t r = 0; r < table.rows(); ++r)
    for (const int year : {2025, 2026}) {
      const std::string_view date = table.cell(r, table.column("date_" + std::to_string(year)));
      if (date.empty()) continue;
      const std::string_view code = table.cell(r, table.column("code"));
      const double days = std::floor(peak_of(year, code).days() + 0.5) -
                          std::floor(table_day(std::string(date) + "T00:00") + 0.5);
      EXPECT_LE(std::abs(days), 1.0) << code << " " << date;
      same += days == 0.0;
      ++count;
    }
  EXPECT_EQ(count, 37 + 12);
  EXPECT_GE(same, 45);
  std::cout << same << " of " << count << " on the printed UT date\n";
}

// Degrees a day at an instant: mean motion and equation of the centre (Meeus, Astronomical
// Algorithms, 2nd ed. 1998, ch. 25), 0.1 %.
double sun_rate(Ut t) {
  const double anomaly = (357.529 + 0.98560028 * t.days()) * std::numbers::pi / 180;
  return 0.985647 * (1 + 0.033417 * std::cos(anomaly) + 0.0003 * std::cos(2 * anomaly));
}

// The calendar pairs longitudes to 0.001 degree with minutes: that tells a geometric longitude from
// an apparent one, which comes 8 minutes later.
TEST(ShowerPeaks, LongitudesAreThoseOfTheCalendar) {
  const std::string text = reference_text("shower_longitudes.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 16U);
  double sum = 0.0;
  int fine = 0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const std::string_view code = table.cell(r, table.column("shower")),
                           utc = table.cell(r, table.column("utc"));
    const Ut peak = peak_of(static_cast<int>(parse_number(utc.substr(0, 4))), code);
    const double listed =
        showers()[static_cast<std::size_t>(shower_index(code))].peak_longitude.degrees();
    const Ut at =
        peak + Days((table.number(r, table.column("longitude_deg")) - listed) / sun_rate(peak));
    const double off = (at.days() - table_day(utc)) * 1440;
    const double resolution = table.number(r, table.column("resolution_min"));
    // Half of what is printed, and the longitude's last figure: 0.01 degree is 15 minutes.
    EXPECT_LE(std::abs(off), 0.5 * resolution + 2.5) << code << " " << utc;
    if (resolution == 1) sum += off, ++fine;
  }
  ASSERT_EQ(fine, 7);
  EXPECT_LT(std::abs(sum / fine), 2.0);
  std::cout << "Printed pairs to the minute: " << fine << ", mean difference " << sum / fine
            << " min\n";
}

TEST(ShowerPeaks, SpansAtTheEnds) {
  const Ut peak = peak_of(2027, "QUA");
  const YearEphemeris& e = ephemeris_of(2027);
  const auto quadrantids = [&](Ut from, Ut to) {
    int n = 0;
    for (const ShowerPeak& p : shower_peaks(e, from, to)) n += code_of(p) == "QUA";
    return n;
  };
  EXPECT_EQ(quadrantids(peak - Days(1e-6), peak + Days(1e-6)), 1);
  EXPECT_EQ(quadrantids(peak + Days(1e-6), peak + Days(10)), 0);
  EXPECT_EQ(quadrantids(peak - Days(10), peak - Days(1e-6)), 0);
  EXPECT_EQ(quadrantids(peak - Days(1), peak + Days(367)), 2);  // a year and a day hold two
  EXPECT_EQ(quadrantids(peak + Days(1), peak + Days(364)), 0);  // most of a year holds none
  EXPECT_TRUE(shower_peaks(e, peak, peak).empty());
}

TEST(ShowerPeaks, InOrderAndAsEvents) {
  const std::vector<ShowerPeak> peaks = peaks_of(2028);
  for (std::size_t i = 1; i < peaks.size(); ++i) EXPECT_LE(peaks[i - 1].at, peaks[i].at);
  const Event e = shower_event(peaks.front());
  EXPECT_EQ(event_name(e.kind), "shower-peak");
  EXPECT_EQ(event_body(e), "QUA");  // the year's first
  EXPECT_EQ(e.value.value(), 283.15);
  EXPECT_EQ(event_unit(e.kind), "deg");
  EXPECT_EQ(e.at, peaks.front().at);
}

}  // namespace
}  // namespace duskleaf
