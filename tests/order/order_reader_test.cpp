// Orders that read well: every key of the order file arrives where it belongs. Expected values are
// those of the text.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "order/order.hpp"
#include "order/outputs.hpp"
#include "order_text.hpp"

namespace duskleaf {
namespace {

using std::chrono::minutes;
using testing::ElementsAre;
using testing::IsEmpty;

TEST(OrderReader, SmallestOrderHasItsDefaults) {
  const Order order = parse_order(OrderText().text(), "folder/o.yaml");
  EXPECT_EQ(order.folder, "folder");
  EXPECT_EQ(order.span.first_year, 2027);
  EXPECT_EQ(order.span.first_month, 1);
  EXPECT_TRUE(order.starts_in_january);
  EXPECT_EQ(order.language, "en");
  ASSERT_EQ(order.publications.size(), 1u);
  EXPECT_EQ(order.publications[0].name, "monthly-handout");
  EXPECT_EQ(order.publications[0].paper, "A4");
  EXPECT_EQ(order.publications[0].files, FileSplit::months);
  ASSERT_EQ(order.sites.size(), 1u);
  const Site& site = order.sites[0];
  EXPECT_EQ(site.place.id, "reed-lake");
  EXPECT_DOUBLE_EQ(site.place.observer.latitude.degrees(), 52.5);
  EXPECT_EQ(site.place.zone.name(), "Europe/Amsterdam");
  EXPECT_EQ(site.place.chart_hours[11].after_midnight, minutes(1290));
  EXPECT_DOUBLE_EQ(site.place.limiting_magnitude, 5.0);
  EXPECT_TRUE(doubts(order).empty());
}

TEST(OrderReader, EveryKeyArrives) {
  const Order order = parse_order(R"(
start: 2026-09
language: fr
clock: 12
publications:
  - template: monthly-handout
    paper: a3
    months: [9, 3]
    ink: grey
    large_print: true
    binding: top
    files: year
    name: wall_1
  - template: paired-places
    pairs: [[tern-point, kestrel-bay]]
    evenings: [2027-03-19]
  - template: ./own.yaml
sites:
  - id: tern-point
    name: Tern Point Sky Watch
    latitude: 54 10 48 N
    longitude: 4°37'12"W
    elevation: 35 m
    time_zone: Europe/London
    chart_hour: ["20:00", dusk, 21:30, dusk, dusk, dusk, dusk, dusk, dusk, dusk, dusk, "00:15"]
    limiting_magnitude: 5.5
    skyline: [[90, 8], [0, 3]]
    masthead: { group: Terns, contact: ring the bell, link: "https://tern-point.example/sky" }
    sessions:
      - { when: first friday, from: "20:30", to: "22:30", where: The jetty, aim: moon, text: Bring boots. }
      - { when: [2027-03-19, 2026-10-02], aim: dark }
    dates:
      - { on: 2027-05-03, text: No school }
      - { from: 2027-03-29, to: 2027-04-09, text: Spring break }
    notes: { 3: "Bring a blanket." }
  - { id: kestrel-bay, name: Kestrel Bay, latitude: -43.5, longitude: 172, elevation: 100 ft, time_zone: Pacific/Auckland, chart_hour: dusk }
)",
                                  "o.yaml");
  EXPECT_EQ(order.span.first_year, 2026);
  EXPECT_EQ(order.span.first_month, 9);
  EXPECT_FALSE(order.starts_in_january);
  EXPECT_EQ(order.language, "fr");
  EXPECT_TRUE(order.clock_12);

  const Publication& wall = order.publications[0];
  EXPECT_EQ(wall.paper, "A3");
  EXPECT_THAT(wall.months, ElementsAre(9, 3));
  EXPECT_EQ(wall.ink, InkMode::grey);
  EXPECT_TRUE(wall.large_print);
  EXPECT_EQ(wall.binding, Binding::top);
  EXPECT_EQ(wall.files, FileSplit::year);
  EXPECT_EQ(wall.name, "wall_1");
  EXPECT_THAT(order.publications[1].pairs,
              ElementsAre(std::pair<std::string, std::string>("tern-point", "kestrel-bay")));
  EXPECT_THAT(order.publications[1].evenings, ElementsAre(make_date(2027, 3, 19)));
  EXPECT_TRUE(order.publications[2].template_is_path);
  EXPECT_EQ(order.publications[2].name, "own");

  const Site& site = order.sites[0];
  EXPECT_NEAR(site.place.observer.latitude.degrees(), 54.18, 1e-12);
  EXPECT_NEAR(site.place.observer.longitude.degrees(), -4.62, 1e-12);
  EXPECT_DOUBLE_EQ(site.place.observer.elevation_m, 35);
  EXPECT_EQ(site.place.chart_hours[0].after_midnight, minutes(1200));
  EXPECT_FALSE(site.place.chart_hours[1].after_midnight.has_value());
  EXPECT_EQ(site.place.chart_hours[11].after_midnight, minutes(15));
  EXPECT_DOUBLE_EQ(site.place.limiting_magnitude, 5.5);
  ASSERT_EQ(site.place.skyline.size(), 2u);
  EXPECT_DOUBLE_EQ(site.place.skyline[0].altitude.degrees(), 3);
  EXPECT_EQ(site.masthead.group, "Terns");
  EXPECT_EQ(site.masthead.contact, "ring the bell");
  EXPECT_EQ(site.masthead.link, "https://tern-point.example/sky");
  ASSERT_EQ(site.sessions.size(), 2u);
  EXPECT_EQ(site.sessions[0].from, minutes(1230));
  EXPECT_EQ(site.sessions[0].to, minutes(1350));
  EXPECT_EQ(site.sessions[0].where, "The jetty");
  EXPECT_EQ(site.sessions[0].text, "Bring boots.");
  EXPECT_EQ(site.sessions[0].aim, Aim::moon);
  EXPECT_EQ(site.sessions[1].aim, Aim::dark);
  ASSERT_EQ(site.dates.size(), 2u);
  EXPECT_EQ(site.dates[0].from, site.dates[0].to);
  EXPECT_EQ(site.dates[1].to, make_date(2027, 4, 9));
  EXPECT_EQ(site.dates[1].text, "Spring break");
  EXPECT_EQ(site.notes.at(3), "Bring a blanket.");

