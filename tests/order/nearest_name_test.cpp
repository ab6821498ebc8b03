// Edit distances counted by hand.
#include "order/nearest_name.hpp"

#include <gtest/gtest.h>

namespace duskleaf {
namespace {

TEST(EditDistance, CountsSingleSteps) {
  EXPECT_EQ(edit_distance("latitude", "latitude"), 0);
  EXPECT_EQ(edit_distance("latitud", "latitude"), 1);
  EXPECT_EQ(edit_distance("langauge", "language"), 1);  // neighbours swapped
  EXPECT_EQ(edit_distance("", "abc"), 3);
  EXPECT_EQ(edit_distance("ABC", "abc"), 0);
  EXPECT_EQ(edit_distance("kitten", "sitting"), 3);
}

TEST(NearestName, IsEmptyWhenNoneIsNear) {
  const std::vector<std::string_view> known = {"latitude", "longitude", "id"};
  EXPECT_EQ(nearest_name("lattitude", known), "latitude");
  EXPECT_EQ(nearest_name("telephone", known), "");
  EXPECT_EQ(nearest_name("xx", known), "");
}

TEST(Listed, ReadsAsAPhrase) {
  EXPECT_EQ(listed({"a"}), "a");
  EXPECT_EQ(listed({"a", "b", "c"}), "a, b or c");
}

}  // namespace
}  // namespace duskleaf
