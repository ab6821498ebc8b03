#pragma once

#include <array>
#include <cstdint>
#include <memory>
#include <set>
#include <string>
#include <string_view>
#include <unordered_map>

namespace duskleaf {

/// A font program cut to the glyphs in use, ready to embed.
struct FontSubset {
  std::string packed;  // zlib stream of a TrueType file, or of the bare CFF table
  std::size_t length;  // before packing
  std::unordered_map<unsigned, unsigned> new_glyph;  // old glyph id -> new one
};

/// Cuts a font (`id`: TypeSet::font_id); kept for the process, thread-safe. Fonts with PostScript
/// outlines keep their glyph ids. Throws std::runtime_error when the font cannot be cut.
std::shared_ptr<const FontSubset> font_subset(std::uint64_t id, std::string_view bytes,
                                              const std::set<unsigned>& glyphs);

bool has_postscript_outlines(std::string_view bytes);

/// What a font descriptor says (ISO 32000-1, table 122), in thousandths.
struct FontFacts {
  std::array<int, 4> box;
  int ascent, descent, cap_height, stem_v;
  double italic_angle;
};
FontFacts font_facts(std::string_view bytes);

}  // namespace duskleaf
