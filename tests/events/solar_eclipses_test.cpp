// Solar eclipses against reference/solar_eclipses_de431.csv and solar_eclipse_sites_de431.csv,
// which tests/reference/make/eclipses.cpp makes from topocentric discs, and against the published
// canon: reference/besselian_elements.csv, solar_eclipses.csv, solar_eclipse_local.csv, each of
// which names its source.
#include "events/solar_eclipses.hpp"

#include <algorithm>

#include "eclipse_tables.hpp"
#include "events/besselian_elements.hpp"

namespace duskleaf {
namespace {

std::vector<SolarEclipse> eclipses_of(int year) {
  return solar_eclipses(year_tables(year), ut_midnight(make_date(year, 1, 1)),
                        ut_midnight(make_date(year + 1, 1, 1)));
}
/// The eclipse whose greatest phase is within a day of a date's noon.
std::optional<SolarEclipse> eclipse_on(std::string_view date) {
  for (const SolarEclipse& e : eclipses_of(year_of_text(date)))
    if (std::abs((e.greatest - (midnight_of(date) + Days(0.5))).count()) < 1.0) return e;
  return std::nullopt;
}
Observer observer(double latitude, double longitude, double elevation_m = 0.0) {
  return {Angle::from_degrees(latitude), Angle::from_degrees(longitude), elevation_m};
}
std::optional<SiteSolarEclipse> seen(std::string_view date, const Observer& o) {
  const std::optional<SolarEclipse> e = eclipse_on(date);
  if (!e) return std::nullopt;
  const SiteSky sky(year_tables(year_of_text(date)), o, e->greatest - Days(2),
                    e->greatest + Days(2));
  return at_site(sky, *e);
}

TEST(SolarEclipses, NoneMissedNoneExtraAgainstDe431) {
  const std::string text = reference_text("solar_eclipses_de431.csv");
  const CsvTable table(text);
  Largest largest;
  std::size_t row = 0;
  for (int year = 2020; year <= 2035; ++year)
    for (const SolarEclipse& e : eclipses_of(year)) {
      ASSERT_LT(row, table.rows());
      const std::string_view date = table.cell(row, table.column("date"));
      const double off =
          seconds_after(e.greatest, instant_of(table.cell(row, table.column("greatest"))));
      const double gamma = e.gamma - table.number(row, table.column("gamma"));
      EXPECT_LE(std::abs(off), 2.0) << date;
      EXPECT_LE(std::abs(gamma), 2e-5) << date;
      largest.note("greatest_s", off);
      largest.note("gamma", gamma);
      ++row;
    }
  EXPECT_EQ(row, table.rows());
  EXPECT_EQ(row, 34U);
  largest.record();
}

TEST(SolarEclipses, CanonOf2001To2050) {
  const std::string text = reference_text("solar_eclipses.csv");
  const CsvTable table(text);
  Largest largest;
  std::size_t row = 0;
  for (int year = 2001; year <= 2050; ++year)
    for (const SolarEclipse& e : eclipses_of(year)) {
      ASSERT_LT(row, table.rows());
      const std::string_view date = table.cell(row, table.column("date"));
      EXPECT_EQ(eclipse_name(e.kind), table.cell(row, table.column("type"))) << date;
      const double published = instant_days(
          std::string(date) + "T" + std::string(table.cell(row, table.column("greatest_td"))));
      const double off = (to_tt(e.greatest).days() - published) * 86400.0;
      const double gamma = e.gamma - table.number(row, table.column("gamma"));
      EXPECT_LE(std::abs(off), 1.5) << date;       // rounded to 1 s
      EXPECT_LE(std::abs(gamma), 0.0001) << date;  // rounded to 0.0001
      largest.note("greatest_tt_s", off);
      largest.note("gamma", gamma);
      // Its magnitude at the place of greatest eclipse, which is given to 0.1 degree.
      const auto degrees = [&](const char* name) {
        const std::string_view cell = table.cell(row, table.column(name));
        const double value = parse_number(cell.substr(0, cell.size() - 1));
        return cell.back() == 'S' || cell.back() == 'W' ? -value : value;
      };
      const SiteSky sky(year_tables(year), observer(degrees("lat"), degrees("lon")),
                        e.greatest - Days(1), e.greatest + Days(1));
      const std::optional<SiteSolarEclipse> site = at_site(sky, e);
      // Where the axis misses the Earth ("A-", "T+"), the place is at the very edge of the umbra.
      const char code = table.cell(row, table.column("type_code")).back();
      const bool axis_misses = e.kind != SolarEclipseKind::partial && (code == '-' || code == '+');
      if (site && !axis_misses) {
        const double magnitude = site->magnitude - table.number(row, table.column("magnitude"));
        const bool central = site->kind != SolarEclipseKind::partial;
        // A partial one's changes by 0.003 in 0.1 degree.
        EXPECT_LE(std::abs(magnitude), central ? 0.0002 : 0.002) << date;
        largest.note(central ? "magnitude_central" : "magnitude_partial", magnitude);
      } else if (!axis_misses) {
        EXPECT_EQ(e.kind, SolarEclipseKind::partial) << date;  // the Sun is on the horizon there
      }
      ++row;
    }
  EXPECT_EQ(row, table.rows());
  EXPECT_GE(largest.count("magnitude_central"), 60);
  largest.record();
}

TEST(SolarEclipses, CanonBesselianElements) {
  const std::string text = reference_text("besselian_elements.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 20U);
  Largest largest;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto number = [&](const std::string& name) {
      return table.number(r, table.column(name));
    };
    const Ut day = ut_midnight(make_date(table.integer(r, table.column("year")),
                                         table.integer(r, table.column("mon")),
                                         table.integer(r, table.column("day"))));
    const Tt t0(Days(day.days() + number("t0") / 24.0));
    const BesselianElements ours =
        besselian_elements(year_tables(table.integer(r, table.column("year"))), t0);
    for (double h = -3.0; h <= 3.0; h += 0.5) {
      const std::string label = std::to_string(r) + " at " + std::to_string(h);
      const auto published = [&](const std::string& name, int terms) {
        double sum = 0.0;
        for (int i = terms; i >= 1; --i) sum = sum * h + number(name + std::to_string(i));
        return sum;
      };
      const ShadowAxis s = shadow_axis(ours, h);
      const auto check = [&](const char* name, double difference, double allowed) {
        EXPECT_LE(std::abs(difference), allowed) << name << " row " << label;
        largest.note(name, difference);
      };
      // The canon's ephemerides, VSOP87 and ELP2000-82, are 0.02" from ours: 1e-5 radii.
      check("x", s.x - published("x", 4), 2e-5);
      check("y", s.y - published("y", 4), 2e-5);
      check("l1", s.l1 - published("l1", 3), 3e-6);
      check("l2", s.l2 - published("l2", 3), 3e-6);
      const double d = std::atan2(s.sine_d, s.cosine_d);
      check("d_deg", Angle::from_radians(d).degrees() - published("d", 3), 4e-5);
      // From the ephemeris meridian to that of Greenwich: 1.002738 x 15" for each second of TT -
      // UT.
      const double delta_t = tt_minus_ut(to_ut(t0)).count();
      const Angle mu = Angle::from_radians(s.mu) + Angle::from_arcseconds(15.041067 * delta_t) -
                       Angle::from_degrees(published("m", 3));
      check("mu_deg", mu.centred().degrees(), 8e-5);
    }
    EXPECT_NEAR(ours.tan_f1, number("tanf1"), 1e-7);
    EXPECT_NEAR(ours.tan_f2, number("tanf2"), 1e-7);
  }
  largest.record();
}

TEST(SolarEclipses, PublishedLocalCircumstances) {
  const std::string text = reference_text("solar_eclipse_local.csv");
  const CsvTable table(text);
  ASSERT_EQ(table.rows(), 6U);
  Largest largest;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](const char* name) { return table.cell(r, table.column(name)); };
    const std::string label = std::string(cell("max"));
    const std::optional<SiteSolarEclipse> s =
        seen(cell("max"),
             observer(table.number(r, table.column("lat")), table.number(r, table.column("lon"))));
    ASSERT_TRUE(s) << label;
    const std::string_view type = cell("type");
    EXPECT_EQ(eclipse_name(s->kind), type == "P"   ? "partial"
                                     : type == "T" ? "total"
                                                   : "annular")
        << label;
    // These pages were computed with Delta T of 68.4 to 73 s (predictions); the contacts' spacing
    // from the greatest does not depend on it, their common shift does.
    const double shift = seconds_after(s->greatest.at, instant_of(cell("max")));
    EXPECT_LE(std::abs(shift), 6.0) << label;
    largest.note("greatest_ut_s", shift);
    const auto check = [&](const char* name, const std::optional<Sighting>& ours,
                           const char* altitude) {
      if (cell(name) == "-") return;
      ASSERT_TRUE(ours) << label;
      const double off = seconds_after(ours->at, instant_of(cell(name))) - shift;
      EXPECT_LE(std::abs(off), 2.0) << label << " " << name;
      largest.note("contact_from_greatest_s", off);
      const double high = ours->place.altitude.degrees() - table.number(r, table.column(altitude));
      // Whole degrees in the oldest page.
      EXPECT_LE(std::abs(high), label.starts_with("2017") ? 0.55 : 0.08) << label << " " << name;
    };
    check("C1", s->partial_begins, "alt1");
    check("C2", s->central_begins, "alt2");
    check("max", s->greatest, "alt_max");
    check("C3", s->central_ends, "alt3");
    check("C4", s->partial_ends, "alt4");
  }
  largest.record();
}

