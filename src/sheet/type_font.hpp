#pragma once

#include <cstdint>
#include <cstdlib>
#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

struct hb_face_t;
struct hb_font_t;

namespace duskleaf {

/// One font file, measured. Advances and kerning are in thousandths of the type size. Thread-safe
/// for reading.
class Font {
 public:
  /// `bytes` must outlive the font. Throws FileError naming `label` when they are no TrueType or
  /// OpenType font, or when the font's licence bits forbid embedding.
  Font(std::string_view bytes, const std::string& label);
  /// Reads a file; throws FileError.
  static std::shared_ptr<const Font> read(const std::string& path);
  Font(const Font&) = delete;
  Font& operator=(const Font&) = delete;

  struct Glyph {
    unsigned id;
    double advance;
  };
  /// Digits come as the font's equal-width lining ones where it has such.
  std::optional<Glyph> glyph(char32_t) const;
  /// For each character below `end`: whether the font has it.
  std::vector<bool> coverage(char32_t end) const;
  /// What to add between two characters that both have glyphs here.
  double kern(char32_t left, char32_t right) const;
  /// The same for characters of `kern_slot`; remembered, about 2 ns when warm.
  double kern_of_slots(int left_slot, int right_slot) const;
  /// Number of a character among those whose kerning is remembered; -1 for the others.
  static int kern_slot(char32_t);

  /// Height of the glyph's ink above (top) or below (bottom, negative) the baseline.
  double top(char32_t) const;
  double bottom(char32_t) const;

  std::string_view bytes() const { return bytes_; }
  const std::string& name() const { return name_; }
  /// A number that no other font of this process has.
  std::uint64_t id() const { return id_; }

 private:
  struct Release {
    void operator()(hb_face_t*) const;
    void operator()(hb_font_t*) const;
    void operator()(std::int16_t* p) const { std::free(p); }
  };

  std::string_view bytes_;
  std::string name_;
  std::uint64_t id_;
  std::unique_ptr<hb_face_t, Release> face_;
  std::unique_ptr<hb_font_t, Release> font_;
  double per_mille_ = 1;  // thousandths for each font unit
  std::unique_ptr<std::int16_t, Release>
      kerning_;  // slot x slot; 0: not asked yet; else kern in font units + bias
};

}  // namespace duskleaf
