// The names of the files that an order gives: NAME-YEAR-MM.pdf, NAME-YEAR.pdf or NAME-START.pdf,
// pairs/ID+ID/NAME-DATE.pdf.
#include "order/outputs.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <map>

namespace duskleaf {

std::vector<OutputFile> output_files(const Order& order, const Publication& publication) {
  std::vector<OutputFile> files;
  for (const auto& [first, second] : publication.pairs)
    for (const Date evening : publication.evenings)
      files.push_back(
          {fmt::format("pairs/{}+{}/{}-{}.pdf", first, second, publication.name, iso_date(evening)),
           {},
           false});
  if (!publication.pairs.empty()) return files;

  std::vector<int> chosen;
  for (int i = 0; i < 12; ++i) {
    const int month = order.span.month(i).second;
    const std::vector<int>& months = publication.months;
    if (months.empty() || std::find(months.begin(), months.end(), month) != months.end())
      chosen.push_back(i);
  }
  if (publication.files == FileSplit::months) {
    for (const int i : chosen) {
      const auto [year, month] = order.span.month(i);
      files.push_back({fmt::format("{}-{}-{:02}.pdf", publication.name, year, month), {i}, true});
    }
  } else {
    const Span& span = order.span;
    files.push_back(
        {order.starts_in_january
             ? fmt::format("{}-{}.pdf", publication.name, span.first_year)
             : fmt::format("{}-{}-{:02}.pdf", publication.name, span.first_year, span.first_month),
         chosen, true});
  }
  return files;
}

void check_outputs(const Order& order) {
  std::map<std::string, const Publication*> written;
  for (const Publication& publication : order.publications) {
    for (const OutputFile& file : output_files(order, publication)) {
      std::string folded = file.path;
      std::transform(folded.begin(), folded.end(), folded.begin(),
                     [](char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c + 32) : c; });
      const auto [first, is_new] = written.emplace(std::move(folded), &publication);
      if (is_new) continue;
      const Location& other = first->second->where;
      const std::string at = fmt::format("{}:{}:{}", other.file, other.line, other.column);
      throw OrderError(publication.where,
                       first->second == &publication
                           ? fmt::format("this publication would write {} twice", file.path)
                           : fmt::format("this publication would write {}, as the one at {} does",
                                         file.path, at),
                       "give it a 'name' of its own");
    }
  }
}

}  // namespace duskleaf
