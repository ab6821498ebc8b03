// The promises of the page's language: no two labels touch, none leaves its chart, none sits on a
// bright star. Inputs are random (fixed seeds); what is demanded of the result needs no outside
// value.
#include "sheet/label_placer.hpp"

#include <cmath>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <random>

namespace duskleaf {
namespace {

const TypeSet& type() {
  static const TypeSet set;
  return set;
}

bool too_near(const Box& a, const Box& b, double gap) {
  return a.x - gap < b.right() && b.x - gap < a.right() && a.y - gap < b.bottom() &&
         b.y - gap < a.bottom();
}

double distance(Point p, const Box& b) {
  return std::hypot(std::max({b.x - p.x, 0.0, p.x - b.right()}),
                    std::max({b.y - p.y, 0.0, p.y - b.bottom()}));
}

struct Crowd {
  LabelRegion region;
  std::vector<Point> bright;
  std::vector<LabelRequest> requests;
  std::vector<PlacedLabel> placed;
};

Crowd crowd(unsigned seed) {
  std::mt19937 random(seed);
  std::uniform_real_distribution<double> part(0, 1);
  Crowd c;
  const bool dome = seed % 2 == 0;
  c.region =
      dome ? LabelRegion{{0, 0, 180, 90}, {90, 90}, 90} : LabelRegion{{10, 20, 120, 60}, {}, 0};
  LabelPlacer placer(type(), c.region);
  const auto point = [&] {
    return Point{c.region.box.x + part(random) * c.region.box.width,
                 c.region.box.y + part(random) * c.region.box.height};
  };
  for (int i = 0; i < 40; ++i) {
    c.bright.push_back(point());
    placer.add_dot(c.bright.back(), 1.0, true);
  }
  for (int i = 0; i < 200; ++i) placer.add_dot(point(), 0.4, false);
  for (int i = 0; i < 100; ++i) placer.add_line(point(), point(), 0.05);
  for (int i = 0; i < 120; ++i) {
    LabelRequest r;
    r.forms = {{{"Name " + std::to_string(i)}, Face::regular, 7.5, 0},
               {{"n"}, Face::regular, 7.5, 0}};
    r.importance = std::floor(5 * part(random));
    r.point = i < 40 ? c.bright[static_cast<std::size_t>(i)] : point();
    r.clearance_mm = 0.5;
    if (i % 3 == 2) {
      r.forms.insert(r.forms.begin(), {{"TWO", "LINES"}, Face::regular, 7.5, 0.06});
      for (int k = 0; k < 12; ++k) r.places.push_back(point());
    }
    r.cost_limit = 10;
    c.requests.push_back(r);
  }
  c.placed = placer.place(c.requests);
  return c;
}

class CrowdedLabels : public testing::TestWithParam<unsigned> {};

TEST_P(CrowdedLabels, KeepApartInsideAndOffBrightStars) {
  const Crowd c = crowd(GetParam());
  EXPECT_GT(c.placed.size(), 30u);
  EXPECT_LT(c.placed.size(), c.requests.size());
  for (std::size_t i = 0; i < c.placed.size(); ++i) {
    const Box& box = c.placed[i].box;
    EXPECT_TRUE(c.region.contains(box)) << i;
    for (std::size_t k = 0; k < i; ++k)
      EXPECT_FALSE(too_near(box, c.placed[k].box, 0.4)) << i << " and " << k;
    for (const Point& p : c.bright) EXPECT_GT(distance(p, box), 0.5) << i;
  }
}

TEST_P(CrowdedLabels, AreTheSameEveryTime) {
  const Crowd one = crowd(GetParam()), two = crowd(GetParam());
  ASSERT_EQ(one.placed.size(), two.placed.size());
  for (std::size_t i = 0; i < one.placed.size(); ++i) {
    EXPECT_EQ(one.placed[i].request, two.placed[i].request);
    EXPECT_EQ(one.placed[i].form, two.placed[i].form);
    EXPECT_EQ(one.placed[i].box.x, two.placed[i].box.x);
    EXPECT_EQ(one.placed[i].box.y, two.placed[i].box.y);
  }
}

TEST_P(CrowdedLabels, AreSetWithinTheirBoxes) {
  for (const PlacedLabel& label : crowd(GetParam()).placed)
    for (const Text& text : label.texts) {
      const double width = type().width(text.words, text.face, text.size_pt, text.tracking_em) -
                           text.tracking_em * text.size_pt * mm_per_pt;
      EXPECT_GE(text.start.x, label.box.x - 1e-9) << text.words;
      EXPECT_LE(text.start.x + width, label.box.right() + 1e-9) << text.words;
      EXPECT_LE(text.start.y, label.box.bottom() + 1e-9) << text.words;
      EXPECT_GE(text.start.y - type().cap_height(text.face, text.size_pt), label.box.y - 1e-9)
          << text.words;
    }
}

INSTANTIATE_TEST_SUITE_P(Seeds, CrowdedLabels, testing::Range(1u, 21u));

LabelRequest one_request(std::string words, Point point) {
  LabelRequest r;
  r.forms = {{{std::move(words)}, Face::regular, 7.5, 0}};
  r.point = point;
  r.clearance_mm = 0.5;
  return r;
}

TEST(LabelPlacer, GivesTheBestSeatToTheMoreImportant) {
  LabelPlacer placer(type(), {{0, 0, 60, 20}, {}, 0});
  LabelRequest low = one_request("Lesser", {20, 10}), high = one_request("Greater", {20.3, 10});
  low.importance = 1;
  high.importance = 2;
  const auto placed = placer.place({low, high});
  ASSERT_EQ(placed.size(), 2u);
  EXPECT_EQ(placed[0].request, 1u);
  EXPECT_GT(placed[0].box.x, 20.3);  // to the right, level with its star
  EXPECT_NEAR(placed[0].box.y + placed[0].box.height / 2, 10, 1e-6);
}

TEST(LabelPlacer, ShortensBeforeItLeavesOut) {
  LabelPlacer placer(type(), {{0, 0, 8, 8}, {}, 0});
  LabelRequest r = one_request("Much too long for this", {2, 4});
  r.forms.push_back({{"α"}, Face::regular, 7.5, 0});
  const auto placed = placer.place({r});
  ASSERT_EQ(placed.size(), 1u);
  EXPECT_EQ(placed[0].form, 1u);
  EXPECT_EQ(placed[0].texts[0].words, "α");
  EXPECT_TRUE(placer.place({one_request("Much too long for this", {2, 4})}).empty());
}

TEST(LabelPlacer, GoesRoundAFaintStarIfItCan) {
  LabelPlacer placer(type(), {{0, 0, 60, 30}, {}, 0});
  placer.add_dot({24, 15}, 0.4, false);
  const auto placed = placer.place({one_request("Star", {20, 15})});
  ASSERT_EQ(placed.size(), 1u);
  EXPECT_GT(distance({24, 15}, placed[0].box), 0.2);
}

TEST(LabelPlacer, KeepsFromReservedBoxes) {
  LabelPlacer placer(type(), {{0, 0, 60, 30}, {}, 0});
  const Box taken{20.5, 0, 39, 30};
  placer.reserve(taken);
  const auto placed = placer.place({one_request("Star", {20, 15})});
  ASSERT_EQ(placed.size(), 1u);
  EXPECT_FALSE(too_near(placed[0].box, taken, 0.4));
}

TEST(LabelPlacer, SetsANameNearerToItsOwnDotThanToAnother) {
  LabelPlacer placer(type(), {{0, 0, 80, 40}, {}, 0});
  LabelRequest left = one_request("Mars", {40, 20}), right = one_request("Jupiter", {42.5, 20});
  for (LabelRequest* r : {&left, &right}) {
    placer.add_dot(r->point, 2, true);
    r->clearance_mm = 0.8;
    r->nearest = r->leader = true;
  }
  const auto placed = placer.place({left, right});
  ASSERT_EQ(placed.size(), 2u);
  for (const PlacedLabel& label : placed) {
    const bool is_left = label.request == 0;
    const Point own = is_left ? left.point : right.point,
                other = is_left ? right.point : left.point;
    EXPECT_TRUE(label.leader || distance(own, label.box) < distance(other, label.box)) << is_left;
  }
}

TEST(LabelPlacer, DrawsALeaderFromADotThatIsHemmedIn) {
  LabelPlacer placer(type(), {{0, 0, 80, 40}, {}, 0});
  LabelRequest r = one_request("Mercury", {40, 20});
  for (const auto& [dx, dy] : {std::pair{-2.0, 0.0}, {2.0, 0.0}, {0.0, -2.0}})
    placer.add_dot({40 + dx, 20 + dy}, 1.2, true);
  placer.reserve({36, 21.2, 3, 2});
  placer.reserve({41, 21.2, 3, 2});
  r.nearest = true;
  EXPECT_TRUE(placer.place({r}).empty());
  r.leader = true;
  const auto placed = placer.place({r});
  ASSERT_EQ(placed.size(), 1u);
  ASSERT_TRUE(placed[0].leader);
  const auto& [from, to] = *placed[0].leader;
  EXPECT_LT(std::hypot(from.x - 40, from.y - 20), 0.8);
  EXPECT_LT(distance(to, placed[0].box), 0.4);
}

TEST(LabelPlacer, KeepsTheWiderOfTwoSideGaps) {
  LabelPlacer placer(type(), {{0, 0, 80, 20}, {}, 0});
  placer.reserve({20, 8, 10, 3}, 2.5);
  EXPECT_FALSE(placer.cost_of({32, 8, 10, 3}));
  EXPECT_TRUE(placer.cost_of({32.6, 8, 10, 3}));
  EXPECT_TRUE(placer.cost_of({32, 12, 10, 3}));  // on another line
}

TEST(LabelRegion, HoldsABoxOnlyWithAllItsCornersInTheDome) {
  const LabelRegion dome{{0, 0, 100, 50}, {50, 50}, 50};
  EXPECT_TRUE(dome.contains({45, 10, 10, 5}));
  EXPECT_FALSE(dome.contains({1, 1, 5, 5}));     // in the corner outside the circle
  EXPECT_FALSE(dome.contains({45, 46, 10, 5}));  // over the base
}

TEST(BreakAt, CutsALineAtABoxAndItsGap) {
  const auto pieces = break_at({{0, 0}, {10, 0}, {20, 0}}, {{8, -1, 4, 2}}, 0.5);
  ASSERT_EQ(pieces.size(), 2u);
  EXPECT_NEAR(pieces[0].back().x, 7.5, 1e-9);
  EXPECT_NEAR(pieces[1].front().x, 12.5, 1e-9);
  EXPECT_NEAR(pieces[1].back().x, 20, 1e-9);
}

TEST(BreakAt, LeavesAFreeLineWholeAndACoveredOneOut) {
  const std::vector<Point> line = {{0, 0}, {10, 0}};
  const auto whole = break_at(line, {{0, 5, 10, 2}}, 0.5);
  ASSERT_EQ(whole.size(), 1u);
  EXPECT_EQ(whole[0].size(), 2u);
  EXPECT_TRUE(break_at(line, {{-1, -1, 12, 2}}, 0.5).empty());
}

TEST(LengthInside, MeasuresThePartOfASegmentInABox) {
  const Box box{0, 0, 3, 4};
  EXPECT_NEAR(length_inside({-3, -4}, {6, 8}, box), 5, 1e-9);
  EXPECT_NEAR(length_inside({1, 1}, {2, 1}, box), 1, 1e-9);
  EXPECT_EQ(length_inside({4, 0}, {4, 9}, box), 0);
}

TEST(Capitals, RaisesLatinLettersWithMarksToo) {
  EXPECT_EQ(capitals("Boötes"), "BOÖTES");
  EXPECT_EQ(capitals("Canis Major"), "CANIS MAJOR");
  EXPECT_EQ(capitals("α ÷ ñ"), "α ÷ Ñ");
}

}  // namespace
}  // namespace duskleaf
