// Lunar eclipses against reference/lunar_eclipses_de431.csv and lunar_eclipse_sites_de431.csv,
// which tests/reference/make/eclipses.cpp makes from cones in space, and against the published
// canon and figures: reference/lunar_eclipses.csv, which names its sources.
#include "events/lunar_eclipses.hpp"

#include <algorithm>

#include "eclipse_tables.hpp"

namespace duskleaf {
namespace {

std::vector<LunarEclipse> eclipses_of(int year) {
  return lunar_eclipses(year_tables(year), ut_midnight(make_date(year, 1, 1)),
                        ut_midnight(make_date(year + 1, 1, 1)));
}
std::optional<LunarEclipse> eclipse_on(std::string_view date) {
  for (const LunarEclipse& e : eclipses_of(year_of_text(date)))
    if (std::abs((e.greatest - (midnight_of(date) + Days(0.5))).count()) < 1.0) return e;
  return std::nullopt;
}
SiteLunarEclipse seen(std::string_view date, double latitude, double longitude,
                      double elevation_m = 0.0) {
  const LunarEclipse e = eclipse_on(date).value();
  const SiteSky sky(year_tables(year_of_text(date)),
                    {Angle::from_degrees(latitude), Angle::from_degrees(longitude), elevation_m},
                    e.greatest - Days(2), e.greatest + Days(2));
  return at_site(sky, e);
}

TEST(LunarEclipses, EveryContactAgainstDe431Cones) {
  const std::string text = reference_text("lunar_eclipses_de431.csv");
  const CsvTable table(text);
  Largest largest;
  std::size_t row = 0;
  for (int year = 2020; year <= 2035; ++year)
    for (const LunarEclipse& e : eclipses_of(year)) {
      ASSERT_LT(row, table.rows());
      const std::string label(table.cell(row, table.column("date")));
      const auto contact = [&](const char* name, const std::optional<Ut>& ours, double allowed) {
        const std::string_view cell = table.cell(row, table.column(name));
        ASSERT_EQ(ours.has_value(), !cell.empty()) << label << " " << name;
        if (!ours) return;
        const double off = seconds_after(*ours, instant_of(cell));
        EXPECT_LE(std::abs(off), allowed) << label << " " << name;
        largest.note(std::string(name) + (allowed > 5.0 ? "_graze_s" : "_s"), off);
      };
      // 2027-07-18 grazes: 0.1" of the shadow's radius is 25 s there.
      const double penumbral = e.penumbral_magnitude < 0.01 ? 20.0 : 2.0;
      // Angles in place of lengths leave out 0.16", which tells where the umbra just touches.
      const double touching = e.umbral_magnitude < 0.03 ? 4.0 : 2.0;
      contact("p1", e.penumbral_begins, penumbral);
      contact("u1", e.partial_begins, touching);
      contact("u2", e.total_begins, 2.0);
      contact("greatest", e.greatest, 2.0);
      contact("u3", e.total_ends, 2.0);
      contact("u4", e.partial_ends, touching);
      contact("p4", e.penumbral_ends, penumbral);
      const auto value = [&](const char* name, double ours, double allowed) {
        const double off = ours - table.number(row, table.column(name));
        EXPECT_LE(std::abs(off), allowed) << label << " " << name;
        largest.note(name, off);
      };
      value("penumbral_magnitude", e.penumbral_magnitude, 0.0005);
      value("umbral_magnitude", e.umbral_magnitude, 0.0005);
      value("gamma", e.gamma, 2e-5);
      ++row;
    }
  EXPECT_EQ(row, table.rows());
  EXPECT_EQ(row, 37U);
  EXPECT_GE(largest.count("u1_s"), 20);
  largest.record();
}

// The catalogue's list is complete for 2015-2035. Its shadow is larger than Danjon's: magnitudes by
// 0.024 to 0.027 (penumbra) and 0.004 to 0.007 (umbra), measured; gamma is rounded to 0.001.
TEST(LunarEclipses, CatalogueOf2015To2035) {
  const std::string text = reference_text("lunar_eclipses.csv");
  const CsvTable table(text);
  std::size_t row = 0;
  Largest largest;
  for (int year = 2015; year <= 2035; ++year)
    for (const LunarEclipse& e : eclipses_of(year)) {
      ASSERT_LT(row, table.rows());
      const std::string_view date = table.cell(row, table.column("date"));
      // 2016-08-18 exists only with the catalogue's larger shadow.
      EXPECT_EQ(eclipse_name(e.kind), table.cell(row, table.column("type"))) << date;
      const auto off = [&](const char* name, double ours) {
        const double difference = ours - table.number(row, table.column(name));
        largest.note(name, difference);
        return difference;
      };
      EXPECT_LE(std::abs(off("gamma", e.gamma)), 0.0007) << date;
      EXPECT_NEAR(off("pen_mag", e.penumbral_magnitude), -0.0255, 0.002) << date;
      EXPECT_NEAR(off("um_mag", e.umbral_magnitude), -0.0055, 0.002) << date;
      ++row;
      if (row < table.rows() && table.cell(row, table.column("date")) == "2016-08-18") ++row;
    }
  EXPECT_EQ(row, table.rows());
  largest.record();
}

/// TT - UT that the canon foretold for 2005-2050 (Espenak & Meeus, NASA/TP-2006-214141, section
/// 2.7).
double canon_delta_t(double year) {
  const double t = year - 2000.0;
  return 62.92 + 0.32217 * t + 0.005589 * t * t;
}

TEST(LunarEclipses, PublishedContactsInTt) {
  const std::string text = reference_text("lunar_eclipses.csv");
  const CsvTable table(text);
  Largest largest;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](const char* name) { return table.cell(r, table.column(name)); };
    // The two figures (NF) mix several values of TT - UT in one row: only their magnitudes serve.
    const bool figure = cell("source_id") == "N+NF";
    const std::string label(cell("date"));
    if (cell("gamma_w").empty() && cell("um_mag_w").empty()) continue;
    const LunarEclipse e = eclipse_on(cell("date")).value();
    const double year = e.greatest.days() / 365.25 + 2000.0;
    const double offset = cell("contact_scale") == "TD" ? 0.0 : canon_delta_t(year);
    std::vector<std::pair<std::string, double>> offs;
    const auto contact = [&](const char* name, const std::optional<Ut>& ours) {
      if (cell(name).empty() || figure) return;
      // 2029-06-26: the second contact as published is 10 s off the symmetry of the others.
      if (label == "2029-06-26" && std::string_view(name) == "U2") return;
      ASSERT_TRUE(ours) << label << " " << name;
      offs.emplace_back(name, (to_tt(*ours).days() - instant_days(cell(name))) * 86400.0 - offset);
    };
    contact("P1", e.penumbral_begins);
    contact("P4", e.penumbral_ends);
    contact("U1", e.partial_begins);
    contact("U4", e.partial_ends);
    contact("U2", e.total_begins);
    contact("U3", e.total_ends);
    contact("greatest", e.greatest);
    // A common shift of a row is the TT - UT that its author took, which is not always the canon's.
    double shift = 0.0;
    for (const auto& [name, off] : offs) shift += off / static_cast<double>(offs.size());
    EXPECT_LE(std::abs(shift), 4.0) << label;
    if (!offs.empty()) largest.note("shift_tt_s", shift);
    for (const auto& [name, off] : offs) {
      // The published penumbra is narrower by 1": the rule's constants, see lunar_eclipses.cpp.
      EXPECT_LE(std::abs(off - shift), name[0] == 'P' ? 4.0 : 3.0) << label << " " << name;
      largest.note(name + "_from_shift_s", off - shift);
    }
    const auto value = [&](const char* name, double ours, double allowed) {
      if (cell(name).empty()) return;
      const double off = ours - table.number(r, table.column(name));
      EXPECT_LE(std::abs(off), allowed) << label << " " << name;
      largest.note(std::string(name) + (figure ? "_figure" : ""), off);
    };
    value("gamma_w", e.gamma, 0.00015);
    // The figures are by Danjon's rule as here; the other sources' magnitudes are 0.0015 to 0.0021
    // larger throughout, while their contacts agree: another rule, which they do not state.
    value("pen_mag_w", e.penumbral_magnitude, figure ? 0.0002 : 0.0025);
    value("um_mag_w", e.umbral_magnitude, figure ? 0.0002 : 0.0025);
  }
  EXPECT_GE(largest.count("U1_from_shift_s"), 8);
  EXPECT_GE(largest.count("P1_from_shift_s"), 10);
  EXPECT_EQ(largest.count("um_mag_w_figure"), 2);
  largest.record();
}