TEST(SolarEclipses, SitesAgainstDe431Discs) {
  const std::string text = reference_text("solar_eclipse_sites_de431.csv");
  const CsvTable table(text);
  Largest largest;
  int none = 0, down = 0, cut = 0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](const char* name) { return table.cell(r, table.column(name)); };
    const auto number = [&](const char* name) { return table.number(r, table.column(name)); };
    const std::string label = std::string(cell("date")) + " " + std::string(cell("site"));
    const std::optional<SiteSolarEclipse> s = seen(
        cell("date"), observer(number("latitude"), number("longitude"), number("elevation_m")));
    if (cell("kind") == "none" || cell("up") == "0") {
      EXPECT_FALSE(s) << label;
      ++(cell("kind") == "none" ? none : down);
      continue;
    }
    ASSERT_TRUE(s) << label;
    EXPECT_EQ(eclipse_name(s->kind), cell("kind")) << label;
    const auto contact = [&](const char* name, const std::optional<Ut>& ours, double limit) {
      ASSERT_EQ(ours.has_value(), !cell(name).empty()) << label << " " << name;
      if (!ours) return;
      const double off = seconds_after(*ours, instant_of(cell(name)));
      EXPECT_LE(std::abs(off), limit) << label << " " << name;
      largest.note(std::string(name) + (limit > 3.0 ? "_edge_s" : "_s"), off);
    };
    const auto at = [](const std::optional<Sighting>& x) {
      return x ? std::optional<Ut>(x->at) : std::nullopt;
    };
    // 5 km inside the partial zone's edge 0.01" is 0.4 s.
    const double allowed = cell("site") == "edge-inside" ? 4.0 : 1.0;
    contact("c1", s->partial_begins.at, allowed);
    contact("c2", at(s->central_begins), 1.0);
    contact("greatest", s->greatest.at, 2.5);  // a small phase hardly changes for seconds
    contact("c3", at(s->central_ends), 1.0);
    contact("c4", s->partial_ends.at, allowed);
    contact("sunrise", s->sunrise, 1.0);
    contact("sunset", s->sunset, 1.0);
    cut += s->sunrise || s->sunset;
    const auto value = [&](const char* name, double difference, double limit) {
      EXPECT_LE(std::abs(difference), limit) << label << " " << name;
      largest.note(name, difference);
    };
    value("altitude_c1", s->partial_begins.place.altitude.degrees() - number("altitude_c1"), 0.02);
    value("altitude_greatest", s->greatest.place.altitude.degrees() - number("altitude_greatest"),
          0.02);
    // Inside a central one the ratio of diameters, here with the mean of the two radii of the Moon.
    if (s->kind == SolarEclipseKind::partial)
      value("magnitude", s->magnitude - number("magnitude"), 0.0002);
    else
      value("ratio", s->magnitude - number("ratio"), 0.0002);
    value("obscuration", s->obscuration - number("obscuration"), 0.001);
  }
  EXPECT_GE(none, 200);
  EXPECT_GE(down, 50);
  EXPECT_GE(cut, 25);
  EXPECT_GE(largest.count("c2_s"), 50);
  EXPECT_GE(largest.count("c1_s"), 150);
  largest.record();
}

