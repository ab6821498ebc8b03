// Each kind of bad input and the exact message that it gets. The expectations are this project's
// own wording.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "order/order.hpp"
#include "order_text.hpp"

namespace duskleaf {

std::string message_of(std::string_view text) {
  try {
    parse_order(text, "o.yaml");
  } catch (const OrderError& error) {
    return error.what();
  }
  return "no error";
}

namespace {

struct Row {
  std::string label, text, message;
};
void PrintTo(const Row& row, std::ostream* out) { *out << row.label; }

class BadOrder : public testing::TestWithParam<Row> {};

TEST_P(BadOrder, GetsItsMessage) { EXPECT_EQ(message_of(GetParam().text), GetParam().message); }

const std::string coordinates_note = "; expected degrees from -90 to 90, or such as 54 10 48 N";
const std::string clock_note =
    "; expected a time of day from 00:00 to 23:59, dusk, or a list of twelve of them";
const std::string id_note =
    "; expected at most 64 letters (a to z), digits, hyphens and underscores";

INSTANTIATE_TEST_SUITE_P(
    Keys, BadOrder,
    testing::Values(
        Row{"unknown key of the order", with_head("year: 2027\nlangauge: fr\n"),
            "o.yaml:2:1: unknown key 'langauge' in the order; did you mean 'language'?"},
        Row{"unknown key of a site", with_site_lines("    latitud: 3\n"),
            "o.yaml:10:5: unknown key 'latitud' in a site; did you mean 'latitude'?"},
        Row{"unknown key far from all", with_site_lines("    masthead: { telephone: 5 }\n"),
            "o.yaml:10:17: unknown key 'telephone' in a masthead; expected group, contact, link or "
            "logo"},
        Row{"a key twice", with_site_lines("    name: Again\n"),
            "o.yaml:10:5: the key 'name' is given twice; keep one (the first stands at "
            "o.yaml:6:5)"},
        Row{"a key twice in a flow map", with_site_lines("    masthead: { group: A, group: B }\n"),
            "o.yaml:10:27: the key 'group' is given twice; keep one (the first stands at "
            "o.yaml:10:17)"},
        Row{"a needed key is missing", with_line("    time_zone", ""),
            "o.yaml:5:5: a site has no 'time_zone'; this key is needed"},
        Row{"a needed key has no value", with_line("    name", "    name:"),
            "o.yaml:6:5: 'name' has no value; this key is needed"},
        Row{"no sites", "year: 2027\npublications: [{ template: monthly-handout }]\n",
            "o.yaml:1:1: the order has no sites; expected at least one under 'sites', or in the "
            "CSV of 'sites_from'"}));

INSTANTIATE_TEST_SUITE_P(
    Types, BadOrder,
    testing::Values(
        Row{"a list where a map belongs", "- year: 2027\n",
            "o.yaml:1:1: the order is a list; expected a map with keys such as year, start or "
            "language"},
        Row{"text where a number belongs", with_site_lines("    limiting_magnitude: good\n"),
            "o.yaml:10:25: limiting_magnitude is 'good'; expected a number from 1 to 8"},
        Row{"a map where text belongs", with_line("    name", "    name: { en: A }"),
            "o.yaml:6:11: name is a map; expected text"},
        Row{"text where a list belongs", with_site_lines("    sessions: first friday\n"),
            "o.yaml:10:15: sessions is 'first friday'; expected a list"},
        Row{"yes where true belongs",
            with_publications("  - { template: monthly-handout, large_print: yes }\n"),
            "o.yaml:3:47: large_print is 'yes'; expected true or false"},
        Row{"an unknown choice",
            with_publications("  - { template: monthly-handout, ink: color }\n"),
            "o.yaml:3:39: ink is 'color'; expected colour or grey (did you mean 'colour'?)"},
        Row{"an unknown paper", with_publications("  - { template: monthly-handout, paper: A9 }\n"),
            "o.yaml:3:41: unknown paper 'A9'; expected A0, A1, A2, A3, A4, A5, A6, B0, B1, B2, B3, "
            "B4, B5, B6, letter, "
            "legal or tabloid"},
        Row{"month 13", with_publications("  - { template: monthly-handout, months: [3, 13] }\n"),
            "o.yaml:3:46: a month is '13'; expected a whole number from 1 to 12"},
        Row{"an unknown template", with_publications("  - template: monthly-handouts\n"),
            "o.yaml:3:15: unknown template 'monthly-handouts'; did you mean 'monthly-handout'?"},
        Row{"no such date", with_site_lines("    dates: [{ on: 2027-02-29, text: Leap }]\n"),
            "o.yaml:10:19: on is '2027-02-29'; expected a date such as 2027-03-19"},
        Row{"an unknown session rule", with_site_lines("    sessions: [{ when: fist fryday }]\n"),
            "o.yaml:10:24: when is 'fist fryday'; expected 'first friday' to 'fourth friday', "
            "'last friday', "
            "'every friday', or a list of dates (did you mean 'first friday'?)"},
        Row{"a link too long for a code",
            with_site_lines("    masthead: { link: \"https://" + std::string(293, 'a') + "\" }\n"),
            "o.yaml:10:23: link has 301 characters; expected at most 300, for a code that phones "
            "can read from paper"},
        Row{"an escaped control character", with_line("    name", "    name: \"Bell \\a\""),
            "o.yaml:6:11: name has the control character 0x07; plain text was expected"},
        Row{"a note for a thirteenth month", with_site_lines("    notes: { 13: \"x\" }\n"),
            "o.yaml:10:14: unknown key '13' in notes; expected 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11 "
            "or 12"},
        Row{"a quote left open at the end", with_site_lines("    chart_hour: \"21:30\n"),
            "o.yaml:10:17: a quote is opened and not closed; close it with another quote"},
        Row{"a single quote left open at the end", with_site_lines("    elevation: 'it''s\n\n"),
            "o.yaml:10:16: a quote is opened and not closed; close it with another quote"},
        Row{"quotes that need no closing, or close lines below",
            with_site_lines("    notes:\n      3: |\n        \"Come\n      4: \"a \\\"\n        "
                            "b\"\n      5: it's\n"),
            "no error"},
        Row{"a link without its scheme",
            with_site_lines("    masthead: { link: reed-lake.example }\n"),
            "o.yaml:10:23: link is 'reed-lake.example'; expected an address that begins with "
            "https://, http:// or "
            "mailto:, without spaces"}));

INSTANTIATE_TEST_SUITE_P(
    Ranges, BadOrder,
    testing::Values(
        Row{"latitude 91", with_line("    latitude", "    latitude: 91"),
            "o.yaml:7:15: latitude is '91'" + coordinates_note},
        Row{"longitude 181", with_line("    longitude", "    longitude: 181"),
            "o.yaml:8:16: longitude is '181'; expected degrees from -180 to 180, or such as 4 37 "
            "12 W"},
        Row{"sixty minutes of arc", with_line("    latitude", "    latitude: 54 60 N"),
            "o.yaml:7:15: latitude is '54 60 N'" + coordinates_note},
        Row{"a sign and a letter", with_line("    latitude", "    latitude: -54 10 S"),
            "o.yaml:7:15: latitude is '-54 10 S'" + coordinates_note},
        Row{"a latitude to the east", with_line("    latitude", "    latitude: 54 E"),
            "o.yaml:7:15: latitude is '54 E'" + coordinates_note},
        Row{"latitude nan", with_line("    latitude", "    latitude: nan"),
            "o.yaml:7:15: latitude is 'nan'" + coordinates_note},
        Row{"year 1850", with_head("year: 1850\n"),
            "o.yaml:1:7: year is '1850'; expected a whole number from 1900 to 2100"},
        Row{"year 2200", with_head("year: 2200\n"),
            "o.yaml:1:7: year is '2200'; expected a whole number from 1900 to 2100"},
        Row{"a start whose year ends too late", with_head("start: 2100-02\n"),
            "o.yaml:1:8: the twelve months from '2100-02' end after 2100; expected the first of "
            "twelve months, such as "
            "2026-09, within 1900 to 2100"},
        Row{"chart hour 25:00", with_site_lines("    chart_hour: \"25:00\"\n"),
            "o.yaml:10:17: chart_hour is '25:00'" + clock_note},
        Row{"eleven chart hours",
            with_site_lines("    chart_hour: [dusk, dusk, dusk, dusk, dusk, dusk, dusk, dusk, "
                            "dusk, dusk, dusk]\n"),
            "o.yaml:10:17: chart_hour has 11 items; expected twelve, January first"},
        Row{"an elevation of no place", with_site_lines("    elevation: 35 km\n"),
            "o.yaml:10:16: elevation is '35 km'; expected metres above the sea from -450 to 9000, "
            "such as 35 m"},
        Row{"a date that ends before it begins",
            with_site_lines("    dates: [{ from: 2027-04-09, to: 2027-03-29, text: Break }]\n"),
            "o.yaml:10:37: 'to' is before 'from'; the last day was expected"},
        Row{"an azimuth twice", with_site_lines("    skyline: [[0, 3], [90, 8], [0, 4]]\n"),
            "o.yaml:10:32: the skyline has azimuth 0 twice; keep one point"}));

INSTANTIATE_TEST_SUITE_P(
    Names, BadOrder,
    testing::Values(
        Row{"unknown zone", with_line("    time_zone", "    time_zone: Europe/Amsterdm"),
            "o.yaml:9:16: unknown time zone 'Europe/Amsterdm'; did you mean 'Europe/Amsterdam'?"},
        Row{"a zone's town alone", with_line("    time_zone", "    time_zone: amsterdam"),
            "o.yaml:9:16: unknown time zone 'amsterdam'; did you mean 'Europe/Amsterdam'?"},
        Row{"duplicate site id",
            OrderText().text() +
                "  - { id: reed-lake, name: B, latitude: 1, longitude: 2, time_zone: UTC }\n",
            "o.yaml:10:11: the site id 'reed-lake' is used twice; expected another (the first "
            "stands at o.yaml:5:9)"},
        Row{"an id with a slash", with_line("  - id", "  - id: reed/lake"),
            "o.yaml:5:9: id is 'reed/lake'" + id_note},
        Row{"an id with dots", with_line("  - id", "  - id: .."),
            "o.yaml:5:9: id is '..'" + id_note},
        Row{"the id pairs", with_line("  - id", "  - id: pairs"),
            "o.yaml:5:9: id is 'pairs'; expected another: the folder pairs/ is taken by paired "
            "places"},
        Row{"a name that is a path",
            with_publications("  - { template: monthly-handout, name: ../up }\n"),
            "o.yaml:3:40: name is '../up'" + id_note},
        Row{"two publications, one file",
            with_publications(
                "  - template: monthly-handout\n  - { template: monthly-handout, months: [5] }\n"),
            "o.yaml:4:5: this publication would write monthly-handout-2027-05.pdf, as the one at "
            "o.yaml:3:5 does; give it "
            "a 'name' of its own"},
        Row{"a pair of an unknown site",
            with_publications("  - template: paired-places\n    pairs: [[reed-lake, reed-lak]]\n   "
                              " evenings: [2027-03-19]\n"),
            "o.yaml:4:25: no site has the id 'reed-lak'; did you mean 'reed-lake'?"},
        Row{"pairs of a handout",
            with_publications("  - template: monthly-handout\n    pairs: [[a, b]]\n"),
            "o.yaml:4:5: 'pairs' belongs to the template paired-places; monthly-handout has no "
            "pairs; leave it out"}));

INSTANTIATE_TEST_SUITE_P(
    Text, BadOrder,
    testing::Values(
        Row{"empty", "", "o.yaml:1:1: the file is empty; keys and values were expected"},
        Row{"comments alone", "# nothing\n\n",
            "o.yaml:1:1: the file is empty; keys and values were expected"},
        Row{"tab-indented", "sites:\n\t- id: a\n",
            "o.yaml:2:1: a tab in the indentation; indent with spaces"},
        Row{"a tab after spaces", "sites:\n  \t- id: a\n",
            "o.yaml:2:3: a tab in the indentation; indent with spaces"},
        Row{"Latin-1",
            "year: 2027\nlanguage: fran\xE7"
            "ais\n",
            "o.yaml:2:15: byte 0xE7 is not UTF-8; save the file as UTF-8 text"},
        Row{"UTF-16", std::string("\xFF\xFEy\0e\0", 6),
            "o.yaml:1:1: byte 0xFF is not UTF-8; save the file as UTF-8 text"},
        Row{"an overlong slash", "a: \xC0\xAF\n",
            "o.yaml:1:4: byte 0xC0 is not UTF-8; save the file as UTF-8 text"},
        Row{"a surrogate", "a: \xED\xA0\x80\n",
            "o.yaml:1:4: byte 0xED is not UTF-8; save the file as UTF-8 text"},
        Row{"a NUL", std::string("a: b\0c\n", 7),
            "o.yaml:1:5: control character 0x00; plain text was expected"},
        Row{"columns count characters", "{ é: 1, é: 2 }\n",
            "o.yaml:1:9: the key 'é' is given twice; keep one (the first stands at o.yaml:1:3)"},
        Row{"an anchor", "a: &x [1]\nb: 2\n",
            "o.yaml:1:4: a YAML anchor (&) is not read here; write the value out"},
        Row{"a tag", "a: !!str 1\n",
            "o.yaml:1:4: a YAML tag (tag:yaml.org,2002:str) is not read here; leave it out"},
        Row{"two documents", "a: 1\n---\nb: 1\n",
            "o.yaml:2:1: a second YAML document begins; one document in a file was expected"},
        Row{"an open bracket", "a: [1, 2\nb: 3\n",
            "o.yaml:2:2: this is not YAML (end of sequence flow not found); look at the "
            "indentation, colons, quotes and "
            "brackets here and just above"},
        Row{"nested too deep", "a: " + std::string(100, '[') + std::string(100, ']'),
            "o.yaml:1:67: nested more than 64 levels deep; a flatter file was expected"},
        Row{"too large", "a: " + std::string(1'000'000, 'x'),
            "o.yaml:1:1: the file is larger than 1000 kB; a smaller one was expected (many sites "
            "go into a CSV file: "
            "sites_from)"}));

// A single long line was once measured from its beginning for each of its values: minutes for a
// megabyte.
TEST(LongLine, IsReadInTheTimeOfItsLength) {
  const std::string text = "a: [" + std::string(200'000, ',') + "é ]\nb: [1, 2\n";
  const auto begin = std::chrono::steady_clock::now();
  EXPECT_THAT(message_of(text), testing::StartsWith("o.yaml:"));
  EXPECT_LT(std::chrono::steady_clock::now() - begin, std::chrono::seconds(10));
}

}  // namespace
}  // namespace duskleaf
