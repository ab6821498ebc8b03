// A year's happenings together, at sites where each kind could go wrong. What each part rests on is
// checked beside it in tests/events and tests/almanac; here: order, completeness, agreement of the
// parts with each other.
#include "almanac/happenings.hpp"

#include <algorithm>
#include <gtest/gtest.h>
#include <set>

#include "sites.hpp"

namespace duskleaf {
namespace {

struct Case {
  const char* label;
  double latitude, longitude;
  const char* zone;
  Span span;
};
// Polar sites, the equator, both sides of the date line, a school year, a leap year, the first and
// last years supported.
const Case cases[] = {
    {"north pole", 90, 0, "UTC", {2027, 1}},
    {"south pole", -90, 0, "Antarctica/McMurdo", {2028, 1}},
    {"78 north", 78.2, 15.6, "Arctic/Longyearbyen", {2026, 1}},
    {"69.6 north", 69.6, 19.4, "Europe/Oslo", {2027, 1}},
    {"66 south", -66.3, 110.5, "Antarctica/Casey", {2024, 1}},
    {"equator", -0.41, 36.95, "Africa/Nairobi", {2027, 1}},
    {"43 south", -43.4, 171.6, "Pacific/Auckland", {2027, 1}},
    {"school year over a leap day", 48.2, 9.0, "Europe/Berlin", {2027, 9}},
    {"a skipped date", -13.83, -171.77, "Pacific/Apia", {2011, 1}},
    {"14 hours ahead", 1.87, -157.4, "Pacific/Kiritimati", {2028, 1}},
    {"first year", 54.2, -4.6, "Europe/London", {1900, 1}},
    {"last year", 41.3, -73.9, "America/New_York", {2100, 1}},
};

template <class List, class At>
bool in_order(const List& list, At at) {
  return std::is_sorted(list.begin(), list.end(),
                        [&](const auto& a, const auto& b) { return at(a) < at(b); });
}

TEST(Happenings, EverySiteGetsAWholeYearInOrder) {
  for (const Case& row : cases) {
    SCOPED_TRACE(row.label);
    const YearEphemeris& ephemeris = ephemeris_of(row.span);
    const SkyYear sky = make_sky_year(ephemeris, row.span);
    Place place = test_place(row.latitude, row.longitude, row.zone);
    place.skyline = {{Angle(), Angle::from_degrees(3)},
                     {Angle::from_degrees(180), Angle::from_degrees(5)}};
    const SiteYear year = make_site_year(ephemeris, place, row.span, {.evenings = false});
    const SiteHappenings site = make_site_happenings(ephemeris, year, sky);

    EXPECT_TRUE(in_order(sky.events, [](const Event& e) { return e.at; }));
    EXPECT_TRUE(in_order(site.events, [](const Event& e) { return e.at; }));
    EXPECT_TRUE(in_order(sky.approaches, [](const Approach& a) { return a.at; }));
    // Common practice: a year has 4 to 7 eclipses of Sun and Moon together, two or more of each.
    EXPECT_GE(sky.solar_eclipses.size(), 2u);
    EXPECT_GE(sky.lunar_eclipses.size(), 2u);
    EXPECT_LE(sky.solar_eclipses.size() + sky.lunar_eclipses.size(), 7u);
    // Each planet passes the Sun once or more in 13 months but Mars, which may miss.
    std::set<Body> passed;
    for (const Event& e : sky.configurations)
      if (e.kind == EventKind::conjunction || e.kind == EventKind::inferior_conjunction ||
          e.kind == EventKind::superior_conjunction)
        passed.insert(e.body);
    EXPECT_GE(passed.size(), 6u);

    EXPECT_EQ(site.meetings.size(), sky.approaches.size());
    EXPECT_EQ(site.lunar_eclipses.size(), sky.lunar_eclipses.size());
    EXPECT_LE(site.solar_eclipses.size(), sky.solar_eclipses.size());
    EXPECT_EQ(site.showers.size(), sky.shower_peaks.size());
    for (const Meeting& m : site.meetings) {
      if (!m.look) continue;
      EXPECT_GE(m.look->place.altitude.degrees(), 4.9);
      EXPECT_LT(std::abs((m.look->at - m.closest.at).count()), 4.0);
    }
    for (const Occultation& o : site.occultations) {
      EXPECT_LT(o.disappears.at, o.reappears.at);
      EXPECT_TRUE(o.disappears.up || o.reappears.up);
      EXPECT_LE(o.least_distance, o.moon_radius);
    }
    for (const SiteSolarEclipse& e : site.solar_eclipses) {
      EXPECT_LT(e.partial_begins.at, e.greatest.at);
      EXPECT_LT(e.greatest.at, e.partial_ends.at);
      EXPECT_GT(e.magnitude, 0.0);
      EXPECT_LE(e.best_magnitude, e.magnitude + 1e-9);
      EXPECT_TRUE(e.best.visible);
    }
    for (const SiteShower& s : site.showers) EXPECT_GE(s.expected_dark, s.expected_per_hour);
    // The site's instants are those of its parts.
    for (const Event& e : site.events) {
      const bool of_site =
          e.kind == EventKind::occultation_disappears ||
          e.kind == EventKind::occultation_reappears ||
          (e.kind >= EventKind::transit_begins && e.kind <= EventKind::transit_ends) ||
          (e.kind >= EventKind::solar_eclipse_partial_begins &&
           e.kind <= EventKind::solar_eclipse_partial_ends);
      EXPECT_TRUE(of_site) << event_name(e.kind);
      EXPECT_FALSE(event_body(e).empty());
    }
  }
}

TEST(Happenings, ThePolesSeeHalfTheSkyAlone) {
  // From a pole a star of the other half of the sky is never up, so the Moon never covers it there.
  const Span span{2027, 1};
  const YearEphemeris& ephemeris = ephemeris_of(span);
  for (const double latitude : {90.0, -90.0}) {
    const SiteYear year =
        make_site_year(ephemeris, test_place(latitude, 0, "UTC"), span, {.evenings = false});
    const SiteHappenings site =
        make_site_happenings(ephemeris, year, make_sky_year(ephemeris, span));
    EXPECT_FALSE(site.occultations.empty());
    for (const Occultation& o : site.occultations) {
      const double z = apparent_direction(ephemeris, targets()[static_cast<std::size_t>(o.target)],
                                          to_tt(o.disappears.at))
                           .normalized()
                           .z();
      EXPECT_GT(z * latitude, -0.02 * 90.0);
    }
  }
}

}  // namespace
}  // namespace duskleaf
