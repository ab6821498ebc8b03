#include <algorithm>
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "month_scene.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/happening_lines.hpp"

namespace duskleaf {
namespace {

using testing::HasSubstr;
using testing::Not;

struct Drawn {
  double height;
  std::string text;
  std::vector<Mark> marks;
};

Drawn panel(MonthScene& scene, double width = 105) {
  Drawn d{};
  d.height = draw_eclipses(scene.context(), {}, {12, 12, width, 200}, d.marks);
  d.text = all_words(d.marks);
  return d;
}

// Contacts of this place: F. Espenak, EclipseWise.com, local circumstances of 2024 April 8 (UT
// 17:55:52, 19:10:42, 19:12:34, 19:14:27, 20:26:37; altitudes 56.3 to 39.6 degrees); civil time is
// UT - 4 h.
TEST(EclipsePanel, ATotalEclipseOfTheSunHasItsContactsAndTheCaution) {
  MonthScene scene(41.0341, -83.6523, "America/New_York", 2024, 4);
  scene.compute(true);
  for (const double width : {75.0, 105.0, 186.0}) {
    const Drawn d = panel(scene, width);
    for (const char* piece : {"Total eclipse of the Sun", "13:56", "15:11", "15:13", "15:14",
                              "16:27", "56° up", "40° up", "3\u00A0min\u00A04"})
      EXPECT_THAT(d.text, HasSubstr(piece)) << width;
    EXPECT_THAT(d.text, HasSubstr("Never look at the Sun"));
    EXPECT_THAT(d.text, HasSubstr("wholly covered"));
    EXPECT_GT(d.height, 25);
  }
}

// What stood near the Sun then: Venus 15 degrees to the west and Jupiter 30 to the east (common
// reports of that day; from memory), right and left of it at this latitude.
TEST(EclipsePanel, TotalityNamesWhatShinesNearTheSun) {
  MonthScene scene(41.0341, -83.6523, "America/New_York", 2024, 4);
  scene.compute(true);
  const Drawn d = panel(scene, 186);
  EXPECT_THAT(d.text, HasSubstr("corona"));
  EXPECT_THAT(d.text, testing::ContainsRegex("Venus 15° to the (lower )?right"));
  EXPECT_THAT(d.text, testing::ContainsRegex("Jupiter (29|30|31)° to the (upper )?left"));
  EXPECT_THAT(d.text, Not(HasSubstr("magnitude")));
}

// 2027 February 6 in the south of Spain: the Moon's penumbra barely reaches it (this project's own
// figures, some 2 % at the Sun's setting): a line, no panel.
TEST(EclipsePanel, ABiteTooSmallHasNone) {
  MonthScene scene(36.1, -5.3, "Europe/Madrid", 2027, 2);
  scene.compute(true);
  ASSERT_FALSE(scene.happenings.solar_eclipses.empty());
  EXPECT_LT(scene.happenings.solar_eclipses.front().best_obscuration, 0.05);
  EXPECT_THAT(panel(scene).text, Not(HasSubstr("eclipse of the Sun")));
}

// The same page's 2023 April 20 at 4.6622 N 170.8101 E: the last contact comes with the Sun 4.4
// degrees down. Pacific/Kosrae is UT + 11 h.
TEST(EclipsePanel, ASunThatSetsEclipsedSaysWhatIsCut) {
  MonthScene scene(4.6622, 170.8101, "Pacific/Kosrae", 2023, 4);
  scene.compute(true);
  const Drawn d = panel(scene);
  for (const char* piece :
       {"Partial eclipse of the Sun", "15:42", "16:54", "17:58", "Sun sets", "below the horizon"})
    EXPECT_THAT(d.text, HasSubstr(piece));
  EXPECT_THAT(d.text, HasSubstr("Never look at the Sun"));
  EXPECT_THAT(d.text, Not(HasSubstr("wholly covered")));
}

// Contacts of 2026 March 3 (UT 09:50:00, 12:02:45): NASA's Catalog of Lunar Eclipses. In
// New York the Moon sets in the first minutes of totality (civil time UT - 5 h; from memory).
TEST(EclipsePanel, AMoonThatSetsEclipsed) {
  MonthScene scene(40.7, -74.0, "America/New_York", 2026, 3);
  scene.compute(true);
  const Drawn d = panel(scene);
  for (const char* piece : {"Total eclipse of the Moon", "night of 2–3\u00A0March", "04:50",
                            "07:03", "Moon sets", "below the horizon"})
    EXPECT_THAT(d.text, HasSubstr(piece));
  EXPECT_THAT(d.text, Not(HasSubstr("the Sun without")));
}

TEST(EclipsePanel, AMonthWithoutOneClosesUp) {
  MonthScene scene(51.5, 0, "Europe/London", 2027, 4);
  scene.compute(true);
  const Drawn d = panel(scene);
  EXPECT_EQ(d.height, 0);
  EXPECT_TRUE(d.marks.empty());
}

// Mercury's transit of 2032 November 13, in the morning of Europe (F. Espenak, NASA/GSFC, Seven
// Century Catalog of Mercury Transits; from memory).
TEST(EclipsePanel, ATransitOfTheSunCarriesTheCaution) {
  MonthScene scene(48, 11, "Europe/Berlin", 2032, 11);
  scene.compute(true);
  const Drawn d = panel(scene);
  EXPECT_THAT(d.text, HasSubstr("Mercury before the Sun"));
  EXPECT_THAT(d.text, HasSubstr("Never look at the Sun"));
}

// 2026 August 12 ends at sunset over the western Mediterranean (F. Espenak & J. Meeus, Five
// Millennium Canon of Solar Eclipses, NASA/TP-2006-214141, the map of that eclipse; from memory):
// at 8 E the Sun is down before the totality. Nobody there may be told to take the filter off.
TEST(EclipsePanel, ATotalityAfterSunsetIsNone) {
  MonthScene scene(39.0, 8.0, "Europe/Rome", 2026, 8);
  scene.compute(true);
  ASSERT_EQ(scene.happenings.solar_eclipses.size(), 1u);
  const SiteSolarEclipse& e = scene.happenings.solar_eclipses.front();
  ASSERT_EQ(e.kind, SolarEclipseKind::total);
  ASSERT_FALSE(e.central_begins->visible);
  const Drawn d = panel(scene, 186);
  EXPECT_THAT(d.text, HasSubstr("Partial eclipse of the Sun"));
  EXPECT_THAT(d.text, HasSubstr("Never look at the Sun"));
  EXPECT_THAT(d.text, Not(HasSubstr("wholly covered")));
  EXPECT_THAT(d.text, Not(HasSubstr("corona")));
}

// At Australia's east coast the Sun sets on the transit of 2032 (the times of its middle and end,
// after sunset there: as above). The line once called the beginning the middle.
TEST(EclipsePanel, ATransitThatSunsetCutsSaysSo) {
  MonthScene scene(-33.9, 151.2, "Australia/Sydney", 2032, 11);
  scene.compute(true);
  const Drawn d = panel(scene, 186);
  EXPECT_THAT(d.text, HasSubstr("Sun sets"));
  EXPECT_THAT(d.text, HasSubstr("below the horizon"));
  const std::vector<HappeningLine> lines = happening_lines(scene.context());
  const auto line = std::find_if(lines.begin(), lines.end(), [](const HappeningLine& l) {
    return l.text.find("crosses the Sun") != std::string::npos;
  });
  ASSERT_NE(line, lines.end());
  EXPECT_THAT(line->text, HasSubstr("until the Sun sets"));
  EXPECT_THAT(line->text, Not(HasSubstr("middle")));
  EXPECT_THAT(line->when, testing::MatchesRegex("17:4.–19:3."));
  EXPECT_THAT(line->caution, HasSubstr("filter"));
}

}  // namespace
}  // namespace duskleaf
