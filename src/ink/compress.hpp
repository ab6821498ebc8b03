#pragma once

#include <string>
#include <string_view>

namespace duskleaf {

/// The bytes as a zlib stream (PDF's FlateDecode).
std::string deflated(std::string_view bytes);

}  // namespace duskleaf