TEST(LunarEclipses, SitesAgainstDe431) {
  const std::string text = reference_text("lunar_eclipse_sites_de431.csv");
  const CsvTable table(text);
  Largest largest;
  int hidden = 0;
  for (std::size_t r = 0; r < table.rows(); ++r) {
    const auto cell = [&](const char* name) { return table.cell(r, table.column(name)); };
    const auto number = [&](const char* name) { return table.number(r, table.column(name)); };
    const std::string label = std::string(cell("date")) + " " + std::string(cell("site"));
    const SiteLunarEclipse s =
        seen(cell("date"), number("latitude"), number("longitude"), number("elevation_m"));
    EXPECT_EQ(s.visible, cell("up") == "1") << label;
    hidden += !s.visible;
    const auto edge = [&](const char* name, const std::optional<Ut>& ours) {
      ASSERT_EQ(ours.has_value(), !cell(name).empty()) << label << " " << name;
      if (!ours) return;
      const double off = seconds_after(*ours, instant_of(cell(name)));
      EXPECT_LE(std::abs(off), 5.0) << label << " " << name;
      largest.note(std::string(name) + "_s", off);
    };
    edge("moonrise", s.moonrise);
    edge("moonset", s.moonset);
    const auto altitude = [&](const char* name, EventKind kind) {
      const auto c = std::find_if(s.contacts.begin(), s.contacts.end(),
                                  [&](const auto& x) { return x.kind == kind; });
      ASSERT_NE(c, s.contacts.end());
      const double off = c->moon.place.altitude.degrees() - number(name);
      EXPECT_LE(std::abs(off), s.eclipse.penumbral_magnitude < 0.01 ? 0.1 : 0.01) << label;
      largest.note(name, off);
    };
    altitude("altitude_p1", EventKind::lunar_eclipse_penumbral_begins);
    altitude("altitude_greatest", EventKind::lunar_eclipse_greatest);
    altitude("altitude_p4", EventKind::lunar_eclipse_penumbral_ends);
  }
  EXPECT_GE(hidden, 100);
  EXPECT_GE(largest.count("moonset_s"), 50);
  largest.record();
}

