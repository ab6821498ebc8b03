// The starter order's small parts. Expectations follow from their own descriptions.
#include "cli/starter_order.hpp"

#include <gtest/gtest.h>

#include "cli/commands.hpp"

namespace duskleaf {
namespace {

TEST(IdFromName, KeepsWhatNamesAFolder) {
  EXPECT_EQ(id_from_name("Tern Point Sky Watch"), "tern-point-sky-watch");
  EXPECT_EQ(id_from_name("  St. Ash's / 2 "), "st-ash-s-2");
  EXPECT_EQ(id_from_name("Σύρος"), "home");
  EXPECT_EQ(id_from_name("Pairs"), "home");
}

TEST(TroubleWith, IsTheReadersWordWithoutThePlace) {
  EXPECT_EQ(trouble_with({"A", "54 10 48 N", "-4.62", "Europe/London", 2027}), "");
  EXPECT_EQ(trouble_with({"A", "54", "5", "Europe/Lundon", 2027}),
            "unknown time zone 'Europe/Lundon'; did you mean 'Europe/London'?");
  EXPECT_EQ(trouble_with({"A: b \\ \"c\"", "54", "5", "Europe/London", 2027}), "");
}

TEST(ParseShare, ReadsPartsOfAWhole) {
  EXPECT_EQ(parse_share("2/8"), (std::pair{2, 8}));
  for (const char* wrong : {"", "2", "2/", "/8", "0/8", "9/8", "2/8x", "-1/8", "a/b"})
    EXPECT_THROW(parse_share(wrong), CommandLineError) << wrong;
}

}  // namespace
}  // namespace duskleaf
