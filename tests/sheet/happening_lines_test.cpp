#include "sheet/happening_lines.hpp"

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <regex>
#include <sstream>

#include "events/targets.hpp"
#include "month_scene.hpp"
#include "sheet/blocks/blocks.hpp"

namespace duskleaf {
namespace {

using testing::HasSubstr;
using testing::Not;

// ---- words

// Keys are put together from literals: every one of these files' that looks like a key is one.
TEST(HappeningWords, EveryKeyExists) {
  const Words words("en");
  const std::regex literal(R"re("([a-z]+(-[a-z0-9]+)*)")re");
  int found = 0;
  for (const auto& entry : std::filesystem::directory_iterator(DUSKLEAF_SOURCE "/src/sheet")) {
    const std::string name = entry.path().filename().string();
    if (!name.starts_with("happening_") || !name.ends_with(".cpp")) continue;
    std::ifstream file(entry.path());
    std::ostringstream stream;
    stream << file.rdbuf();
    const std::string text = std::regex_replace(stream.str(), std::regex("\\{\"[a-z]+\","), "");
    for (std::sregex_iterator at(text.begin(), text.end(), literal), end; at != end; ++at) {
      const std::string key = "happening." + (*at)[1].str();
      EXPECT_TRUE(words.has(key) || words.has(key + "-begins")) << key << " in " << name;
      ++found;
    }
  }
  EXPECT_GT(found, 70);
}

TEST(HappeningWords, KeysOfKindsAndExtremesHaveTheirBriefForms) {
  const Words words("en");
  for (const EventKind kind :
       {EventKind::march_equinox, EventKind::june_solstice, EventKind::september_equinox,
        EventKind::december_solstice, EventKind::perihelion, EventKind::aphelion,
        EventKind::perigee, EventKind::apogee}) {
    EXPECT_TRUE(words.has("happening." + event_name(kind)));
    EXPECT_TRUE(words.has("happening." + event_name(kind) + "-brief"));
  }
  for (const char* key : {"earliest-sunset", "latest-sunset", "earliest-sunrise", "latest-sunrise",
                          "longest-day", "shortest-day"})
    EXPECT_TRUE(words.has(std::string("happening.") + key + "-brief")) << key;
  for (const char* key : {"never-dark", "midnight-sun", "polar-night"})
    for (const char* end : {"-begins", "-begins-long", "-once", "-brief", "-ends", "-ends-brief"})
      EXPECT_TRUE(words.has(std::string("happening.") + key + end)) << key << end;
  for (const SolarEclipseKind kind : {SolarEclipseKind::partial, SolarEclipseKind::annular,
                                      SolarEclipseKind::total, SolarEclipseKind::hybrid})
    EXPECT_TRUE(words.has("happening.kind-" + std::string(eclipse_name(kind))));
  for (const Target& target : targets())
    EXPECT_TRUE(target.sort != Target::Sort::cluster ||
                words.has("happening.target-" + std::string(target.name)))
        << target.name;
}

// ---- dates

Ut universal(int year, int month, int day, int hour, int minute, double second) {
  return ut_midnight(make_date(year, month, day)) +
         Days(hour / 24.0 + minute / 1440.0 + second / 86400.0);
}

Meeting meeting_at(Ut at, std::string_view a = "moon", std::string_view b = "regulus",
                   double degrees = 2.1) {
  Meeting m{};
  m.closest = {at, target_index(a), target_index(b), Angle::from_degrees(degrees)};
  m.look = Look{at, {Angle::from_degrees(34), Angle::from_degrees(136)}, Date{}, false, true};
  m.separation = Angle::from_degrees(degrees);
  m.bare_eye = true;
  return m;
}

struct DateCase {
  const char* label;
  Ut at;
  Date evening;
  int after_midnight_day;  // 0: none
  const char* when;
};

class HappeningDates : public testing::Test {
 protected:
  static void SetUpTestSuite() {
    scene_ = std::make_unique<MonthScene>(52.0, -1.0, "Europe/London", 2027, 3);
    scene_->compute(false);
  }
  static void TearDownTestSuite() { scene_.reset(); }
  static std::unique_ptr<MonthScene> scene_;
  static std::vector<HappeningLine> lines_of(std::vector<Meeting> meetings, int month) {
    scene_->month_index = month - 1;
    scene_->happenings.meetings = std::move(meetings);
    std::vector<HappeningLine> lines = happening_lines(scene_->context());
    std::erase_if(lines,
                  [](const HappeningLine& l) { return l.text.find("°") == std::string::npos; });
    return lines;
  }
};
std::unique_ptr<MonthScene> HappeningDates::scene_;

// Civil time from the zone's law: summer time from 2027-03-28 01:00 to 2027-10-31 01:00 UT (EU and
// UK rule: last Sundays, common fact). A night runs from noon to noon (this project's conventions).
TEST_F(HappeningDates, NearMidnightAndAClockChangeALineStandsUnderItsEvening) {
  const DateCase cases[] = {
      {"half a minute before midnight rounds into the next date", universal(2027, 3, 3, 23, 59, 40),
       make_date(2027, 3, 3), 4, "00:00"},
      {"a little earlier does not", universal(2027, 3, 3, 23, 59, 20), make_date(2027, 3, 3), 0,
       "23:59"},
      {"just after midnight", universal(2027, 3, 4, 0, 0, 20), make_date(2027, 3, 3), 4, "00:00"},
      {"before noon it is still that night", universal(2027, 3, 4, 11, 59, 20),
       make_date(2027, 3, 3), 4, "11:59"},
      {"at noon the next begins", universal(2027, 3, 4, 11, 59, 40), make_date(2027, 3, 4), 0,
       "12:00"},
      {"rounds over the jump of the clocks", universal(2027, 3, 28, 0, 59, 40),
       make_date(2027, 3, 27), 28, "02:00"},
      {"just before it", universal(2027, 3, 28, 0, 59, 20), make_date(2027, 3, 27), 28, "00:59"},
      {"the first midnight of summer time", universal(2027, 3, 28, 22, 59, 40),
       make_date(2027, 3, 28), 29, "00:00"},
      {"the last of the month goes over its end", universal(2027, 3, 31, 23, 10, 0),
       make_date(2027, 3, 31), 1, "00:10"},
  };
  for (const DateCase& row : cases) {
    const auto lines = lines_of({meeting_at(row.at)}, 3);
    ASSERT_EQ(lines.size(), 1u) << row.label;
    EXPECT_EQ(iso_date(lines[0].date), iso_date(row.evening)) << row.label;
    EXPECT_EQ(lines[0].when, row.when) << row.label;
    EXPECT_EQ(lines[0].after_midnight ? day_of(*lines[0].after_midnight) : 0,
              row.after_midnight_day)
        << row.label;
  }
  // The same night is not told again by the next month.
  EXPECT_TRUE(lines_of({meeting_at(universal(2027, 3, 31, 23, 10, 0))}, 4).empty());
}

TEST_F(HappeningDates, ClocksChangeByTheOldTime) {
  scene_->month_index = 2;
  const auto lines = happening_lines(scene_->context());
  const auto clocks = std::find_if(lines.begin(), lines.end(), [](const HappeningLine& l) {
    return l.text.find("forward") != std::string::npos;
  });
  ASSERT_NE(clocks, lines.end());
  // In the night of the 27th, as all that comes before sunrise.
  EXPECT_EQ(iso_date(clocks->date), "2027-03-27");
  ASSERT_TRUE(clocks->after_midnight);
  EXPECT_EQ(iso_date(*clocks->after_midnight), "2027-03-28");
  EXPECT_EQ(clocks->when, "01:00");
}

// ---- meetings

TEST_F(HappeningDates, ALineSaysWhatWhenWhichWayAndHowHigh) {
  const auto lines = lines_of({meeting_at(universal(2027, 3, 3, 21, 30, 0))}, 3);
  ASSERT_EQ(lines.size(), 1u);
  EXPECT_EQ(lines[0].when, "21:30");
  EXPECT_EQ(lines[0].text, "Moon 2.1° from Regulus, 34° up in the SE.");
}

TEST_F(HappeningDates, MeetingsOfOneHourShareALineAndUnseenOnesHaveNone) {
  Meeting unseen = meeting_at(universal(2027, 3, 9, 12, 0, 0), "moon", "spica");
  unseen.look.reset();
  const Ut at = universal(2027, 3, 3, 21, 30, 0);
  auto lines = lines_of({meeting_at(at), meeting_at(at, "moon", "mars", 3.4), unseen,
                         meeting_at(at + Days(5), "moon", "spica")},
                        3);
  ASSERT_EQ(lines.size(), 2u);
  EXPECT_EQ(lines[0].text, "Moon 3.4° from Mars and 2.1° from Regulus, 34° up in the SE.");
  EXPECT_THAT(lines[1].text, HasSubstr("Spica"));
}

TEST_F(HappeningDates, WhatTheSkylineHidesSaysSo) {
  Meeting hidden = meeting_at(universal(2027, 3, 3, 21, 30, 0));
  hidden.look->above_skyline = false;
  const auto lines = lines_of({hidden}, 3);
  ASSERT_EQ(lines.size(), 1u);
  EXPECT_THAT(lines[0].text, HasSubstr("Behind your hills."));
  const auto open = lines_of({meeting_at(universal(2027, 3, 3, 21, 30, 0))}, 3);
  EXPECT_GT(lines[0].rank, open.at(0).rank + 1) << "told after what can be seen";
}

TEST_F(HappeningDates, WidePairsAreNoMeetings) {
  const Ut at = universal(2027, 3, 3, 21, 30, 0);
  EXPECT_EQ(lines_of({meeting_at(at, "moon", "regulus", 5.9)}, 3).size(), 1u);
  EXPECT_TRUE(lines_of({meeting_at(at, "moon", "regulus", 6.1)}, 3).empty());
}

// 2027-08-11 and 2027-08-12: Venus and Mercury pass behind the Sun (superior conjunctions; from
// memory): whatever a meeting says, nobody sees them.
TEST_F(HappeningDates, WhatThePlanetsBlockDoesNotShowMeetsNothing) {
  const Ut at = universal(2027, 8, 12, 21, 0, 0);
  EXPECT_EQ(lines_of({meeting_at(at, "moon", "antares")}, 8).size(), 1u);
  EXPECT_TRUE(lines_of({meeting_at(at, "moon", "venus")}, 8).empty());
  EXPECT_TRUE(lines_of({meeting_at(at, "moon", "mercury")}, 8).empty());
}

TEST_F(HappeningDates, TheBestSightIsMarkedAndTheGroupsOwnNightComesFirst) {
  const Ut early = universal(2027, 3, 3, 21, 30, 0), late = universal(2027, 3, 20, 21, 30, 0);
  const std::vector<Meeting> both = {meeting_at(early, "moon", "mars", 1.0),
                                     meeting_at(late, "moon", "regulus", 5.0)};
  auto lines = lines_of(both, 3);
  ASSERT_EQ(lines.size(), 2u);
  EXPECT_TRUE(lines[0].best);
  EXPECT_FALSE(lines[1].best);
  EXPECT_LT(lines[0].rank, lines[1].rank);
  Session session;
  session.when = std::vector<Date>{make_date(2027, 3, 20)};
  scene_->site.sessions = {session};
  lines = lines_of(both, 3);
  scene_->site.sessions.clear();
  ASSERT_EQ(lines.size(), 2u);
  EXPECT_TRUE(lines[0].best) << "the rarest sight stays the best";
  EXPECT_GT(lines[0].rank, lines[1].rank);
}

TEST_F(HappeningDates, OccultationsAreToldWhereTheyCanBeWatched) {
  const Ut at = universal(2027, 3, 3, 21, 14, 0);
  const auto contact = [&](Ut when, bool dark, double altitude, double sun) {
    LimbContact c{};
    c.at = when;
    c.place = {Angle::from_degrees(altitude), Angle::from_degrees(225)};
    c.dark_limb = dark;
    c.up = altitude > -0.5;
    c.sun_altitude = Angle::from_degrees(sun);
    return c;
  };
  const auto occultation = [&](std::string_view name, bool first_dark, double altitude,
                               double sun) {
    return Occultation{target_index(name),
                       contact(at, first_dark, altitude, sun),
                       contact(at + Days(66.0 / 1440), !first_dark, altitude - 9, sun),
                       Angle::from_degrees(0.1),
                       Angle::from_degrees(0.26),
                       0.4};
  };
  const auto told = [&](const Occultation& o) {
    scene_->happenings.occultations = {o};
    const auto lines = lines_of({meeting_at(at, "moon", "antares", 0.1)}, 3);
    scene_->happenings.occultations.clear();
    return lines;
  };
  auto lines = told(occultation("antares", true, 27, -30));
  ASSERT_EQ(lines.size(), 1u) << "the meeting is not told beside the occultation";
  EXPECT_EQ(lines[0].when, "21:14");
  EXPECT_EQ(lines[0].text, "The Moon’s dark edge covers Antares, until 22:20; 27° up in the SW.");
  lines = told(occultation("antares", true, 8, -30));
  EXPECT_THAT(lines.at(0).text, Not(HasSubstr("22:20"))) << "it has set by then";
  lines = told(occultation("antares", true, 27, 10));
  EXPECT_THAT(lines.at(0).text, Not(HasSubstr("covers"))) << "by day";
  // A faint star at the bright edge is drowned: only its return at the dark edge is told.
  lines = told(occultation("alcyone", false, 27, -30));
  const auto returns = std::find_if(lines.begin(), lines.end(), [](const HappeningLine& l) {
    return l.text.find("η\u00A0Tauri (Alcyone) comes out") != std::string::npos;
  });
  ASSERT_NE(returns, lines.end());
  EXPECT_EQ(returns->when, "22:20");
  EXPECT_THAT(returns->text, HasSubstr("dark edge"));
}

// ---- the Sun

struct SunCase {
  const char* label;
  double latitude, longitude;
  const char* zone;
  int year, month;
  const char* text;  // what the line says
};

// Which eclipses these are and where they are total: F. Espenak, EclipseWise.com (2024-04-08: local
// circumstances of that page, 3 min 45 s), and NASA/TP-2006-214141 (2026-08-12, 2027-08-02), paths
// from memory.
class SunLines : public testing::TestWithParam<SunCase> {};
TEST_P(SunLines, CarryTheCaution) {
  const SunCase& row = GetParam();
  MonthScene scene(row.latitude, row.longitude, row.zone, row.year, row.month);
  scene.compute(true);
  const auto lines = happening_lines(scene.context());
  bool told = false;
  for (const HappeningLine& line : lines) {
    if (line.text.find("eclipse of the Sun") == std::string::npos &&
        line.text.find("crosses the Sun") == std::string::npos)
      continue;
    told = told || line.text.find(row.text) != std::string::npos;
    const bool seen = line.text.find("not seen from here") == std::string::npos;
    EXPECT_EQ(line.caution.find("filter made for the Sun") != std::string::npos, seen) << line.text;
  }
  EXPECT_TRUE(told) << row.text;

  std::vector<Mark> marks;
  BlockOptions options;
  options.values["most"] = "3";
  draw_happenings(scene.context(), options, {0, 0, 75, 200}, marks);
  const bool seen = std::string(row.text).find("not seen") == std::string::npos;
  EXPECT_EQ(all_words(marks).find("filter") != std::string::npos, seen);
}
INSTANTIATE_TEST_SUITE_P(
    Eclipses, SunLines,
    testing::Values(
        SunCase{"total_2024", 41.0341, -83.6523, "America/New_York", 2024, 4,
                "total for 3\u00A0min\u00A045"},
        SunCase{"total_2026", 42.0, -4.5, "Europe/Madrid", 2026, 8, "Total eclipse"},
        SunCase{"total_2027", 36.0, -5.6, "Europe/Madrid", 2027, 8, "Total eclipse"},
        SunCase{"partial_2027", 51.5, 0.0, "Europe/London", 2027, 8, "covered at"},
        SunCase{"elsewhere_2027", -43.4, 171.6, "Pacific/Auckland", 2027, 8, "not seen from here"},
        SunCase{"transit_2032", 48.0, 11.0, "Europe/Berlin", 2032, 11, "Mercury crosses the Sun"}),
    [](const auto& row) { return std::string(row.param.label); });

// ---- choosing

HappeningLine line_of(int day, double rank, bool own = false) {
  return {make_date(2027, 3, day),
          std::nullopt,
          ut_midnight(make_date(2027, 3, day)),
          "21:00",
          "Something.",
          {},
          own ? "" : "something",
          rank,
          own};
}

TEST(HappeningChoice, LeavesOutTheLeastImportantInOrderOfDate) {
  const auto choice = choose_lines(
      {line_of(1, 5), line_of(2, 0), line_of(3, 4), line_of(4, 1), line_of(5, 4), line_of(6, 2)},
      3);
  ASSERT_EQ(choice.shown.size(), 3u);
  EXPECT_EQ(day_of(choice.shown[0].date), 2);
  EXPECT_EQ(day_of(choice.shown[1].date), 4);
  EXPECT_EQ(day_of(choice.shown[2].date), 6);
  ASSERT_EQ(choice.left_out.size(), 3u);
  EXPECT_EQ(day_of(choice.left_out[0].date), 1);
  EXPECT_EQ(day_of(choice.left_out[2].date), 5);
}

TEST(HappeningChoice, ASingleOneIsToldRatherThanCountedAndOwnDatesStay) {
  EXPECT_TRUE(choose_lines({line_of(1, 4), line_of(2, 0)}, 1).left_out.empty());
  const auto choice =
      choose_lines({line_of(1, 0), line_of(2, 0), line_of(3, 0, true), line_of(4, 0, true)}, 1);
  ASSERT_EQ(choice.shown.size(), 2u);
  EXPECT_TRUE(choice.shown[0].own && choice.shown[1].own);
}

TEST(HappeningChoice, WhatNobodySeesIsNamedLastAlone) {
  const auto choice = choose_lines({line_of(1, fact_rank), line_of(2, 4)}, 100);
  ASSERT_EQ(choice.shown.size(), 1u);
  EXPECT_EQ(day_of(choice.shown[0].date), 2);
  ASSERT_EQ(choice.left_out.size(), 1u);
}

TEST_F(HappeningDates, AFullMonthClosesWithTheCount) {
  std::vector<Meeting> many;
  for (int day = 1; day <= 20; ++day)
    many.push_back(meeting_at(universal(2027, 7, day, 21, 30, 0)));
  scene_->month_index = 6;
  scene_->happenings.meetings = many;
  const std::size_t all = happening_lines(scene_->context()).size();
  ASSERT_GE(all, 20u);
  BlockOptions options;
  options.values["most"] = "6";
  std::vector<Mark> marks;
  const double height = draw_happenings(scene_->context(), options, {0, 0, 75, 300}, marks);
  EXPECT_THAT(all_words(marks), HasSubstr("And " + std::to_string(all - 6) + " lesser ones"));
  std::vector<Mark> whole;
  options.values["most"] = "100";
  EXPECT_GT(draw_happenings(scene_->context(), options, {0, 0, 75, 300}, whole), height);
  EXPECT_THAT(all_words(whole), Not(HasSubstr("lesser")));
  scene_->happenings.meetings.clear();
}

}  // namespace
}  // namespace duskleaf
