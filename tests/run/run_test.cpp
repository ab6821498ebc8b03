// The run's parts: whole files, workers, the report. Expectations follow from their own
// descriptions.
#include <atomic>
#include <fcntl.h>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <sys/stat.h>
#include <unistd.h>

#include "order/order.hpp"
#include "order/scratch_folder.hpp"
#include "run/report.hpp"
#include "run/whole_file.hpp"
#include "run/workers.hpp"

namespace duskleaf {
namespace {

std::vector<std::string> names_in(const ScratchFolder& folder) {
  std::vector<std::string> names;
  for (const auto& entry : std::filesystem::directory_iterator(folder.path()))
    names.push_back(entry.path().filename().string());
  std::sort(names.begin(), names.end());
  return names;
}

TEST(WholeFile, AppearsAtItsEndAlone) {
  const ScratchFolder folder;
  folder.write("t.txt", "before");
  {
    WholeFile file(folder.path() / "t.txt");
    file.stream() << "after";
    file.stream().flush();
    std::string now;
    std::getline(std::ifstream(folder.path() / "t.txt"), now);
    EXPECT_EQ(now, "before");
    file.finish();
  }
  std::string now;
  std::getline(std::ifstream(folder.path() / "t.txt"), now);
  EXPECT_EQ(now, "after");
  EXPECT_THAT(names_in(folder), testing::ElementsAre("t.txt"));
}

TEST(WholeFile, LeavesNothingWhenNotFinished) {
  const ScratchFolder folder;
  { WholeFile(folder.path() / "t.txt").stream() << "half"; }
  EXPECT_THAT(names_in(folder), testing::IsEmpty());
}

TEST(WholeFile, LeavesNothingWhenItCannotTakeItsPlace) {
  const ScratchFolder folder;
  folder.write("t.txt/inside", "");  // a folder of that name, not empty
  EXPECT_THROW(write_whole(folder.path() / "t.txt", "bytes"), FileError);
  EXPECT_THAT(names_in(folder), testing::ElementsAre("t.txt"));
}

TEST(WholeFile, WritesThroughALink) {
  const ScratchFolder folder;
  folder.write("real.txt", "before");
  std::filesystem::create_symlink("real.txt", folder.path() / "link.txt");
  std::filesystem::create_symlink("new.txt", folder.path() / "dangling.txt");
  write_whole(folder.path() / "link.txt", "after");
  write_whole(folder.path() / "dangling.txt", "made");
  EXPECT_TRUE(std::filesystem::is_symlink(folder.path() / "link.txt"));
  EXPECT_TRUE(std::filesystem::is_symlink(folder.path() / "dangling.txt"));
  std::string now;
  std::getline(std::ifstream(folder.path() / "real.txt"), now);
  EXPECT_EQ(now, "after");
  std::getline(std::ifstream(folder.path() / "new.txt"), now);
  EXPECT_EQ(now, "made");
}

// It once put a plain file in the place of a device or a pipe.
TEST(WholeFile, WritesIntoAPipe) {
  const ScratchFolder folder;
  const std::string pipe = (folder.path() / "pipe").string();
  ASSERT_EQ(::mkfifo(pipe.c_str(), 0600), 0);
  const int reader = ::open(pipe.c_str(), O_RDONLY | O_NONBLOCK);
  ASSERT_GE(reader, 0);
  write_whole(pipe, "bytes");
  char got[8] = {};
  EXPECT_EQ(::read(reader, got, sizeof got - 1), 5);
  ::close(reader);
  EXPECT_STREQ(got, "bytes");
  EXPECT_TRUE(std::filesystem::is_fifo(pipe));
}

TEST(WritableFolder, IsMadeAndLeftEmpty) {
  const ScratchFolder folder;
  check_writable_folder(folder.path() / "a/b");
  EXPECT_TRUE(std::filesystem::is_empty(folder.path() / "a/b"));
  folder.write("file", "");
  EXPECT_THROW(check_writable_folder(folder.path() / "file"), FileError);
  EXPECT_THROW(check_writable_folder(folder.path() / "file/c"), FileError);
}

TEST(Workers, DoEachTaskOnce) {
  for (const int jobs : {0, 1, 3, 64}) {
    std::vector<std::atomic<int>> done(50);
    run_tasks(done.size(), jobs, [&](std::size_t i) { ++done[i]; });
    for (const auto& times : done) EXPECT_EQ(times, 1) << jobs << " jobs";
  }
  run_tasks(0, 4, [](std::size_t) { FAIL() << "there is no task"; });
}

// The bug: only --verbose told of a page that was too full.
TEST(Report, GivesThePressedFilesNotes) {
  PressReport report;
  report.rows.push_back(
      {"o.yaml", "a", "h", "a/h.pdf", ReportRow::Status::pressed, "", 0, {"one", "two", "one"}});
  report.rows.push_back({"o.yaml", "b", "h", "b/h.pdf", ReportRow::Status::pressed, "", 9, {}});
  EXPECT_EQ(report.with_notes(), 1);
  EXPECT_EQ(report_csv(report),
            "order,site,publication,file,status,reason\n"
            "o.yaml,a,h,a/h.pdf,pressed,one; two\n"
            "o.yaml,b,h,b/h.pdf,pressed,\n");
}

TEST(Report, QuotesWhatCsvMust) {
  PressReport report;
  report.rows.push_back(
      {"o.yaml", "a", "h", "a/h.pdf", ReportRow::Status::failed, "said \"no\", twice", 0, {}});
  report.rows.push_back({"o.yaml", "b", "h", "b/h.pdf", ReportRow::Status::pressed, "", 3, {}});
  EXPECT_EQ(report_csv(report),
            "order,site,publication,file,status,reason\n"
            "o.yaml,a,h,a/h.pdf,failed,\"said \"\"no\"\", twice\"\n"
            "o.yaml,b,h,b/h.pdf,pressed,\n");
  EXPECT_EQ(report.count(ReportRow::Status::failed), 1);
  EXPECT_EQ(report.count(ReportRow::Status::skipped), 0);
}

}  // namespace
}  // namespace duskleaf
