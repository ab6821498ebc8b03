// The Moon's phases in a dome's corners, and the columns that the night bars have in some months
// or at some sites. Jupiter was opposite the Sun on 2027 February 11 (UT) and beside it on August
// 31 (tests/reference/configurations_de431.csv), so evenings show it in March and not in September.
#include <cmath>
#include <fmt/format.h>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <map>

#include "sheet/blocks/blocks.hpp"
#include "sheet/jupiter_column.hpp"
#include "sheet/sky_chart_dome.hpp"

namespace duskleaf {
namespace {

/// A site's year and what its pages look at.
struct Desk {
  Order order;
  Site site;
  Publication publication;
  YearEphemeris ephemeris;
  SiteYear year;
  SkyYear sky_year;
  SiteHappenings happenings;
  TypeSet type;
  Words words{"en", true};
  Theme theme = Theme::colour();
  Tally tally;

  Desk(double latitude, double longitude, const char* zone, std::vector<SkylinePoint> skyline)
      : order(order_of()),
        site(site_of(latitude, longitude, zone, std::move(skyline))),
        ephemeris(ephemeris_span(order.span).first, ephemeris_span(order.span).second),
        year(make_site_year(ephemeris, site.place, order.span)),
        sky_year(make_sky_year(ephemeris, order.span)),
        happenings(make_site_happenings(ephemeris, year, sky_year)) {}

