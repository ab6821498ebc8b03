// Domes and ribbon for many places and times: labels apart and inside, the right way round. What
// stands where follows from geometry (common facts of the trade: Orion is upright seen from the
// north, upside down from the south; seen from the north the sky turns counterclockwise round the
// pole, from the south clockwise). Star places: the project's own table.
#include <cmath>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <random>

#include "catalogue/stars.hpp"
#include "ephemeris/year_ephemeris.hpp"
#include "sheet/blocks/blocks.hpp"
#include "sheet/sky_chart_dome.hpp"
#include "sheet/sky_chart_ribbon.hpp"

namespace duskleaf {
namespace {

constexpr int hr_betelgeuse = 2061, hr_rigel = 1713;

const YearEphemeris& ephemeris() {
  static const YearEphemeris table(to_tt(ut_midnight(make_date(2026, 11, 1))),
                                   to_tt(ut_midnight(make_date(2028, 3, 1))));
  return table;
}

/// Everything that a chart looks at, for an evening built from sidereal time alone.
struct Scene {
  Order order;
  Site site;
  Publication publication;
  SiteYear year{};
  SkyYear sky_year;
  SiteHappenings happenings;
  TypeSet type;
  Words words{"en"};
  Theme theme = Theme::colour();
  Tally tally;
  int month_index;

