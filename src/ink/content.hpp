#pragma once

#include <string>

#include "ink/fonts.hpp"
#include "ink/pictures.hpp"
#include "sheet/marks.hpp"

namespace duskleaf {

/// A sheet's marks as PDF page operators. Coordinates are whole hundredths of a point; registers
/// fonts and pictures. Links are not page contents and are left to the caller.
std::string page_content(const Sheet&, DocumentFonts&, DocumentPictures&);

}  // namespace duskleaf
