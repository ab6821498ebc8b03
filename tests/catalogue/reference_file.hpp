#pragma once

#include <fstream>
#include <iterator>
#include <stdexcept>
#include <string>

namespace duskleaf {

/// The text of a file under tests/reference.
inline std::string reference_text(const std::string& name) {
  std::ifstream file(std::string(DUSKLEAF_REFERENCE) + "/" + name, std::ios::binary);
  if (!file) throw std::runtime_error("no reference file " + name);
  return std::string(std::istreambuf_iterator<char>(file), {});
}

}  // namespace duskleaf
