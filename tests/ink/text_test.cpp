#include <gtest/gtest.h>
#include <set>

#include "ink/pdf_reading.hpp"

namespace duskleaf {
namespace {

/// One text under the other.
std::vector<Mark> lines(const std::vector<std::string>& words, Face face = Face::regular) {
  std::vector<Mark> marks;
  double y = 20;
  for (const std::string& line : words) {
    marks.emplace_back(Text{.start = {15, y}, .words = line, .face = face});
    y += 6;
  }
  return marks;
}

std::string joined(const std::vector<std::string>& words) {
  std::string all;
  for (const std::string& line : words) all += line + "\n";
  return all + "\f";
}

TEST(PdfText, UnusualTextComesBackWordForWordInEveryFace) {
  const std::vector<std::string> words{"Night of 2–3 March (first \\ last)",
                                       "α Centauri, δ Scorpii: Ωμέγα",
                                       "Привет, Сириус",
                                       "−26.5° and 54° 10′ 48″",
                                       "Ångström, Łódź, ½ “quoted” … ’tis",
                                       "signs ☉ ★ from the fallback face"};
  for (const Face face : {Face::regular, Face::bold, Face::italic, Face::light, Face::condensed,
                          Face::condensed_bold})
    EXPECT_EQ(text_of(ReadPdf(document_of(lines(words, face))).bytes, "-raw"), joined(words))
        << "face " << static_cast<int>(face);
}

TEST(PdfText, EveryByteValueOfACodeSurvives) {
  // So many letters outside ASCII that codes end in the bytes of parentheses, backslash, line feed
  // and return.
  std::vector<std::string> words;
  const auto utf8 = [](unsigned c) {
    return std::string{static_cast<char>(0xC0 | c >> 6), static_cast<char>(0x80 | (c & 0x3F))};
  };
  for (unsigned first = 0xC0; first < 0x240; first += 16) {
    std::string row;
    // The ligature and the digraphs that some readers spell out are left aside.
    const std::set<unsigned> aside{0x132, 0x133, 0x149, 0x17F};
    for (unsigned c = first; c < first + 16; ++c)
      if (!aside.contains(c) && (c < 0x1C4 || c > 0x1CC) && (c < 0x1F1 || c > 0x1F3))
        row += utf8(c);
    if (!row.empty()) words.push_back(row);
  }
  for (unsigned first = 0x410; first < 0x450; first += 16) {
    std::string row;
    for (unsigned c = first; c < first + 16; ++c) row += utf8(c);
    words.push_back(row);
  }
  ASSERT_GT(words.size(), 24U);
  EXPECT_EQ(text_of(ReadPdf(document_of(lines(words))).bytes, "-raw"), joined(words));
}

TEST(PdfText, CharacterThatNoFaceHasBecomesAQuestionMark) {
  EXPECT_EQ(text_of(ReadPdf(document_of(lines({"a中b"}))).bytes, "-raw"), "a?b\n\f");
}

TEST(PdfText, MarksAreReadInTheirOrder) {
  std::vector<Mark> marks;
  marks.emplace_back(Text{.start = {15, 20}, .words = "first", .size_pt = 12});
  marks.emplace_back(Stroke{Path::polyline({{0, 0}, {9, 9}}), 0.2});
  marks.emplace_back(
      Text{.start = {15, 30}, .words = "second", .face = Face::bold, .tracking_em = 0.08});
  auto group = std::make_shared<ClipGroup>();
  group->clip = Path::rectangle({0, 0, 200, 200});
  group->marks.emplace_back(Text{.start = {15, 40}, .words = "third"});
  marks.emplace_back(group);
  marks.emplace_back(Text{.start = {15, 50}, .words = "fourth", .face = Face::light});
  EXPECT_EQ(text_of(ReadPdf(document_of(marks)).bytes, "-raw"), "first\nsecond\nthird\nfourth\n\f");
}

struct Word {
  const char* label;
  Text text;
};
TEST(PdfText, WordsStandWhereTheyWereMeasured) {
  const Word rows[] = {
      {"kerned", {.start = {20, 30}, .words = "AVATAR", .size_pt = 20}},
      {"tracked",
       {.start = {20, 30},
        .words = "ORION",
        .face = Face::condensed,
        .size_pt = 11,
        .tracking_em = 0.08}},
      {"digits", {.start = {100.3, 250.7}, .words = "21:30", .face = Face::bold, .size_pt = 7.5}},
      {"fallback within", {.start = {50, 50}, .words = "a★b", .face = Face::italic, .size_pt = 9}},
  };
  for (const Word& row : rows) {
    const std::string boxes = text_of(ReadPdf(document_of({row.text})).bytes, "-bbox");
    double left = 0, right = 0;
    const std::size_t at = boxes.find("<word xMin=\"");
    ASSERT_NE(at, std::string::npos) << boxes;
    ASSERT_EQ(std::sscanf(boxes.c_str() + at, "<word xMin=\"%lf\" yMin=\"%*f\" xMax=\"%lf\"", &left,
                          &right),
              2);
    EXPECT_NEAR(left * mm_per_pt, row.text.start.x, 0.01) << row.label;
    const double width =
        test_type().width(row.text.words, row.text.face, row.text.size_pt, row.text.tracking_em);
    EXPECT_NEAR((right - left) * mm_per_pt, width, 0.02) << row.label;
  }
}

TEST(PdfText, TurnedTextRunsUpThePage) {
  const std::string boxes = text_of(
      ReadPdf(document_of({Text{
                  .start = {50, 100}, .words = "upwards", .size_pt = 10, .turn_degrees = 90}}))
          .bytes,
      "-bbox");
  double left = 0, top = 0, right = 0, bottom = 0;
  const std::size_t at = boxes.find("<word xMin=\"");
  ASSERT_NE(at, std::string::npos) << boxes;
  ASSERT_EQ(
      std::sscanf(boxes.c_str() + at, "<word xMin=\"%lf\" yMin=\"%lf\" xMax=\"%lf\" yMax=\"%lf\"",
                  &left, &top, &right, &bottom),
      4);
  EXPECT_NEAR(bottom * mm_per_pt, 100, 0.02);
  EXPECT_NEAR((bottom - top) * mm_per_pt, test_type().width("upwards", Face::regular, 10), 0.02);
  EXPECT_LT(left * mm_per_pt, 50);
  EXPECT_GT(right * mm_per_pt, 50);
}

TEST(PdfFonts, EveryFontIsEmbeddedAsASubsetWithItsTextMap) {
  std::vector<Mark> marks = lines({"Regular ☉"});
  for (const Mark& mark : lines({"Bold"}, Face::bold)) marks.push_back(mark);
  for (const Mark& mark : lines({"Italic"}, Face::italic)) marks.push_back(mark);
  ReadPdf read(document_of(marks));
  QPDFObjectHandle fonts = read.page(0).getKey("/Resources").getKey("/Font");
  ASSERT_EQ(fonts.getKeys().size(), 4U);  // three faces and the fallback
  for (const std::string& key : fonts.getKeys()) {
    QPDFObjectHandle font = fonts.getKey(key);
    QPDFObjectHandle descendant = font.getKey("/DescendantFonts").getArrayItem(0);
    EXPECT_EQ(font.getKey("/Encoding").getName(), "/Identity-H");
    EXPECT_EQ(font.getKey("/BaseFont").getName().at(7), '+');
    const std::string program =
        ReadPdf::data(descendant.getKey("/FontDescriptor").getKey("/FontFile2"));
    EXPECT_EQ(program.substr(0, 4), std::string("\0\1\0\0", 4));
    EXPECT_LT(program.size(), 4000U) << "only the glyphs in use";
    for (const char* table : {"GSUB", "GPOS", "fpgm", "name"})
      EXPECT_EQ(program.find(table), std::string::npos);
    EXPECT_GT(count(ReadPdf::data(font.getKey("/ToUnicode")), "beginbfchar"), 0U);
  }
}

TEST(PdfFonts, FacesThatShareAFileShareAFont) {
  const std::filesystem::path file =
      std::filesystem::path(testing::TempDir()) / "duskleaf_shared_face.ttf";
  std::ofstream(file, std::ios::binary) << test_type().font_bytes(Face::regular, false);
  const TypeSet own({file.string(), "", ""});
  std::filesystem::remove(file);
  std::vector<Mark> marks = lines({"Regular"});
  for (const Mark& mark : lines({"Bold"}, Face::bold)) marks.push_back(mark);
  const std::string bytes = make_pdf(document_of(marks), own);
  QPDF pdf;
  pdf.processMemoryFile("test", bytes.data(), bytes.size());
  QPDFObjectHandle page = pdf.getAllPages().at(0);
  EXPECT_EQ(page.getKey("/Resources").getKey("/Font").getKeys().size(), 1U);
}

}  // namespace
}  // namespace duskleaf