// The Sun rises eclipsed over the north-east of North America on 2021-06-10 (common knowledge); the
// instants are those of the reference's way of counting, checked in the table above.
TEST(SolarEclipses, BeginsBeforeSunrise) {
  const std::optional<SiteSolarEclipse> s = seen("2021-06-10", observer(43.6, -79.4));
  ASSERT_TRUE(s);
  ASSERT_TRUE(s->sunrise);
  EXPECT_FALSE(s->partial_begins.visible);
  EXPECT_LT(s->partial_begins.at, *s->sunrise);
  EXPECT_LT(*s->sunrise, s->partial_ends.at);
  EXPECT_TRUE(s->partial_ends.visible);
  EXPECT_FALSE(s->sunset);
  EXPECT_TRUE(s->best.visible);
  EXPECT_GE(s->best.at, *s->sunrise);
  if (!s->greatest.visible) {
    EXPECT_EQ(s->best.at, *s->sunrise);
    EXPECT_LT(s->best_magnitude, s->magnitude);
  }
}

TEST(SolarEclipses, SetsBeforeTheGreatestPhase) {
  // Western Mediterranean, 2026-08-12: greatest in the west at sunset. Farther east it sets first.
  const std::optional<SiteSolarEclipse> s = seen("2026-08-12", observer(41.9, 12.5));
  ASSERT_TRUE(s);
  ASSERT_TRUE(s->sunset);
  EXPECT_TRUE(s->partial_begins.visible);
  EXPECT_FALSE(s->greatest.visible);
  EXPECT_EQ(s->best.at, *s->sunset);
  EXPECT_TRUE(s->best.visible);
  EXPECT_LT(s->best_magnitude, s->magnitude);
  EXPECT_LT(s->best_obscuration, s->obscuration);
  EXPECT_GT(s->best_magnitude, 0.0);
  // The drawing is that of the best moment: magnitude = (1 + r - distance) / 2 in Sun's radii.
  EXPECT_NEAR(s->best_magnitude, (1.0 + s->moon_radius - s->moon_distance) / 2.0, 1e-9);
}

