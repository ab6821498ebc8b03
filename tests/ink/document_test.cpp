#include <gtest/gtest.h>
#include <random>
#include <thread>

#include "ink/pdf_reading.hpp"

namespace duskleaf {
namespace {

/// Two pages with some of everything.
SheetDocument busy_document() {
  std::mt19937 random(7);
  const auto between = [&](double a, double b) {
    return a + (b - a) * static_cast<double>(random()) / 4294967295.0;
  };
  SheetDocument document{
      "Sky <over> Tern & Point", "Tern Point Sky Watch", "Evenings of March", "en-GB", {}};
  constexpr int faces = 6;
  for (const char* side : {"Side A", "Side B"}) {
    Sheet sheet{210, 297, side, {}};
    for (int i = 0; i < 750; ++i)
      sheet.marks.emplace_back(Text{.start = {between(12, 180), between(12, 285)},
                                    .words = "Rising " + std::to_string(random() % 10000) + "°",
                                    .face = static_cast<Face>(i * faces / 750),
                                    .size_pt = 7.5});
    Dots dots;
    for (int i = 0; i < 1500; ++i)
      dots.dots.push_back({{between(12, 198), between(12, 285)}, between(0.2, 2)});
    sheet.marks.emplace_back(dots);
    for (int i = 0; i < 200; ++i) {
      Path path;
      path.move({between(12, 198), between(12, 285)});
      for (int k = 0; k < 5; ++k) path.line({between(12, 198), between(12, 285)});
      sheet.marks.emplace_back(Stroke{path, 0.15});
    }
    sheet.marks.emplace_back(Link{{20, 10, 30, 5}, "https://example.org/tern"});
    document.sheets.push_back(sheet);
  }
  return document;
}

TEST(PdfDocument, EveryObjectAndStreamReadsWithoutAComplaint) {
  ReadPdf read(busy_document());
  std::size_t streams = 0;
  for (QPDFObjectHandle object : read.pdf.getAllObjects())
    if (object.isStream()) {
      EXPECT_FALSE(ReadPdf::data(object).empty());
      ++streams;
    }
  EXPECT_GE(streams, 2U + 3 * 6 + 1);  // pages, three for each font, metadata
  for (QPDFObjectHandle page : read.pdf.getAllPages()) {
    struct Parser : QPDFObjectHandle::ParserCallbacks {
      int depth = 0, texts = 0;
      std::size_t operators = 0;
      void handleObject(QPDFObjectHandle object) override {
        if (!object.isOperator()) return;
        ++operators;
        const std::string name = object.getOperatorValue();
        depth += name == "q" ? 1 : name == "Q" ? -1 : 0;
        texts += name == "BT" ? 1 : name == "ET" ? -1 : 0;
        EXPECT_GE(depth, 0);
        EXPECT_TRUE(texts == 0 || texts == 1);
      }
      void handleEOF() override {}
    } parser;
    QPDFObjectHandle::parseContentStream(page.getKey("/Contents"), &parser);
    EXPECT_EQ(parser.depth, 0);
    EXPECT_EQ(parser.texts, 0);
    EXPECT_GT(parser.operators, 3000U);
  }
  EXPECT_TRUE(read.pdf.getWarnings().empty());
  EXPECT_EQ(read.pdf.getPDFVersion(), "1.7");
}

TEST(PdfDocument, SameDocumentSameBytesWhoeverMakesIt) {
  const SheetDocument document = busy_document();
  const std::string first = make_pdf(document, test_type());
  EXPECT_EQ(make_pdf(document, TypeSet()), first);
  std::vector<std::string> others(4);
  {
    std::vector<std::jthread> workers;
    for (std::string& other : others)
      workers.emplace_back([&] { other = make_pdf(document, test_type()); });
  }
  for (const std::string& other : others) EXPECT_TRUE(other == first);
  EXPECT_EQ(first.find("CreationDate"), std::string::npos);
}

TEST(PdfDocument, TwoDensePagesStaySmall) {
  EXPECT_LT(make_pdf(busy_document(), test_type()).size(), 120'000U);
}

TEST(PdfDocument, SaysWhatItIs) {
  ReadPdf read(busy_document());
  QPDFObjectHandle info = read.pdf.getTrailer().getKey("/Info");
  EXPECT_EQ(info.getKey("/Title").getUTF8Value(), "Sky <over> Tern & Point");
  EXPECT_EQ(info.getKey("/Author").getUTF8Value(), "Tern Point Sky Watch");
  EXPECT_EQ(info.getKey("/Subject").getUTF8Value(), "Evenings of March");
  QPDFObjectHandle root = read.pdf.getRoot();
  EXPECT_EQ(root.getKey("/Lang").getUTF8Value(), "en-GB");
  EXPECT_TRUE(root.getKey("/ViewerPreferences").getKey("/DisplayDocTitle").getBoolValue());
  const std::string xmp = ReadPdf::data(root.getKey("/Metadata"));
  EXPECT_EQ(count(xmp, "Sky &lt;over&gt; Tern &amp; Point"), 1U);
  EXPECT_EQ(count(xmp, "<rdf:li>en-GB</rdf:li>"), 1U);
}

TEST(PdfDocument, NamesOutsideAsciiSurvive) {
  SheetDocument document = document_of({});
  document.title = "Himmel über Łódź — März";
  document.sheets[0].bookmark = "Μάρτιος";
  ReadPdf read(document);
  EXPECT_EQ(read.pdf.getTrailer().getKey("/Info").getKey("/Title").getUTF8Value(), document.title);
  EXPECT_EQ(read.pdf.getRoot().getKey("/Outlines").getKey("/First").getKey("/Title").getUTF8Value(),
            "Μάρτιος");
}

// The bug: a site's name of two lines put a line break into the document's title.
TEST(PdfDocument, MetadataAreSingleLines) {
  SheetDocument document = busy_document();
  document.title = "Tern\nPoint";
  document.author = "A\tB";
  ReadPdf read(document);
  QPDFObjectHandle info = read.pdf.getTrailer().getKey("/Info");
  EXPECT_EQ(info.getKey("/Title").getUTF8Value(), "Tern Point");
  EXPECT_EQ(info.getKey("/Author").getUTF8Value(), "A B");
  EXPECT_NE(ReadPdf::data(read.pdf.getRoot().getKey("/Metadata")).find(">Tern Point<"),
            std::string::npos);
}

TEST(PdfDocument, BookmarksLeadToTheirPages) {
  SheetDocument document = document_of({});
  document.sheets = {{210, 297, "March", {}}, {210, 297, "", {}}, {297, 210, "April", {}}};
  ReadPdf read(document);
  QPDFObjectHandle outlines = read.pdf.getRoot().getKey("/Outlines");
  EXPECT_EQ(outlines.getKey("/Count").getIntValue(), 2);
  QPDFObjectHandle march = outlines.getKey("/First");
  QPDFObjectHandle april = march.getKey("/Next");
  EXPECT_EQ(march.getKey("/Title").getUTF8Value(), "March");
  EXPECT_EQ(april.getKey("/Title").getUTF8Value(), "April");
  EXPECT_TRUE(march.getKey("/Dest").getArrayItem(0).getObjGen() == read.page(0).getObjGen());
  EXPECT_TRUE(april.getKey("/Dest").getArrayItem(0).getObjGen() == read.page(2).getObjGen());
  EXPECT_TRUE(outlines.getKey("/Last").getObjGen() == april.getObjGen());
  EXPECT_FALSE(ReadPdf(document_of({})).pdf.getRoot().hasKey("/Outlines"));
}

TEST(PdfDocument, PagesHaveTheirSheetsSize) {
  SheetDocument document = document_of({});
  document.sheets = {{210, 297, "", {}}, {420, 297, "", {}}};
  ReadPdf read(document);
  const auto side = [&](std::size_t page, int i) {
    return read.page(page).getKey("/MediaBox").getArrayItem(i).getNumericValue();
  };
  EXPECT_NEAR(side(0, 2), 595.28, 0.01);
  EXPECT_NEAR(side(0, 3), 841.89, 0.01);
  EXPECT_NEAR(side(1, 2), 1190.55, 0.01);
}

TEST(PdfDocument, LinksCoverTheirBoxes) {
  auto group = std::make_shared<ClipGroup>();
  group->clip = Path::rectangle({0, 0, 10, 10});
  group->marks.emplace_back(Link{{0, 0, 5, 5}, "https://example.org/inner"});
  ReadPdf read(document_of({Link{{20, 30, 40, 10}, "https://example.org/a b?ü=1"}, group}));
  QPDFObjectHandle links = read.page(0).getKey("/Annots");
  ASSERT_EQ(links.getArrayNItems(), 2);
  QPDFObjectHandle first = links.getArrayItem(0);
  EXPECT_EQ(first.getKey("/A").getKey("/URI").getStringValue(),
            "https://example.org/a%20b?%C3%BC=1");
  const double expected[] = {20, 297 - 40, 60, 297 - 30};
  for (int i = 0; i < 4; ++i)
    EXPECT_NEAR(first.getKey("/Rect").getArrayItem(i).getNumericValue() * mm_per_pt, expected[i],
                0.01);
  EXPECT_EQ(links.getArrayItem(1).getKey("/A").getKey("/URI").getStringValue(),
            "https://example.org/inner");
}

TEST(PdfContent, StrokesOfOneStateArePaintedTogether) {
  std::vector<Mark> marks;
  for (int i = 0; i < 5; ++i)
    marks.emplace_back(Stroke{Path::polyline({{1.0 * i, 0}, {1.0 * i, 9}}), 0.2});
  marks.emplace_back(Stroke{Path::polyline({{7, 0}, {7, 9}}), 0.2, {}, {1, 0.5}});
  marks.emplace_back(Stroke{Path::polyline({{8, 0}, {8, 9}}), 0.2});
  const std::string content = ReadPdf(document_of(marks)).content(0);
  EXPECT_EQ(count(content, "\nS\n"), 3U) << content;
  EXPECT_EQ(count(content, " w\n"), 1U);
  EXPECT_EQ(count(content, "[283 142 ] 0 d\n"), 1U);
  EXPECT_EQ(count(content, "[] 0 d\n"), 1U);
}

TEST(PdfContent, StateInsideAClipGroupEndsWithIt) {
  const Ink blue{0, 0, 0.5};
  auto group = std::make_shared<ClipGroup>();
  group->clip = Path::circle({50, 50}, 20);
  group->marks.emplace_back(Fill{Path::rectangle({40, 40, 20, 20}), blue});
  const std::string content =
      ReadPdf(document_of({Fill{Path::rectangle({0, 0, 1, 1}), blue}, group,
                           Fill{Path::rectangle({2, 0, 1, 1}), Ink{1, 1, 1}}, group,
                           Fill{Path::rectangle({4, 0, 1, 1}), Ink{1, 1, 1}, true}}))
          .content(0);
  EXPECT_EQ(count(content, "0 0 .5 rg\n"), 2U)
      << content;                          // before the first group, within the second
  EXPECT_EQ(count(content, "1 g\n"), 1U);  // holds on behind the second group
  EXPECT_EQ(count(content, "W n\n"), 2U);
  EXPECT_EQ(count(content, "\nf*\n"), 1U);
}

TEST(PdfContent, DotsAreRoundCappedPointsOfTheirSize) {
  Dots dots;
  dots.dots = {{{10, 20}, 1.0}, {{30, 40}, 0.5}, {{50, 60}, 1.0}};
  const std::string content = ReadPdf(document_of({dots})).content(0);
  EXPECT_EQ(count(content, "1 J 1 j\n"), 1U) << content;
  EXPECT_EQ(count(content, " w\n"), 2U);
  EXPECT_EQ(count(content, "285 w\n"), 1U);  // 1 mm = 283.5 hundredths of a point, in steps of 5
  EXPECT_EQ(count(content, "2835 78520 m\n2835 78520 l\n"), 1U);
}

}  // namespace
}  // namespace duskleaf
