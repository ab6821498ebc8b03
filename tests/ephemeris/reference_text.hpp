#pragma once

#include <fstream>
#include <iterator>
#include <stdexcept>
#include <string>

namespace duskleaf {

/// The whole text of a file of tests/reference/, or of another path when that is absolute.
inline std::string reference_text(const std::string& name) {
  const std::string path =
      name.starts_with('/') ? name : std::string(DUSKLEAF_REFERENCE) + "/" + name;
  std::ifstream file(path, std::ios::binary);
  if (!file) throw std::runtime_error("cannot read " + path);
  return {std::istreambuf_iterator<char>(file), {}};
}

}  // namespace duskleaf
