#pragma once

#include <optional>
#include <string_view>
#include <utility>

namespace duskleaf {

/// Width and height in pixels from a PNG's header (ISO/IEC 15948); nullopt when it is not a PNG.
std::optional<std::pair<int, int>> png_size(std::string_view bytes);

}  // namespace duskleaf
