#include <algorithm>
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "almanac/happenings.hpp"
#include "sheet/publication.hpp"

namespace duskleaf {
namespace {

struct Layout {
  const char* label;
  double latitude, longitude;
  const char* zone;
  int chart_minutes;
  const char* paper;
  bool clock_12;
};

Order order_for(const Layout& row) {
  Order order;
  order.span = {2027, 1};
  order.clock_12 = row.clock_12;
  Publication publication;
  publication.template_name = "monthly-handout";
  publication.paper = row.paper;
  order.publications.push_back(publication);
  Site site;
  site.name = "The Long Meadow Observatory Field";
  site.place.id = "meadow";
  site.place.observer = {Angle::from_degrees(row.latitude), Angle::from_degrees(row.longitude),
                         120};
  site.place.zone = *Zone::load(row.zone);
  site.place.chart_hours.fill({std::chrono::minutes(row.chart_minutes)});
  site.masthead.group = "Long Meadow Star Evenings";
  site.masthead.contact = "hello@longmeadow.example";
  site.masthead.link = "https://longmeadow.example/evenings";
  Session session;
  session.when = Session::Rule{-1, std::chrono::Friday};
  session.from = std::chrono::minutes(row.chart_minutes - 60);
  session.to = std::chrono::minutes(row.chart_minutes + 60);
  session.where = "at the gate by the old orchard";
  session.text = "If it is cloudy we meet in the hall.";
  site.sessions.push_back(session);
  site.notes[3] = "Bring a blanket and a flask. The gate closes at eleven.";
  order.sites.push_back(site);
  return order;
}

struct Placed {
  Box box;
  std::string words;
};

/// The letters' boxes of all upright text, with the height of capitals.
void collect(const std::vector<Mark>& marks, const TypeSet& type, std::vector<Placed>& out) {
  for (const Mark& mark : marks) {
    if (const auto* group = std::get_if<std::shared_ptr<ClipGroup>>(&mark))
      collect((*group)->marks, type, out);
    const auto* text = std::get_if<Text>(&mark);
    if (text == nullptr || text->turn_degrees != 0) continue;
    const double cap = type.cap_height(text->face, text->size_pt);
    const double width = type.width(text->words, text->face, text->size_pt, text->tracking_em);
    out.push_back({{text->start.x, text->start.y - cap, width, cap}, text->words});
  }
}

class Handout : public testing::TestWithParam<Layout> {};

// The rules of this project's pages: nothing off the margins, no two pieces of type over one
// another, no page too full. One site sees the total eclipse of 2027 August 2.
TEST_P(Handout, EveryMonthFitsItsPages) {
  const Order order = order_for(GetParam());
  const auto [from, to] = ephemeris_span(order.span);
  const YearEphemeris ephemeris(from, to);
  const SiteYear year = make_site_year(ephemeris, order.sites[0].place, order.span);
  const SkyYear sky_year = make_sky_year(ephemeris, order.span);
  const SiteHappenings happenings = make_site_happenings(ephemeris, year, sky_year);
  const TypeSet type;
  for (int month = 0; month < 12; ++month) {
    Tally tally;
    const SheetDocument document =
        make_handout(order, order.sites[0], order.publications[0], year, sky_year, happenings,
                     ephemeris, {month}, type, tally);
    ASSERT_EQ(document.sheets.size(), 2u);
    EXPECT_THAT(tally.notes, testing::IsEmpty()) << "month " << month + 1;
    for (const Sheet& sheet : document.sheets) {
      std::vector<Placed> placed;
      collect(sheet.marks, type, placed);
      EXPECT_GT(placed.size(), 40u);
      for (std::size_t i = 0; i < placed.size(); ++i) {
        const Box& a = placed[i].box;
        EXPECT_TRUE(a.x > 11.5 && a.right() < sheet.width_mm - 11.5 && a.y > 11.5 &&
                    a.bottom() < sheet.height_mm - 11.5)
            << "month " << month + 1 << ": '" << placed[i].words << "' leaves the margins at "
            << a.x << ", " << a.y;
        for (std::size_t j = i + 1; j < placed.size(); ++j) {
          const Box& b = placed[j].box;
          const double across = std::min(a.right(), b.right()) - std::max(a.x, b.x);
          const double down = std::min(a.bottom(), b.bottom()) - std::max(a.y, b.y);
          EXPECT_FALSE(across > 0.15 && down > 0.15)
              << "month " << month + 1 << ": '" << placed[i].words << "' and '" << placed[j].words
              << "' overlap at " << a.x << ", " << a.y;
        }
      }
    }
  }
}

INSTANTIATE_TEST_SUITE_P(
    Sites, Handout,
    testing::Values(
        Layout{"north", 69.6, 18.9, "Europe/Oslo", 21 * 60 + 30, "A4", false},
        Layout{"temperate", 54.2, -4.6, "Europe/London", 21 * 60 + 30, "A4", false},
        Layout{"letter_and_twelve_hours", 40.1, -88.2, "America/Chicago", 21 * 60, "letter", true},
        Layout{"equator", -0.2, -78.5, "America/Guayaquil", 20 * 60, "A4", false},
        Layout{"south", -43.5, 172.6, "Pacific/Auckland", 21 * 60, "A4", true},
        Layout{"far_south_letter", -77.8, 166.7, "Antarctica/McMurdo", 22 * 60, "letter", false},
        Layout{"under_a_total_eclipse", 36.1, -5.3, "Europe/Madrid", 21 * 60 + 30, "letter", true},
        Layout{"pole", 90, 0, "UTC", 22 * 60, "A4", false}),
    [](const auto& row) { return std::string(row.param.label); });

}  // namespace
}  // namespace duskleaf
