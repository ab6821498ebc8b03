// Sessions by rule against the civil calendar of 2027 and 2026 (common practice; 1 January 2027 is
// a Friday).
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "order/order.hpp"
#include "order_text.hpp"

namespace duskleaf {
namespace {

std::vector<std::string> dates_of(const std::string& when,
                                  const std::string& head = "year: 2027\n") {
  OrderText text;
  text.head = head;
  text.sites += "    sessions: [{ when: " + when + " }]\n";
  const Order order = parse_order(text.text(), "o.yaml");
  std::vector<std::string> list;
  for (const Date date : session_dates(order.sites[0].sessions[0], order.span))
    list.push_back(iso_date(date));
  return list;
}

TEST(SessionDates, FirstFridays) {
  EXPECT_THAT(dates_of("first friday"),
              testing::ElementsAre("2027-01-01", "2027-02-05", "2027-03-05", "2027-04-02",
                                   "2027-05-07", "2027-06-04", "2027-07-02", "2027-08-06",
                                   "2027-09-03", "2027-10-01", "2027-11-05", "2027-12-03"));
}

TEST(SessionDates, LastSaturdaysOfASchoolYear) {
  EXPECT_THAT(dates_of("Last Saturday", "start: 2026-09\n"),
              testing::ElementsAre("2026-09-26", "2026-10-31", "2026-11-28", "2026-12-26",
                                   "2027-01-30", "2027-02-27", "2027-03-27", "2027-04-24",
                                   "2027-05-29", "2027-06-26", "2027-07-31", "2027-08-28"));
}

TEST(SessionDates, EveryFridayOf2027) {
  const auto dates = dates_of("every friday");
  EXPECT_EQ(dates.size(), 53u);
  EXPECT_EQ(dates.front(), "2027-01-01");
  EXPECT_EQ(dates.back(), "2027-12-31");
}

TEST(SessionDates, ListedDatesInsideTheSpanInOrder) {
  EXPECT_THAT(dates_of("[2027-10-08, 2028-01-01, 2027-03-19, 2027-03-19]"),
              testing::ElementsAre("2027-03-19", "2027-10-08"));
  EXPECT_THAT(dates_of("2027-03-19"), testing::ElementsAre("2027-03-19"));
}

}  // namespace
}  // namespace duskleaf
