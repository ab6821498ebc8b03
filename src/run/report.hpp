#pragma once

#include <string>
#include <vector>

namespace duskleaf {

/// What became of one file.
struct ReportRow {
  enum class Status { pressed, skipped, failed };
  std::string order, site, publication;
  std::string file;  // path below the output folder
  Status status = Status::skipped;
  std::string reason;  // why it was skipped or failed
  int labels_left_out = 0;
  std::vector<std::string> notes;  // what of a pressed file's pages did not fit
};

struct PressReport {
  std::vector<ReportRow>
      rows;  // by order, site, publication, file, however the work was shared out
  int count(ReportRow::Status) const;
  int with_notes() const;  // files
};

/// The report as CSV (RFC 4180): order,site,publication,file,status,reason. A pressed
/// file's notes stand as its reason.
std::string report_csv(const PressReport&);

}  // namespace duskleaf
