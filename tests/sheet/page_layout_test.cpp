// How a page gives way: blocks of the test's own, whose heights are known.
#include "sheet/page_layout.hpp"

#include <algorithm>
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "month_scene.hpp"

namespace duskleaf {
namespace {

constexpr double line_mm = 5;

void put(std::vector<Mark>& out, const Box& area, double y, const char* words, double size_pt) {
  Text text{};
  text.start = {area.x, y + line_mm - 1};
  text.words = words;
  text.size_pt = size_pt;
  out.emplace_back(std::move(text));
}
/// As many lines as its option `most` says.
double draw_list(const BlockContext&, const BlockOptions& options, const Box& area,
                 std::vector<Mark>& out) {
  const int lines = options.number("most");
  for (int i = 0; i < lines; ++i) put(out, area, area.y + i * line_mm, "list", 10);
  return lines * line_mm;
}
template <int lines>
double draw_fixed(const BlockContext&, const BlockOptions&, const Box& area,
                  std::vector<Mark>& out) {
  for (int i = 0; i < lines; ++i) put(out, area, area.y + i * line_mm, "fixed", 10);
  return lines * line_mm;
}
double draw_roaming(const BlockContext&, const BlockOptions&, const Box& area,
                    std::vector<Mark>& out) {
  for (int i = 0; i < 8; ++i) put(out, area, area.y + i * line_mm, "roaming", 10);
  return 8 * line_mm;
}

const BlockSpec list{"list", "", {{"most", "100", "number", ""}}, draw_list};
const BlockSpec ten{"ten", "", {}, draw_fixed<10>};
const BlockSpec thirty{"thirty", "", {}, draw_fixed<30>};
const BlockSpec sixty{"sixty", "", {}, draw_fixed<60>};
const BlockSpec roaming{"roaming", "", {}, draw_roaming};

PageTemplate::Block block(const BlockSpec& spec, const char* most = nullptr) {
  PageTemplate::Block b;
  b.spec = &spec;
  if (most != nullptr) {
    b.options.values["most"] = most;
    b.fill = true;
  }
  return b;
}

class PageLayoutTest : public testing::Test {
 protected:
  static void SetUpTestSuite() {
    scene_ = new MonthScene(50, 8, "Europe/Berlin", 2027, 3);
    scene_->compute(false);
  }
  static void TearDownTestSuite() {
    delete scene_;
    scene_ = nullptr;
  }
  /// A page of 200 x 200 mm with margins of 10 and one band.
  std::vector<Text> drawn(std::vector<PageTemplate::Column> columns) {
    PageTemplate page_template;
    page_template.margin_mm = 10;
    PageTemplate::Page page;
    PageTemplate::Band band;
    band.columns = std::move(columns);
    page.bands.push_back(std::move(band));
    scene_->tally = {};
    std::vector<Text> texts;
    for (const Mark& mark : draw_page(scene_->context(), page_template, page, 200, 200))
      texts.push_back(std::get<Text>(mark));
    return texts;
  }
  static auto count(const std::vector<Text>& texts, const std::string& words) {
    return std::count_if(texts.begin(), texts.end(),
                         [&](const Text& t) { return t.words == words; });
  }
  static MonthScene* scene_;
};
MonthScene* PageLayoutTest::scene_ = nullptr;

TEST_F(PageLayoutTest, AListFillsTheRoomThatIsLeft) {
  // 180 mm less ten lines and the gap between the blocks is room for 25.
  const auto texts = drawn({{1, 12, {block(list, "60"), block(ten)}}});
  EXPECT_EQ(count(texts, "list"), 25);
  EXPECT_EQ(count(texts, "fixed"), 10);
  EXPECT_TRUE(scene_->tally.notes.empty());
  for (const Text& t : texts) EXPECT_LE(t.start.y, 190);
  EXPECT_EQ(texts.back().size_pt, 10);
}

TEST_F(PageLayoutTest, NeverMoreLinesThanTheTemplateGives) {
  EXPECT_EQ(count(drawn({{1, 12, {block(list, "2"), block(ten)}}}), "list"), 2);
  // No room: it once got three lines, more than its own two.
  const auto texts = drawn({{1, 12, {block(list, "2"), block(thirty), block(ten)}}});
  EXPECT_LE(count(texts, "list"), 2);
  EXPECT_EQ(count(drawn({{1, 12, {block(list, "0"), block(ten)}}}), "list"), 0);
}

TEST_F(PageLayoutTest, WordsThatAreTooManyAreSetSmallRatherThanCutOff) {
  const auto texts = drawn({{1, 12, {block(list, "60"), block(sixty)}}});
  EXPECT_EQ(count(texts, "fixed"), 60);
  EXPECT_EQ(count(texts, "list"), 0);
  EXPECT_NEAR(texts.front().size_pt, 6, 1e-9);
  for (const Text& t : texts) EXPECT_LE(t.start.y, 190);
  EXPECT_THAT(scene_->tally.notes, testing::ElementsAre("a page is reduced to 60 % to hold all its "
                                                        "words"));
}

TEST_F(PageLayoutTest, TooFullEvenThenIsNoted) {
  drawn({{1, 12, {block(sixty), block(thirty)}}});
  EXPECT_THAT(scene_->tally.notes,
              testing::ElementsAre(testing::HasSubstr("a page is too full by ")));
}

TEST_F(PageLayoutTest, ABlockRoamsToTheShorterColumn) {
  PageTemplate::Block guest = block(roaming);
  guest.roam = true;
  const auto texts = drawn({{1, 6, {block(ten)}}, {7, 12, {block(thirty), guest}}});
  EXPECT_EQ(count(texts, "roaming"), 8);
  for (const Text& t : texts)
    if (t.words == "roaming") {
      EXPECT_LT(t.start.x, 100);
    }
  guest.roam = false;
  for (const Text& t : drawn({{1, 6, {block(ten)}}, {7, 12, {block(thirty), guest}}}))
    if (t.words == "roaming") {
      EXPECT_GT(t.start.x, 100);
    }
}

}  // namespace
}  // namespace duskleaf
