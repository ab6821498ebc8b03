// Showers' nights: the formula by hand and by brute force, published Full and New Moons
// (reference/moon_phases.csv) and the Moon's part as a calendar saw it for 2025.
#include "almanac/shower_nights.hpp"

#include <cmath>
#include <fstream>
#include <gtest/gtest.h>
#include <set>
#include <sstream>
#include <string>

#include "almanac/nights.hpp"
#include "almanac/planets.hpp"
#include "almanac/shower_watch.hpp"
#include "base/csv.hpp"

namespace duskleaf {
namespace {

/// The header's formula once more, from what the row says and the sky at a moment.
double expected(const Watch& watch, const SiteShower& row, Ut t, bool dark) {
  const Shower& s = shower_of(row);
  const SkyLight light = sky_light(watch.sky, watch.year.place.limiting_magnitude, t);
  const Horizontal radiant =
      to_horizontal(watch.sky.ephemeris().icrs_to_date(to_tt(t)) * s.direction(),
                    watch.sky.local_sidereal_time(t), watch.sky.observer().latitude);
  if (light.sun_altitude.degrees() >= -6 || radiant.altitude.degrees() <= 0) return 0.0;
  const double degrees = (t - row.peak).count() * 0.98565;
  const double activity = std::pow(10.0, degrees < 0 ? s.rise * degrees : -s.fall * degrees);
  return s.zhr.value_or(0.0) * activity * sin(radiant.altitude) *
         (dark ? 1.0 : std::pow(s.population_index, light.faintest_star - 6.5));
}

TEST(ShowerNights, OneRowForEachPeakInOrder) {
  const Watch watch(dark_place(45, 10, "UTC"), 2027);
  ASSERT_EQ(watch.rows.size(), watch.peaks.size());
  for (std::size_t i = 0; i < watch.rows.size(); ++i) {
    EXPECT_EQ(watch.rows[i].shower, watch.peaks[i].shower);
    EXPECT_EQ(watch.rows[i].peak, watch.peaks[i].at);
  }
}

// 150 an hour overhead at the peak under a limit of 6.5; a magnitude less leaves one in 2.6. New
// Moon on 2020 December 14 at 16:17 UT (USNO).
TEST(ShowerNights, GeminidsOverheadByHand) {
  const Watch zero(dark_place(33, 0, "UTC"), 2020);
  const Ut peak = zero.row("GEM").peak;
  // The longitude at which the radiant (right ascension 112 degrees) is highest then.
  const Angle longitude =
      (Angle::from_degrees(112.3) - zero.sky.local_sidereal_time(peak)).centred();
  for (const auto& [limit, wanted] : {std::pair{6.5, 150.0}, {5.5, 150.0 / 2.6}, {4.5, 22.19}}) {
    const Watch watch(dark_place(33, longitude.degrees(), "UTC", limit), 2020);
    const SiteShower& row = watch.row("GEM");
    ASSERT_TRUE(row.best) << limit;
    EXPECT_NEAR(Seconds(*row.best - peak).count(), 0, 900) << limit;
    EXPECT_NEAR(row.radiant.altitude.degrees(), 89.5, 1.5) << limit;
    EXPECT_NEAR(row.expected_per_hour, wanted, 0.01 * wanted) << limit;
    EXPECT_NEAR(row.expected_dark, 150.0, 1.5) << limit;
    EXPECT_EQ(row.verdict, Verdict::good) << limit;
    EXPECT_EQ(row.spoiler, Spoiler::none) << limit;
  }
}

// At 30 degrees a radiant gives half, and a day from the peak with B = 0.35 a further 0.452
// (10^(-0.35 x 0.98565)): hand numbers.
TEST(ShowerNights, AltitudeAndDayFromThePeakByHand) {
  const Watch watch(dark_place(45, 10, "UTC", 6.5), 2026);
  const SiteShower& row = watch.row("PER");
  ASSERT_TRUE(row.best);
  // The same night for a peak a day earlier and later than the best moment.
  for (const double day : {-0.4, 0.4}) {
    const SiteShower moved = watch.at("PER", *row.best - Days(day));
    ASSERT_TRUE(moved.best) << day;
    const double from_peak = std::abs((*moved.best - moved.peak).count());
    EXPECT_NEAR(moved.expected_dark,
                100 * std::pow(10, -0.35 * 0.98565 * from_peak) * sin(moved.radiant.altitude), 0.01)
        << day;
  }
  EXPECT_NEAR(std::pow(10, -0.35 * 0.98565), 0.452, 0.001);
}

TEST(ShowerNights, NothingBetterWithinHalfADayOfThePeak) {
  for (const auto& [latitude, longitude, zone] : {std::tuple{52.0, 13.0, "Europe/Berlin"},
                                                  {-34.0, 151.0, "Australia/Sydney"},
                                                  {1.0, -78.0, "America/Guayaquil"},
                                                  {69.6, 19.0, "Europe/Oslo"}}) {
    const Watch watch(dark_place(latitude, longitude, zone), 2027);
    for (const SiteShower& row : watch.rows) {
      const std::string label = std::string(shower_of(row).code) + " " + zone;
      double greatest = 0.0;
      for (int minutes = -720; minutes <= 720; minutes += 10)
        greatest =
            std::max(greatest, expected(watch, row, row.peak + Days(minutes / 1440.0), false));
      EXPECT_GE(row.expected_per_hour, 0.98 * greatest - 1e-9) << label;
      if (!row.best) continue;
      EXPECT_NEAR(row.expected_per_hour, expected(watch, row, *row.best, false),
                  0.002 * row.expected_per_hour + 1e-9)
          << label;
      EXPECT_NEAR(row.expected_dark, expected(watch, row, *row.best, true),
                  0.002 * row.expected_dark + 1e-9)
          << label;
      EXPECT_LE(row.expected_per_hour, row.expected_dark * (1 + 1e-9)) << label;
    }
  }
}

TEST(ShowerNights, BestHoursAreThoseOfHalfTheBestRateOrMore) {
  const Watch watch(dark_place(52, 13, "Europe/Berlin"), 2027);
  int checked = 0;
  for (const SiteShower& row : watch.rows) {
    if (!row.best || !shower_of(row).zhr) continue;
    const std::string label(shower_of(row).code);
    ASSERT_TRUE(row.best_from && row.best_to) << label;
    EXPECT_LE(*row.best_from, *row.best) << label;
    EXPECT_GE(*row.best_to, *row.best) << label;
    const double half = 0.5 * row.expected_per_hour;
    for (int i = 0; i <= 8; ++i) {
      const Ut t = *row.best_from + (*row.best_to - *row.best_from) * (i / 8.0);
      EXPECT_GE(expected(watch, row, t, false), 0.97 * half) << label << " " << i;
    }
    const Ut before = *row.best_from - Days(3.0 / 1440), after = *row.best_to + Days(3.0 / 1440);
    const bool from_moonset = !row.moon_up && watch.sky.moon_up(before),
               to_moonrise = !row.moon_up && watch.sky.moon_up(after);
    if (!from_moonset) {
      EXPECT_LT(expected(watch, row, before, false), 1.03 * half) << label;
    }
    if (!to_moonrise) {
      EXPECT_LT(expected(watch, row, after, false), 1.03 * half) << label;
    }
    const TimeSpan night = night_span(watch.year.place.zone, row.night);
    EXPECT_GE(*row.best_from, night.from) << label;
    EXPECT_LE(*row.best_to, night.to) << label;
    ++checked;
  }
  EXPECT_GE(checked, 25);
}

// Declination 58 N: at 60 S the radiant passes 28 degrees below the horizon at its highest.
TEST(ShowerNights, PerseidsCannotBeSeenFromTheFarSouth) {
  for (const int year : {2025, 2026, 2027, 2028}) {
    const Watch watch(dark_place(-60, -45, "UTC"), year);
    const SiteShower& row = watch.row("PER");
    EXPECT_EQ(row.verdict, Verdict::not_seen) << year;
    EXPECT_EQ(row.spoiler, Spoiler::radiant_down) << year;
    EXPECT_FALSE(row.best || row.best_from || row.best_to) << year;
    EXPECT_EQ(row.expected_per_hour, 0.0) << year;
    EXPECT_NEAR(row.radiant_highest.degrees(), -28, 1.0) << year;
  }
}

TEST(ShowerNights, SouthernRadiantsBelongToTheSouth) {
  const Watch south(dark_place(-34, 151, "Australia/Sydney"), 2027);
  const Watch north(dark_place(52, 13, "Europe/Berlin"), 2027);
  for (const char* code : {"ACE", "GNO", "PPU", "PUP"}) {
    EXPECT_EQ(north.row(code).verdict, Verdict::not_seen) << code;
    EXPECT_NE(south.row(code).verdict, Verdict::not_seen) << code;
    EXPECT_GT(south.row(code).radiant_highest.degrees(), 60) << code;
  }
  EXPECT_GT(south.row("ETA").expected_dark, 3 * north.row("ETA").expected_dark);
  EXPECT_EQ(south.row("URS").verdict, Verdict::not_seen);
  EXPECT_EQ(south.row("URS").spoiler, Spoiler::radiant_down);
}

TEST(ShowerNights, FullMoonsSpoilAndNewMoonsDoNot) {
  std::ifstream file(std::string(DUSKLEAF_REFERENCE) + "/moon_phases.csv", std::ios::binary);
  std::ostringstream stream;
  stream << file.rdbuf();
  const std::string text = stream.str();
  const CsvTable table(text);
  std::set<int> seen;
  // Enough of them for the Moon to decide, and high at this site.
  const std::set<std::string> strong = {"PER", "GEM", "QUA", "LYR", "ORI", "SDA", "HYD"};
  int full = 0, fresh = 0;
  for (const int year : {2000, 2010, 2020, 2030, 2040, 2050}) {
    const Watch watch(dark_place(45, 10, "Europe/Rome"), year);
    for (std::size_t r = 0; r < table.rows(); ++r) {
      const std::string_view instant = table.cell(r, table.column("instant"));
      if (table.cell(r, table.column("source_id")) != "USNO" ||
          instant.substr(0, 4) != std::to_string(year))
        continue;
      const auto part = [&](std::size_t at, std::size_t n) {
        return static_cast<int>(parse_number(instant.substr(at, n)));
      };
      const Ut phase = ut_midnight(make_date(part(0, 4), part(5, 2), part(8, 2))) +
                       Days(part(11, 2) / 24.0 + part(14, 2) / 1440.0);
      const std::string_view name = table.cell(r, table.column("phase"));
      for (const SiteShower& row : watch.rows) {
        const double days = std::abs((row.peak - phase).count());
        const std::string code(shower_of(row).code), label = code + " " + std::string(instant);
        if (name == "Full Moon" && days < 1.0) {
          EXPECT_GE(row.verdict, Verdict::poor) << label;
          EXPECT_GT(row.moon_lit, 0.95) << label;
          if (strong.count(code) != 0) {
            EXPECT_EQ(row.spoiler, Spoiler::moon) << label;
            ++full;
          }
        }
        if (name == "New Moon" && days < 3.0) {
          EXPECT_NE(row.spoiler, Spoiler::moon) << label;
          EXPECT_LT(row.moon_lit, 0.2) << label;
          if (code == "PER" || code == "GEM") {
            EXPECT_EQ(row.verdict, Verdict::good) << label;
            ++fresh;
          }
        }
      }
    }
  }
  EXPECT_GE(full, 2);
  EXPECT_GE(fresh, 2);
}

// International Meteor Organization, 2025 Meteor Shower Calendar, pp. 1, 10, 12, 13, 19 (see
// reference/meteor_showers.csv): the Perseids "badly" lit, the Geminids little, the Quadrantids,
// Aurigids, Orionids and Leonids without the Moon.
TEST(ShowerNights, MoonOf2025AsPublished) {
  const Watch watch(dark_place(45, 10, "Europe/Rome", 6.5), 2025);
  EXPECT_EQ(watch.row("PER").verdict, Verdict::poor);
  EXPECT_EQ(watch.row("PER").spoiler, Spoiler::moon);
  EXPECT_EQ(watch.row("GEM").verdict, Verdict::good);
  for (const char* code : {"QUA", "AUR", "ORI", "LEO", "GEM"})
    EXPECT_NE(watch.row(code).spoiler, Spoiler::moon) << code;
}

// One peak moved through a lunation, New Moon on 2020 August 19 at 02:41 UT, Full Moon on September
// 2 at 05:22 (USNO): night by night the waxing Moon leaves less.
TEST(ShowerNights, WaxingMoonLeavesLessEachNight) {
  const Watch watch(dark_place(45, 10, "Europe/Rome"), 2020);
  const Ut first = ut_midnight(make_date(2020, 8, 20)) + Days(2.0 / 24);
  double before = watch.at("PER", first).expected_per_hour;
  const double at_new = before;
  for (int day = 1; day <= 13; ++day) {
    const double now = watch.at("PER", first + Days(day)).expected_per_hour;
    // The radiant stands four minutes further on each night.
    EXPECT_LT(now, 1.02 * before) << day;
    before = now;
  }
  EXPECT_LT(before, 0.5 * at_new);
}

// The site's limit is read back from the two rates: whole without Sun and Moon, less with them.
TEST(ShowerNights, OnlyMoonAndTwilightTakeFromTheSitesLimit) {
  const Watch watch(dark_place(45, 10, "Europe/Rome"), 2027);
  int whole = 0, less = 0;
  for (const SiteShower& row : watch.rows) {
    if (!row.best || !shower_of(row).zhr) continue;
    const Angle sun = watch.sky.altitude(Body::sun, *row.best);
    const double limit = 6.5 + std::log(row.expected_per_hour / row.expected_dark) /
                                   std::log(shower_of(row).population_index);
    const std::string_view code = shower_of(row).code;
    if (sun.degrees() < -18 && !row.moon_up) {
      EXPECT_NEAR(limit, 6.0, 1e-6) << code;
      ++whole;
    } else {
      EXPECT_LT(limit, 6.0 + 1e-9) << code;
      ++less;
    }
  }
  EXPECT_GE(whole, 5);
  EXPECT_GE(less, 8);
}

TEST(ShowerNights, WhiteAndPolarNights) {
  const Watch watch(dark_place(78.2, 15.6, "Arctic/Longyearbyen"), 2027);
  const SiteShower& perseids = watch.row("PER");  // midnight sun
  EXPECT_EQ(perseids.verdict, Verdict::not_seen);
  EXPECT_EQ(perseids.spoiler, Spoiler::bright_night);
  EXPECT_FALSE(perseids.best);
  EXPECT_GT(perseids.radiant_highest.degrees(), 30);  // though the radiant never sets
  EXPECT_EQ(watch.row("ACE").spoiler, Spoiler::radiant_down);
  const SiteShower& geminids = watch.row("GEM");  // polar night
  ASSERT_TRUE(geminids.best);
  EXPECT_NEAR(geminids.radiant_highest.degrees(), 90 - 78.2 + 33, 1.0);
  EXPECT_GT(geminids.expected_per_hour, 0);
  // A radiant that is only up by day or in no dark night: polar summer of the south.
  const Watch pole(dark_place(-90, 0, "UTC"), 2027);
  EXPECT_EQ(pole.row("PUP").spoiler, Spoiler::bright_night);
  EXPECT_EQ(pole.row("GEM").spoiler, Spoiler::radiant_down);
  EXPECT_EQ(pole.row("SDA").verdict == Verdict::not_seen, false);  // up all through polar night
  EXPECT_EQ(Watch(dark_place(90, 0, "UTC"), 2027).row("PER").spoiler, Spoiler::bright_night);
}

TEST(ShowerNights, DaytimeShowersShowLittle) {
  for (const double latitude : {52.0, 0.0, -34.0}) {
    const Watch watch(dark_place(latitude, 13, "UTC"), 2027);
    for (const char* code : {"ARI", "DSX"}) {
      const SiteShower& row = watch.row(code);
      EXPECT_GE(row.verdict, Verdict::poor) << code << " " << latitude;
      EXPECT_LT(row.radiant_highest.degrees(), 25) << code << " " << latitude;
    }
  }
}

TEST(ShowerNights, GradesFollowTheWrittenThresholds) {
  for (const double limit : {4.0, 5.0, 6.5}) {
    const Watch watch(dark_place(40, -100, "America/Chicago", limit), 2027);
    for (const SiteShower& row : watch.rows) {
      const std::string label = std::string(shower_of(row).code) + " " + std::to_string(limit);
      EXPECT_EQ(row.spoiler == Spoiler::none, row.verdict == Verdict::good) << label;
      EXPECT_EQ(row.best.has_value(), row.verdict != Verdict::not_seen) << label;
      if (!row.best) continue;
      const double highest = row.radiant_highest.degrees(), rate = row.expected_per_hour;
      const bool known = shower_of(row).zhr.has_value();
      const Verdict best_possible = highest < 15 || (known && rate < 3)    ? Verdict::poor
                                    : highest < 30 || (known && rate < 10) ? Verdict::fair
                                                                           : Verdict::good;
      EXPECT_GE(row.verdict, best_possible) << label;
    }
  }
}

// Samoa skipped 2011 December 30: the night of the 29th goes on to noon of the 31st.
TEST(ShowerNights, SkippedDatesHaveNoNight) {
  const Watch watch(dark_place(-13.83, -171.77, "Pacific/Apia"), 2011);
  const Zone& zone = watch.year.place.zone;
  const Ut noon = night_span(zone, make_date(2011, 12, 29)).from;
  std::set<Date> nights;
  for (int hours = -30; hours < 50; hours += 4) {
    const SiteShower row = watch.at("PUP", noon + Days(hours / 24.0));
    EXPECT_NE(iso_date(row.night), "2011-12-30") << hours;
    ASSERT_TRUE(row.best) << hours;
    EXPECT_LT(std::abs((*row.best - row.peak).count()), 1.0) << hours;
    const TimeSpan span = night_span(zone, row.night);
    EXPECT_TRUE(span.from <= *row.best && *row.best < span.to) << hours;
    nights.insert(row.night);
  }
  EXPECT_EQ(nights.count(make_date(2011, 12, 29)), 1U);
  EXPECT_EQ(nights.count(make_date(2011, 12, 31)), 1U);
}

TEST(ShowerNights, LeapDayAndEndsOfTheYear) {
  const Watch watch(dark_place(-34, 151, "Australia/Sydney"), 2028);
  const Zone& zone = watch.year.place.zone;
  const Ut midnight = zone.start_of(make_date(2028, 3, 1));
  EXPECT_EQ(iso_date(watch.at("GNO", midnight - Days(0.01)).night), "2028-02-29");
  EXPECT_EQ(iso_date(watch.at("GNO", midnight + Days(0.01)).night), "2028-02-29");
  const Watch berlin(dark_place(52, 13, "Europe/Berlin"), 2028);
  // In the morning of January 1 the night is still last year's; of December 31 it is this year's.
  EXPECT_EQ(iso_date(berlin.at("QUA", ut_midnight(make_date(2028, 1, 1)) + Days(0.1)).night),
            "2027-12-31");
  EXPECT_EQ(iso_date(berlin.at("QUA", ut_midnight(make_date(2029, 1, 1)) + Days(0.1)).night),
            "2028-12-31");
}

TEST(ShowerNights, Names) {
  EXPECT_EQ(verdict_name(Verdict::good), "good");
  EXPECT_EQ(verdict_name(Verdict::fair), "fair");
  EXPECT_EQ(verdict_name(Verdict::poor), "poor");
  EXPECT_EQ(verdict_name(Verdict::not_seen), "not-seen");
}

}  // namespace
}  // namespace duskleaf
