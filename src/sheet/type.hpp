#pragma once

#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "sheet/marks.hpp"

namespace duskleaf {

inline constexpr double mm_per_pt = 25.4 / 72.0;

/// A glyph of a line of text as it will be set: which font (0 the face, 1 the fallback), glyph, its character, advance
/// (with kerning to the next) in thousandths of the type size.
struct SetGlyph {
  bool fallback;
  unsigned glyph;
  char32_t character;
  double advance;       // without kerning
  double kern_after;    // to add before the next glyph
};

/// The fonts of a document, measured. Thread-safe for reading. Faces named in the order replace the built-in ones.
class TypeSet {
 public:
  struct Files {
    std::string regular, bold, italic;  // paths; empty: the built-in faces
  };
  /// Throws std::runtime_error naming the file when a font is missing or is not one.
  explicit TypeSet(const Files& = {});
  ~TypeSet();

  std::vector<SetGlyph> set(std::string_view utf8, Face) const;
  /// Width in mm.
  double width(std::string_view utf8, Face, double size_pt, double tracking_em = 0) const;
  double cap_height(Face, double size_pt) const;   // mm
  double x_height(Face, double size_pt) const;     // mm
  double ascent(Face, double size_pt) const;       // mm, of the tallest letters in use
  double descent(Face, double size_pt) const;      // mm, positive

  /// The font file's bytes and PostScript-like name, for embedding. fallback: the built-in fallback face.
  std::string_view font_bytes(Face, bool fallback) const;
  std::string font_name(Face, bool fallback) const;

 private:
  struct Impl;
  std::unique_ptr<Impl> impl_;
};

/// Breaks text into lines no wider than `width_mm`, at spaces; no-break spaces (U+00A0, U+202F) do not break.
std::vector<std::string> break_lines(const TypeSet&, std::string_view text, Face, double size_pt, double width_mm);

}  // namespace duskleaf
