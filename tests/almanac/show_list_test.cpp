// What there is to show, by the project's own rule (almanac/show_list.cpp). Bounds are common
// practice among observers where nothing else is said.
#include <gtest/gtest.h>

#include "show_list_site.hpp"

namespace duskleaf {
namespace {

TEST(ShowList, OpeningThatObserversKnow) {
  struct Row {
    const char* code;
    double limit, least, most;  // mm
  };
  for (const Row& r : {
           Row{"M31", 6.5, 0, 0},         // a bare-eye sight in the country ...
           Row{"M31", 5.5, 0, 0},         //
           Row{"M31", 4.0, 50, 80},       // ... and one for binoculars in town
           Row{"M33", 6.5, 0, 50},        //
           Row{"M45", 4.0, 0, 0},         //
           Row{"M44", 6.0, 0, 0},         //
           Row{"M44", 4.0, 50, 50},       //
           Row{"M42", 5.5, 0, 0},         //
           Row{"M42", 4.0, 50, 50},       //
           Row{"M13", 6.5, 50, 50},       //
           Row{"M13", 5.0, 50, 50},       //
           Row{"M57", 5.0, 80, 100},      // not told from a star in binoculars
           Row{"M27", 5.5, 50, 80},       //
           Row{"M51", 5.0, 80, 150},      //
           Row{"NGC 5139", 5.5, 0, 0},    //
           Row{"NGC 4755", 5.5, 50, 50},  // one star to the bare eye
           Row{"LMC", 6.0, 0, 0},         //
           Row{"β Cyg", 5.0, 50, 50},     // steadily held binoculars
           Row{"γ And", 5.0, 50, 80},     //
           Row{"ε Boo", 5.0, 80, 150},    // hard for its distance: unequal
           Row{"α Sco", 5.0, 100, 200},   //
           Row{"β Ori", 5.0, 80, 150},    //
           Row{"α UMi", 5.0, 60, 100},    //
           Row{"α Cap", 5.5, 0, 0},       // two stars to the bare eye
           Row{"ε Lyr", 5.5, 50, 50},     // for sharp eyes alone without binoculars
           Row{"α Cen", 5.0, 50, 80},
       }) {
    const auto opening = least_opening_mm(object(r.code), r.limit);
    ASSERT_TRUE(opening) << r.code << " under " << r.limit;
    EXPECT_GE(*opening, r.least) << r.code << " under " << r.limit;
    EXPECT_LE(*opening, r.most) << r.code << " under " << r.limit;
  }
}

// What observers call bare-eye objects under a dark sky (common practice), and nothing else.
TEST(ShowList, BareEyeIsForBareEyeObjects) {
  const std::set<std::string_view> known = {
      "M45",     "Mel 25",   "M44",      "NGC 869",  "M6",      "M7",       "M41",      "Mel 20",
      "Mel 111", "NGC 2451", "NGC 2516", "IC 2391",  "IC 2602", "NGC 3532", "NGC 6231", "NGC 104",
      "M42",     "NGC 5139", "M8",       "NGC 3372", "M31",     "NGC 292",  "LMC",      "M24"};
  std::set<std::string_view> found;
  for (const ShowObject& o : show_objects()) {
    if (o.sort == ShowClass::double_star || least_opening_mm(o, 6.0) != 0.0) continue;
    EXPECT_TRUE(known.contains(o.code)) << o.code;
    found.insert(o.code);
  }
  for (const char* code : {"M45", "Mel 25", "M44", "NGC 869", "M7", "M42", "NGC 5139", "NGC 104",
                           "NGC 3372", "M31", "LMC", "NGC 292", "IC 2602", "Mel 20"})
    EXPECT_TRUE(found.contains(code)) << code;
  for (const char* code : {"M11", "NGC 5128", "NGC 253", "M57"})
    EXPECT_GE(least_opening_mm(object(code), 6.0).value_or(0), 50.0) << code;
}

// Under a Moon nearly full and high no galaxy is offered, bright nebulae and clusters are (common
// practice); the same hour a fortnight before or after, without the Moon, offers galaxies.
// Helix is a faint glow half as wide as the Moon: it once stood on a sheet for a full-Moon night.
TEST(ShowList, MoonlightTakesGalaxiesAndFaintNebulae) {
  const ShowSite site(-0.4, 37, "Africa/Nairobi", 6.0);
  int moonlit = 0, others = 0, dark_galaxies = 0, helix = 0;
  for (const Night& night : site.year.nights) {
    const Ut t = site.year.place.zone.instant(night.date, std::chrono::hours(22));
    const SkyLight light = sky_light(site.sky, 6.0, t);
    const bool bright = light.moon_lit > 0.94 && light.moon.altitude.degrees() > 35;
    const bool dark = light.moon.altitude.degrees() < -1;
    if (!bright && !dark) continue;
    moonlit += bright;
    for (const ShowItem& item : site.at(t)) {
      if (item.body) continue;
      const ShowObject& o = show_objects()[static_cast<std::size_t>(item.object)];
      if (o.sort != ShowClass::galaxy) {
        EXPECT_FALSE(bright && o.code == "NGC 7293") << iso_date(night.date);
        helix += o.code == "NGC 7293";
        others += bright;
        continue;
      }
      dark_galaxies += dark;
      EXPECT_FALSE(bright) << o.code << " " << iso_date(night.date);
    }
  }
  EXPECT_GT(moonlit, 20);
  EXPECT_GT(others, 300);
  EXPECT_GT(dark_galaxies, 300);
  EXPECT_GT(helix, 10);
}

// What never sets has no last chance: its lower culmination is above the horizon.
TEST(ShowList, NoLastChanceOfWhatNeverSets) {
  int last = 0, spared = 0;
  for (const auto& [latitude, zone] :
       {std::pair{41.3, "America/New_York"}, {-43.4, "Pacific/Auckland"}}) {
    const ShowSite site(latitude, 10, zone, 6.0);
    for (int month = 1; month <= 12; ++month)
      for (const int hour : {20, 22, 24, 28})
        for (const ShowItem& item : site.at(site.evening(month, 6, hour))) {
          if (item.body) continue;
          const ShowObject& o = show_objects()[static_cast<std::size_t>(item.object)];
          const double declination = std::asin(o.direction.z()) * 180 / std::numbers::pi;
          const bool never_sets = std::abs(latitude + declination) > 91.0;
          spared += never_sets;
          if (item.standing != Standing::last_chance) continue;
          ++last;
          EXPECT_FALSE(never_sets) << o.code << " " << month << " at " << latitude;
        }
  }
  EXPECT_GT(last, 100);
  EXPECT_GT(spared, 100);
}

TEST(ShowList, FaintGalaxiesDrownInABrightSky) {
  for (const char* code : {"M33", "M101", "NGC 4565", "LMC", "NGC 7000"})
    EXPECT_FALSE(least_opening_mm(object(code), 4.0)) << code;
  int dark = 0, bright = 0;
  for (const ShowObject& o : show_objects()) {
    dark += least_opening_mm(o, 6.0).has_value();
    bright += least_opening_mm(o, 3.0).has_value();
  }
  EXPECT_EQ(dark, static_cast<int>(show_objects().size()));
  EXPECT_LT(bright, dark - 15);
}

// Dawes (1867): 116"/D parts two stars alike, so no opening smaller than that may be given.
TEST(ShowList, NoDoubleBelowDawes) {
  int doubles = 0;
  for (const ShowObject& o : show_objects()) {
    if (o.sort != ShowClass::double_star) continue;
    const auto opening = least_opening_mm(o, 5.5);
    ASSERT_TRUE(opening) << o.code;
    ++doubles;
    if (*opening > 0) {
      EXPECT_GE(*opening * o.size.arcseconds(), 116.0) << o.code;
    } else {
      EXPECT_GE(o.size.arcminutes(), 4.0) << o.code;
    }
  }
  EXPECT_GT(doubles, 40);
}

TEST(ShowList, ABrighterSkyNeverAsksForLess) {
  for (const ShowObject& o : show_objects()) {
    double before = 1e9;
    for (double limit = 2.0; limit <= 7.0; limit += 0.25) {
      const double opening = least_opening_mm(o, limit).value_or(1e6);
      EXPECT_LE(opening, before) << o.code << " " << limit;
      before = opening;
    }
    EXPECT_LE(before, 300.0) << o.code;
  }
}

TEST(ShowList, OmegaCentauriNeverFromSixtyNorth) {
  const ShowSite north(60, 25, "Europe/Helsinki", 6.0),
      south(-34, 18.5, "Africa/Johannesburg", 6.0);
  int from_south = 0;
  for (const Night& night : north.year.nights) {
    const auto list = north.at(night.darkest);
    EXPECT_FALSE(find(list, "NGC 5139")) << iso_date(night.date);
    EXPECT_FALSE(find(list, "α Cru")) << iso_date(night.date);
  }
  for (const Night& night : south.year.nights) {
    const auto list = south.at(night.darkest);
    from_south += find(list, "NGC 5139") != nullptr;
    EXPECT_FALSE(find(list, "M81")) << iso_date(night.date);
    EXPECT_FALSE(find(list, "α UMi")) << iso_date(night.date);
  }
  EXPECT_GT(from_south, 100);
}

TEST(ShowList, SeasonsOfTheNorth) {
  const ShowSite site(50, 10, "Europe/Berlin", 6.0);
  struct Row {
    const char* code;
    int month, day, hour;
    std::optional<Standing> standing;
  };
  for (const Row& r :
       {Row{"M42", 1, 8, 22, Standing::at_its_best}, Row{"M42", 4, 2, 21, Standing::last_chance},
        Row{"M42", 7, 2, 23, std::nullopt}, Row{"M13", 5, 5, 22, Standing::rising},
        Row{"M13", 7, 5, 23, Standing::at_its_best}, Row{"M13", 11, 1, 20, Standing::last_chance},
        Row{"M31", 8, 3, 23, Standing::rising}, Row{"M31", 11, 1, 21, Standing::at_its_best},
        Row{"β Cyg", 8, 30, 22, Standing::at_its_best}, Row{"M44", 3, 6, 21, Standing::at_its_best},
        Row{"M44", 10, 1, 21, std::nullopt}}) {
    const auto list = site.at(site.evening(r.month, r.day, r.hour));
    ASSERT_FALSE(list.empty());
    const ShowItem* item = find(list, r.code);
    ASSERT_EQ(item != nullptr, r.standing.has_value()) << r.code << " " << r.month;
    if (item != nullptr) {
      EXPECT_EQ(item->standing, *r.standing) << r.code << " " << r.month;
    }
  }
}

// Over a year at four sites: heights, halves of the sky, order and what may stand under twilight.
TEST(ShowList, EveryItemKeepsTheRules) {
  int items = 0, twilight = 0;
  for (const auto& [latitude, zone] : {std::pair{52.0, "Europe/Berlin"},
                                       {-34.0, "Africa/Johannesburg"},
                                       {69.6, "Europe/Oslo"},
                                       {-1.3, "Africa/Nairobi"}}) {
    const ShowSite site(latitude, 15, zone, 5.5);
    for (std::size_t i = 0; i < site.year.nights.size(); i += 3) {
      const Night& night = site.year.nights[i];
      for (const double part : {0.3, 0.5}) {
        const Ut t = night.from + part * (night.to - night.from);
        const SkyLight light = sky_light(site.sky, 5.5, t);
        const auto list = site.at(t);
        for (std::size_t k = 0; k < list.size(); ++k) {
          const ShowItem& item = list[k];
          SCOPED_TRACE(iso_date(night.date));
          ++items;
          EXPECT_LT(light.sun_altitude.degrees(), -50.0 / 60.0);
          if (k > 0) {
            EXPECT_GE(item.standing, list[k - 1].standing);
            if (item.standing == list[k - 1].standing) {
              EXPECT_LE(item.worth, list[k - 1].worth);
            }
          }
          const double altitude = item.place.altitude.degrees();
          const double azimuth = item.place.azimuth.degrees();
          if (item.body == Body::moon) {
            EXPECT_GE(altitude, 5.0);
            EXPECT_GT(light.moon.altitude.degrees(), 4.5);
            EXPECT_GT(light.moon_lit, 0.01);
            continue;
          }
          if (item.standing == Standing::rising) {
            EXPECT_LT(azimuth, 180.0 + 1e-6);
          }
          if (item.standing == Standing::last_chance) {
            EXPECT_GT(azimuth, 180.0 - 1e-6);
          }
          if (item.body) {
            EXPECT_GE(altitude, item.opening_mm > 0 ? 10.0 : 5.0);
            EXPECT_LE(light.sun_altitude.degrees(), -4.0);
            continue;
          }
          EXPECT_GE(altitude, 15.0);
          EXPECT_LT(light.sun_altitude.degrees(), -6.0);
          twilight += light.sun_altitude.degrees() > -9.0;
          EXPECT_LE(item.opening_mm, 300.0);
          // Not fainter than what the opening reaches: 12 magnitudes are out of all of these.
          const ShowObject& o = show_objects()[static_cast<std::size_t>(item.object)];
          EXPECT_LE(o.magnitude, light.faintest_star + 5 * std::log10(300.0 / 7.0));
        }
      }
    }
  }
  EXPECT_GT(items, 10000);
  EXPECT_GT(twilight, 50);
}

}  // namespace
}  // namespace duskleaf
