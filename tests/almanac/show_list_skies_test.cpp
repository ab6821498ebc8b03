// What a sky leaves to show: Moon, planets, skyline, twilight, variety. Openings and standings:
// show_list_test.cpp.
#include <gtest/gtest.h>

#include "show_list_site.hpp"

namespace duskleaf {
namespace {

TEST(ShowList, TheMoonWheneverItIsUp) {
  const ShowSite site(40.4, -3.7, "Europe/Madrid", 5.0);
  const Observer& o = site.year.place.observer;
  int shown = 0, down = 0, full = 0;
  for (const Night& night : site.year.nights) {
    const Ut t = site.year.place.zone.instant(night.date, std::chrono::hours(22));
    const double altitude =
        topocentric_horizontal(site.sky.ephemeris(), Body::moon, o.latitude, o.longitude, 0, t)
            .altitude.degrees();
    const bool listed = find(site.at(t), Body::moon) != nullptr;
    if (altitude < 4.5) {
      ++down;
      EXPECT_FALSE(listed) << iso_date(night.date);
    } else if (altitude > 6 && night.moon_lit > 0.03) {
      ++shown;
      full += night.moon_lit > 0.97;
      EXPECT_TRUE(listed) << iso_date(night.date);
    }
  }
  EXPECT_GT(shown, 80);
  EXPECT_GT(down, 120);
  EXPECT_GT(full, 20);
}

// 69.6 N: no night in June, nothing to show; at 60 N what shines through the twilight.
TEST(ShowList, FarNorthInSummer) {
  const ShowSite tromso(69.6, 18.9, "Europe/Oslo", 6.0), helsinki(60.2, 25, "Europe/Helsinki", 6.0);
  for (int day = 1; day <= 30; ++day)
    EXPECT_TRUE(tromso.at(night_of(tromso.year, 2027, 6, day).darkest).empty()) << day;
  int items = 0;
  for (int day = 10; day <= 30; ++day)
    for (const ShowItem& item : helsinki.at(night_of(helsinki.year, 2027, 6, day).darkest)) {
      if (item.body) continue;
      ++items;
      const ShowObject& o = show_objects()[static_cast<std::size_t>(item.object)];
      EXPECT_NE(o.sort, ShowClass::galaxy) << o.code;
      EXPECT_TRUE(o.sort != ShowClass::double_star || o.second_magnitude < 9.0) << o.code;
    }
  EXPECT_GT(items, 100);
}

TEST(ShowList, PlanetsAreThereWhenTheyShine) {
  const ShowSite site(52, 13, "Europe/Berlin", 5.0);
  // February 2027: Jupiter and Mars near opposition in Leo (from memory); Saturn sets early.
  const auto list = site.at(site.evening(2, 12, 23));
  const ShowItem* jupiter = find(list, Body::jupiter);
  ASSERT_TRUE(jupiter);
  EXPECT_EQ(jupiter->opening_mm, 0.0);
  EXPECT_EQ(jupiter->standing, Standing::at_its_best);
  EXPECT_FALSE(find(list, Body::saturn));
  // Neptune never without optics, and only in the dark.
  int neptune = 0;
  for (const Night& night : site.year.nights)
    for (const double part : {0.3, 0.35, 0.45}) {
      const Ut t = night.from + part * (night.to - night.from);
      const auto shown = site.at(t);
      if (const ShowItem* item = find(shown, Body::neptune)) {
        ++neptune;
        EXPECT_GE(item->opening_mm, 50.0);
        EXPECT_LT(site.sky.altitude(Body::sun, t).degrees(), -12.0);
      }
    }
  EXPECT_GT(neptune, 50);
}

// A bright planet that stands in the west but does not go is no less a sight.
TEST(ShowList, BareEyePlanetsAreNeverPassedOver) {
  const ShowSite site(-0.4, 37, "Africa/Nairobi", 6.0);
  int seen = 0, low = 0;
  for (const Night& night : site.year.nights) {
    const Ut t = site.year.place.zone.instant(night.date, std::chrono::minutes(19 * 60 + 40));
    const SkyLight light = sky_light(site.sky, 6.0, t);
    const auto list = site.at(t);
    for (const Body planet : {Body::venus, Body::mars, Body::jupiter, Body::saturn}) {
      const Angle altitude = apparent_place(site.sky, planet, t).altitude;
      const double magnitude =
          planet_magnitude(planet, planet_aspect(site.sky.ephemeris(), planet, to_tt(t)));
      if (!bare_eye_visible(planet, magnitude, altitude, light.faintest_star)) continue;
      ++seen;
      low += altitude.degrees() < 10;
      const ShowItem* item = find(list, planet);
      ASSERT_TRUE(item) << body_name(planet) << " " << iso_date(night.date);
      EXPECT_EQ(item->opening_mm, 0.0);
    }
  }
  EXPECT_GT(seen, 300);
  EXPECT_GT(low, 10);
}

// A wall 40 degrees high from south to north through west takes away just what is behind it.
TEST(ShowList, NothingBehindTheSkyline) {
  const ShowSite open(52, 13, "Europe/Berlin", 5.5);
  ShowSite walled(52, 13, "Europe/Berlin", 5.5);
  const auto point = [](double azimuth, double altitude) {
    return SkylinePoint{Angle::from_degrees(azimuth), Angle::from_degrees(altitude)};
  };
  walled.year.place.skyline = {point(0, 0), point(179.9, 0), point(180, 40), point(359.9, 40)};
  int gone = 0, kept = 0;
  for (int month = 1; month <= 12; ++month) {
    const Ut t = open.evening(month, 6, 22);
    const auto all = open.at(t), seen = walled.at(t);
    std::size_t expected = 0;
    for (const ShowItem& item : all) {
      const bool behind =
          item.place.azimuth.degrees() > 180.0 && item.place.altitude.degrees() < 40.0;
      ++(behind ? gone : kept);
      expected += !behind;
    }
    EXPECT_EQ(seen.size(), expected) << month;
    for (const ShowItem& item : seen)
      EXPECT_TRUE(item.place.azimuth.degrees() < 180.0 || item.place.altitude.degrees() > 40.0);
  }
  EXPECT_GT(gone, 50);
  EXPECT_GT(kept, 200);
}

// Twenty degrees up M31 asks for more than overhead.
TEST(ShowList, LowDownItTakesMore) {
  const ShowSite site(45, 10, "Europe/Rome", 5.0);
  const auto high = site.at(site.evening(11, 2, 21)), low = site.at(site.evening(7, 2, 24));
  const ShowItem *overhead = find(high, "M31"), *rising = find(low, "M31");
  ASSERT_TRUE(overhead && rising);
  EXPECT_GT(overhead->place.altitude.degrees(), 70);
  EXPECT_LT(rising->place.altitude.degrees(), 30);
  EXPECT_EQ(overhead->opening_mm, 0);
  EXPECT_EQ(rising->opening_mm, 50);
}

// A session that ended in bright twilight was once offered galaxies.
TEST(ShowList, GlowsWaitForTheDark) {
  const ShowSite site(69.6, 19.4, "Europe/Oslo", 5.8);
  int bright = 0, doubles = 0, glows = 0;
  for (const Night& night : site.year.nights)
    for (const int hour : {20, 22}) {
      const Ut t = site.year.place.zone.instant(night.date, std::chrono::hours(hour));
      const double sun = site.sky.altitude(Body::sun, t).degrees();
      for (const ShowItem& item : site.at(t)) {
        if (item.body) continue;
        const ShowObject& o = show_objects()[static_cast<std::size_t>(item.object)];
        doubles += sun > -10 && o.sort == ShowClass::double_star;
        glows += o.sort == ShowClass::galaxy;
        if (o.sort == ShowClass::double_star) continue;
        bright += sun > -10;
        if (o.sort == ShowClass::galaxy) {
          EXPECT_LT(sun, -13) << iso_date(night.date);
        }
      }
    }
  EXPECT_EQ(bright, 0);
  EXPECT_GT(doubles, 20);
  EXPECT_GT(glows, 100);
}

// The first few of a list are of several kinds.
TEST(ShowList, NotTenOpenClusters) {
  int lists = 0;
  for (const auto& [latitude, zone] :
       {std::pair{52.0, "Europe/Berlin"}, {-34.0, "Africa/Johannesburg"}}) {
    const ShowSite site(latitude, 15, zone, 5.5);
    for (int month = 1; month <= 12; ++month) {
      const Ut t = site.evening(month, 5, 22);
      if (site.sky.altitude(Body::sun, t) > nautical_altitude) continue;  // doubles alone
      const auto list = site.at(t);
      std::map<int, int> kinds;
      int taken = 0;
      for (const ShowItem& item : list)
        if (!item.body && item.standing == Standing::at_its_best && taken < 8) {
          ++taken;
          ++kinds[static_cast<int>(show_objects()[static_cast<std::size_t>(item.object)].sort)];
        }
      if (taken < 8) continue;
      ++lists;
      EXPECT_GE(kinds.size(), 3u) << latitude << " month " << month;
      for (const auto& [kind, count] : kinds) EXPECT_LE(count, 4) << latitude << " " << month;
    }
  }
  EXPECT_GE(lists, 18);
}

}  // namespace
}  // namespace duskleaf
