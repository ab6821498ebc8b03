#pragma once

#include <string>

#include "sheet/marks.hpp"
#include "sheet/type.hpp"

namespace duskleaf {

/// The document as a PDF 1.7 file's bytes: fonts embedded as subsets, ToUnicode maps, title,
/// author, subject, language, bookmarks, links. The same document gives the same bytes. Throws
/// std::runtime_error for a broken picture.
std::string make_pdf(const SheetDocument&, const TypeSet&);

}  // namespace duskleaf