TEST(LunarEclipses, SetsEclipsed) {
  // 2026-03-03 over the east of North America: the Moon sets within totality (common knowledge).
  const SiteLunarEclipse s = seen("2026-03-03", 40.7, -74.0);
  ASSERT_TRUE(s.moonset);
  EXPECT_FALSE(s.moonrise);
  EXPECT_TRUE(s.visible);
  EXPECT_TRUE(s.umbra_visible);
  ASSERT_EQ(s.contacts.size(), 7U);
  EXPECT_TRUE(s.contacts.front().moon.visible);
  EXPECT_FALSE(s.contacts.back().moon.visible);
  EXPECT_GT(*s.moonset, *s.eclipse.partial_begins);
  EXPECT_LT(*s.moonset, s.eclipse.partial_ends.value());
  EXPECT_EQ(s.drawn_at, std::min(*s.moonset, s.eclipse.greatest));
  // The umbra covers part of the Moon or all of it in the drawing.
  EXPECT_LT(s.shadow_distance, s.umbra_radius + 1.0);
  EXPECT_GT(s.penumbra_radius, s.umbra_radius + 1.8);  // two Suns' radii, in Moon's radii
}

TEST(LunarEclipses, PenumbraAloneAtMoonrise) {
  // The Moon rises after the umbra has left it: visible, but not the umbra.
  const LunarEclipse e = eclipse_on("2028-01-12").value();
  const YearEphemeris& year = year_tables(2028);
  bool found = false;
  for (int longitude = -180; longitude < 180 && !found; longitude += 2) {
    const SiteSky sky(year, {Angle::from_degrees(30), Angle::from_degrees(longitude)},
                      e.greatest - Days(2), e.greatest + Days(2));
    const SiteLunarEclipse s = at_site(sky, e);
    if (!s.moonrise || *s.moonrise < *e.partial_ends) continue;
    found = true;
    EXPECT_TRUE(s.visible);
    EXPECT_FALSE(s.umbra_visible);
    EXPECT_EQ(s.drawn_at, *s.moonrise);
    EXPECT_GT(s.shadow_distance, s.umbra_radius + 1.0);
  }
  EXPECT_TRUE(found);
}

