#include "sheet/picture_size.hpp"

namespace duskleaf {

std::optional<std::pair<int, int>> png_size(std::string_view bytes) {
  constexpr std::string_view signature("\x89PNG\r\n\x1a\n", 8);
  if (bytes.size() < 24 || !bytes.starts_with(signature) || bytes.substr(12, 4) != "IHDR")
    return std::nullopt;
  const auto number_at = [&](std::size_t at) {
    int value = 0;
    for (std::size_t i = 0; i < 4; ++i)
      value = value * 256 + static_cast<unsigned char>(bytes[at + i]);
    return value;
  };
  const int width = number_at(16), height = number_at(20);
  if (width <= 0 || height <= 0) return std::nullopt;
  return std::pair(width, height);
}

}  // namespace duskleaf
