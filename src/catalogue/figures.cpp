// The figures are this project's own; data/README.md states the rule by which they were drawn.
#include <algorithm>
#include <stdexcept>
#include <string>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"

namespace duskleaf {
namespace {

/// HR numbers with spaces between them, as indices into stars().
std::vector<int> read_path(std::string_view text) {
  std::vector<int> path;
  while (!text.empty()) {
    const std::string_view word = text.substr(0, text.find(' '));
    text.remove_prefix(std::min(text.size(), word.size() + 1));
    const int index = star_index(static_cast<int>(parse_number(word)));
    if (index < 0) throw std::runtime_error("no star HR " + std::string(word));
    path.push_back(index);
  }
  return path;
}

std::vector<Figure> read_figures() {
  const CsvTable table(embedded_file("data/figures.csv"));
  const std::size_t name = table.column("constellation"), part = table.column("part"),
                    path = table.column("path");
  std::vector<Figure> all;
  for (std::size_t i = 0; i < table.rows(); ++i) {
    const int constellation = constellation_index(table.cell(i, name));
    if (all.empty() || all.back().constellation != constellation ||
        all.back().part != table.cell(i, part))
      all.push_back({constellation, table.cell(i, part), {}, {}});
    const std::vector<int> joined = read_path(table.cell(i, path));
    for (std::size_t k = 0; k + 1 < joined.size(); ++k)
      all.back().lines.emplace_back(joined[k], joined[k + 1]);
    std::vector<int>& members = all.back().figure_stars;
    members.insert(members.end(), joined.begin(), joined.end());
  }
  for (Figure& figure : all) {
    std::sort(figure.figure_stars.begin(), figure.figure_stars.end());
    figure.figure_stars.erase(std::unique(figure.figure_stars.begin(), figure.figure_stars.end()),
                              figure.figure_stars.end());
  }
  return all;
}

std::vector<Asterism> read_asterisms() {
  const CsvTable table(embedded_file("data/asterisms.csv"));
  const std::size_t key = table.column("key"), path = table.column("stars");
  std::vector<Asterism> all;
  for (std::size_t i = 0; i < table.rows(); ++i)
    all.push_back({table.cell(i, key), read_path(table.cell(i, path))});
  return all;
}

}  // namespace

std::span<const Figure> figures() {
  static const std::vector<Figure> all = read_figures();
  return all;
}

std::span<const Asterism> asterisms() {
  static const std::vector<Asterism> all = read_asterisms();
  return all;
}

}  // namespace duskleaf