TEST(SolarEclipses, NoneWhereTheSunIsDown) {
  EXPECT_FALSE(seen("2027-08-02", observer(-43.5, 172.6)));  // night in New Zealand
  EXPECT_FALSE(seen("2024-10-02", observer(85.0, 10.0)));    // polar night, no contact
}

TEST(SolarEclipses, PolarSites) {
  // 2026-08-12 passes near the North Pole under the midnight Sun; 2021-12-04 is total in
  // Antarctica.
  const std::optional<SiteSolarEclipse> north = seen("2026-08-12", observer(90.0, 0.0));
  ASSERT_TRUE(north);
  EXPECT_FALSE(north->sunrise || north->sunset);
  EXPECT_TRUE(north->partial_begins.visible && north->partial_ends.visible);
  EXPECT_GT(north->magnitude, 0.8);
  const std::optional<SiteSolarEclipse> south = seen("2021-12-04", observer(-76.8, -46.2));
  ASSERT_TRUE(south);
  EXPECT_EQ(south->kind, SolarEclipseKind::total);
  EXPECT_FALSE(south->sunrise || south->sunset);
  EXPECT_EQ(south->best.at, south->greatest.at);
}

TEST(SolarEclipses, EventsInOrderWithTheirValues) {
  const std::optional<SiteSolarEclipse> s = seen("2027-08-02", observer(25.7, 32.6));
  ASSERT_TRUE(s);
  const std::vector<Event> events = eclipse_events(*s);
  ASSERT_EQ(events.size(), 5U);
  EXPECT_TRUE(std::is_sorted(events.begin(), events.end(),
                             [](const Event& a, const Event& b) { return a.at < b.at; }));
  const char* names[] = {"solar-eclipse-partial-begins", "solar-eclipse-central-begins",
                         "solar-eclipse-greatest", "solar-eclipse-central-ends",
                         "solar-eclipse-partial-ends"};
  for (std::size_t i = 0; i < events.size(); ++i) {
    EXPECT_EQ(event_name(events[i].kind), names[i]);
    EXPECT_EQ(event_body(events[i]), "total");
    ASSERT_TRUE(events[i].value);
  }
  EXPECT_EQ(*events[2].value, s->magnitude);
  EXPECT_EQ(*events[1].value, s->central_begins->place.altitude.degrees());
}

// A span holds its first instant and not its last.
TEST(SolarEclipses, SpansShareNoEclipse) {
  const Ut at = eclipse_on("2027-08-02").value().greatest;
  const YearEphemeris& tables = year_tables(2027);
  EXPECT_TRUE(solar_eclipses(tables, at - Days(5), at).empty());
  const auto after = solar_eclipses(tables, at, at + Days(5));
  ASSERT_EQ(after.size(), 1U);
  EXPECT_EQ(after.front().greatest, at);
  EXPECT_TRUE(solar_eclipses(tables, at, at).empty());
}

}  // namespace
}  // namespace duskleaf
