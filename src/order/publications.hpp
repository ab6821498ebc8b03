#pragma once

#include <vector>

#include "order/yaml_values.hpp"

namespace duskleaf {

/// The names of our own templates, printed by this version or not.
const std::vector<std::string_view>& template_names();

/// An id that a pair names, to be looked up once the sites are read.
struct PairMention {
  std::string id;
  Location at;
};

/// The list under `publications`. Throws OrderError. Doubts (keys that nothing prints yet) go to
/// `noticed`.
std::vector<Publication> read_publications(const YamlValue&, std::vector<PairMention>& mentions,
                                           std::vector<Doubt>& noticed);

}  // namespace duskleaf
