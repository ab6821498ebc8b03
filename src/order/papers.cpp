// Sheet sizes: ISO 216:2007 (A and B series); letter, legal and tabloid by ANSI/ASME Y14.1 and
// common practice (inches).
#include "order/papers.hpp"

#include <algorithm>

namespace duskleaf {
namespace {

struct Paper {
  std::string_view name;
  double width_mm, height_mm;
};
constexpr Paper papers[] = {
    {"A0", 841, 1189},         {"A1", 594, 841}, {"A2", 420, 594},         {"A3", 297, 420},
    {"A4", 210, 297},          {"A5", 148, 210}, {"A6", 105, 148},         {"B0", 1000, 1414},
    {"B1", 707, 1000},         {"B2", 500, 707}, {"B3", 353, 500},         {"B4", 250, 353},
    {"B5", 176, 250},          {"B6", 125, 176}, {"letter", 215.9, 279.4}, {"legal", 215.9, 355.6},
    {"tabloid", 279.4, 431.8},
};

bool same_letters(std::string_view a, std::string_view b) {
  return std::equal(a.begin(), a.end(), b.begin(), b.end(),
                    [](char x, char y) { return (x | 0x20) == (y | 0x20); });
}

}  // namespace

std::vector<std::string_view> paper_names() {
  std::vector<std::string_view> names;
  for (const Paper& paper : papers) names.push_back(paper.name);
  return names;
}

std::optional<std::string> canonical_paper(std::string_view name) {
  for (const Paper& paper : papers)
    if (same_letters(paper.name, name)) return std::string(paper.name);
  return std::nullopt;
}

std::optional<std::pair<double, double>> paper_size(std::string_view name) {
  for (const Paper& paper : papers)
    if (same_letters(paper.name, name)) return std::pair{paper.width_mm, paper.height_mm};
  return std::nullopt;
}

}  // namespace duskleaf