TEST(LunarEclipses, PolarSites) {
  // A winter Moon stays up at the pole, a summer one down.
  const SiteLunarEclipse winter = seen("2028-12-31", 90.0, 0.0);
  EXPECT_TRUE(winter.umbra_visible);
  EXPECT_FALSE(winter.moonrise || winter.moonset);
  for (const auto& c : winter.contacts) EXPECT_TRUE(c.moon.visible);
  const SiteLunarEclipse summer = seen("2029-06-26", 90.0, 0.0);
  EXPECT_FALSE(summer.visible || summer.umbra_visible);
  EXPECT_FALSE(summer.moonrise || summer.moonset);
  EXPECT_TRUE(seen("2029-06-26", -90.0, 0.0).umbra_visible);
}

TEST(LunarEclipses, EventsCarryTheMagnitudeAtTheGreatestAlone) {
  for (const char* date : {"2027-02-20", "2028-01-12", "2028-12-31"}) {
    const LunarEclipse e = eclipse_on(date).value();
    const std::vector<Event> events = eclipse_events(e);
    EXPECT_EQ(events.size(), e.kind == LunarEclipseKind::total     ? 7U
                             : e.kind == LunarEclipseKind::partial ? 5U
                                                                   : 3U);
    EXPECT_TRUE(std::is_sorted(events.begin(), events.end(), [](const Event& a, const Event& b) {
      return a.at < b.at;
    })) << date;
    for (const Event& event : events) {
      const bool greatest = event.kind == EventKind::lunar_eclipse_greatest;
      EXPECT_EQ(event.value.has_value(), greatest) << date;
      EXPECT_EQ(event_body(event), eclipse_name(e.kind));
      if (!greatest) continue;
      const bool umbral = e.kind != LunarEclipseKind::penumbral;
      EXPECT_EQ(*event.value, umbral ? e.umbral_magnitude : e.penumbral_magnitude) << date;
    }
  }
}

// A span holds its first instant and not its last.
TEST(LunarEclipses, SpansShareNoEclipse) {
  const Ut at = eclipse_on("2028-12-31").value().greatest;
  const YearEphemeris& tables = year_tables(2028);
  EXPECT_TRUE(lunar_eclipses(tables, at - Days(5), at).empty());
  const auto after = lunar_eclipses(tables, at, at + Days(5));
  ASSERT_EQ(after.size(), 1U);
  EXPECT_EQ(after.front().greatest, at);
  EXPECT_TRUE(lunar_eclipses(tables, at, at).empty());
}

}  // namespace
}  // namespace duskleaf
