// Elementary: the expected values are counted by hand.
#include "almanac/time_spans.hpp"

#include <gtest/gtest.h>

namespace duskleaf {
namespace {

Ut at(double d) { return Ut(Days(d)); }
std::vector<Event> events(std::initializer_list<std::pair<EventKind, double>> list) {
  std::vector<Event> all;
  for (const auto& [kind, day] : list) all.push_back({kind, Body::moon, at(day), {}});
  return all;
}
constexpr EventKind up = EventKind::moonrise, down = EventKind::moonset;

TEST(TimeSpans, BelowByItsInstants) {
  struct Row {
    const char* label;
    std::vector<Event> events;
    bool below_if_none;
    std::vector<std::pair<double, double>> spans;
  };
  for (const Row& row :
       {Row{"none, below", {}, true, {{0, 1}}}, Row{"none, above", {}, false, {}},
        Row{"sets", events({{down, 0.4}}), false, {{0.4, 1}}},
        Row{"rises, whatever was believed before", events({{up, 0.4}}), false, {{0, 0.4}}},
        Row{"rises and sets", events({{up, 0.2}, {down, 0.7}}), true, {{0, 0.2}, {0.7, 1}}},
        Row{"sets and rises", events({{down, 0.2}, {up, 0.7}}), true, {{0.2, 0.7}}},
        Row{"other instants do not count",
            events({{EventKind::sunset, 0.1}, {down, 0.2}}),
            true,
            {{0.2, 1}}}}) {
    const auto spans = spans_below(row.events, up, down, at(0), at(1), row.below_if_none);
    ASSERT_EQ(spans.size(), row.spans.size()) << row.label;
    for (std::size_t i = 0; i < spans.size(); ++i) {
      EXPECT_EQ(spans[i].from, at(row.spans[i].first)) << row.label;
      EXPECT_EQ(spans[i].to, at(row.spans[i].second)) << row.label;
    }
  }
}

TEST(TimeSpans, IntersectionAndLength) {
  const std::vector<TimeSpan> a = {{at(0), at(2)}, {at(3), at(5)}},
                              b = {{at(1), at(4)}, {at(5), at(6)}};
  const auto common = intersection(a, b);
  ASSERT_EQ(common.size(), 2u);
  EXPECT_EQ(common[0].from, at(1));
  EXPECT_EQ(common[0].to, at(2));
  EXPECT_EQ(common[1].from, at(3));
  EXPECT_EQ(common[1].to, at(4));
  EXPECT_DOUBLE_EQ(length(common).count(), 2.0);
  EXPECT_TRUE(contains(common, at(1)));
  EXPECT_FALSE(contains(common, at(2)));
  EXPECT_FALSE(contains(common, at(2.5)));
}

}  // namespace
}  // namespace duskleaf
