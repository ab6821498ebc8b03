#pragma once

#include <string_view>

#include "sheet/marks.hpp"

namespace duskleaf {

/// The dark modules of a QR code (ISO/IEC 18004, error correction M) as one path to fill; the quiet
/// zone of four modules lies inside `box`, whose shorter side sets the size. Throws
/// std::runtime_error when the text is too long for a code.
Path qr_code(std::string_view text, const Box& box);

}  // namespace duskleaf
