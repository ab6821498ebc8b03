#include "base/embedded.hpp"

#include <stdexcept>
#include <string>

namespace duskleaf {
namespace {
extern "C" {
struct EmbeddedEntry {
  const char* name;
  const char* begin;
  const char* end;
};
extern const EmbeddedEntry duskleaf_embedded_table[];
}
}  // namespace

std::optional<std::string_view> find_embedded_file(std::string_view name) {
  for (const EmbeddedEntry* e = duskleaf_embedded_table; e->name != nullptr; ++e)
    if (name == e->name)
      return std::string_view(e->begin, static_cast<std::size_t>(e->end - e->begin));
  return std::nullopt;
}

std::string_view embedded_file(std::string_view name) {
  if (auto found = find_embedded_file(name)) return *found;
  throw std::out_of_range("no embedded file " + std::string(name));
}

std::vector<std::string_view> embedded_names(std::string_view prefix) {
  std::vector<std::string_view> names;
  for (const EmbeddedEntry* e = duskleaf_embedded_table; e->name != nullptr; ++e)
    if (std::string_view(e->name).starts_with(prefix)) names.emplace_back(e->name);
  return names;
}

}  // namespace duskleaf
