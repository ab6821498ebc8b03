// The real program's commands: what they say, and the named exit codes of the command line's
// description (README).
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "cli/program.hpp"

namespace duskleaf {
namespace {

using testing::AllOf;
using testing::ElementsAre;
using testing::HasSubstr;
using testing::IsEmpty;
using testing::StartsWith;

const std::string one_site =
    "year: 2027\nclock: 24\npublications: [{ template: monthly-handout }]\n"
    "sites: [{ id: alder, name: Alder Hill, latitude: 52, longitude: 5, time_zone: "
    "Europe/Amsterdam }]\n";

struct Line {
  std::string label;
  std::vector<std::string> arguments;
  int code;
  std::string message;
};
void PrintTo(const Line& line, std::ostream* out) { *out << line.label; }

class CommandLine : public testing::TestWithParam<Line> {};

TEST_P(CommandLine, AnswersWithItsCode) {
  const ScratchFolder folder;
  folder.write("o.yaml", one_site);
  folder.write("bad.yaml", "year: 1850\n");
  folder.write("later.yaml", "year: 2027\npublications: [{ template: dark-year }]\n" +
                                 one_site.substr(one_site.find("sites")));
  folder.write("file", "");
  const Answer answer = run(folder, GetParam().arguments);
  EXPECT_EQ(answer.code, GetParam().code);
  EXPECT_THAT(answer.err, StartsWith(GetParam().message));
  EXPECT_THAT(answer.out, IsEmpty());
  EXPECT_THAT(files_below(folder.path().string()),
              ElementsAre("bad.yaml", "file", "later.yaml", "o.yaml"));
}

INSTANTIATE_TEST_SUITE_P(
    Refused, CommandLine,
    testing::Values(
        Line{"no command",
             {},
             2,
             "duskleaf: a command is needed: new, proof, press, data or blocks\n"},
        Line{"unknown command",
             {"pres"},
             2,
             "duskleaf: there is no command 'pres'; did you mean 'press'?\n"},
        Line{"unknown option", {"press", "o.yaml", "--colour"}, 2, "duskleaf: "},
        Line{"month 13", {"press", "o.yaml", "--month", "13"}, 2, "duskleaf: --month"},
        Line{"year 1850", {"press", "o.yaml", "--year", "1850"}, 2, "duskleaf: --year"},
        Line{"share 3/2",
             {"press", "o.yaml", "--share", "3/2"},
             2,
             "duskleaf: --share 3/2: expected K/N with K from 1 to N, such as 2/8\n"},
        Line{"unknown site",
             {"press", "o.yaml", "--site", "aldr"},
             2,
             "duskleaf: --site aldr: no site has this id; did you mean 'alder'?\n"},
        Line{"wrong order",
             {"press", "bad.yaml"},
             3,
             "bad.yaml:1:7: year is '1850'; expected a whole number from 1900 to 2100\n"},
        Line{"missing order", {"press", "none.yaml"}, 4, "none.yaml: there is no such file\n"},
        Line{"a template of later",
             {"press", "later.yaml"},
             3,
             "later.yaml:2:16: the template dark-year is not printed yet by this version; "},
        Line{"a folder under a file",
             {"press", "o.yaml", "-o", "file/out"},
             4,
             "file/out: the folder cannot be made ("},
        Line{"a folder that is a file",
             {"press", "o.yaml", "-o", "file"},
             4,
             "file: the folder cannot be made ("},
        Line{"unknown table",
             {"data", "o.yaml", "--table", "night"},
             2,
             "duskleaf: --table night: there is no such table; did you mean 'nights'?\n"},
        Line{"a form of later",
             {"data", "o.yaml", "--table", "nights", "--as", "ics"},
             2,
             "duskleaf: --as ics: calendars are not made yet by this version; expected csv or "
             "json\n"},
        Line{"data into a file's folder",
             {"data", "o.yaml", "--table", "nights", "-o", "file/t.csv"},
             4,
             "file: the folder cannot be made ("},
        Line{"unknown block",
             {"blocks", "dom"},
             2,
             "duskleaf: there is no block 'dom'; did you mean 'dome'?\n"},
        Line{"new over a file",
             {"new", "o.yaml"},
             4,
             "o.yaml: there is such a file already; new does not overwrite\n"},
        Line{"new with half a place",
             {"new", "n.yaml", "--latitude", "5"},
             2,
             "duskleaf: a place needs --latitude, --longitude and --time-zone, all three\n"},
        Line{"new with latitude 91",
             {"new", "n.yaml", "--latitude", "91", "--longitude", "1", "--time-zone", "UTC"},
             2,
             "duskleaf: latitude is '91'; expected degrees from -90 to 90, or such as 54 10 48 "
             "N\n"}));

TEST(Version, IsToldOnStandardOutput) {
  const ScratchFolder folder;
  const Answer answer = run(folder, {"--version"});
  EXPECT_EQ(answer.code, 0);
  EXPECT_THAT(answer.out, StartsWith("duskleaf 0."));
  EXPECT_EQ(run(folder, {"press", "--help"}).code, 0);
}

TEST(Proof, ShowsWhatWouldBePrintedAndWritesNothing) {
  const ScratchFolder folder;
  folder.write("o.yaml", one_site);
  const Answer answer = run(folder, {"proof", "o.yaml"});
  EXPECT_EQ(answer.code, 0);
  EXPECT_THAT(
      answer.out,
      AllOf(HasSubstr("alder: Alder Hill, 52.0000 N, 5.0000 E, Europe/Amsterdam, charts at 21:30"),
            HasSubstr("monthly-handout-2027-01.pdf to monthly-handout-2027-12.pdf"),
            HasSubstr("12 files in all")));
  EXPECT_THAT(answer.err, IsEmpty());
  EXPECT_THAT(files_below(folder.path().string()), ElementsAre("o.yaml"));
}

TEST(Proof, GoesOnAfterAWrongOrder) {
  const ScratchFolder folder;
  folder.write("a.yaml", "year: 1850\n");
  folder.write("b.yaml", "yaer: 2027\n");
  const Answer answer = run(folder, {"proof", "a.yaml", "b.yaml"});
  EXPECT_EQ(answer.code, 3);
  EXPECT_THAT(
      answer.err,
      AllOf(HasSubstr("a.yaml:1:7: "),
            HasSubstr("b.yaml:1:1: unknown key 'yaer' in the order; did you mean 'year'?")));
}

TEST(Proof, NamesWhatIsNotPrintedYet) {
  const ScratchFolder folder;
  folder.write("o.yaml",
               "year: 2027\nlanguage: fr\npublications: [{ template: dark-year }]\n"
               "sites: [{ id: a, name: A, latitude: 0, longitude: 0, time_zone: UTC, skyline: [[0, "
               "5]] }]\n");
  const Answer answer = run(folder, {"proof", "o.yaml"});
  EXPECT_EQ(answer.code, 0);
  EXPECT_THAT(
      answer.err,
      AllOf(
          HasSubstr("o.yaml:2:1: warning: the language 'fr' is not printed yet by this version\n"),
          HasSubstr(
              "o.yaml:3:16: warning: the template dark-year is not printed yet by this version\n"),
          HasSubstr("o.yaml:4:15: warning: a: latitude 0, longitude 0 is in the sea; ")));
}

TEST(Proof, FindsTheExampleOrdersRight) {
  const ScratchFolder folder;
  int orders = 0;
  for (const auto& entry : std::filesystem::directory_iterator(DUSKLEAF_SOURCE "/config")) {
    if (entry.path().extension() != ".yaml") continue;
    ++orders;
    const Answer answer = run(folder, {"proof", entry.path().string()});
    EXPECT_EQ(answer.code, 0) << entry.path() << answer.err;
    EXPECT_THAT(answer.out, HasSubstr("12 files in all"));
  }
  EXPECT_GE(orders, 4);
}

TEST(New, WritesAnOrderThatProofAccepts) {
  const ScratchFolder folder;
  const Answer answer = run(
      folder, {"new", "n.yaml", "--name", "Ash \"Down\"", "--latitude", "50 30 S", "--longitude",
               "-70.5", "--time-zone", "America/Punta_Arenas", "--year", "2030"});
  EXPECT_EQ(answer.code, 0) << answer.err;
  const Answer proof = run(folder, {"proof", "n.yaml"});
  EXPECT_EQ(proof.code, 0) << proof.err;
  EXPECT_THAT(proof.out,
              AllOf(HasSubstr("ash-down: Ash \"Down\", 50.5000 S, 70.5000 W, America/Punta_Arenas"),
                    HasSubstr("2030-01")));
  EXPECT_THAT(proof.err, IsEmpty());
}

TEST(New, WithoutAPlaceWritesAnInventedOne) {
  const ScratchFolder folder;
  EXPECT_EQ(run(folder, {"new"}).code, 0);
  EXPECT_THAT(bytes_of(folder.file("order.yaml")), HasSubstr("this place is invented"));
  EXPECT_EQ(run(folder, {"proof", "order.yaml"}).code, 0);
}

TEST(Blocks, ListsTheirOptions) {
  const ScratchFolder folder;
  EXPECT_THAT(run(folder, {"blocks", "dome"}).out,
              AllOf(StartsWith("dome\n"), HasSubstr("facing: equator|pole")));
}

TEST(Data, GoesToStandardOutputOrAFileAlike) {
  const ScratchFolder folder;
  folder.write("o.yaml", one_site);
  const Answer shown = run(folder, {"data", "o.yaml", "--table", "instants"});
  EXPECT_EQ(shown.code, 0);
  EXPECT_THAT(shown.out, StartsWith("site,event,body,utc,local,value,unit\r\n-,"));
  EXPECT_EQ(run(folder, {"data", "o.yaml", "--table", "instants", "-o", "t.csv"}).code, 0);
  EXPECT_EQ(bytes_of(folder.file("t.csv")), shown.out);
}

TEST(Data, TellsWhenStandardOutputIsFull) {
  const ScratchFolder folder;
  folder.write("o.yaml", one_site);
  const Answer answer = run(folder, {"data", "o.yaml", "--table", "nights"}, "", "/dev/full");
  EXPECT_EQ(answer.code, 4);
  EXPECT_EQ(answer.err, "standard output cannot be written\n");
}

}  // namespace
}  // namespace duskleaf
