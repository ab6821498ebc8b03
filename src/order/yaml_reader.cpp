// YAML 1.2 (yaml.org/spec/1.2.2) as yaml-cpp's event parser reads it. Departures, all towards
// strictness: one document, no anchors, aliases or tags, no key twice in a map, no tab in an
// indentation, limits on size and depth. Plain scalars are not resolved to types; the reader of
// each key does that.
#include "order/yaml_reader.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <sstream>
#include <unordered_map>
#include <yaml-cpp/eventhandler.h>
#include <yaml-cpp/exceptions.h>
#include <yaml-cpp/parser.h>

namespace duskleaf {
namespace {

std::vector<std::string_view> lines_of(std::string_view text) {
  std::vector<std::string_view> lines;
  for (std::size_t at = 0; at <= text.size();) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    lines.push_back(text.substr(at, end - at));
    at = end + 1;
  }
  return lines;
}

/// Builds the tree from the parser's events, and refuses what a person's file does not need.
class TreeBuilder : public YAML::EventHandler {
 public:
  TreeBuilder(const std::string& file, const std::vector<std::string_view>& lines)
      : file_(file), lines_(lines) {}

  /// yaml-cpp counts lines from 0 and columns in bytes. Marks mostly go forward, so characters are
  /// counted on from the last one: a single line of a megabyte would else take the square of its
  /// length.
  Location locate(const YAML::Mark& mark) const {
    if (mark.is_null()) return {file_, 1, 1};
    const auto line = static_cast<std::size_t>(std::max(mark.line, 0));
    const auto byte = static_cast<std::size_t>(std::max(mark.column, 0));
    const std::string_view text = line < lines_.size() ? lines_[line] : std::string_view();
    if (line != last_.line || byte < last_.byte) last_ = {line, 0, 1};
    last_.column +=
        column_of(text.substr(std::min(last_.byte, text.size())), byte - last_.byte) - 1;
    last_.byte = byte;
    return {file_, mark.line + 1, last_.column};
  }
  YamlValue take_root() { return std::move(root_); }
  bool has_root() const { return has_root_; }

