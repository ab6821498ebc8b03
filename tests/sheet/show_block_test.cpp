#include <gmock/gmock.h>
#include <gtest/gtest.h>

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
  for (const char* piece : {"At its best", "Orion Nebula", "bare eye", "binoculars", "mm"})
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
      for (const char* takes : {"bare eye", "binoculars", "telescope", "\u00A0mm"})
        if (piece.ends_with(takes)) ++n;
    return n;
  };
  const Drawn six = show(scene, "6"), whole = show(scene, "100");
  EXPECT_EQ(things(six), 6);
  EXPECT_GT(things(whole), 12);
  EXPECT_GT(whole.height, six.height);
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
  }
}

}  // namespace
}  // namespace duskleaf