  const Site& other = order.sites[1];
  EXPECT_NEAR(other.place.observer.elevation_m, 30.48, 1e-9);
  EXPECT_FALSE(other.place.chart_hours[6].after_midnight.has_value());
}

TEST(OrderReader, AcceptsByteOrderMarkAndWindowsLineEnds) {
  std::string text = "\xEF\xBB\xBF";
  for (const char c : OrderText().text())
    text += c == '\n' ? std::string("\r\n") : std::string(1, c);
  const Order order = parse_order(text, "o.yaml");
  EXPECT_EQ(order.sites.at(0).name, "Reed Lake");
  EXPECT_EQ(order.sites.at(0).where.line, 5);
}

TEST(OrderReader, WordsStayWords) {
  const Order order = parse_order(with_line("    name", "    name: no"), "o.yaml");
  EXPECT_EQ(order.sites.at(0).name, "no");
}

TEST(OrderReader, LanguageHasItsClock) {
  EXPECT_TRUE(parse_order(OrderText().text(), "o.yaml").clock_12);
  EXPECT_FALSE(parse_order(with_head("year: 2027\nlanguage: de\n"), "o.yaml").clock_12);
}

TEST(OrderReader, FilesAreNamedByMonthYearOrStart) {
  const auto paths = [](const std::string& head, const std::string& publication) {
    OrderText text;
    text.head = head;
    text.publications = "publications:\n" + publication;
    const Order order = parse_order(text.text(), "o.yaml");
    std::vector<std::string> list;
    for (const OutputFile& file : output_files(order, order.publications[0]))
      list.push_back(file.path);
    return list;
  };
  EXPECT_THAT(paths("year: 2027\n", "  - { template: monthly-handout, months: [12, 2] }\n"),
              ElementsAre("monthly-handout-2027-02.pdf", "monthly-handout-2027-12.pdf"));
  EXPECT_THAT(
      paths("start: 2026-09\n", "  - { template: monthly-handout, months: [8, 9], name: h }\n"),
      ElementsAre("h-2026-09.pdf", "h-2027-08.pdf"));
  EXPECT_THAT(paths("year: 2027\n", "  - { template: monthly-handout, files: year, name: h }\n"),
              ElementsAre("h-2027.pdf"));
  EXPECT_THAT(paths("start: 2026-09\n", "  - { template: dark-year }\n"),
              ElementsAre("dark-year-2026-09.pdf"));
}

TEST(Doubts, NameWhatLooksWrong) {
  const auto texts = [](const std::string& order) {
    std::vector<std::string> list;
    for (const Doubt& doubt : doubts(parse_order(order, "o.yaml")))
      list.push_back(std::to_string(doubt.where.line) + ": " + doubt.text);
    return list;
  };
  EXPECT_THAT(texts(with_line("    longitude", "    longitude: -105.5")),
              ElementsAre("5: reed-lake: the clock of Europe/Amsterdam is 8.0 hours from the Sun's "
                          "at this longitude; is "
                          "the longitude's sign right (east positive)?"));
  EXPECT_THAT(texts("year: 2027\npublications: [{ template: monthly-handout }]\n"
                    "sites: [{ id: a, name: A, latitude: 0, longitude: 0, time_zone: UTC }]\n"),
              ElementsAre("3: a: latitude 0, longitude 0 is in the sea; is the place filled in?"));
  EXPECT_THAT(texts(with_site_lines("    chart_hour: \"9:30\"\n")),
              ElementsAre("5: reed-lake: chart_hour 09:30 is by day; is 21:30 meant?"));
  EXPECT_THAT(texts(with_site_lines("    chart_hour: [dusk, 20:00, 20:00, 21:00, 22:00, 23:00, "
                                    "4:59, 12:05, 14:00, 20:00, 19:00, 18:00]\n")),
              ElementsAre("5: reed-lake: chart_hour 12:05 is by day"));
  EXPECT_THAT(texts(with_site_lines("    skyline: [[0, 3]]\n")), IsEmpty());
  EXPECT_THAT(texts(with_site_lines("    sessions: [{ when: every friday, from: \"9:00\", to: "
                                    "\"11:00\" }]\n")),
              ElementsAre("10: reed-lake: a session from 09:00 is by day; is 21:00 meant?"));
  EXPECT_THAT(texts(with_publications("  - { template: monthly-handout, binding: edge }\n")),
              ElementsAre("3: binding is not printed yet: the margins are the usual ones"));
  EXPECT_THAT(
      texts(with_site_lines("    sessions: [{ when: [2027-01-01, 2028-01-01] }]\n")),
      ElementsAre("10: reed-lake: 1 of the session's 2 dates fall outside the order's months"));
}

// Kiritimati's clock (UT+14) and the Sun's at 157.4 W differ by a day and half an hour: no slip.
TEST(Doubts, TheDateLineIsNone) {
  EXPECT_TRUE(doubts(parse_order("year: 2027\npublications: [{ template: monthly-handout }]\n"
                                 "sites: [{ id: a, name: A, latitude: 1.9, longitude: -157.4, "
                                 "time_zone: Pacific/Kiritimati }]\n",
                                 "o.yaml"))
                  .empty());
}

}  // namespace
}  // namespace duskleaf