  void OnDocumentStart(const YAML::Mark& mark) override {
    if (documents_++ > 0)
      throw OrderError(locate(mark), "a second YAML document begins",
                       "one document in a file was expected");
  }
  void OnDocumentEnd() override {}
  void OnNull(const YAML::Mark& mark, YAML::anchor_t anchor) override {
    refuse_anchor(mark, anchor);
    put({YamlValue::Kind::null, null_place(mark), "", {}, {}});
  }
  void OnAlias(const YAML::Mark& mark, YAML::anchor_t) override {
    throw OrderError(locate(mark), "a YAML alias (*) is not read here", "write the value out");
  }
  void OnScalar(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                const std::string& value) override {
    refuse_tag(mark, tag);
    refuse_anchor(mark, anchor);
    refuse_open_quote(mark);
    put({YamlValue::Kind::scalar, locate(mark), value, {}, {}});
  }
  void OnSequenceStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                       YAML::EmitterStyle::value) override {
    begin(mark, tag, anchor, YamlValue::Kind::list);
  }
  void OnSequenceEnd() override { end(); }
  void OnMapStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                  YAML::EmitterStyle::value) override {
    begin(mark, tag, anchor, YamlValue::Kind::map);
  }
  void OnMapEnd() override { end(); }

 private:
  struct Level {
    YamlValue value;
    bool key_waits = false;  // a key was read and its value is to come
    std::unordered_map<std::string, Location> seen;
  };

  void refuse_anchor(const YAML::Mark& mark, YAML::anchor_t anchor) const {
    if (anchor != 0)
      throw OrderError(locate(mark), "a YAML anchor (&) is not read here", "write the value out");
  }
  void refuse_tag(const YAML::Mark& mark, const std::string& tag) const {
    if (!tag.empty() && tag != "?" && tag != "!")
      throw OrderError(locate(mark), fmt::format("a YAML tag ({}) is not read here", tag),
                       "leave it out");
  }
  /// yaml-cpp takes the end of the file for the closing quote.
  void refuse_open_quote(const YAML::Mark& mark) const {
    if (mark.is_null() || mark.line < 0 || static_cast<std::size_t>(mark.line) >= lines_.size())
      return;
    auto line = static_cast<std::size_t>(mark.line);
    auto at = static_cast<std::size_t>(std::max(mark.column, 0));
    if (at >= lines_[line].size()) return;
    const char quote = lines_[line][at];
    if (quote != '"' && quote != '\'') return;
    for (++at; line < lines_.size(); ++line, at = 0)
      for (; at < lines_[line].size(); ++at) {
        const char c = lines_[line][at];
        const bool doubled = quote == '\'' && lines_[line].substr(at, 2) == "''";
        if (doubled || (quote == '"' && c == '\\'))
          ++at;
        else if (c == quote)
          return;
      }
    throw OrderError(locate(mark), "a quote is opened and not closed",
                     "close it with another quote");
  }
  /// An empty value's mark is that of the next token, which may stand lines below: its key's place
  /// helps more.
  Location null_place(const YAML::Mark& mark) const {
    if (!levels_.empty() && levels_.back().key_waits)
      return levels_.back().value.entries.back().key_at;
    return locate(mark);
  }
  void begin(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
             YamlValue::Kind kind) {
    refuse_tag(mark, tag);
    refuse_anchor(mark, anchor);
    if (static_cast<int>(levels_.size()) >= deepest_yaml)
      throw OrderError(locate(mark), fmt::format("nested more than {} levels deep", deepest_yaml),
                       "a flatter file was expected");
    if (!levels_.empty() && levels_.back().value.kind == YamlValue::Kind::map &&
        !levels_.back().key_waits)
      throw OrderError(locate(mark), "a list or map stands where a key should",
                       "a plain word was expected");
    levels_.push_back({{kind, locate(mark), "", {}, {}}, false, {}});
  }
  void end() {
    YamlValue value = std::move(levels_.back().value);
    levels_.pop_back();
    put(std::move(value));
  }
  void put(YamlValue value) {
    if (levels_.empty()) {
      root_ = std::move(value);
      has_root_ = true;
      return;
    }
    Level& level = levels_.back();
    if (level.value.kind == YamlValue::Kind::list) {
      level.value.items.push_back(std::move(value));
    } else if (level.key_waits) {
      level.value.entries.back().value = std::move(value);
      level.key_waits = false;
    } else {
      put_key(level, value);
    }
  }
  void put_key(Level& level, YamlValue& key) {
    if (key.kind != YamlValue::Kind::scalar || key.text.empty())
      throw OrderError(key.at, "a key is empty", "a plain word was expected");
    const auto [first, is_new] = level.seen.emplace(key.text, key.at);
    if (!is_new)
      throw OrderError(key.at, fmt::format("the key '{}' is given twice", key.text),
                       fmt::format("keep one (the first stands at {}:{}:{})", first->second.file,
                                   first->second.line, first->second.column));
    level.value.entries.push_back({std::move(key.text), std::move(key.at), {}});
    level.key_waits = true;
  }

  const std::string& file_;
  const std::vector<std::string_view>& lines_;
  mutable struct {
    std::size_t line, byte;
    int column;
  } last_{0, 0, 1};
  std::vector<Level> levels_;
  YamlValue root_;
  bool has_root_ = false;
  int documents_ = 0;
};

void refuse_tabs(const std::vector<std::string_view>& lines, const std::string& file) {
  for (std::size_t i = 0; i < lines.size(); ++i) {
    const std::size_t content = lines[i].find_first_not_of(" \t");
    if (content == std::string_view::npos) continue;
    const std::size_t tab = lines[i].find('\t');
    if (tab < content)
      throw OrderError({file, static_cast<int>(i) + 1, static_cast<int>(tab) + 1},
                       "a tab in the indentation", "indent with spaces");
  }
}

}  // namespace

YamlValue parse_yaml(std::string_view bytes, const std::string& file) {
  if (bytes.size() > largest_yaml_bytes)
    throw OrderError({file, 1, 1},
                     fmt::format("the file is larger than {} kB", largest_yaml_bytes / 1000),
                     "a smaller one was expected (many sites go into a CSV file: sites_from)");
  const std::string text = clean_text(bytes, file);
  const std::vector<std::string_view> lines = lines_of(text);
  refuse_tabs(lines, file);
  TreeBuilder builder(file, lines);
  try {
    std::istringstream stream(text);
    YAML::Parser parser(stream);
    while (parser.HandleNextDocument(builder)) {
    }
  } catch (const YAML::Exception& error) {
    throw OrderError(builder.locate(error.mark), fmt::format("this is not YAML ({})", error.msg),
                     "look at the indentation, colons, quotes and brackets here and just above");
  }
  if (!builder.has_root())
    throw OrderError({file, 1, 1}, "the file is empty", "keys and values were expected");
  YamlValue root = builder.take_root();
  if (root.kind == YamlValue::Kind::null)
    throw OrderError({file, 1, 1}, "the file is empty", "keys and values were expected");
  return root;
}

YamlValue load_yaml(const std::string& path) {
  return parse_yaml(read_file(path, largest_yaml_bytes), path);
}

}  // namespace duskleaf
