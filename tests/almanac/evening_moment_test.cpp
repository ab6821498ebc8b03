// The project's rules for evening charts, with facts of the time-zone data (clock changes of
// London, Lord Howe, Samoa).
#include "almanac/evening_moment.hpp"

#include <algorithm>
#include <cmath>
#include <gtest/gtest.h>

#include "almanac/nights.hpp"
#include "sites.hpp"

namespace duskleaf {
namespace {

struct Made {
  SiteYear year;
  std::unique_ptr<SiteSky> sky;
};
Made make(const Place& place, int y) {
  Made m{year_of_site(place, y), nullptr};
  m.sky = std::make_unique<SiteSky>(ephemeris_of({y, 1}), place.observer,
                                    m.year.nights.front().from, m.year.nights.back().to);
  return m;
}
EveningMoment evening(const Made& m, int month, int day) {
  const Night& night = night_of(m.year, m.year.span.first_year, month, day);
  return evening_moment(*m.sky, m.year.place.zone,
                        m.year.place.chart_hours[static_cast<std::size_t>(month - 1)], night);
}
std::string clock(const Made& m, Ut t) { return m.year.place.zone.civil(t).iso(); }

TEST(EveningMoment, ADarkEveningIsDrawnAtTheOrdersHour) {
  const Made m = make(test_place(54.18, -4.62, "Europe/London"), 2027);
  const EveningMoment e = evening(m, 3, 15);
  EXPECT_EQ(e.shift, EveningShift::none);
  EXPECT_EQ(clock(m, e.moment), "2027-03-15T21:30+00:00");
  EXPECT_EQ(e.moment, e.chart_moment);
}

TEST(EveningMoment, ABrightOneWaitsForMinusTwelveToTheNextFiveMinutes) {
  const Made m = make(test_place(54.18, -4.62, "Europe/London"), 2027);
  for (int month : {4, 5, 6, 7, 8}) {
    const EveningMoment e = evening(m, month, 15);
    const Night& night = night_of(m.year, 2027, month, 15);
    EXPECT_EQ(e.shift, EveningShift::waits_for_dark) << month;
    EXPECT_EQ(clock(m, e.chart_moment).substr(11, 5), "21:30");
    EXPECT_EQ(m.year.place.zone.civil(e.moment).minute() % 5, 0) << month;
    EXPECT_GE(e.moment, *night.nautical_dusk);
    EXPECT_LT((e.moment - *night.nautical_dusk).count() * 1440, 5.0) << month;
    EXPECT_LE(m.sky->altitude(Body::sun, e.moment).degrees(), -12) << month;
  }
}

TEST(EveningMoment, BeforeSunsetAndInTheMorningItIsTheEveningsDuskToo) {
  for (int minutes : {13 * 60, 17 * 60, 5 * 60 + 30, 9 * 60}) {
    const Made m = make(test_place(51.5, 0.0, "Europe/London", minutes), 2027);
    const EveningMoment e = evening(m, 3, 15);
    EXPECT_EQ(e.shift, EveningShift::waits_for_dark) << minutes;
    const double wait = (e.moment - *night_of(m.year, 2027, 3, 15).nautical_dusk).count() * 1440;
    EXPECT_GE(wait, 0.0) << minutes;
    EXPECT_LT(wait, 5.0) << minutes;
  }
}

TEST(EveningMoment, AnHourAfterMidnightIsOfTheNextDate) {
  const Made m = make(test_place(51.5, 0.0, "Europe/London", 60), 2027);
  EXPECT_EQ(clock(m, evening(m, 1, 15).moment), "2027-01-16T01:00+00:00");
}

TEST(EveningMoment, WhiteNightsShowTheDarkestMoment) {
  const Made m = make(test_place(60.0, 25.0, "Europe/Helsinki"), 2027);
  const EveningMoment e = evening(m, 6, 15);
  EXPECT_EQ(e.shift, EveningShift::darkest_moment);
  EXPECT_LT(std::abs((e.moment - night_of(m.year, 2027, 6, 15).darkest).count() * 1440), 0.51);
}

TEST(EveningMoment, MidnightSunShowsNoStars) {
  const Made m = make(test_place(69.65, 18.96, "Europe/Oslo"), 2027);
  EXPECT_EQ(evening(m, 6, 15).shift, EveningShift::no_stars);
  // Sun below the horizon, but above -6 all night.
  EXPECT_EQ(evening(m, 7, 31).shift, EveningShift::no_stars);
  EXPECT_EQ(evening(m, 8, 20).shift, EveningShift::darkest_moment);
  // In the polar night the order's hour is dark.
  EXPECT_EQ(evening(m, 12, 15).shift, EveningShift::none);
}

TEST(EveningMoment, DuskIsMinusTwelveOrTheDarkestOrSixInThePolarNight) {
  const Made south = make(test_place(-33.9, 18.4, "Africa/Johannesburg", -1), 2027);
  const EveningMoment dusk = evening(south, 5, 15);
  EXPECT_EQ(dusk.shift, EveningShift::none);
  EXPECT_EQ(dusk.moment, dusk.chart_moment);
  EXPECT_LT((dusk.moment - *night_of(south.year, 2027, 5, 15).nautical_dusk).count() * 1440, 5.0);
  EXPECT_GE((dusk.moment - *night_of(south.year, 2027, 5, 15).nautical_dusk).count(), 0.0);
  const Made north = make(test_place(85.0, 0.0, "UTC", -1), 2027);
  EXPECT_EQ(evening(north, 6, 15).shift, EveningShift::no_stars);
  EXPECT_EQ(clock(north, evening(north, 12, 15).moment), "2027-12-15T18:00+00:00");
}

TEST(EveningMoment, AnHourThatTheClocksSkipIsTheMomentOfTheJump) {
  const Made m = make(test_place(51.5, 0.0, "Europe/London", 90), 2027);
  EXPECT_EQ(clock(m, evening(m, 3, 27).chart_moment), "2027-03-28T02:00+01:00");
}

TEST(ChartFits, TheSkyComesFourMinutesEarlierEachDay) {
  const Made m = make(test_place(51.5, 0.0, "Europe/London"), 2027);
  const Ut moment = evening(m, 3, 15).moment;
  const auto fits = chart_fits(m.year.place.zone, make_date(2027, 3, 15), moment);
  std::vector<std::string> texts;
  for (const ChartFit& f : fits) texts.push_back(iso_date(f.date) + ' ' + f.clock.iso().substr(11));
  // Common practice: 21:30 at mid-month serves 22:30 at its start and 20:30 at its end; a sidereal
  // day is 3 min 56 s shorter.
  EXPECT_EQ(texts, (std::vector<std::string>{"2027-03-01 22:25+00:00", "2027-03-08 21:58+00:00",
                                             "2027-03-15 21:30+00:00", "2027-03-22 21:02+00:00",
                                             "2027-03-27 20:43+00:00", "2027-03-28 21:39+01:00",
                                             "2027-03-31 21:27+01:00"}));
}

TEST(ChartFits, HalfHoursSkippedDatesAndLeapDays) {
  const Made lord_howe = make(test_place(-31.55, 159.08, "Australia/Lord_Howe", 19 * 60), 2027);
  const auto april = chart_fits(lord_howe.year.place.zone, make_date(2027, 4, 15),
                                evening(lord_howe, 4, 15).moment);
  const auto change = std::find_if(april.begin(), april.end(),
                                   [](const ChartFit& f) { return day_of(f.date) == 4; });
  ASSERT_NE(change, april.end());
  const auto minutes = [](const ChartFit& f) { return f.clock.hour() * 60 + f.clock.minute(); };
  EXPECT_EQ(minutes(*(change - 1)) - minutes(*change), 34);
  const Made apia = make(test_place(-13.83, -171.77, "Pacific/Apia"), 2011);
  const auto december =
      chart_fits(apia.year.place.zone, make_date(2011, 12, 15), evening(apia, 12, 15).moment);
  for (const ChartFit& f : december) EXPECT_NE(day_of(f.date), 30);
  EXPECT_EQ(minutes(*(december.end() - 2)) - minutes(*(december.end() - 1)),
            4);  // 29th and 31st are neighbours
  const Made madrid = make(test_place(40.4, -3.7, "Europe/Madrid"), 2028);
  const auto february =
      chart_fits(madrid.year.place.zone, make_date(2028, 2, 15), evening(madrid, 2, 15).moment);
  EXPECT_EQ(iso_date(february.back().date), "2028-02-29");
}

TEST(ChartFits, TheSameSiderealTimeStands) {
  const Made m = make(test_place(-33.9, 18.4, "Africa/Johannesburg"), 2027);
  const Ut moment = evening(m, 7, 15).moment;
  for (const ChartFit& f : chart_fits(m.year.place.zone, make_date(2027, 7, 15), moment)) {
    const Ut t = Ut(Days(ut_midnight(f.clock.date()).days()) +
                    Days((f.clock.hour() * 60.0 + f.clock.minute()) / 1440) - Days(f.clock.offset));
    EXPECT_LT(std::abs((m.sky->local_sidereal_time(t) - m.sky->local_sidereal_time(moment))
                           .centred()
                           .degrees()),
              0.15);
  }
}

}  // namespace
}  // namespace duskleaf
