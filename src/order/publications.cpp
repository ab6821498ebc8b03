// What to print: the publications of an order, by the table of keys in the order file's description
// (README).
#include "order/publications.hpp"

#include <algorithm>
#include <filesystem>
#include <fmt/format.h>

#include "order/nearest_name.hpp"
#include "order/papers.hpp"
#include "order/site_reader.hpp"

namespace duskleaf {
namespace {

void read_template(const MapReader& map, Publication& publication) {
  const YamlValue& value = map.require("template");
  publication.template_name = read_text(value, "template");
  const std::string& name = publication.template_name;
  publication.template_is_path = name.find('/') != std::string::npos || name.ends_with(".yaml");
  const auto& ours = template_names();
  if (!publication.template_is_path && std::find(ours.begin(), ours.end(), name) == ours.end()) {
    const std::string near = nearest_name(name, ours);
    throw OrderError(value.at, fmt::format("unknown template '{}'", name),
                     near.empty()
                         ? fmt::format("expected {}, or a path that ends in .yaml", listed(ours))
                         : fmt::format("did you mean '{}'?", near));
  }
  const bool monthly = publication.template_is_path || name == "monthly-handout";
  publication.files = monthly ? FileSplit::months : FileSplit::year;
  publication.name =
      publication.template_is_path ? std::filesystem::path(name).stem().string() : name;
}

std::string read_paper(const YamlValue& value) {
  const std::string name = read_text(value, "paper");
  if (const auto paper = canonical_paper(name)) return *paper;
  throw OrderError(value.at, fmt::format("unknown paper '{}'", name),
                   "expected " + listed(paper_names()));
}

std::vector<int> read_months(const YamlValue& value) {
  if (value.kind == YamlValue::Kind::scalar) {
    if (value.text == "all") return {};
    throw OrderError(value.at, fmt::format("months is {}", described(value)),
                     "expected all, or a list of month numbers such as [3, 4, 5]");
  }
  std::vector<int> months;
  for (const YamlValue& item : read_list(value, "months")) {
    const int month = read_integer(item, "a month", 1, 12);
    if (std::find(months.begin(), months.end(), month) != months.end())
      throw OrderError(item.at, fmt::format("month {} is given twice", month), "keep one");
    months.push_back(month);
  }
  if (months.empty())
    throw OrderError(value.at, "months is an empty list", "expected all, or month numbers");
  return months;
}

void read_pairs(const MapReader& map, Publication& publication,
                std::vector<PairMention>& mentions) {
  const bool paired = publication.template_name == "paired-places";
  for (const std::string_view key : {"pairs", "evenings"}) {
    if (paired) map.require(key);
    if (!paired && !publication.template_is_path && map.find(key) != nullptr)
      throw OrderError(map.where(key),
                       fmt::format("'{}' belongs to the template paired-places", key),
                       fmt::format("{} has no pairs; leave it out", publication.template_name));
  }
  if (const YamlValue* pairs = map.find("pairs")) {
    for (const YamlValue& item : read_list(*pairs, "pairs")) {
      if (item.kind != YamlValue::Kind::list || item.items.size() != 2)
        throw OrderError(item.at, fmt::format("a pair is {}", described(item)),
                         "expected [one-id, another-id]");
      const std::string first = read_id(item.items[0], "an id"),
                        second = read_id(item.items[1], "an id");
      if (first == second)
        throw OrderError(item.at, "a pair names one site twice", "expected two sites");
      mentions.push_back({first, item.items[0].at});
      mentions.push_back({second, item.items[1].at});
      publication.pairs.emplace_back(first, second);
    }
  }
  if (const YamlValue* evenings = map.find("evenings"))
    for (const YamlValue& item : read_list(*evenings, "evenings"))
      publication.evenings.push_back(read_date(item, "an evening"));
  const bool half = publication.pairs.empty() != publication.evenings.empty();
  if (half || (paired && publication.pairs.empty()))
    throw OrderError(map.where(publication.pairs.empty() ? "pairs" : "evenings"),
                     "pairs and evenings need at least one item each", "expected both");
}

Publication read_publication(const YamlValue& value, std::vector<PairMention>& mentions,
                             std::vector<Doubt>& noticed) {
  const MapReader map(value, "a publication",
                      {"template", "paper", "months", "ink", "large_print", "binding", "files",
                       "name", "pairs", "evenings"});
  Publication publication;
  publication.where = value.at;
  read_template(map, publication);
  if (const YamlValue* paper = map.find("paper")) publication.paper = read_paper(*paper);
  if (const YamlValue* months = map.find("months")) publication.months = read_months(*months);
  if (const YamlValue* ink = map.find("ink"))
    publication.ink = static_cast<InkMode>(read_choice(*ink, "ink", {"colour", "grey"}));
  if (const YamlValue* large = map.find("large_print"))
    publication.large_print = read_bool(*large, "large_print");
  if (const YamlValue* binding = map.find("binding"))
    publication.binding =
        static_cast<Binding>(read_choice(*binding, "binding", {"none", "edge", "top"}));
  if (const YamlValue* files = map.find("files"))
    publication.files = static_cast<FileSplit>(read_choice(*files, "files", {"months", "year"}));
  if (const YamlValue* name = map.find("name")) {
    publication.name = read_id(*name, "name");
  } else if (publication.template_is_path) {
    const YamlValue named{YamlValue::Kind::scalar, map.where("template"), publication.name, {}, {}};
    try {
      read_id(named, "name");
    } catch (const OrderError&) {
      throw OrderError(
          named.at,
          fmt::format("the template's file name {} cannot name the PDFs", described(named)),
          "give the publication a 'name' of letters, digits, hyphens and underscores");
    }
  }
  read_pairs(map, publication, mentions);
  if (publication.large_print)
    noticed.push_back({map.where("large_print"),
                       "large_print is not printed yet: the sheet comes in its usual size", true});
  if (publication.binding != Binding::none)
    noticed.push_back(
        {map.where("binding"), "binding is not printed yet: the margins are the usual ones", true});
  return publication;
}

}  // namespace

const std::vector<std::string_view>& template_names() {
  static const std::vector<std::string_view> names = {"monthly-handout", "school-calendar",
                                                      "place-almanac",   "season-poster",
                                                      "paired-places",   "dark-year"};
  return names;
}

std::vector<Publication> read_publications(const YamlValue& value,
                                           std::vector<PairMention>& mentions,
                                           std::vector<Doubt>& noticed) {
  std::vector<Publication> publications;
  for (const YamlValue& item : read_list(value, "publications"))
    publications.push_back(read_publication(item, mentions, noticed));
  if (publications.empty())
    throw OrderError(value.at, "publications is an empty list",
                     "expected at least one, such as template: monthly-handout");
  return publications;
}

}  // namespace duskleaf
