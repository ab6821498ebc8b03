#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "almanac/best_nights.hpp"
#include "almanac/show_list.hpp"
#include "month_scene.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/show_moment.hpp"

namespace duskleaf {
namespace {

using testing::HasSubstr;
using testing::Not;

Session fridays(int nth, int from_hour, int to_hour) {
  Session session;
  session.when = Session::Rule{nth, std::chrono::Friday};
  session.from = std::chrono::hours(from_hour);
  session.to = std::chrono::hours(to_hour);
  return session;
}

struct Drawn {
  double height;
  std::vector<std::string> pieces;
  std::string text;
};
Drawn show(MonthScene& scene, const char* most, double width = 75) {
  std::vector<Mark> marks;
  BlockOptions options;
  options.values["most"] = most;
  Drawn d{};
  d.height = draw_show(scene.context(), options, {12, 12, width, 200}, marks);
  collect_words(marks, d.pieces);
  d.text = all_words(marks);
  return d;
}

TEST(ShowBlock, IsForTheFirstSessionOfTheMonth) {
  MonthScene scene(52, -1, "Europe/London", 2027, 2);
  scene.site.place.limiting_magnitude = 5.5;
  scene.site.sessions = {fridays(-1, 19, 21), fridays(1, 20, 22)};
  scene.compute(false, true);
  const ShowMoment moment = show_moment(scene.context());
  EXPECT_EQ(iso_date(moment.evening), "2027-02-05");  // the first Friday
  const Drawn d = show(scene, "100");
  EXPECT_THAT(d.text, HasSubstr("Fri 5\u00A0February, 20:00"));
  // In a February evening of the north Orion stands high in the south (common fact).
  for (const char* piece :
       {"At its best", "Orion Nebula", "bare eye", "binoculars", "small telescope"})
    EXPECT_THAT(d.text, HasSubstr(piece));
}

TEST(ShowBlock, WaitsForDarknessWithinTheSession) {
  MonthScene scene(52, -1, "Europe/London", 2027, 7);
  scene.site.sessions = {fridays(1, 20, 22)};
  scene.compute(false, true);
  // In July the Sun is not 12 degrees down by 22:00 at 52 N: the session's end is taken.
  EXPECT_EQ(scene.site.place.zone.civil(show_moment(scene.context()).at).hour(), 22);
}

TEST(ShowBlock, MostLimitsItsLines) {
  MonthScene scene(-43, 172, "Pacific/Auckland", 2027, 6);
  scene.compute(false, true);
  const auto things = [](const Drawn& d) {
    int n = 0;
    for (const std::string& piece : d.pieces)
      for (const char* takes : {"bare eye", "binoculars", "telescope"})
        if (piece.ends_with(takes)) ++n;
    return n;
  };
  const Drawn six = show(scene, "6"), whole = show(scene, "100");
  EXPECT_EQ(things(six), 6);
  EXPECT_GT(things(whole), 12);
  EXPECT_GT(whole.height, six.height);
}

// On the full Moon's own evening (a group asked for the Moon) it is not left out for star clusters.
TEST(ShowBlock, MoonAndBrightPlanetsComeFirst) {
  MonthScene scene(-43.4, 171.6, "Pacific/Auckland", 2027, 2);
  scene.site.place.limiting_magnitude = 6.0;
  Session session;
  session.when = std::vector<Date>{make_date(2027, 2, 20)};
  session.from = std::chrono::hours(20);
  session.to = std::chrono::minutes(21 * 60 + 30);
  scene.site.sessions = {session};
  scene.compute(false, true);
  EXPECT_TRUE(show_moment(scene.context()).session);
  // Full on February 20, UT 23 h (from memory); Mars and Jupiter are about their oppositions.
  const Drawn d = show(scene, "4");
  for (const char* piece : {"Moon, full", "Jupiter, moons", "Mars", "Saturn"})
    EXPECT_THAT(d.text, HasSubstr(piece));
  EXPECT_THAT(d.text, HasSubstr("east is on the right"));
}

TEST(ShowBlock, WithoutASessionItIsForTheBestNight) {
  for (const int month : {2, 8, 11}) {
    MonthScene scene(41.3, -73.9, "America/New_York", 2027, month);
    scene.compute(true, true);
    std::vector<Date> dates;
    for (int day = 1; day <= days_in_month(2027, month); ++day)
      dates.push_back(make_date(2027, month, day));
    const auto ranks =
        rank_nights(*scene.ephemeris, scene.year, dates, {}, Aim::any, &scene.happenings);
    const ShowMoment moment = show_moment(scene.context());
    EXPECT_FALSE(moment.session);
    EXPECT_EQ(moment.evening, ranks.front().date) << month;
    EXPECT_LT(ranks.front().moon_lit, 0.3) << month;
    EXPECT_THAT(show(scene, "100").text,
                HasSubstr("best night, " + scene.words.weekday_short(weekday_of(moment.evening)) +
                          " " + scene.words.day_month(moment.evening)));
  }
}

TEST(ShowBlock, DoublesAreNamedWithTheirConstellationAndColours) {
  MonthScene scene(45, 10, "Europe/Rome", 2027, 9);
  scene.site.sessions = {fridays(1, 21, 23)};
  scene.compute(false, true);
  const Drawn d = show(scene, "100", 190);
  for (const char* piece :
       {"Albireo in Cygnus, double: gold and blue", "61 in Cygnus, double: both orange"})
    EXPECT_THAT(d.text, HasSubstr(piece));
  EXPECT_THAT(d.text, Not(HasSubstr("β Cyg")));
}

TEST(ShowBlock, ClosesUpWithALineWhereTheSkyIsTooBright) {
  MonthScene scene(78, 16, "Europe/Oslo", 2027, 6);
  scene.compute(false, true);
  const Drawn d = show(scene, "100");
  EXPECT_THAT(d.text, HasSubstr("too bright"));
  EXPECT_THAT(d.text, Not(HasSubstr("At its best")));
  EXPECT_LT(d.height, 15);
}

TEST(ShowBlock, EveryKindHasItsWords) {
  const Words words("en");
  for (const ShowObject& object : show_objects()) {
    EXPECT_TRUE(words.has("show.kind-" + std::string(show_class_name(object.sort))));
    EXPECT_TRUE(object.name.empty() || words.has("show-object." + std::string(object.name)))
        << object.code;
    EXPECT_TRUE(object.look.empty() || words.has("show.look-" + std::string(object.look)))
        << object.code;
  }
}

}  // namespace
}  // namespace duskleaf
