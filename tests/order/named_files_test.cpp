// What an order names on disk: pictures, fonts, tables of sites. Expected messages are this
// project's own.
#include <fmt/format.h>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <png.h>

#include "order/order.hpp"
#include "order_text.hpp"
#include "scratch_folder.hpp"

namespace duskleaf {
namespace {

std::string error_of(const std::string& path) {
  try {
    read_order(path);
  } catch (const OrderError& error) {
    return error.what();
  }
  return "no error";
}

std::string png_bytes(unsigned side) {
  png_image image{};
  image.version = PNG_IMAGE_VERSION;
  image.width = image.height = side;
  image.format = PNG_FORMAT_GRAY;
  const std::vector<png_byte> pixels(static_cast<std::size_t>(side) * side, 128);
  png_alloc_size_t size = 0;
  png_image_write_to_memory(&image, nullptr, &size, 0, pixels.data(), 0, nullptr);
  std::string bytes(size, '\0');
  png_image_write_to_memory(&image, bytes.data(), &size, 0, pixels.data(), 0, nullptr);
  return bytes;
}

TEST(NamedFiles, MissingOrderIsAFileError) {
  const ScratchFolder folder;
  EXPECT_THROW(read_order(folder.file("none.yaml")), FileError);
  EXPECT_THROW(read_order(folder.path().string()), FileError);
}

TEST(NamedFiles, LogoIsFoundBesideTheOrder) {
  const ScratchFolder folder;
  folder.write("logo.png", png_bytes(8));
  const std::string path =
      folder.write("o.yaml", with_site_lines("    masthead: { logo: logo.png }\n"));
  EXPECT_EQ(read_order(path).sites.at(0).masthead.logo, folder.file("logo.png"));
}

TEST(NamedFiles, MissingOrBrokenLogoIsRefused) {
  const ScratchFolder folder;
  const std::string order =
      folder.write("o.yaml", with_site_lines("    masthead: { logo: logo.png }\n"));
  const std::string logo = folder.file("logo.png"), at = order + ":10:23: " + logo + ": ";
  const std::string note = "; expected a PNG picture, named relative to the order";
  EXPECT_EQ(error_of(order), at + "there is no such file" + note);
  folder.write("logo.png", "");
  EXPECT_EQ(error_of(order), at + "the file is empty" + note);
  folder.write("logo.png", "GIF89a");
  EXPECT_THAT(error_of(order), testing::AllOf(testing::StartsWith(at + "not a whole PNG picture ("),
                                              testing::EndsWith(note)));
  const std::string whole = png_bytes(64);
  folder.write("logo.png", whole.substr(0, whole.size() - 30));
  EXPECT_THAT(error_of(order), testing::StartsWith(at + "not a whole PNG picture ("));
  folder.write("logo.png", png_bytes(4097));
  EXPECT_EQ(error_of(order),
            at + "the picture is 4097 by 4097 pixels, more than 4096 a side" + note);
}

TEST(NamedFiles, MissingOrBrokenFontIsRefused) {
  const ScratchFolder folder;
  const std::string order =
      folder.write("o.yaml", with_head("year: 2027\nfonts: { bold: b.ttf }\n"));
  const std::string at = order + ":2:16: " + folder.file("b.ttf") + ": ";
  const std::string note =
      "; expected a TrueType or OpenType font file, named relative to the order";
  EXPECT_EQ(error_of(order), at + "there is no such file" + note);
  folder.write("b.ttf", "not a font");
  EXPECT_EQ(error_of(order), at + "this is not a font" + note);
  folder.write("b.ttf", "ttcf and more");
  EXPECT_EQ(error_of(order), at + "this is a collection of several fonts" + note);
}

/// A font's table directory (OpenType 1.9) with empty tables of these names; the last may claim
/// more bytes than there are.
std::string font_bytes(const std::vector<std::string>& tables, char last_length = 0) {
  std::string bytes("\0\1\0\0\0", 5);
  bytes += static_cast<char>(tables.size());
  bytes.append(6, '\0');
  for (std::size_t i = 0; i < tables.size(); ++i) {
    bytes += tables[i];
    bytes.append(11, '\0');
    bytes += i + 1 < tables.size() ? '\0' : last_length;
  }
  return bytes;
}

// The bug: proof passed a font cut short in copying, and press failed after it had made the folder.
TEST(NamedFiles, FontThatIsCutShortIsRefused) {
  const ScratchFolder folder;
  const std::string order =
      folder.write("o.yaml", with_head("year: 2027\nfonts: { bold: b.ttf }\n"));
  const std::string at = order + ":2:16: " + folder.file("b.ttf") + ": ";
  const std::string note =
      "; expected a TrueType or OpenType font file, named relative to the order";
  const std::vector<std::string> all = {"cmap", "glyf", "head", "hhea", "hmtx", "loca", "maxp"};
  folder.write("b.ttf", font_bytes(all));
  EXPECT_EQ(read_order(order).fonts.bold, folder.file("b.ttf"));
  folder.write("b.ttf", font_bytes(all).substr(0, 40));
  EXPECT_EQ(error_of(order), at + "the font is cut short" + note);
  folder.write("b.ttf", std::string("\0\1\0\0", 4));
  EXPECT_EQ(error_of(order), at + "the font is cut short" + note);
  folder.write("b.ttf", font_bytes(all, 127));
  EXPECT_EQ(error_of(order), at + "the font is cut short" + note);
  folder.write("b.ttf", font_bytes({"cmap", "glyf", "head", "hhea", "loca", "maxp"}));
  EXPECT_EQ(error_of(order), at + "the font lacks its table 'hmtx'" + note);
  folder.write("b.ttf", font_bytes({"cmap", "head", "hhea", "hmtx", "maxp"}));
  EXPECT_EQ(error_of(order), at + "the font has no outlines" + note);
}

TEST(SitesCsv, RowsBecomeSites) {
  const ScratchFolder folder;
  folder.write("sites.csv",
               "\xEF\xBB\xBFid,name,latitude,longitude,time_zone,chart_hour,skyline,masthead.group,"
               "masthead.contact,notes.3\r\n"
               "a,\"Alder, \"\"old\"\" hill\",10,20,Africa/Cairo,dusk,0:3 90:8,Alder "
               "group,,\"two\nlines\"\r\n"
               "\r\n"
               "b,Birch,\"54 10 48 N\",20,Europe/Warsaw,,,,,\r\n");
  const std::string path = folder.write(
      "o.yaml",
      "year: 2027\npublications: [{ template: monthly-handout }]\nsites_from: sites.csv\n");
  const Order order = read_order(path);
  ASSERT_EQ(order.sites.size(), 2u);
  EXPECT_EQ(order.sites[0].name, "Alder, \"old\" hill");
  EXPECT_EQ(order.sites[0].masthead.group, "Alder group");
  EXPECT_EQ(order.sites[0].masthead.contact, "");
  EXPECT_EQ(order.sites[0].notes.at(3), "two\nlines");
  EXPECT_FALSE(order.sites[0].place.chart_hours[0].after_midnight.has_value());
  ASSERT_EQ(order.sites[0].place.skyline.size(), 2u);
  EXPECT_DOUBLE_EQ(order.sites[0].place.skyline[1].altitude.degrees(), 8);
  EXPECT_NEAR(order.sites[1].place.observer.latitude.degrees(), 54.18, 1e-12);
  EXPECT_EQ(order.sites[1].where.line, 5);
}

struct CsvRow {
  std::string label, csv, message;
};
void PrintTo(const CsvRow& row, std::ostream* out) { *out << row.label; }
class BadCsv : public testing::TestWithParam<CsvRow> {};

TEST_P(BadCsv, GetsItsMessage) {
  const ScratchFolder folder;
  folder.write("s.csv", GetParam().csv);
  const std::string path = folder.write(
      "o.yaml", "year: 2027\npublications: [{ template: monthly-handout }]\nsites_from: s.csv\n");
  EXPECT_EQ(error_of(path), folder.file("s.csv") + GetParam().message);
}

const std::string header = "id,name,latitude,longitude,time_zone,skyline\n";
INSTANTIATE_TEST_SUITE_P(
    Rows, BadCsv,
    testing::Values(
        CsvRow{"empty", "",
               ":1:1: the file is empty; a header row of the sites' keys was expected"},
        CsvRow{"latitude 91", header + "a,A,1,2,UTC,\nb,\"é\",91,2,UTC,\n",
               ":3:7: latitude is '91'; expected degrees from -90 to 90, or such as 54 10 48 N"},
        CsvRow{"unknown column", "id,nme,latitude\na,b,1\n",
               ":1:4: unknown key 'nme' in a site; did you mean 'name'?"},
        CsvRow{"unknown nested column",
               "id,name,latitude,longitude,time_zone,masthead.grup\na,A,1,2,UTC,G\n",
               ":1:38: unknown key 'grup' in a masthead; did you mean 'group'?"},
        CsvRow{"a column twice", "id,id\n", ":1:4: column 'id' is given twice; keep one"},
        CsvRow{"a row too short", header + "a,A\n",
               ":2:1: the row has 2 cells; expected 6, as in the header"},
        CsvRow{"an open quote", header + "a,\"A\n",
               ":2:3: a quote is opened and not closed; close it with another quote"},
        CsvRow{"semicolons", "id;name\n",
               ":1:1: the header's cells are separated by semicolons; expected commas"},
        CsvRow{"a skyline without colons", header + "a,A,1,2,UTC,0:3 90\n",
               ":2:17: a point of the skyline is '90'; expected azimuth:altitude in degrees, such "
               "as 90:8"},
        CsvRow{"no name: the cell's place, not its header's", header + "a,,1,2,UTC,\n",
               ":2:3: 'name' has no value; this key is needed"},
        CsvRow{"a chart hour of two words",
               "id,name,latitude,longitude,time_zone,chart_hour\na,A,1,2,UTC,9 pm\n",
               ":2:13: chart_hour is '9 pm'; expected a time of day from 00:00 to 23:59, dusk, or "
               "a list of twelve of them"},
        CsvRow{"not UTF-8", "id,n\xE9\n",
               ":1:5: byte 0xE9 is not UTF-8; save the file as UTF-8 text"}));

// The bug: the rows of commas that spreadsheets leave at the end were refused as sites without id.
TEST(SitesCsv, RowsOfEmptyCellsAreNoSites) {
  const ScratchFolder folder;
  folder.write("s.csv", header + "a,A,1,2,UTC,\n,,,,,\n , ,,,,\n");
  const std::string path = folder.write(
      "o.yaml", "year: 2027\npublications: [{ template: monthly-handout }]\nsites_from: s.csv\n");
  EXPECT_EQ(read_order(path).sites.size(), 1u);
}

TEST(SitesCsv, DuplicateIdNamesBothPlaces) {
  const ScratchFolder folder;
  const std::string csv = folder.write("s.csv", header + "a,A,1,2,UTC,\nA,B,1,2,UTC,\n");
  const std::string path = folder.write(
      "o.yaml", "year: 2027\npublications: [{ template: monthly-handout }]\nsites_from: s.csv\n");
  EXPECT_EQ(
      error_of(path),
      fmt::format(
          "{0}:3:1: the site id 'A' is used twice; expected another (the first stands at {0}:2:1)",
          csv));
}

TEST(SitesCsv, MissingFileIsToldWhereItIsNamed) {
  const ScratchFolder folder;
  const std::string path = folder.write(
      "o.yaml", "year: 2027\npublications: [{ template: monthly-handout }]\nsites_from: s.csv\n");
  EXPECT_EQ(error_of(path),
            fmt::format(
                "{}:3:13: {}: there is no such file; expected a CSV file of sites, named relative "
                "to the order",
                path, folder.file("s.csv")));
}

}  // namespace
}  // namespace duskleaf
