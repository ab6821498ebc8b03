#pragma once

#include <cstdint>
#include <map>
#include <qpdf/QPDF.hh>
#include <qpdf/QPDFObjectHandle.hh>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

#include "sheet/type.hpp"

namespace duskleaf {

/// One font of a document: gives each character a two-byte code, and at the end becomes the PDF's
/// font objects.
class FontInUse {
 public:
  FontInUse(std::uint64_t id, std::string_view bytes, std::string name);

  /// The code that shows this glyph for this character. Printable ASCII characters are their own
  /// codes.
  unsigned code(const SetGlyph&);
  /// The width that the PDF gives to a code, in thousandths of the type size.
  double width(unsigned code) const { return slots_[code].width; }

  /// Type0 font dictionary with its descendant, embedded subset and ToUnicode map.
  QPDFObjectHandle make(QPDF&) const;

 private:
  struct Slot {
    char32_t character = 0;  // 0: not used
    unsigned glyph = 0;
    double width = 0;
  };
  QPDFObjectHandle widths() const;
  std::string to_unicode() const;

  std::uint64_t id_;
  std::string_view bytes_;
  std::string name_;
  bool postscript_outlines_;
  std::vector<Slot> slots_;                       // by code
  std::unordered_map<char32_t, unsigned> codes_;  // of the characters outside ASCII
};

/// The fonts of a document by the names that its pages use: F1, F2 ...
class DocumentFonts {
 public:
  explicit DocumentFonts(const TypeSet& type) : type_(type) {}
  /// Index of a face's font, counted from 0: resource name F0, F1 ...
  std::size_t index(Face, bool fallback);
  FontInUse& operator[](std::size_t index) { return fonts_[index]; }
  const TypeSet& type() const { return type_; }
  /// The resource dictionary's /Font entry.
  QPDFObjectHandle make(QPDF&) const;

 private:
  const TypeSet& type_;
  std::vector<FontInUse> fonts_;
  std::map<std::uint64_t, std::size_t> index_of_id_;
  std::vector<int> index_of_face_ = std::vector<int>(16, -1);
};

}  // namespace duskleaf
