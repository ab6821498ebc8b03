// Many sites as a table: CSV by RFC 4180 (UTF-8; quoted cells may hold commas, line breaks and
// doubled quotes). Each row becomes the map that a site of the order would be, so that one reader
// checks both.
#include <algorithm>
#include <fmt/format.h>
#include <set>

#include "order/site_reader.hpp"

namespace duskleaf {
namespace {

constexpr std::size_t largest_csv_bytes = 16'000'000;

struct Cell {
  std::string text;
  Location at;
};
using Row = std::vector<Cell>;

/// Walks the text cell by cell and keeps count of lines and characters.
class CsvReader {
 public:
  CsvReader(std::string_view text, const std::string& file) : text_(text), here_{file, 1, 1} {}

  bool at_end() const { return at_ >= text_.size(); }

  Row next_row() {
    Row row;
    for (;;) {
      row.push_back(next_cell());
      if (at_end()) return row;
      const char separator = text_[at_];
      step();
      if (separator == '\n') return row;
    }
  }

 private:
  void step() {
    if (text_[at_] == '\n') {
      ++here_.line;
      here_.column = 1;
    } else if ((static_cast<unsigned char>(text_[at_]) & 0xC0U) != 0x80U) {
      ++here_.column;
    }
    ++at_;
  }
  Cell next_cell() {
    Cell cell{"", here_};
    if (at_end() || text_[at_] != '"') {
      while (!at_end() && text_[at_] != ',' && text_[at_] != '\n') {
        if (text_[at_] == '"')
          throw OrderError(here_, "a quote inside a cell that does not begin with one",
                           "put the whole cell in quotes and double those within");
        cell.text += text_[at_];
        step();
      }
      return cell;
    }
    step();
    for (;;) {
      if (at_end())
        throw OrderError(cell.at, "a quote is opened and not closed",
                         "close it with another quote");
      const char c = text_[at_];
      step();
      if (c == '"') {
        if (at_end() || text_[at_] != '"') break;
        step();
      }
      cell.text += c;
    }
    if (!at_end() && text_[at_] != ',' && text_[at_] != '\n')
      throw OrderError(here_, "text after a cell's closing quote",
                       "a comma or the end of the line was expected");
    return cell;
  }

  std::string_view text_;
  std::size_t at_ = 0;
  Location here_;
};

YamlValue scalar_value(std::string text, const Location& at) {
  return {YamlValue::Kind::scalar, at, std::move(text), {}, {}};
}

/// The words of a cell, split at spaces, each with its place (a cell that is split has no line
/// breaks before its words).
std::vector<YamlValue> words_of(const Cell& cell) {
  std::vector<YamlValue> words;
  for (std::size_t at = 0; (at = cell.text.find_first_not_of(' ', at)) != std::string::npos;) {
    const std::size_t end = std::min(cell.text.find(' ', at), cell.text.size());
    Location place = cell.at;
    place.column += column_of(cell.text, at) - 1;
    words.push_back(scalar_value(cell.text.substr(at, end - at), place));
    at = end;
  }
  return words;
}

/// "0:3 90:8" -> [[0, 3], [90, 8]]
YamlValue skyline_value(const Cell& cell) {
  YamlValue list{YamlValue::Kind::list, cell.at, "", {}, {}};
  for (const YamlValue& word : words_of(cell)) {
    const std::size_t colon = word.text.find(':');
    if (colon == std::string::npos)
      throw OrderError(word.at, fmt::format("a point of the skyline is '{}'", word.text),
                       "expected azimuth:altitude in degrees, such as 90:8");
    YamlValue point{YamlValue::Kind::list, word.at, "", {}, {}};
    point.items.push_back(scalar_value(word.text.substr(0, colon), word.at));
    point.items.push_back(scalar_value(word.text.substr(colon + 1), word.at));
    list.items.push_back(std::move(point));
  }
  return list;
}

YamlValue cell_value(const std::string& key, const Cell& cell) {
  if (key == "skyline") return skyline_value(cell);
  if (key == "chart_hour")  // two words are no list of twelve: "9 pm" is a wrong time of day
    if (std::vector<YamlValue> hours = words_of(cell); hours.size() > 2)
      return {YamlValue::Kind::list, cell.at, "", std::move(hours), {}};
  return scalar_value(cell.text, cell.at);
}

bool is_empty(const Cell& cell) { return cell.text.find_first_not_of(' ') == std::string::npos; }

void put(YamlValue& site, const Cell& column, YamlValue value) {
  const std::size_t dot = column.text.find('.');
  if (dot == std::string::npos) {
    site.entries.push_back({column.text, column.at, std::move(value)});
    return;
  }
  const std::string outer = column.text.substr(0, dot);
  auto found = std::find_if(site.entries.begin(), site.entries.end(),
                            [&](const YamlEntry& entry) { return entry.key == outer; });
  if (found == site.entries.end())
    found = site.entries.insert(site.entries.end(),
                                {outer, column.at, {YamlValue::Kind::map, value.at, "", {}, {}}});
  if (found->value.kind != YamlValue::Kind::map)
    throw OrderError(column.at, fmt::format("column '{}' beside a column '{}'", column.text, outer),
                     "keep one of them");
  found->value.entries.push_back({column.text.substr(dot + 1), column.at, std::move(value)});
}

void check_header(const Row& header) {
  std::set<std::string> seen;
  for (const Cell& column : header) {
    if (column.text.find(';') != std::string::npos)
      throw OrderError(column.at, "the header's cells are separated by semicolons",
                       "expected commas");
    if (column.text.empty())
      throw OrderError(column.at, "a column has no name", "expected a site's key");
    if (column.text == "sessions" || column.text == "dates" ||
        column.text.starts_with("sessions.") || column.text.starts_with("dates."))
      throw OrderError(column.at, fmt::format("column '{}' is not read from a CSV", column.text),
                       "sites with sessions or dates of their own go into the order");
    if (!seen.insert(column.text).second)
      throw OrderError(column.at, fmt::format("column '{}' is given twice", column.text),
                       "keep one");
  }
}

}  // namespace

std::vector<Site> read_sites_csv(const std::string& path, const Location& named_at,
                                 SiteContext& context) {
  std::string bytes;
  try {
    bytes = read_file(path, largest_csv_bytes);
  } catch (const FileError& error) {
    throw OrderError(named_at, error.what(),
                     "expected a CSV file of sites, named relative to the order");
  }
  const std::string text = clean_text(bytes, path);
  CsvReader reader(text, path);
  const Row header = reader.next_row();
  if (header.size() == 1 && header[0].text.empty())
    throw OrderError({path, 1, 1}, "the file is empty",
                     "a header row of the sites' keys was expected");
  check_header(header);

  std::vector<Site> sites;
  while (!reader.at_end()) {
    const Row row = reader.next_row();
    const bool blank = std::all_of(row.begin(), row.end(), is_empty);
    if (blank && (row.size() == 1 || row.size() == header.size()))
      continue;  // spreadsheets leave rows of commas at the end
    if (row.size() != header.size())
      throw OrderError(row[0].at, fmt::format("the row has {} cells", row.size()),
                       fmt::format("expected {}, as in the header", header.size()));
    YamlValue site{YamlValue::Kind::map, row[0].at, "", {}, {}};
    for (std::size_t i = 0; i < row.size(); ++i) {
      put(site, header[i],
          is_empty(row[i]) ? YamlValue{YamlValue::Kind::null, row[i].at, "", {}, {}}
                           : cell_value(header[i].text, row[i]));
    }
    sites.push_back(read_site(site, context));
  }
  return sites;
}

}  // namespace duskleaf
