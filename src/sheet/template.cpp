#include "sheet/template.hpp"

#include <algorithm>

#include "base/embedded.hpp"
#include "order/nearest_name.hpp"
#include "order/yaml_reader.hpp"
#include "order/yaml_values.hpp"

namespace duskleaf {
namespace {

std::vector<std::string_view> block_names() {
  std::vector<std::string_view> names;
  for (const BlockSpec& spec : block_table()) names.push_back(spec.name);
  return names;
}

/// The value of an option, checked against what the block's table allows: "a|b|c", "number" or
/// "text".
std::string read_option(const YamlValue& value, const OptionSpec& option) {
  if (option.allowed == "text") return read_text(value, option.name);
  if (option.allowed == "number") {
    read_number(value, option.name, 0, 1000);
    return value.text;
  }
  std::vector<std::string_view> choices;
  for (std::string_view rest = option.allowed; !rest.empty();) {
    const std::size_t bar = rest.find('|');
    choices.push_back(rest.substr(0, bar));
    rest.remove_prefix(bar == std::string_view::npos ? rest.size() : bar + 1);
  }
  return std::string(choices[read_choice(value, option.name, choices)]);
}

PageTemplate::Block read_block(const YamlValue& value) {
  // The block's name decides which keys may follow, so it is looked up before the map is checked.
  const YamlValue* name = nullptr;
  for (const YamlEntry& entry : value.entries)
    if (entry.key == "block") name = &entry.value;
  if (name == nullptr)
    throw OrderError(value.at, "a block without its name",
                     "a map with the key 'block', one of " + listed(block_names()));
  const BlockSpec& spec = block_table()[read_choice(*name, "block", block_names())];
  std::vector<std::string_view> keys{"block", "over", "fill", "roam"};
  for (const OptionSpec& option : spec.options) keys.push_back(option.name);
  const MapReader reader(value, "the block '" + std::string(spec.name) + "'", keys);
  PageTemplate::Block block;
  block.spec = &spec;
  if (const YamlValue* over = reader.find("over")) block.over = read_bool(*over, "over");
  if (const YamlValue* fill = reader.find("fill")) {
    block.fill = read_bool(*fill, "fill");
    if (block.fill && block.over)
      throw OrderError(fill->at, "a block with both over and fill", "one of the two, or neither");
  }
  if (const YamlValue* roam = reader.find("roam")) block.roam = read_bool(*roam, "roam");
  for (const OptionSpec& option : spec.options) {
    const YamlValue* given = reader.find(option.name);
    block.options.values.emplace(
        option.name, given ? read_option(*given, option) : std::string(option.fallback));
  }
  return block;
}

PageTemplate::Column read_column(const YamlValue& value) {
  const MapReader reader(value, "a column", {"from", "to", "blocks"});
  PageTemplate::Column column;
  if (const YamlValue* from = reader.find("from"))
    column.first = read_integer(*from, "from", 1, grid_columns);
  if (const YamlValue* to = reader.find("to"))
    column.last = read_integer(*to, "to", column.first, grid_columns);
  for (const YamlValue& block : read_list(reader.require("blocks"), "blocks"))
    column.blocks.push_back(read_block(block));
  return column;
}

PageTemplate::Band read_band(const YamlValue& value) {
  const MapReader reader(value, "a band", {"steps", "share", "gap", "columns", "blocks"});
  PageTemplate::Band band;
  if (const YamlValue* steps = reader.find("steps"))
    band.steps = read_number(*steps, "steps", 1, 200);
  if (const YamlValue* share = reader.find("share")) {
    if (band.steps > 0)
      throw OrderError(share->at, "a band with both steps and share", "one of the two, or neither");
    band.share = read_number(*share, "share", 0.01, 100);
  }
  if (const YamlValue* gap = reader.find("gap")) band.gap_mm = read_number(*gap, "gap", 0, 100);
  const YamlValue* columns = reader.find("columns");
  const YamlValue* blocks = reader.find("blocks");
  if ((columns == nullptr) == (blocks == nullptr))
    throw OrderError(value.at, "a band that has not one of columns and blocks",
                     "'blocks' for the full width, or 'columns'");
  if (blocks != nullptr) {
    PageTemplate::Column whole;
    for (const YamlValue& block : read_list(*blocks, "blocks"))
      whole.blocks.push_back(read_block(block));
    band.columns.push_back(std::move(whole));
  } else {
    int last = 0;
    for (const YamlValue& column : read_list(*columns, "columns")) {
      band.columns.push_back(read_column(column));
      if (band.columns.back().first <= last)
        throw OrderError(column.at, "a column that overlaps the one before it",
                         "'from' greater than " + std::to_string(last));
      last = band.columns.back().last;
    }
  }
  return band;
}

}  // namespace

PageTemplate parse_template(std::string_view text, const std::string& file) {
  const YamlValue root = parse_yaml(text, file);
  const MapReader reader(root, "a template", {"title", "subject", "papers", "margin", "pages"});
  PageTemplate page_template;
  page_template.title = read_text(reader.require("title"), "title");
  page_template.subject = read_text(reader.require("subject"), "subject");
  for (const YamlValue& paper : read_list(reader.require("papers"), "papers")) {
    const std::string name = read_text(paper, "paper");
    if (!paper_size(name))
      throw OrderError(paper.at, "unknown paper '" + name + "'",
                       "A4, letter or another known paper");
    page_template.papers.push_back(name);
  }
  if (const YamlValue* margin = reader.find("margin"))
    page_template.margin_mm = read_number(*margin, "margin", 6, 60);
  for (const YamlValue& value : read_list(reader.require("pages"), "pages")) {
    const MapReader page_reader(value, "a page", {"bookmark", "bands"});
    PageTemplate::Page page;
    if (const YamlValue* bookmark = page_reader.find("bookmark"))
      page.bookmark = read_text(*bookmark, "bookmark");
    for (const YamlValue& band : read_list(page_reader.require("bands"), "bands"))
      page.bands.push_back(read_band(band));
    page_template.pages.push_back(std::move(page));
  }
  return page_template;
}

PageTemplate load_template(const Order& order, const Publication& publication) {
  PageTemplate page_template;
  if (publication.template_is_path) {
    std::string path = publication.template_name;
    if (!path.starts_with('/') && !order.folder.empty()) path = order.folder + "/" + path;
    page_template = parse_template(read_file(path, largest_yaml_bytes), path);
  } else {
    const std::string name = "templates/" + publication.template_name + ".yaml";
    const auto text = find_embedded_file(name);
    if (!text)
      throw OrderError(
          publication.where,
          "the template '" + publication.template_name + "' is not printed yet by this version",
          "monthly-handout");
    page_template = parse_template(*text, name);
  }
  if (std::find(page_template.papers.begin(), page_template.papers.end(), publication.paper) ==
      page_template.papers.end()) {
    std::vector<std::string_view> names(page_template.papers.begin(), page_template.papers.end());
    throw OrderError(publication.where,
                     "the template '" + publication.template_name + "' has no layout for paper " +
                         publication.paper,
                     listed(names));
  }
  return page_template;
}

}  // namespace duskleaf
