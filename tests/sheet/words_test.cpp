#include "sheet/words.hpp"

#include <filesystem>
#include <fstream>
#include <gtest/gtest.h>
#include <regex>
#include <sstream>

namespace duskleaf {
namespace {

using namespace std::chrono_literals;

std::string contents(const std::filesystem::path& path) {
  std::ifstream file(path);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

// Every key that the pages ask for by its whole name exists: a missing word would stop a page.
TEST(Words, EveryKeyNamedInTheSourcesExists) {
  const Words words("en");
  const std::regex call(R"re(words\(\s*"([a-z0-9.-]+[a-z0-9])")re");
  int found = 0;
  for (const auto& entry :
       std::filesystem::recursive_directory_iterator(DUSKLEAF_SOURCE "/src/sheet")) {
    if (entry.path().extension() != ".cpp") continue;
    const std::string text = contents(entry.path());
    for (std::sregex_iterator at(text.begin(), text.end(), call), end; at != end; ++at, ++found)
      // HappeningWriter asks for keys below "happening.".
      EXPECT_TRUE(words.has((*at)[1].str()) ||
                  (text.find("happening_writer.hpp") != std::string::npos &&
                   words.has("happening." + (*at)[1].str())))
          << (*at)[1].str() << " in " << entry.path();
  }
  EXPECT_GT(found, 40);
}

TEST(Words, ClockOfTwelveAndTwentyFour) {
  const Words twelve("en", true), twentyfour("en", false);
  EXPECT_EQ(twentyfour.time_of_day(21h + 5min), "21:05");
  EXPECT_EQ(twelve.time_of_day(21h + 5min), "9:05\u00A0pm");
  EXPECT_EQ(twelve.time_of_day(1min), "12:01\u00A0am");
  EXPECT_EQ(twelve.time_of_day(12h + 1min), "12:01\u00A0pm");
  // 12:00 am and pm are read either way: they have their names instead.
  EXPECT_EQ(twelve.time_of_day(0min), "midnight");
  EXPECT_EQ(twelve.time_of_day(12h), "noon");
  EXPECT_EQ(twelve.whole_hour(24), "midnight");
  EXPECT_EQ(twentyfour.time_of_day(0min), "00:00");
}

TEST(Words, NumbersHaveATrueMinusSign) {
  const Words words("en");
  EXPECT_EQ(words.number(-1.44, 1), "\u22121.4");
  EXPECT_EQ(words.number(-0.04, 1), "0.0");
}

TEST(Words, ANightIsNamedByBothItsDates) {
  const Words words("en");
  EXPECT_EQ(words.night_of(make_date(2027, 3, 2)), "night of 2–3\u00A0March");
  EXPECT_EQ(words.night_of(make_date(2027, 3, 31)), "night of 31\u00A0March – 1\u00A0April");
}

TEST(Words, DirectionsGoRoundFromNorthThroughEast) {
  const Words words("en");
  EXPECT_EQ(words.direction(Angle::from_degrees(359)), "north");
  EXPECT_EQ(words.direction(Angle::from_degrees(91)), "east");
  EXPECT_EQ(words.direction_short(Angle::from_degrees(247.5)), "WSW");
  EXPECT_EQ(words.direction_short(Angle::from_degrees(-10)), "N");
}

TEST(Words, AMissingKeyOrNameThrows) {
  const Words words("en");
  EXPECT_THROW(words("no.such.key"), std::out_of_range);
  EXPECT_THROW(words("date.day-month", {{"day", "1"}}), std::out_of_range);
  EXPECT_THROW(Words("xx"), std::out_of_range);
}

}  // namespace
}  // namespace duskleaf