  static Order order_of() {
    Order order;
    order.span = {2027, 1};
    order.clock_12 = true;  // the wider times
    return order;
  }
  static Site site_of(double latitude, double longitude, const char* zone,
                      std::vector<SkylinePoint> skyline) {
    Site site;
    site.place.observer = {Angle::from_degrees(latitude), Angle::from_degrees(longitude), 0};
    site.place.zone = *Zone::load(zone);
    site.place.chart_hours.fill({std::chrono::minutes(21 * 60)});
    site.place.skyline = std::move(skyline);
    return site;
  }
  BlockContext context(int month) {
    return {order,    site,       publication, year,  month - 1, ephemeris,
            sky_year, happenings, type,        words, theme,     tally};
  }
};

Desk& north() {
  static Desk desk(54.2, -4.6, "Europe/London", {});
  return desk;
}
Desk& south() {
  static Desk desk(-43.4, 171.6, "Pacific/Auckland",
                   {{Angle(), Angle::from_degrees(4)},
                    {Angle::from_degrees(90), Angle::from_degrees(6)},
                    {Angle::from_degrees(270), Angle::from_degrees(14)}});
  return desk;
}

std::vector<Text> texts_of(const std::vector<Mark>& marks) {
  std::vector<Text> found;
  for (const Mark& mark : marks)
    if (const Text* text = std::get_if<Text>(&mark)) found.push_back(*text);
  return found;
}
std::vector<std::string> words_of(const std::vector<Mark>& marks) {
  std::vector<std::string> found;
  for (const Text& text : texts_of(marks)) found.push_back(text.words);
  return found;
}

TEST(MoonPhases, StandInTheCornersClearOfTheDome) {
  std::size_t most = 0;
  for (Desk* desk : {&north(), &south()})
    for (int month = 1; month <= 12; ++month)
      for (const Box area : {Box{12, 140, 186, 95}, Box{12, 130, 191.9, 84}}) {  // A4, letter
        const BlockContext context = desk->context(month);
        std::vector<Mark> marks;
        draw_moon_phases(context, {{{"form", "corners"}}}, area, marks);
        const double radius = dome_radius(context, area);
        const Point centre{area.x + area.width / 2, area.y + radius};
        std::size_t phases = 0;
        for (const Text& text : texts_of(marks)) {
          const double width = desk->type.width(text.words, text.face, text.size_pt);
          const double below = text.start.y + desk->type.descent(text.face, text.size_pt);
          EXPECT_GE(text.start.x, area.x);
          EXPECT_LE(text.start.x + width, area.right() + 0.01);
          for (const double x : {text.start.x, text.start.x + width})
            EXPECT_GT(std::hypot(x - centre.x, below - centre.y), radius + 1)
                << month << ": " << text.words;
          for (const char* key : {"new", "first", "full", "last"})
            phases += text.words == desk->words("moon-phases." + std::string(key));
        }
        EXPECT_GE(phases, 4u) << month;
        most = std::max(most, phases);
      }
  EXPECT_EQ(most, 5u);  // a year has months of five
  EXPECT_THAT(north().tally.notes, testing::IsEmpty());
  EXPECT_THAT(south().tally.notes, testing::IsEmpty());
}

std::vector<const Night*> nights_of(const Desk& desk, int month) {
  std::vector<const Night*> nights;
  for (const Night& night : desk.year.nights)
    if (month_of(night.date) == month) nights.push_back(&night);
  return nights;
}

TEST(NightBars, HaveJupitersMoonsInMonthsThatShowIt) {
  for (Desk* desk : {&north(), &south()}) {
    const auto march = jupiter_column(desk->context(3), nights_of(*desk, 3));
    ASSERT_TRUE(march);
    ASSERT_EQ(march->order.size(), 31u);
    EXPECT_EQ(march->hour, "9:00\u00A0pm");
    for (const std::string& order : march->order) {
      EXPECT_THAT(order, testing::MatchesRegex("([1-4] )*J( [1-4])*"));
      EXPECT_GE(order.size(), 3u);  // never all four before or behind the disc in one month's looks
    }
    EXPECT_FALSE(jupiter_column(desk->context(9), nights_of(*desk, 9)));
    std::vector<Mark> with, without;
    draw_night_bars(desk->context(3), {}, {12, 30, 186, 130}, with);
    draw_night_bars(desk->context(9), {}, {12, 30, 186, 130}, without);
    EXPECT_THAT(words_of(with), testing::Contains(desk->words("night-bars.jupiter-2")));
    EXPECT_THAT(words_of(without),
                testing::Not(testing::Contains(desk->words("night-bars.jupiter-2"))));
  }
}

TEST(NightBars, HaveTheHillsTimesBesideTheStandardOnes) {
  std::vector<Mark> flat, hills;
  draw_night_bars(north().context(6), {}, {12, 30, 186, 130}, flat);
  draw_night_bars(south().context(6), {}, {12, 30, 186, 130}, hills);
  const auto columns = testing::IsSupersetOf({std::string("behind"), std::string("clears")});
  EXPECT_THAT(words_of(flat), testing::Not(testing::Contains("behind")));
  EXPECT_THAT(words_of(hills), columns);
  // Under a skyline the Sun is gone before it sets and clears it after its rise.
  const auto nights = nights_of(south(), 6);
  int rows = 0;
  for (const Night* night : nights)
    for (const SkylineDay& day : south().happenings.skyline) {
      if (day.date != night->date) continue;
      ASSERT_TRUE(day.gone && night->sunset);
      EXPECT_LT(*day.gone, *night->sunset);
      const auto shown = [&](Ut t) {
        const CivilMinute time = south().site.place.zone.civil(t);  // "sets pm": 5:07
        return testing::Contains(fmt::format("{}:{:02}", time.hour() - 12, time.minute()));
      };
      EXPECT_THAT(words_of(hills), shown(*day.gone));
      EXPECT_THAT(words_of(hills), shown(*night->sunset));
      ++rows;
    }
  EXPECT_EQ(rows, 30);
}

TEST(NightBars, ShrinkToTheirLeastHeight) {
  for (Desk* desk : {&north(), &south()})
    for (const int month : {2, 3}) {
      const BlockContext context = desk->context(month);
      std::vector<Mark> marks;
      const double least = night_bars_least_height(context);
      EXPECT_LE(draw_night_bars(context, {}, {12, 30, 186, least}, marks), least + 0.001);
      EXPECT_LT(least, 115);
    }
}

// Where all of a column's times are of one half of the day its head says so.
TEST(NightBars, NameTheHalfOfTheDayOnce) {
  std::vector<Mark> marks;
  draw_night_bars(south().context(6), {}, {12, 30, 186, 130}, marks);
  const auto words = words_of(marks);
  EXPECT_THAT(words, testing::IsSupersetOf({std::string("sets pm"), std::string("from pm"),
                                            std::string("until am"), std::string("rises am")}));
  const Night& night = *nights_of(south(), 6).front();
  const CivilMinute sets = south().site.place.zone.civil(*night.sunset);
  EXPECT_THAT(words, testing::Contains(fmt::format("{}:{:02}", sets.hour() - 12, sets.minute())));
}

// At 54.2 degrees north the Sun is never 18 degrees down in June (its declination is above 17.8).
TEST(NightBars, CallNothingDarkInMonthsOfTwilight) {
  std::vector<Mark> june, march;
  draw_night_bars(north().context(6), {}, {12, 30, 186, 130}, june);
  draw_night_bars(north().context(3), {}, {12, 30, 186, 130}, march);
  EXPECT_THAT(words_of(june),
              testing::IsSupersetOf({std::string("darkest"), std::string("darkest,")}));
  EXPECT_THAT(words_of(june), testing::Not(testing::Contains("dark,")));
  EXPECT_THAT(words_of(march), testing::Contains("dark,"));
}

// Jupiter stands highest in the north of the southern site, in the south of the northern one.
TEST(NightBars, TellWhereEastIsSouthOfTheEquator) {
  std::vector<Mark> northern, southern;
  draw_night_bars(north().context(3), {}, {12, 30, 186, 130}, northern);
  draw_night_bars(south().context(3), {}, {12, 30, 186, 130}, southern);
  const auto told = testing::Contains(testing::StartsWith(north().words("night-bars.east-right")));
  EXPECT_THAT(words_of(northern), testing::Not(told));
  EXPECT_THAT(words_of(southern), told);
}

TEST(NightBars, LabelTheHoursEvenly) {
  for (Desk* desk : {&north(), &south()})
    for (int month = 1; month <= 12; ++month) {
      std::vector<Mark> marks;
      draw_night_bars(desk->context(month), {}, {12, 30, 186, 130}, marks);
      std::map<std::string, int> hours;
      for (int hour = 13; hour < 36; ++hour)
        hours[hour == 24 ? desk->words("night-bars.midnight") : desk->words.whole_hour(hour)] =
            hour;
      std::vector<std::pair<double, double>> labels;  // from left to right: left end, right end
      std::vector<int> named;
      for (const Text& text : texts_of(marks))
        if (const auto hour = hours.find(text.words); hour != hours.end()) {
          named.push_back(hour->second);
          labels.emplace_back(text.start.x,
                              text.start.x + desk->type.width(text.words, text.face, text.size_pt));
        }
      ASSERT_GE(named.size(), 3u) << month;
      for (std::size_t i = 1; i < named.size(); ++i) {
        EXPECT_EQ(named[i] - named[i - 1], named[1] - named[0]) << month;
        EXPECT_GT(labels[i].first - labels[i - 1].second, 2) << month;
      }
      EXPECT_LT(labels.back().second, 198.01);
    }
}

TEST(ConstellationTable, LeavesOutWhatIsAskedOfIt) {
  const BlockContext context = north().context(3);
  std::vector<double> heights;
  std::vector<std::string> pages;
  for (const char* level : {"0", "1", "2", "3"}) {
    std::vector<Mark> marks;
    heights.push_back(
        draw_constellations(context, {{{"leave-out", level}}}, {12, 30, 186, 90}, marks));
    pages.emplace_back();
    for (const std::string& piece : words_of(marks)) pages.back() += piece + " ";
  }
  EXPECT_THAT(heights, testing::ElementsAre(testing::_, testing::Lt(heights[0]),
                                            testing::Le(heights[1]), testing::Lt(heights[2] / 2)));
  EXPECT_THAT(pages[0], testing::HasSubstr(north().words("constellations.below")));
  EXPECT_THAT(pages[1], testing::Not(testing::HasSubstr(north().words("constellations.below"))));
  // Orion in March: an evening sight of the winter months.
  EXPECT_THAT(pages[2], testing::ContainsRegex("Orion .*Dec–"));
  EXPECT_THAT(pages[3], testing::HasSubstr("Orion"));
  EXPECT_THAT(pages[3], testing::Not(testing::HasSubstr("Dec–")));
}

}  // namespace
}  // namespace duskleaf
