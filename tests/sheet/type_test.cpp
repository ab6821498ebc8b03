#include "sheet/type.hpp"

#include <filesystem>
#include <fstream>
#include <gtest/gtest.h>
#include <thread>

#include "base/embedded.hpp"
#include "order/order.hpp"

namespace duskleaf {
namespace {

constexpr Face faces[] = {Face::regular, Face::bold,      Face::italic,
                          Face::light,   Face::condensed, Face::condensed_bold};

const TypeSet& type() {
  static const TypeSet set;
  return set;
}

/// A file of the test's own that goes when the test ends.
class ScratchFile {
 public:
  ScratchFile(const std::string& name, std::string_view content)
      : path_(std::filesystem::path(testing::TempDir()) / ("duskleaf_type_" + name)) {
    std::ofstream(path_, std::ios::binary) << content;
  }
  ~ScratchFile() { std::filesystem::remove(path_); }
  std::string path() const { return path_.string(); }

 private:
  std::filesystem::path path_;
};

TEST(Type, DigitsHaveEqualWidthsInEveryFace) {
  for (const Face face : faces) {
    const double zero = type().width("0", face, 100);
    EXPECT_GT(zero, 0);
    for (const char* number : {"1", "4", "7", "9"})
      EXPECT_DOUBLE_EQ(type().width(number, face, 100), zero) << number;
    EXPECT_NEAR(type().width("1174", face, 100), 4 * zero, 1e-9);
  }
}

TEST(Type, KerningClosesPairsThatStandApart) {
  for (const Face face : faces)
    for (const std::string pair : {"AV", "To", "P."}) {
      const double apart =
          type().width(pair.substr(0, 1), face, 10) + type().width(pair.substr(1), face, 10);
      EXPECT_LT(type().width(pair, face, 10), apart - 0.05)
          << pair << " in face " << static_cast<int>(face);
    }
}

// OS/2 tables of Roboto Regular and Roboto Condensed Regular (2017): sCapHeight 1456, sxHeight 1082
// of 2048 units.
TEST(Type, HeightsAreThoseOfTheFontsOwnTable) {
  for (const Face face : {Face::regular, Face::condensed}) {
    EXPECT_NEAR(type().cap_height(face, 72), 1456.0 / 2048 * 25.4, 0.02);
    EXPECT_NEAR(type().x_height(face, 72), 1082.0 / 2048 * 25.4, 0.02);
  }
  EXPECT_GT(type().ascent(Face::regular, 10), type().cap_height(Face::regular, 10));
  EXPECT_GT(type().descent(Face::regular, 10), 0.15 * 10 * mm_per_pt);
}

TEST(Type, WidthIsTheSumOfWhatIsSet) {
  double thousandths = 0;
  for (const SetGlyph& glyph : type().set("AVATAR, Tö δ 12°", Face::italic))
    thousandths += glyph.advance + glyph.kern_after;
  EXPECT_NEAR(type().width("AVATAR, Tö δ 12°", Face::italic, 9), thousandths / 1000 * 9 * mm_per_pt,
              1e-9);
}

TEST(Type, TrackingStandsBetweenCharactersOnly) {
  const double plain = type().width("ORION", Face::regular, 10);
  EXPECT_NEAR(type().width("ORION", Face::regular, 10, 0.08), plain + 4 * 0.08 * 10 * mm_per_pt,
              1e-9);
  EXPECT_EQ(type().width("", Face::regular, 10, 0.08), 0);
}

struct Case {
  const char* label;
  const char* text;
  std::u32string characters;
  bool fallback;
};
TEST(Type, CharactersFindTheirGlyphs) {
  const Case cases[] = {
      {"Greek is in the face", "αΩ", U"αΩ", false},
      {"Cyrillic is in the face", "Жя", U"Жя", false},
      {"minus, prime, degree", "−′°", U"−′°", false},
      {"the Sun's sign is not", "☉", U"☉", true},
      {"neither has the ideograph", "中", U"?", false},
      {"beyond the first plane", "\U0001F319", U"?", false},
      {"accent joins its letter", "e\u0301n\u0303", U"éñ", false},
      {"soft hyphen and joiner leave no trace", "a\u00ADb\u200Dc", U"abc", false},
      {"tab counts as space", "a\tb", U"a b", false},
      {"narrow no-break space keeps its name", "5\u202F°", U"5\u202F°", false},
      {"byte that is not UTF-8", "a\xFF", U"a?", false},
      {"cut short", "a\xE2\x82", U"a?", false},
  };
  for (const Case& row : cases) {
    std::u32string got;
    bool fallback = false;
    for (const SetGlyph& glyph : type().set(row.text, Face::regular)) {
      got += glyph.character;
      fallback = fallback || glyph.fallback;
      EXPECT_NE(glyph.glyph, 0U) << row.label;
    }
    EXPECT_TRUE(got == row.characters) << row.label;
    EXPECT_EQ(fallback, row.fallback) << row.label;
  }
}

TEST(Type, ThreadsMeasureTheSameFromACold) {
  const TypeSet cold;
  const std::string text = "AVATAR Towards Väinö, P. Yes; LT “Wolf” 11:47 Жук Τα";
  std::vector<double> widths(8);
  {
    std::vector<std::jthread> workers;
    for (double& width : widths)
      workers.emplace_back([&] { width = cold.width(text, Face::bold, 8.5); });
  }
  for (const double width : widths) EXPECT_EQ(width, type().width(text, Face::bold, 8.5));
}

// Named faces once served the tables too, whose columns then ran together with a wide one.
TEST(OrderFonts, TablesKeepTheCondensedFaces) {
  const ScratchFile file("regular.ttf", embedded_file("fonts/fallback"));
  const TypeSet own({file.path(), file.path(), file.path()});
  for (const Face face : {Face::condensed, Face::condensed_bold})
    EXPECT_EQ(own.width("Rigel", face, 10), type().width("Rigel", face, 10));
}

TEST(OrderFonts, RegularAloneServesTheOtherFacesToo) {
  const ScratchFile file("regular.ttf", embedded_file("fonts/condensed"));
  const TypeSet own({file.path(), "", ""});
  for (const Face face : {Face::regular, Face::bold, Face::italic, Face::light}) {
    EXPECT_EQ(own.font_id(face, false), own.font_id(Face::regular, false));
    EXPECT_EQ(own.width("Rigel", face, 10), type().width("Rigel", Face::condensed, 10));
  }
  EXPECT_EQ(own.font_name(Face::light, false), "RobotoCondensed-Regular");
}

TEST(OrderFonts, BoldIsSetWhereItIsNamed) {
  const ScratchFile bold("bold.ttf", embedded_file("fonts/italic"));
  const TypeSet own({"", bold.path(), ""});
  EXPECT_EQ(own.width("Rigel", Face::bold, 10), type().width("Rigel", Face::italic, 10));
  EXPECT_EQ(own.width("Rigel", Face::regular, 10), type().width("Rigel", Face::regular, 10));
}

TEST(OrderFonts, TroubleNamesTheFile) {
  const ScratchFile text("words.ttf", "These words are no font, however long they go on about it.");
  const ScratchFile cut("cut.ttf", embedded_file("fonts/regular").substr(0, 300));
  const ScratchFile empty("empty.ttf", "");
  std::string restricted(embedded_file("fonts/regular"));
  // fsType is the fifth number of the OS/2 table, whose offset stands in the table directory.
  const std::size_t entry = restricted.find("OS/2");
  const auto byte = [&](std::size_t i) {
    return static_cast<std::size_t>(static_cast<unsigned char>(restricted[i]));
  };
  restricted[(byte(entry + 8) << 24 | byte(entry + 9) << 16 | byte(entry + 10) << 8 |
              byte(entry + 11)) +
             9] = 2;
  const ScratchFile locked("locked.ttf", restricted);
  const std::pair<std::string, std::string> rows[] = {{"/nowhere/at/all.ttf", "cannot be read"},
                                                      {text.path(), "is not a font"},
                                                      {cut.path(), "is not a font"},
                                                      {empty.path(), "cannot be read"},
                                                      {locked.path(), "forbid embedding"}};
  for (const auto& [path, message] : rows) {
    try {
      const TypeSet own({path, "", ""});
      ADD_FAILURE() << path << " was taken for a font";
    } catch (const FileError& error) {
      EXPECT_TRUE(std::string(error.what()).starts_with(path)) << error.what();
      EXPECT_NE(std::string(error.what()).find(message), std::string::npos) << error.what();
    }
  }
}

TEST(Lines, NoLineIsWiderThanTheMeasureAndNoWordIsLost) {
  const std::string text =
      "The Moon is up all night, so look for the bright ones: Sirius, Procyon, and Rigel.";
  const auto lines = break_lines(type(), text, Face::regular, 8.5, 30);
  ASSERT_GT(lines.size(), 3U);
  std::string joined;
  for (const std::string& line : lines) {
    EXPECT_LE(type().width(line, Face::regular, 8.5), 30) << line;
    joined += (joined.empty() ? "" : " ") + line;
  }
  EXPECT_EQ(joined,
            "The Moon is up all night, so look for the bright ones: Sirius, Procyon, and Rigel.");
  // Each line is full: its follower's first word would not have fitted.
  for (std::size_t i = 0; i + 1 < lines.size(); ++i)
    EXPECT_GT(type().width(lines[i] + " " + lines[i + 1].substr(0, lines[i + 1].find(' ')),
                           Face::regular, 8.5),
              30);
}

TEST(Lines, SpacesThatHoldHold) {
  const double narrow = type().width("at 21:30", Face::regular, 8.5) + 0.5;
  using Lines = std::vector<std::string>;
  EXPECT_EQ(break_lines(type(), "at 21:30 h", Face::regular, 8.5, narrow),
            (Lines{"at 21:30", "h"}));
  EXPECT_EQ(break_lines(type(), "at 21:30\u00A0h", Face::regular, 8.5, narrow),
            (Lines{"at", "21:30\u00A0h"}));
  EXPECT_EQ(break_lines(type(), "at 21:30\u202Fh", Face::regular, 8.5, narrow),
            (Lines{"at", "21:30\u202Fh"}));
}

TEST(Lines, EdgesOfTheText) {
  using Lines = std::vector<std::string>;
  EXPECT_EQ(break_lines(type(), "", Face::regular, 8.5, 30), Lines{});
  EXPECT_EQ(break_lines(type(), "   ", Face::regular, 8.5, 30), Lines{});
  EXPECT_EQ(break_lines(type(), " one\ntwo ", Face::regular, 8.5, 30), (Lines{"one", "two"}));
  const double exact = type().width("exactly so", Face::regular, 8.5);
  EXPECT_EQ(break_lines(type(), "exactly so", Face::regular, 8.5, exact), (Lines{"exactly so"}));
  const Lines cut = break_lines(type(), "Çatalhöyükçatalhöyük", Face::regular, 8.5, 10);
  ASSERT_GT(cut.size(), 1U);
  std::string joined;
  for (const std::string& piece : cut) joined += piece;
  EXPECT_EQ(joined, "Çatalhöyükçatalhöyük");
}

}  // namespace
}  // namespace duskleaf
