// The order file: what to print, for whom. Every key is read and checked here, whether or not this
// version prints it.
#include <algorithm>
#include <fmt/format.h>
#include <map>

#include "order/nearest_name.hpp"
#include "order/outputs.hpp"
#include "order/publications.hpp"
#include "order/site_reader.hpp"

namespace duskleaf {
namespace {

constexpr int first_year = 1900, last_year = 2100;

void read_span(const MapReader& map, Order& order) {
  const YamlValue* year = map.find("year");
  const YamlValue* start = map.find("start");
  if (year != nullptr && start != nullptr)
    throw OrderError(map.where("start"), "both 'year' and 'start' are given", "keep one of them");
  if (start == nullptr) {
    order.span = {read_integer(map.require("year"), "year", first_year, last_year), 1};
    order.starts_in_january = true;
    return;
  }
  const std::string expected =
      fmt::format("expected the first of twelve months, such as 2026-09, within {} to {}",
                  first_year, last_year);
  const std::string& text = start->text;
  YamlValue day = *start;
  day.text += "-01";
  Date first;
  try {
    if (start->kind != YamlValue::Kind::scalar || text.size() != 7)
      throw OrderError(start->at, "", "");
    first = read_date(day, "start");
  } catch (const OrderError&) {
    throw OrderError(start->at, fmt::format("start is {}", described(*start)), expected);
  }
  order.span = {year_of(first), month_of(first)};
  order.starts_in_january = false;
  if (year_of(first) > last_year || (year_of(first) == last_year && month_of(first) > 1))
    throw OrderError(start->at,
                     fmt::format("the twelve months from '{}' end after {}", text, last_year),
                     expected);
}

void read_habits(const MapReader& map, Order& order) {
  static const std::vector<std::string_view> languages = {"en", "es", "fr", "de",
                                                          "pt", "it", "el", "uk"};
  order.language_at = map.where("language");
  if (const YamlValue* language = map.find("language"))
    order.language = languages[read_choice(*language, "language", languages)];
  order.clock_12 =
      order.language == "en";  // common practice: English reads 9:30 pm, the others 21:30
  if (const YamlValue* clock = map.find("clock"))
    order.clock_12 = read_choice(*clock, "clock", {"12", "24"}) == 0;
}

void read_fonts(const YamlValue& value, Order& order) {
  const MapReader map(value, "fonts", {"regular", "bold", "italic"});
  for (const auto& [key, path] :
       {std::pair{"regular", &order.fonts.regular}, std::pair{"bold", &order.fonts.bold},
        std::pair{"italic", &order.fonts.italic}}) {
    const YamlValue* font = map.find(key);
    if (font == nullptr) continue;
    *path = path_in(order.folder, read_text(*font, key));
    check_font(*path, font->at);
  }
}

void check_ids(const std::vector<Site>& sites) {
  std::map<std::string, const Site*>
      seen;  // by the id in small letters: some file systems hold "a" and "A" for one
  for (const Site& site : sites) {
    std::string folded = site.place.id;
    std::transform(folded.begin(), folded.end(), folded.begin(),
                   [](char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c + 32) : c; });
    const auto [first, is_new] = seen.emplace(std::move(folded), &site);
    if (is_new) continue;
    const Location& other = first->second->where;
    throw OrderError(site.where, fmt::format("the site id '{}' is used twice", site.place.id),
                     fmt::format("expected another (the first stands at {}:{}:{})", other.file,
                                 other.line, other.column));
  }
}

void check_pairs(const std::vector<PairMention>& mentions, const std::vector<Site>& sites) {
  std::vector<std::string> ids;
  for (const Site& site : sites) ids.push_back(site.place.id);
  for (const PairMention& mention : mentions) {
    if (std::find(ids.begin(), ids.end(), mention.id) != ids.end()) continue;
    const std::string near = nearest_name(mention.id, ids);
    throw OrderError(mention.at, fmt::format("no site has the id '{}'", mention.id),
                     near.empty() ? "expected the id of a site of this order"
                                  : fmt::format("did you mean '{}'?", near));
  }
}

void read_sites(const MapReader& map, Order& order) {
  SiteContext context{order.folder, {}};
  if (const YamlValue* sites = map.find("sites"))
    for (const YamlValue& item : read_list(*sites, "sites"))
      order.sites.push_back(read_site(item, context));
  if (const YamlValue* from = map.find("sites_from")) {
    std::vector<Site> more =
        read_sites_csv(path_in(order.folder, read_text(*from, "sites_from")), from->at, context);
    std::move(more.begin(), more.end(), std::back_inserter(order.sites));
  }
  if (order.sites.empty())
    throw OrderError(map.where(map.find("sites") == nullptr ? "sites_from" : "sites"),
                     "the order has no sites",
                     "expected at least one under 'sites', or in the CSV of 'sites_from'");
  check_ids(order.sites);
}

}  // namespace

Order parse_order(std::string_view text, const std::string& path) {
  const YamlValue root = parse_yaml(text, path);
  const MapReader map(
      root, "the order",
      {"year", "start", "language", "clock", "publications", "sites", "sites_from", "fonts"});
  Order order;
  order.path = path;
  order.folder = folder_of(path);
  read_span(map, order);
  read_habits(map, order);
  std::vector<PairMention> mentions;
  order.publications = read_publications(map.require("publications"), mentions, order.noticed);
  if (const YamlValue* fonts = map.find("fonts")) read_fonts(*fonts, order);
  read_sites(map, order);
  check_pairs(mentions, order.sites);
  check_outputs(order);
  return order;
}

Order read_order(const std::string& path) {
  return parse_order(read_file(path, largest_yaml_bytes), path);
}

}  // namespace duskleaf