  Scene(double latitude, double longitude, Date date, double hours_ut, double faintest)
      : month_index(month_of(date) - 1) {
    site.place.observer = {Angle::from_degrees(latitude), Angle::from_degrees(longitude), 0};
    year.place = site.place;
    for (int month = 1; month <= 12; ++month) {
      EveningSky& e = year.evenings[static_cast<std::size_t>(month - 1)];
      e.year = 2027;
      e.month = month;
      e.date = month == month_of(date) ? date : make_date(2027, month, 15);
      e.moment = e.chart_moment = ut_midnight(e.date) + Days(hours_ut / 24);
      e.local_sidereal_time =
          ephemeris().apparent_sidereal_time(e.moment) + site.place.observer.longitude;
    }
    EveningSky& e = year.evenings[static_cast<std::size_t>(month_index)];
    e.shift = EveningShift::none;
    e.faintest_star = faintest;
    e.stars_return = make_date(2027, 8, 3);
    const Eigen::Matrix3d to_date = ephemeris().icrs_to_date(to_tt(e.moment));
    for (const Eigen::Vector3d& icrs : star_directions(27))
      e.stars.push_back(in_sky(to_date * icrs));
    e.moon = in_sky(ephemeris().apparent(Body::moon, to_tt(e.moment)));
    e.moon_lit = 0.4;
    for (const Body body : planets)
      e.planets.push_back({body,
                           in_sky(ephemeris().apparent(body, to_tt(e.moment))),
                           1.0,
                           true,
                           {},
                           0,
                           {},
                           {},
                           {}});
  }
  Horizontal in_sky(const Eigen::Vector3d& of_date) const {
    const EquatorialPlace p = to_equatorial(of_date);
    const EveningSky& e = year.evenings[static_cast<std::size_t>(month_index)];
    return horizontal_of(e.local_sidereal_time - p.right_ascension, p.declination,
                         site.place.observer.latitude);
  }
  BlockContext context() {
    return {order,    site,       publication, year,  month_index, ephemeris(),
            sky_year, happenings, type,        words, theme,       tally};
  }
  EveningSky& evening() { return year.evenings[static_cast<std::size_t>(month_index)]; }
  Horizontal star(int hr) { return evening().stars[static_cast<std::size_t>(star_index(hr))]; }
};

const Box dome_area{12, 30, 186, 100};

bool touch(const Box& a, const Box& b) {
  return a.x < b.right() && b.x < a.right() && a.y < b.bottom() && b.y < a.bottom();
}

/// Labels as boxes: one for each upright label, a chain for each turned one.
void expect_apart(const std::vector<PlacedLabel>& labels, const std::vector<Box>& boxes,
                  const LabelRegion& outline, const std::string& what) {
  for (std::size_t i = 0; i < labels.size(); ++i) {
    EXPECT_TRUE(outline.contains(labels[i].box)) << what << ": " << labels[i].texts[0].words;
    for (const Box& other : boxes) {
      const bool itself = other.x == labels[i].box.x && other.y == labels[i].box.y;
      EXPECT_TRUE(itself || !touch(labels[i].box, other))
          << what << ": " << labels[i].texts[0].words;
    }
  }
  for (const Box& box : boxes) EXPECT_TRUE(outline.contains(box)) << what;
}

class AnywhereAnytime : public testing::TestWithParam<int> {};

TEST_P(AnywhereAnytime, LabelsKeepApartInsideAndOffBrightStars) {
  std::mt19937 random(static_cast<unsigned>(GetParam()));
  std::uniform_real_distribution<double> part(0, 1);
  const double latitude = std::asin(2 * part(random) - 1) * 180 / std::numbers::pi;
  const int month = 1 + static_cast<int>(12 * part(random));
  Scene scene(latitude, 360 * part(random) - 180, make_date(2027, month, 15), 24 * part(random),
              3.5 + 2.5 * part(random));
  const std::string what =
      "latitude " + std::to_string(latitude) + ", month " + std::to_string(month);
  const BlockContext context = scene.context();
  for (const DomeFacing facing : {DomeFacing::equator, DomeFacing::pole}) {
    std::vector<Mark> marks;
    const DomeDrawing dome = compose_dome(context, facing, dome_area, marks);
    EXPECT_GT(dome.labels.size(), 12u) << what;
    EXPECT_LE(dome.height, dome_area.height);
    expect_apart(dome.labels, dome.label_boxes, dome.outline, what);
    const DomeView view(dome.outline.centre, dome.outline.radius,
                        dome_azimuth(facing, context.site.place.observer.latitude));
    for (const ChartStar& candidate : chart_stars()) {
      const auto i = static_cast<std::size_t>(candidate.index);
      if (stars()[i].magnitude >= 3) break;  // brightest first
      const auto p = view.project(scene.evening().stars[i]);
      if (!p || !dome.outline.contains({p->x, p->y, 0, 0})) continue;
      const double r = star_dot_mm(stars()[i].magnitude) / 2;
      for (const PlacedLabel& label : dome.labels) {
        const double dx = std::max({label.box.x - p->x, 0.0, p->x - label.box.right()});
        const double dy = std::max({label.box.y - p->y, 0.0, p->y - label.box.bottom()});
        EXPECT_GE(std::hypot(dx, dy), r)
            << what << ": " << label.texts[0].words << " on HR " << stars()[i].hr;
      }
    }
  }
  std::vector<Mark> marks;
  const RibbonDrawing ribbon = compose_ribbon(context, {12, 240, 186, 44}, marks);
  EXPECT_GT(ribbon.labels.size(), 20u) << what;
  EXPECT_LE(ribbon.height, 44);
  expect_apart(ribbon.labels, ribbon.label_boxes, ribbon.outline, what);
}

INSTANTIATE_TEST_SUITE_P(Places, AnywhereAnytime, testing::Range(0, 60));

TEST(DomeFacing, IsTowardsTheEquatorAndThePoleThatIsUp) {
  EXPECT_EQ(dome_azimuth(DomeFacing::equator, Angle::from_degrees(54)).degrees(), 180);
  EXPECT_EQ(dome_azimuth(DomeFacing::equator, Angle::from_degrees(0)).degrees(), 180);
  EXPECT_EQ(dome_azimuth(DomeFacing::equator, Angle::from_degrees(-0.1)).degrees(), 0);
  EXPECT_EQ(dome_azimuth(DomeFacing::pole, Angle::from_degrees(54)).degrees(), 0);
  EXPECT_EQ(dome_azimuth(DomeFacing::pole, Angle::from_degrees(-43)).degrees(), 180);
}

TEST(DomeView, HasEastToTheLeftFacingSouthAndToTheRightFacingNorth) {
  const Horizontal east{Angle(), Angle::from_degrees(90)};
  const DomeView south({100, 100}, 90, Angle::from_degrees(180)), north({100, 100}, 90, Angle());
  EXPECT_LT(south.project(east)->x, 100);
  EXPECT_GT(north.project(east)->x, 100);
  EXPECT_NEAR(south.project(east)->y, 100, 1e-9);  // on the base
}

TEST(DomeView, RunsTenDegreesPastTheZenith) {
  const DomeView view({100, 100}, 90, Angle::from_degrees(180));
  const auto past = view.project({Angle::from_degrees(80), Angle()});  // 10 degrees beyond overhead
  EXPECT_NEAR(past->y, 10, 1e-9);
  const auto zenith = view.project({Angle::from_degrees(90), Angle()});
  EXPECT_NEAR(100 - zenith->y, view.unit(), 1e-9);
}

TEST(DomeView, KnowsWhereUpPoints) {
  const DomeView view({100, 100}, 90, Angle::from_degrees(180));
  EXPECT_NEAR(view.up_at({Angle::from_degrees(40), Angle::from_degrees(180)}).degrees(), 0, 1e-3);
  // Low in the east, left on the page, up leans to the right, towards the zenith: clockwise.
  EXPECT_LT(view.up_at({Angle::from_degrees(30), Angle::from_degrees(110)}).degrees(), -5);
  EXPECT_GT(view.up_at({Angle::from_degrees(30), Angle::from_degrees(250)}).degrees(), 5);
}

struct OrionCase {
  const char* label;
  double latitude, longitude, hours_ut;
  bool upright;
};

TEST(Domes, ShowOrionUprightFromTheNorthAndUpsideDownFromTheSouth) {
  for (const OrionCase& c :
       {OrionCase{"54 N", 54.2, 0, 21.5, true}, OrionCase{"43 S", -43, 0, 21.5, false}}) {
    Scene scene(c.latitude, c.longitude, make_date(2027, 1, 15), c.hours_ut, 5);
    const DomeView view({105, 130}, 93,
                        dome_azimuth(DomeFacing::equator, scene.site.place.observer.latitude));
    const auto betelgeuse = view.project(scene.star(hr_betelgeuse)),
               rigel = view.project(scene.star(hr_rigel));
    ASSERT_TRUE(betelgeuse && rigel) << c.label;
    EXPECT_EQ(betelgeuse->y < rigel->y, c.upright) << c.label;
    std::vector<Mark> marks;
    const DomeDrawing dome = compose_dome(scene.context(), DomeFacing::equator, dome_area, marks);
    std::vector<std::string> names;
    for (const PlacedLabel& label : dome.labels) names.push_back(label.texts[0].words);
    EXPECT_THAT(names, testing::IsSupersetOf({"Rigel", "Betelgeuse", "Sirius"})) << c.label;
  }
}

TEST(Domes, HaveThePoleStarInThePolesDomeAlone) {
  Scene scene(54, 0, make_date(2027, 3, 15), 21.5, 5);
  const auto names = [&](DomeFacing facing) {
    std::vector<Mark> marks;
    std::vector<std::string> found;
    for (const PlacedLabel& label : compose_dome(scene.context(), facing, dome_area, marks).labels)
      for (const Text& text : label.texts) found.push_back(text.words);
    return found;
  };
  EXPECT_THAT(names(DomeFacing::pole), testing::Contains("Polaris"));
  EXPECT_THAT(names(DomeFacing::pole), testing::Contains("this way"));
  EXPECT_THAT(names(DomeFacing::equator), testing::Not(testing::Contains("Polaris")));
}

TEST(Domes, TurnRoundThePoleAsTheSkyDoes) {
  for (const double latitude : {54.0, -43.0}) {
    Scene scene(latitude, 0, make_date(2027, 3, 15), 21.5, 5);
    const DomeView view({105, 130}, 93,
                        dome_azimuth(DomeFacing::pole, scene.site.place.observer.latitude));
    const Angle declination = Angle::from_degrees(latitude > 0 ? 75 : -75);
    const auto at = [&](double hours) {
      return *view.project(
          horizontal_of(Angle::from_hours(hours), declination, scene.site.place.observer.latitude));
    };
    const Point pole = *view.project({Angle::from_degrees(std::abs(latitude)), view.facing()});
    const Point before = at(3), after = at(4);
    // Cross product on a page whose y runs down: negative is counterclockwise.
    const double cross =
        (before.x - pole.x) * (after.y - pole.y) - (before.y - pole.y) * (after.x - pole.x);
    EXPECT_EQ(cross<0, latitude> 0) << latitude;
  }
}

std::vector<std::string> texts_of(const std::vector<Mark>& marks) {
  std::vector<std::string> found;
  for (const Mark& mark : marks)
    if (const Text* text = std::get_if<Text>(&mark)) found.push_back(text->words);
  return found;
}

TEST(Domes, SayWhichWayTheyFace) {
  Scene north(54, 0, make_date(2027, 3, 15), 21.5, 5),
      south(-43, 0, make_date(2027, 3, 15), 21.5, 5);
  const BlockOptions equator{{{"facing", "equator"}}}, pole{{{"facing", "pole"}}};
  std::vector<Mark> a, b, c;
  draw_dome(north.context(), equator, dome_area, a);
  EXPECT_THAT(texts_of(a), testing::IsSupersetOf({"FACING SOUTH", "E", "SE", "SW", "W"}));
  draw_dome(south.context(), equator, dome_area, b);
  EXPECT_THAT(texts_of(b), testing::IsSupersetOf({"FACING NORTH", "W", "NW", "NE", "E"}));
  draw_dome(south.context(), pole, dome_area, c);
  EXPECT_THAT(texts_of(c), testing::Contains("FACING SOUTH"));
}

TEST(Domes, NameEveryPlanetAndTheMoonsDate) {
  for (const double latitude : {54.0, -43.0}) {
    Scene scene(latitude, 0, make_date(2027, 3, 15), 21.5, 5);
    std::vector<Mark> marks;
    for (const DomeFacing facing : {DomeFacing::equator, DomeFacing::pole})
      compose_dome(scene.context(), facing, dome_area, marks);
    const std::vector<std::string> found = texts_of(marks);
    EXPECT_THAT(found, testing::Contains("Moon, 15\u00A0Mar")) << latitude;
    for (const PlanetEvening& planet : scene.evening().planets)
      if (planet.place.altitude.degrees() > 2) {
        EXPECT_THAT(found,
                    testing::Contains(scene.words("body." + std::string(body_name(planet.planet)))))
            << latitude;
      }
  }
}

TEST(Domes, NameTheSouthsLandmarksInFull) {
  Scene scene(-43, 0, make_date(2027, 4, 15), 21.5, 5);
  std::vector<Mark> marks;
  compose_dome(scene.context(), DomeFacing::pole, dome_area, marks);
  EXPECT_THAT(texts_of(marks),
              testing::IsSupersetOf({"Southern Cross", "the Pointers", "Rigil Kentaurus"}));
}

TEST(ChartKey, ListsWhatIsDrawn) {
  Scene scene(70, 19, make_date(2027, 6, 15), 22, 5);
  const BlockOptions corner{{{"corner", "top-left"}}};
  std::vector<Mark> dark, bright;
  draw_chart_key(scene.context(), corner, {12, 30, 60, 40}, dark);
  scene.evening().shift = EveningShift::no_stars;
  draw_chart_key(scene.context(), corner, {12, 30, 60, 40}, bright);
  const std::string figure = scene.words("key.figure"), sun = scene.words("dome.way-of-sun");
  EXPECT_THAT(texts_of(dark), testing::Contains(figure));
  EXPECT_THAT(texts_of(dark), testing::Not(testing::Contains(sun)));
  EXPECT_THAT(texts_of(bright), testing::Contains(sun));
  EXPECT_THAT(texts_of(bright), testing::Not(testing::Contains(figure)));
}

TEST(Domes, WithoutStarsShowTheSunsWayAndTheDateOfReturn) {
  Scene scene(70, 19, make_date(2027, 6, 15), 22, -4);
  scene.evening().shift = EveningShift::no_stars;
  std::vector<Mark> south, north;
  compose_dome(scene.context(), DomeFacing::equator, dome_area, south);
  compose_dome(scene.context(), DomeFacing::pole, dome_area, north);
  EXPECT_THAT(texts_of(south), testing::Contains(testing::HasSubstr("3\u00A0August")));
  EXPECT_THAT(texts_of(south), testing::Contains("12:00"));
  EXPECT_THAT(texts_of(north), testing::Contains("Sun"));  // the midnight Sun stands in the north
}

TEST(Domes, AreTheSameEveryTime) {
  Scene scene(0, 37, make_date(2027, 6, 15), 18, 5);
  std::vector<Mark> one, two;
  const DomeDrawing a = compose_dome(scene.context(), DomeFacing::pole, dome_area, one);
  const DomeDrawing b = compose_dome(scene.context(), DomeFacing::pole, dome_area, two);
  ASSERT_EQ(a.label_boxes.size(), b.label_boxes.size());
  for (std::size_t i = 0; i < a.label_boxes.size(); ++i) {
    EXPECT_EQ(a.label_boxes[i].x, b.label_boxes[i].x);
    EXPECT_EQ(a.label_boxes[i].y, b.label_boxes[i].y);
  }
  EXPECT_EQ(texts_of(one), texts_of(two));
}

TEST(Charts, CountWhatFoundNoRoom) {
  Scene scene(54, 0, make_date(2027, 3, 15), 21.5, 5);
  std::vector<Mark> marks;
  compose_dome(scene.context(), DomeFacing::equator, {0, 0, 80, 48}, marks);
  EXPECT_GT(scene.tally.labels_left_out, 10);
}

TEST(StarDots, GrowWithBrightness) {
  EXPECT_GT(star_dot_mm(5.0), 0.3);    // the faintest survive a copier
  EXPECT_LT(star_dot_mm(-1.46), 3.0);  // Sirius hides no neighbour
  for (double m = -1.4; m < 6; m += 0.2) EXPECT_GT(star_dot_mm(m), star_dot_mm(m + 0.2));
}

TEST(ChartStars, LeaveOutWhatTheCatalogueListsAtItsOutburst) {
  const int t_crb = star_index(5958);
  ASSERT_GE(t_crb, 0);
  for (const ChartStar& star : chart_stars()) EXPECT_NE(star.index, t_crb);
}

class RibbonAt : public testing::TestWithParam<double> {};

TEST_P(RibbonAt, IsLightWhereTheSkyIsUp) {
  const Angle latitude = Angle::from_degrees(GetParam());
  const RibbonView view({0, 0, 180, 40}, Angle::from_hours(7), latitude);
  const auto regions = view.above_horizon();
  std::mt19937 random(5);
  std::uniform_real_distribution<double> part(-1, 1);
  int up_count = 0;
  for (int i = 0; i < 4000; ++i) {
    const Angle h = Angle::from_degrees(179 * part(random)),
                d = Angle::from_degrees(39 * part(random));
    const double altitude = horizontal_of(h, d, latitude).altitude.degrees();
    if (std::abs(altitude) < 0.3)
      continue;  // the outline is drawn in steps of 2 degrees of azimuth
    const Point p = view.at(h, d);
    bool inside = false;
    for (const auto& outline : regions)
      for (std::size_t a = 0, b = outline.size() - 1; a < outline.size(); b = a++)
        if ((outline[a].y > p.y) != (outline[b].y > p.y) &&
            p.x < (outline[b].x - outline[a].x) * (p.y - outline[a].y) /
                          (outline[b].y - outline[a].y) +
                      outline[a].x)
          inside = !inside;
    EXPECT_EQ(inside, altitude > 0)
        << "hour angle " << h.degrees() << ", declination " << d.degrees();
    up_count += altitude > 0;
  }
  EXPECT_GT(up_count, 1000);
}

INSTANTIATE_TEST_SUITE_P(Latitudes, RibbonAt,
                         testing::Values(90.0, 70.0, 54.0, 30.0, 2.0, 0.0, -2.0, -30.0, -43.0,
                                         -80.0));

TEST(Ribbon, IsTurnedAsTheReaderSeesTheSky) {
  const Box band{0, 0, 180, 40};
  const RibbonView north(band, Angle::from_hours(7), Angle::from_degrees(54)),
      south(band, Angle::from_hours(7), Angle::from_degrees(-43));
  const Angle east = north.hour_angle(Angle::from_hours(9));  // rises later: east of the meridian
  EXPECT_LT(north.at(east, Angle()).x, 90);
  EXPECT_GT(south.at(east, Angle()).x, 90);
  const Angle up = Angle::from_degrees(20);
  EXPECT_LT(north.at(Angle(), up).y, 20);
  EXPECT_GT(south.at(Angle(), up).y, 20);
  EXPECT_NEAR(north.at(north.hour_angle(Angle::from_hours(7)), Angle()).x, 90, 1e-9);
}

TEST(Ribbon, HasTheMonthInItsMiddle) {
  Scene scene(54, 0, make_date(2027, 3, 15), 21.5, 5);
  std::vector<Mark> marks;
  draw_ribbon(scene.context(), {}, {12, 240, 186, 44}, marks);
  const Text* march = nullptr;
  for (const Mark& mark : marks)
    if (const Text* text = std::get_if<Text>(&mark))
      if (text->words == "Mar") march = text;
  ASSERT_NE(march, nullptr);
  const double width = scene.type.width("Mar", march->face, march->size_pt);
  EXPECT_NEAR(march->start.x + width / 2, 105, 0.01);
  EXPECT_EQ(march->face, Face::bold);
}

TEST(HorizonFrame, GoesThereAndBack) {
  std::mt19937 random(3);
  std::uniform_real_distribution<double> part(-1, 1);
  for (int i = 0; i < 200; ++i) {
    const Angle h = Angle::from_degrees(179 * part(random)),
                d = Angle::from_degrees(88 * part(random)),
                latitude = Angle::from_degrees(89 * part(random));
    const auto [back_h, back_d] = equatorial_of(horizontal_of(h, d, latitude), latitude);
    EXPECT_NEAR((back_h - h).centred().degrees(), 0, 1e-7);
    EXPECT_NEAR((back_d - d).degrees(), 0, 1e-7);
  }
}

}  // namespace
}  // namespace duskleaf
