// The tables' form: RFC 4180, RFC 8259, ISO 8601, and this project's own columns.
#include "export/tables.hpp"

#include <gtest/gtest.h>
#include <locale>
#include <nlohmann/json.hpp>
#include <set>
#include <sstream>

#include "almanac/sites.hpp"

namespace duskleaf {
namespace {

std::string written(TableName name, TableFormat format,
                    const std::vector<std::vector<Row>>& parts) {
  std::ostringstream out;
  TableWriter writer(out, name, format);
  for (const auto& rows : parts) writer.add(rows);
  writer.finish();
  return out.str();
}
// Splits CSV text whose cells hold no line breaks.
std::vector<std::vector<std::string>> cells(const std::string& text) {
  std::vector<std::vector<std::string>> rows;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = text.find("\r\n", at);
    EXPECT_NE(end, std::string::npos);
    rows.emplace_back(1);
    for (std::size_t i = at; i < end; ++i) {
      if (text[i] == ',')
        rows.back().emplace_back();
      else
        rows.back().back() += text[i];
    }
    at = end + 2;
  }
  return rows;
}

const SiteYear& london() {
  static const SiteYear year = [] {
    Place place = test_place(51.5, -0.1, "Europe/London");
    place.id = "tern-point";
    return make_site_year(ephemeris_of({2027, 1}), place, {2027, 1});
  }();
  return year;
}
const SkyYear& sky_2027() {
  static const SkyYear year = make_sky_year(ephemeris_of({2027, 1}), {2027, 1});
  return year;
}
std::vector<Row> rows_of(TableName name) {
  static const SiteHappenings happenings =
      make_site_happenings(ephemeris_of({2027, 1}), london(), sky_2027());
  return site_rows(name, ephemeris_of({2027, 1}), london(), happenings);
}

TEST(UtcText, RoundsToATenthAndCarriesOver) {
  struct Row {
    double seconds;  // after 2027-03-20T00:00Z
    const char* text;
  };
  for (const Row& row :
       {Row{0, "2027-03-20T00:00:00.0Z"}, Row{73481.34, "2027-03-20T20:24:41.3Z"},
        Row{59.96, "2027-03-20T00:01:00.0Z"}, Row{86399.94, "2027-03-20T23:59:59.9Z"},
        Row{86399.96, "2027-03-21T00:00:00.0Z"}, Row{-0.04, "2027-03-20T00:00:00.0Z"},
        Row{-86400.0 * 9574 + 0.2, "2001-01-01T00:00:00.2Z"}})
    EXPECT_EQ(utc_text(ut_midnight(make_date(2027, 3, 20)) + Days(Seconds(row.seconds))), row.text)
        << row.seconds;
  EXPECT_EQ(utc_text(ut_midnight(make_date(1944, 2, 29)) + Days(0.5)), "1944-02-29T12:00:00.0Z");
}

TEST(TableWriter, CsvQuotesWhatNeedsIt) {
  const std::string text = written(
      TableName::instants, TableFormat::csv,
      {{{Cell{std::string("a,b")}, Cell{std::string("say \"dusk\"")}, Cell{},
         Cell{std::string("plain")}, Cell{true}, Cell{Number{-0.04, 1}}, Cell{Number{3, 0}}}}});
  EXPECT_EQ(
      text,
      "site,event,body,utc,local,value,unit\r\n\"a,b\",\"say \"\"dusk\"\"\",,plain,true,0.0,3\r\n");
}

TEST(TableWriter, JsonKeepsTypesAndOrder) {
  const std::string text =
      written(TableName::instants, TableFormat::json,
              {{},
               {{Cell{std::string("a\"b")}, Cell{std::string("é")}, Cell{}, Cell{false},
                 Cell{Number{1.25, 1}}, Cell{Number{-12.0, 2}}, Cell{Number{0.98333351, 7}}}},
               {}});
  EXPECT_EQ(text,
            "[\n{\"site\":\"a\\\"b\",\"event\":\"é\",\"body\":null,\"utc\":false,\"local\":1.3,"
            "\"value\":-12,\"unit\":0.9833335}\n]\n");
  EXPECT_EQ(nlohmann::json::parse(written(TableName::nights, TableFormat::json, {})).size(), 0u);
}

TEST(TableWriter, DoesNotHeedTheLocale) {
  // A locale with decimal commas and grouped digits, whether or not the machine has one installed.
  struct Commas : std::numpunct<char> {
    char do_decimal_point() const override { return ','; }
    char do_thousands_sep() const override { return '.'; }
    std::string do_grouping() const override { return "\3"; }
  };
  const auto all = [] {
    std::string text;
    for (std::string_view name : table_names())
      for (TableFormat format : {TableFormat::csv, TableFormat::json})
        text += written(find_table(name).value(), format, {rows_of(find_table(name).value())});
    return text;
  };
  const std::string before = all();
  const std::locale old = std::locale::global(std::locale(std::locale::classic(), new Commas));
  const std::string after = all();
  std::locale::global(old);
  EXPECT_TRUE(before == after);
}

TEST(Tables, NamesAndColumns) {
  EXPECT_EQ(find_table("planets"), TableName::planet_places);
  EXPECT_FALSE(find_table("planet"));
  EXPECT_EQ(table_names().size(), 6u);
  for (std::string_view name : table_names()) {
    const TableName table = find_table(name).value();
    for (const Row& row : rows_of(table))
      ASSERT_EQ(row.size(), table_columns(table).size()) << name;
  }
}

TEST(Instants, GlobalRowsFirstThenTheSitesOwn) {
  const auto table = cells(written(
      TableName::instants, TableFormat::csv,
      {global_rows(TableName::instants, sky_2027(), london().span), rows_of(TableName::instants)}));
  ASSERT_GT(table.size(), 3500u);
  bool site = false;
  std::string last;
  std::set<std::string> events;
  for (std::size_t i = 1; i < table.size(); ++i) {
    const auto& row = table[i];
    ASSERT_EQ(row.size(), 7u);
    if (row[0] == "-") {
      EXPECT_FALSE(site);
      EXPECT_EQ(row[4], "");
      EXPECT_EQ(row[3].substr(0, 4), "2027");
    } else {
      if (!site) last.clear();
      site = true;
      EXPECT_EQ(row[0], "tern-point");
      EXPECT_EQ(row[4].substr(0, 4), "2027");  // the local calendar year
      EXPECT_EQ(row[4].size(), 22u);
    }
    EXPECT_LE(last, row[3]);
    last = row[3];
    events.insert(row[1]);
    // An eclipse's magnitude alone is a number without a unit.
    EXPECT_EQ(row[5].empty() || row[1].ends_with("-eclipse-greatest"), row[6].empty()) << row[1];
  }
  EXPECT_TRUE(site);
  for (const char* name :
       {"sunrise", "astronomical-dusk", "moon-transit", "full-moon", "perigee", "march-equinox",
        "aphelion", "clock-change", "opposition", "superior-conjunction", "stationary-then-direct",
        "greatest-elongation-west", "closest-approach", "occultation-disappears",
        "lunar-eclipse-greatest", "solar-eclipse-partial-begins", "shower-peak"})
    EXPECT_TRUE(events.contains(name)) << name;
}

TEST(Instants, AClockChangeSaysTheHoursGainedOrLost) {
  std::vector<std::string> found;
  for (const auto& row :
       cells(written(TableName::instants, TableFormat::csv, {rows_of(TableName::instants)})))
    if (row[1] == "clock-change")
      found.push_back(row[2] + ' ' + row[3] + ' ' + row[4] + ' ' + row[5] + row[6]);
  // tz database, Europe/London: 01:00 UT on the last Sundays of March and October.
  EXPECT_EQ(found, (std::vector<std::string>{
                       "site 2027-03-28T01:00:00.0Z 2027-03-28T02:00+01:00 1.00h",
                       "site 2027-10-31T01:00:00.0Z 2027-10-31T01:00+00:00 -1.00h"}));
}

TEST(Nights, OneRowEachAndEmptyCellsForWhatDoesNotHappen) {
  const auto table =
      cells(written(TableName::nights, TableFormat::csv, {rows_of(TableName::nights)}));
  ASSERT_EQ(table.size(), 366u);
  const auto& june = table[1 + 171];
  EXPECT_EQ(june[1], "2027-06-21");
  EXPECT_EQ(june[5], "");  // no astronomical dusk at 51.5 degrees
  EXPECT_EQ(june[13], "");
  EXPECT_EQ(june[15], "0");
  EXPECT_NE(june[16].find("no-astronomical-dark"), std::string::npos);
  for (std::size_t i = 1; i < table.size(); ++i) {
    const auto& row = table[i];
    // The Moon's times are between sunset and sunrise; text of equal offsets compares like time.
    if (!row[10].empty() && row[16].find("clock-change") == std::string::npos) {
      EXPECT_GE(row[10], row[2]) << row[1];
      EXPECT_LE(row[10], row[9]) << row[1];
    }
    EXPECT_EQ(row[13].empty(), row[14].empty()) << row[1];
    if (row[13].empty()) {
      EXPECT_EQ(row[15], "0") << row[1];
    }
  }
}

TEST(Nights, ASkippedDateHasARowThatSaysSoAndNothingElse) {
  const SiteYear apia = year_of_site(test_place(-13.83, -171.77, "Pacific/Apia"), 2011);
  const auto table =
      cells(written(TableName::nights, TableFormat::csv,
                    {site_rows(TableName::nights, ephemeris_of({2011, 1}), apia, {})}));
  ASSERT_EQ(table.size(), 366u);
  std::vector<std::string> expected(17);
  expected[0] = "site";
  expected[1] = "2011-12-30";
  expected[16] = "short-date";
  EXPECT_EQ(table[364], expected);
}

TEST(Constellations, ThirtySixRowsAMonth) {
  const auto table = cells(
      written(TableName::constellations, TableFormat::csv, {rows_of(TableName::constellations)}));
  ASSERT_EQ(table.size(), 1u + 12u * 36u);
  std::set<std::string> names, states;
  for (std::size_t i = 1; i < table.size(); ++i) {
    names.insert(table[i][2]);
    states.insert(table[i][6]);
    EXPECT_TRUE(table[i][3] == "true" || table[i][3] == "false");
  }
  EXPECT_EQ(names.size(), 36u);
  EXPECT_TRUE(names.contains("Serpens Caput") && names.contains("Serpens Cauda") &&
              names.contains("Orion"));
  EXPECT_TRUE(states.contains("up high") && states.contains("below rising") &&
              states.contains("partly-up sinking"));
}

TEST(Planets, JsonHasNumbersAndNulls) {
  const auto table = nlohmann::json::parse(
      written(TableName::planet_places, TableFormat::json, {rows_of(TableName::planet_places)}));
  ASSERT_EQ(table.size(), 252u);
  for (const auto& row : table) {
    EXPECT_TRUE(row["ra_deg"].is_number());
    EXPECT_GE(row["ra_deg"].get<double>(), 0.0);
    EXPECT_LE(row["ra_deg"].get<double>(), 360.0);
    EXPECT_LE(std::abs(row["dec_deg"].get<double>()), 29.0);
    EXPECT_TRUE(row["rises"].is_string() || row["rises"].is_null());
    EXPECT_TRUE(row["altitude_at_chart_hour_deg"].is_number());
  }
  EXPECT_EQ(table[0]["planet"], "mercury");
  EXPECT_EQ(table[6]["planet"], "neptune");
  EXPECT_EQ(table[7]["date"], "2027-01-11");
}

TEST(Showers, ARowForEachPeakOfTheYear) {
  const auto table =
      cells(written(TableName::showers, TableFormat::csv, {rows_of(TableName::showers)}));
  ASSERT_GT(table.size(), 20u);
  std::set<std::string> codes;
  for (std::size_t i = 1; i < table.size(); ++i) {
    const auto& row = table[i];
    EXPECT_EQ(row[3].substr(0, 4), "2027");
    EXPECT_TRUE(codes.insert(row[1]).second) << row[1];
    EXPECT_EQ(row[7].empty(), row[8].empty()) << row[1];
    EXPECT_TRUE(row[11] == "good" || row[11] == "fair" || row[11] == "poor" ||
                row[11] == "not-seen")
        << row[11];
    // Not seen is not a rate.
    if (row[11] == "not-seen" && !row[10].empty()) {
      EXPECT_EQ(row[10], "0.0") << row[1];
    }
  }
  EXPECT_TRUE(codes.contains("PER") && codes.contains("GEM") && codes.contains("QUA"));
}

// Dates and kinds: F. Espenak & J. Meeus, NASA/TP-2006-214141 and NASA/TP-2009-214172 (the annular
// eclipse of 6 February 2027 passes London by).
TEST(Eclipses, ContactsInOrderWithTheirPlaces) {
  const auto table =
      cells(written(TableName::eclipses, TableFormat::csv, {rows_of(TableName::eclipses)}));
  std::set<std::string> seen;
  for (std::size_t i = 1; i < table.size(); ++i) {
    const auto& row = table[i];
    seen.insert(row[4].substr(0, 10) + ' ' + row[1] + ' ' + row[2]);
    EXPECT_EQ(row[8].empty(), row[3] != "greatest") << i;
    EXPECT_EQ(row[9].empty(), row[3] != "greatest" || row[2] == "moon") << i;
    if (i > 1) {
      EXPECT_LE(table[i - 1][4], row[4]);
    }
    if (row[10] == "true") {
      EXPECT_GT(std::stod(row[6]), -1.2) << i;
    } else {
      EXPECT_LT(std::stod(row[6]), 0.0) << i;
    }
  }
  EXPECT_TRUE(seen.contains("2027-08-02 partial sun"));
  EXPECT_TRUE(seen.contains("2027-02-20 penumbral moon"));
  EXPECT_TRUE(seen.contains("2027-08-17 penumbral moon"));
  EXPECT_FALSE(seen.contains("2027-02-06 partial sun"));
}

}  // namespace
}  // namespace duskleaf
