// The report of a run, as CSV by RFC 4180 with \n line ends.
#include "run/report.hpp"

#include <algorithm>

namespace duskleaf {
namespace {

std::string cell(const std::string& text) {
  if (text.find_first_of(",\"\n\r") == std::string::npos) return text;
  std::string quoted = "\"";
  for (const char c : text) {
    if (c == '"') quoted += '"';
    quoted += c;
  }
  return quoted + '"';
}

std::string reason(const ReportRow& row) {
  std::string text = row.reason;
  for (auto note = row.notes.begin(); note != row.notes.end(); ++note)
    if (std::find(row.notes.begin(), note, *note) == note)  // twelve months may say the same
      text.append(text.empty() ? "" : "; ").append(*note);
  return text;
}

std::string status_name(ReportRow::Status status) {
  switch (status) {
    case ReportRow::Status::pressed:
      return "pressed";
    case ReportRow::Status::skipped:
      return "skipped";
    case ReportRow::Status::failed:
      break;
  }
  return "failed";
}

}  // namespace

int PressReport::count(ReportRow::Status status) const {
  return static_cast<int>(std::count_if(
      rows.begin(), rows.end(), [&](const ReportRow& row) { return row.status == status; }));
}

int PressReport::with_notes() const {
  return static_cast<int>(std::count_if(rows.begin(), rows.end(),
                                        [](const ReportRow& row) { return !row.notes.empty(); }));
}

std::string report_csv(const PressReport& report) {
  std::string text = "order,site,publication,file,status,reason\n";
  for (const ReportRow& row : report.rows)
    text += cell(row.order) + ',' + cell(row.site) + ',' + cell(row.publication) + ',' +
            cell(row.file) + ',' + status_name(row.status) + ',' + cell(reason(row)) + '\n';
  return text;
}

}  // namespace duskleaf
