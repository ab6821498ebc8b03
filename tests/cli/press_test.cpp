// Pressing with the real program: what it writes, whatever the threads, the locale and the clock of
// the machine, and what it leaves when something fails.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "cli/program.hpp"

namespace duskleaf {
namespace {

using testing::ElementsAre;
using testing::HasSubstr;
using testing::IsEmpty;
using testing::StartsWith;

const std::string three_sites =
    "year: 2027\nclock: 24\npublications: [{ template: monthly-handout, months: [3, 6], name: h "
    "}]\nsites:\n"
    "  - { id: alder, name: Alder Hill, latitude: 52, longitude: 5, time_zone: Europe/Amsterdam }\n"
    "  - { id: birch, name: Birch Bay, latitude: -43, longitude: 171, time_zone: Pacific/Auckland "
    "}\n"
    "  - { id: cedar, name: Cedar Cape, latitude: 70, longitude: 20, time_zone: Europe/Oslo }\n";

std::vector<std::string> contents(const ScratchFolder& folder, const std::string& out) {
  std::vector<std::string> list;
  for (const std::string& file : files_below(folder.file(out)))
    list.push_back(file + "\n" + bytes_of(folder.file(out + "/" + file)));
  return list;
}

TEST(Press, WritesTheSameBytesWhateverTheMachine) {
  const ScratchFolder folder;
  folder.write("o.yaml", three_sites);
  const Answer plain = run(folder, {"press", "o.yaml", "-o", "a", "--month", "3", "--jobs", "1"});
  ASSERT_EQ(plain.code, 0) << plain.err;
  EXPECT_THAT(plain.err, IsEmpty());  // quiet in a pipe
  EXPECT_THAT(files_below(folder.file("a")),
              ElementsAre("alder/h-2027-03.pdf", "birch/h-2027-03.pdf", "cedar/h-2027-03.pdf",
                          "report.csv"));
  EXPECT_THAT(bytes_of(folder.file("a/birch/h-2027-03.pdf")), StartsWith("%PDF-1.7"));
  EXPECT_EQ(run(folder, {"press", "o.yaml", "-o", "b", "--month", "3", "--jobs", "4"},
                "env LANG=de_DE.UTF-8 LC_ALL=tr_TR.UTF-8 TZ=Asia/Kathmandu")
                .code,
            0);
  EXPECT_EQ(contents(folder, "a"), contents(folder, "b"));
}

TEST(Press, OneFailingSiteDoesNotStopTheRest) {
  const ScratchFolder folder;
  folder.write("o.yaml", three_sites);
  folder.write("out/birch", "a file where the site's folder would be");
  const Answer answer = run(folder, {"press", "o.yaml", "-o", "out", "--month", "6"});
  EXPECT_EQ(answer.code, 1);
  EXPECT_THAT(
      answer.err,
      HasSubstr("birch/h-2027-06.pdf: out/birch: the folder cannot be made (Not a directory)\n"));
  EXPECT_THAT(files_below(folder.file("out")),
              ElementsAre("alder/h-2027-06.pdf", "birch", "cedar/h-2027-06.pdf", "report.csv"));
  EXPECT_EQ(bytes_of(folder.file("out/report.csv")),
            "order,site,publication,file,status,reason\n"
            "o.yaml,alder,h,alder/h-2027-03.pdf,skipped,another month was asked for\n"
            "o.yaml,alder,h,alder/h-2027-06.pdf,pressed,\n"
            "o.yaml,birch,h,birch/h-2027-03.pdf,skipped,another month was asked for\n"
            "o.yaml,birch,h,birch/h-2027-06.pdf,failed,out/birch: the folder cannot be made (Not a "
            "directory)\n"
            "o.yaml,cedar,h,cedar/h-2027-03.pdf,skipped,another month was asked for\n"
            "o.yaml,cedar,h,cedar/h-2027-06.pdf,pressed,\n");
}

TEST(Press, SharesTogetherAreTheWhole) {
  const ScratchFolder folder;
  folder.write("o.yaml", three_sites);
  EXPECT_EQ(run(folder, {"press", "o.yaml", "-o", "out", "--month", "3", "--share", "1/2"}).code,
            0);
  EXPECT_THAT(files_below(folder.file("out")),
              ElementsAre("alder/h-2027-03.pdf", "cedar/h-2027-03.pdf", "report-1-of-2.csv"));
  EXPECT_EQ(run(folder, {"press", "o.yaml", "-o", "out", "--month", "3", "--share", "2/2"}).code,
            0);
  EXPECT_THAT(files_below(folder.file("out")),
              ElementsAre("alder/h-2027-03.pdf", "birch/h-2027-03.pdf", "cedar/h-2027-03.pdf",
                          "report-1-of-2.csv", "report-2-of-2.csv"));
}

TEST(Press, SiteAndYearNarrowIt) {
  const ScratchFolder folder;
  folder.write("o.yaml", three_sites);
  EXPECT_EQ(run(folder, {"press", "o.yaml", "--site", "cedar", "--year", "2031"}).code, 0);
  EXPECT_THAT(files_below(folder.file("out")),
              ElementsAre("cedar/h-2031-03.pdf", "cedar/h-2031-06.pdf", "report.csv"));
}

TEST(Press, OneFileForTheYear) {
  const ScratchFolder folder;
  std::string text = three_sites;
  folder.write("o.yaml", text.replace(text.find("name: h"), 7, "files: year"));
  EXPECT_EQ(run(folder, {"press", "o.yaml", "--site", "alder"}).code, 0);
  EXPECT_THAT(files_below(folder.file("out")),
              ElementsAre("alder/monthly-handout-2027.pdf", "report.csv"));
}

TEST(Press, TwoOrdersMayNotWriteOneFile) {
  const ScratchFolder folder;
  folder.write("o.yaml", three_sites);
  folder.write("p.yaml", three_sites);
  const Answer answer = run(folder, {"press", "o.yaml", "p.yaml"});
  EXPECT_EQ(answer.code, 3);
  EXPECT_EQ(answer.err,
            "p.yaml:5:11: alder/h-2027-03.pdf would also be written by o.yaml; press the two "
            "orders into different folders, "
            "or give the site another id\n");
  EXPECT_FALSE(std::filesystem::exists(folder.file("out")));
}

TEST(Press, WarnsOfAPlaceThatLooksWrong) {
  const ScratchFolder folder;
  folder.write(
      "o.yaml",
      "year: 2027\npublications: [{ template: monthly-handout, months: [1] }]\n"
      "sites: [{ id: a, name: A, latitude: 40, longitude: 105, time_zone: America/Denver }]\n");
  const Answer answer = run(folder, {"press", "o.yaml"});
  EXPECT_EQ(answer.code, 0);
  EXPECT_EQ(answer.err,
            "o.yaml:3:15: warning: a: the clock of America/Denver is 10.0 hours from the Sun's at "
            "this longitude; is the "
            "longitude's sign right (east positive)?\n");
}

// The bug: emoji and such came out as question marks, and nobody was told.
TEST(Press, WarnsOfCharactersThatTheFontsLack) {
  const ScratchFolder folder;
  folder.write("o.yaml",
               "year: 2027\npublications: [{ template: monthly-handout, months: [1] }]\n"
               "sites: [{ id: a, name: \"Ó Πάρνηθα, Лес?\", latitude: 40, longitude: 5, time_zone: "
               "Europe/Paris, notes: { 1: \"Come! \U0001F31F 星 \U0001F31F\" } }]\n");
  const std::string warning =
      "o.yaml:3:15: warning: a: the fonts lack \U0001F31F 星; each is printed as a question mark\n";
  for (const char* command : {"proof", "press"}) {
    const Answer answer = run(folder, {command, "o.yaml"});
    EXPECT_EQ(answer.code, 0);
    EXPECT_EQ(answer.err, warning);
  }
}

// The bug: a year file and --month gave no file, no word and success.
TEST(Press, SaysWhyNothingIsPressed) {
  const ScratchFolder folder;
  folder.write(
      "o.yaml",
      "year: 2027\npublications: [{ template: monthly-handout, files: year }]\n"
      "sites: [{ id: a, name: A, latitude: 40, longitude: 5, time_zone: Europe/Paris }]\n");
  const Answer answer = run(folder, {"press", "o.yaml", "--month", "3"});
  EXPECT_EQ(answer.code, 0);
  EXPECT_EQ(answer.err,
            "nothing to press: one file holds the whole year; press it without --month\n");
  EXPECT_EQ(run(folder, {"press", "o.yaml", "--share", "2/2"}).err,
            "nothing to press: no site falls to this part\n");
}

TEST(Press, NeedsAFolderWithAName) {
  const ScratchFolder folder;
  folder.write("o.yaml", three_sites);
  const Answer answer = run(folder, {"press", "o.yaml", "-o", "", "--month", "3"});
  EXPECT_EQ(answer.code, 2);
  EXPECT_EQ(answer.err, "duskleaf: --out: expected the name of a folder\n");
  EXPECT_THAT(files_below(folder.path().string()), ElementsAre("o.yaml"));
}

TEST(Press, MissingTemplateIsToldWhereItIsNamed) {
  const ScratchFolder folder;
  folder.write(
      "o.yaml",
      "year: 2027\npublications:\n  - template: mine.yaml\n"
      "sites: [{ id: a, name: A, latitude: 40, longitude: 5, time_zone: Europe/Paris }]\n");
  for (const char* command : {"proof", "press"}) {
    const Answer answer = run(folder, {command, "o.yaml"});
    EXPECT_EQ(answer.code, 3);
    EXPECT_EQ(answer.err,
              "o.yaml:3:5: mine.yaml: there is no such file; expected a page template, named "
              "relative to the order\n");
  }
}

TEST(Press, SaysThatOwnWordsHardlyFit) {
  const ScratchFolder folder;
  std::string note;
  for (int i = 0; i < 300; ++i) note += "Bring a blanket. ";
  folder.write("o.yaml",
               "year: 2027\npublications: [{ template: monthly-handout, months: [1] }]\n"
               "sites: [{ id: a, name: A, latitude: 40, longitude: 5, time_zone: Europe/Paris, "
               "notes: { 1: \"" +
                   note + "\" } }]\n");
  const Answer answer = run(folder, {"press", "o.yaml"});
  EXPECT_EQ(answer.code, 0);
  EXPECT_EQ(answer.err, "1 file has a page whose words hardly fit; see the report in out\n");
  EXPECT_THAT(bytes_of(folder.file("out/report.csv")), HasSubstr(",pressed,a page is reduced to "));
}

}  // namespace
}  // namespace duskleaf
