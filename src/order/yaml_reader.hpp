#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "order/order.hpp"

namespace duskleaf {

struct YamlEntry;

/// A value of a YAML document (or of a CSV row), with the place where it stands. Scalars keep their
/// text as written: nothing is guessed, so that `no`, `on` and 21:30 stay words.
struct YamlValue {
  enum class Kind { null, scalar, list, map };
  Kind kind = Kind::null;
  Location at;
  std::string text;                // of a scalar
  std::vector<YamlValue> items;    // of a list
  std::vector<YamlEntry> entries;  // of a map, in order; no key twice
};
struct YamlEntry {
  std::string key;
  Location key_at;
  YamlValue value;
};

/// Limits on what is read: a person's file stays far below them.
inline constexpr std::size_t largest_yaml_bytes = 1'000'000;
inline constexpr int deepest_yaml = 64;

/// Reads one YAML document; `file` is its name in messages. A byte order mark and CRLF line ends
/// are accepted. Throws OrderError for text that is not UTF-8, empty, too large, indented with
/// tabs, too deep, or not YAML; for a key given twice in one map, anchors, aliases, tags, and a
/// second document.
YamlValue parse_yaml(std::string_view text, const std::string& file);
/// The same from a file; throws FileError when it cannot be read.
YamlValue load_yaml(const std::string& path);

/// A whole file's bytes, no more than `limit`. Throws FileError (missing, a folder, unreadable, too
/// large).
std::string read_file(const std::string& path, std::size_t limit);
/// UTF-8 text without its byte order mark, with \n line ends. Throws OrderError at the first bad
/// byte or control character.
std::string clean_text(std::string_view bytes, const std::string& file);
/// Column, in characters from 1, of a byte offset within a line.
int column_of(std::string_view line, std::size_t byte);

}  // namespace duskleaf
