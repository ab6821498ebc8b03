#pragma once

#include <cstddef>
#include <cstdint>
#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "sheet/marks.hpp"

namespace duskleaf {

inline constexpr double mm_per_pt = 25.4 / 72.0;

/// A glyph of a line of text as it will be set, measured in thousandths of the type size.
struct SetGlyph {
  bool fallback;  // from the fallback face
  unsigned glyph;
  char32_t character;  // U'?' where neither face has the character
  double advance;      // without kerning
  double kern_after;   // to add before the next glyph
};

/// The fonts of a document, measured. Thread-safe for reading. Faces named in the order replace the
/// built-in ones; once a regular face is named, light, and bold and italic that are not named, are
/// set in it. The condensed faces of the tables stay the built-in ones. Digits have equal widths;
/// there are no ligatures; base letter and combining accent join where Unicode has the letter;
/// control characters count as spaces, and invisible ones (soft hyphens, joiners) are left out.
class TypeSet {
 public:
  struct Files {
    std::string regular, bold, italic;  // paths; empty: the built-in faces
  };
  /// Throws FileError (order/order.hpp, a std::runtime_error) naming the file when a font is
  /// missing or is not one.
  explicit TypeSet(const Files& = {});
  ~TypeSet();

  std::vector<SetGlyph> set(std::string_view utf8, Face) const;
  /// Width in mm of what is seen: the tracking after the last character does not count.
  double width(std::string_view utf8, Face, double size_pt, double tracking_em = 0) const;
  double cap_height(Face, double size_pt) const;  // mm
  double x_height(Face, double size_pt) const;    // mm
  double ascent(Face, double size_pt)
      const;  // mm, of the tallest of a-z, A-Z and digits (accents stand higher)
  double descent(Face, double size_pt) const;  // mm, positive, of the deepest of a-z

  /// The font file's bytes and PostScript-like name, for embedding. fallback: the built-in fallback
  /// face.
  std::string_view font_bytes(Face, bool fallback) const;
  std::string font_name(Face, bool fallback) const;
  /// A number that no other font file of this process has; faces that share a file share it.
  std::uint64_t font_id(Face, bool fallback) const;

  /// Where a character stands in a line: its first byte, its left edge and its right edge without
  /// kerning, in thousandths of the type size.
  struct Position {
    std::size_t byte;
    double left, right;
    bool space;  // a place where a line may break
  };
  std::vector<Position> positions(std::string_view utf8, Face) const;

 private:
  struct Impl;
  std::unique_ptr<Impl> impl_;
};

/// Breaks text into lines no wider than `width_mm`, at spaces and always at '\n'; no-break spaces
/// (U+00A0, U+202F) do not break. A word wider than a line is cut between characters. Text without
/// words gives no lines.
std::vector<std::string> break_lines(const TypeSet&, std::string_view text, Face, double size_pt,
                                     double width_mm);

}  // namespace duskleaf
