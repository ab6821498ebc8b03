// A line of text becomes glyphs by table: one row for each character, filled when the fonts are
// loaded. UTF-8 is read after RFC 3629; accents are joined by Unicode's canonical composition.
#include "sheet/type.hpp"

#include <algorithm>
#include <array>
#include <hb.h>
#include <span>
#include <utility>

#include "base/embedded.hpp"
#include "sheet/type_font.hpp"

namespace duskleaf {
namespace {

constexpr std::size_t face_count = 6;
constexpr char32_t table_size = 0x2800;  // characters beyond are looked up each time
constexpr char32_t replacement = U'?';

struct Row {
  double advance = 0;
  unsigned glyph = 0;
  std::int16_t kern_slot = -1;
  bool fallback = false;
  char32_t character = 0;  // 0: nothing is set
};

bool is_digit(char32_t c) { return c >= U'0' && c <= U'9'; }
bool is_accent(char32_t c) { return c >= 0x300 && c <= 0x36F; }
bool is_invisible(char32_t c) {
  return c == 0xAD || (c >= 0x200B && c <= 0x200F) || (c >= 0x202A && c <= 0x202E) || c == 0x2060 ||
         c == 0xFEFF || (c >= 0xFE00 && c <= 0xFE0F);
}
bool is_control(char32_t c) {
  return c < 0x20 || (c >= 0x7F && c < 0xA0) || c == 0x2028 || c == 0x2029;
}
/// Width of a space of another kind as a part of the plain one; 0 for other characters. From
/// memory.
double part_of_space(char32_t c) {
  if (c == 0xA0) return 1;
  if (c == 0x2006 || c == 0x2009 || c == 0x202F) return 0.7;
  return c == 0x200A ? 0.4 : 0;
}
bool is_special(char32_t c) { return is_control(c) || is_invisible(c) || part_of_space(c) > 0; }

/// Reads the character at `at` and moves behind it; a byte that is not UTF-8 reads as a question
/// mark.
char32_t next_character(std::string_view text, std::size_t& at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned char first = byte(at++);
  if (first < 0x80) return first;
  const int more = first >= 0xF0 && first <= 0xF4 ? 3 : first >= 0xE0 ? 2 : first >= 0xC2 ? 1 : 0;
  if (more == 0 || first > 0xF4) return replacement;
  char32_t value = first & (0x3FU >> more);
  for (int i = 0; i < more; ++i) {
    if (at >= text.size() || (byte(at) & 0xC0) != 0x80) return replacement;
    value = (value << 6) | (byte(at++) & 0x3F);
  }
  return value;
}

/// The character at `at` joined with the accents that follow it.
char32_t next_letter(std::string_view text, std::size_t& at) {
  char32_t letter = next_character(text, at);
  while (at < text.size() && (static_cast<unsigned char>(text[at]) & 0xFE) == 0xCC) {
    std::size_t after = at;
    const char32_t accent = next_character(text, after);
    hb_codepoint_t joined = 0;
    if (!is_accent(accent) ||
        hb_unicode_compose(hb_unicode_funcs_get_default(), letter, accent, &joined) == 0)
      break;
    letter = joined;
    at = after;
  }
  return letter;
}

std::shared_ptr<const Font> built_in(std::string_view name) {
  return std::make_shared<const Font>(embedded_file(name), std::string(name));
}

}  // namespace

struct TypeSet::Impl {
  std::array<std::shared_ptr<const Font>, face_count> faces;
  std::shared_ptr<const Font> fallback = built_in("fonts/fallback");
  std::array<std::vector<Row>, face_count> rows;

  const Font& font(Face face, bool other) const {
    return other ? *fallback : *faces[static_cast<std::size_t>(face)];
  }

  std::vector<Row> fallback_rows = std::vector<Row>(table_size);

  Impl() {
    const std::vector<bool> has = fallback->coverage(table_size);
    for (char32_t c = 0; c < table_size; ++c) {
      if (!has[c]) continue;
      if (const auto glyph = fallback->glyph(c))
        fallback_rows[c] = {glyph->advance, glyph->id, -1, true, c};
    }
  }

  Row look_up(const Font& face, char32_t character) const {
    if (is_control(character)) character = U' ';
    if (is_invisible(character)) return {};
    if (const auto own = face.glyph(character))
      return {own->advance, own->id, static_cast<std::int16_t>(Font::kern_slot(character)), false,
              character};
    // Spaces of other widths: the face's own space, so that the line stays in one font.
    if (const double part = part_of_space(character); part > 0)
      if (const auto space = face.glyph(U' '))
        return {space->advance * part, space->id, -1, false, character};
    if (const auto other = fallback->glyph(character))
      return {other->advance, other->id, -1, true, character};
    return look_up(face, replacement);
  }

  void fill(std::size_t index) {
    const Font& face = *faces[index];
    const std::vector<bool> own = face.coverage(table_size);
    const Row unknown = look_up(face, replacement);
    std::vector<Row>& table = rows[index];
    table.resize(table_size);
    for (char32_t c = 0; c < table_size; ++c) {
      if (own[c] || is_special(c))
        table[c] = look_up(face, c);
      else
        table[c] = fallback_rows[c].character != 0 ? fallback_rows[c] : unknown;
    }
    const auto digits = std::span(table).subspan(U'0', 10);
    const double widest = std::ranges::max_element(digits, {}, &Row::advance)->advance;
    for (Row& digit : digits) digit.advance = widest;
  }

  /// Calls visit(first byte, row, kerning to the next) for each character that is set.
  template <typename Visit>
  void walk(std::string_view text, Face face, const Visit& visit) const {
    const Font& own = font(face, false);
    const std::vector<Row>& table = rows[static_cast<std::size_t>(face)];
    Row held;
    std::size_t held_byte = 0;
    for (std::size_t at = 0; at < text.size();) {
      const std::size_t byte = at;
      const char32_t letter = next_letter(text, at);
      const Row row = letter < table_size ? table[letter] : look_up(own, letter);
      if (row.character == 0) continue;
      if (held.character != 0) {
        const bool kerned = held.kern_slot >= 0 && row.kern_slot >= 0 &&
                            !(is_digit(held.character) && is_digit(row.character));
        visit(held_byte, held, kerned ? own.kern_of_slots(held.kern_slot, row.kern_slot) : 0.0);
      }
      held = row;
      held_byte = byte;
    }
    if (held.character != 0) visit(held_byte, held, 0.0);
  }
};

TypeSet::TypeSet(const Files& files) : impl_(std::make_unique<Impl>()) {
  auto& faces = impl_->faces;
  const auto at = [&](Face face) -> std::shared_ptr<const Font>& {
    return faces[static_cast<std::size_t>(face)];
  };
  if (files.regular.empty()) {
    at(Face::regular) = built_in("fonts/regular");
    at(Face::bold) = built_in("fonts/bold");
    at(Face::italic) = built_in("fonts/italic");
    at(Face::light) = built_in("fonts/light");
  } else {
    faces.fill(Font::read(files.regular));
  }
  // Tables are laid out for narrow digits and words: a wide face would run its columns together.
  at(Face::condensed) = built_in("fonts/condensed");
  at(Face::condensed_bold) = built_in("fonts/condensed-bold");
  if (!files.bold.empty()) at(Face::bold) = Font::read(files.bold);
  if (!files.italic.empty()) at(Face::italic) = Font::read(files.italic);
  for (std::size_t i = 0; i < face_count; ++i) {
    const auto same =
        std::find(faces.begin(), faces.begin() + static_cast<std::ptrdiff_t>(i), faces[i]);
    const auto index = static_cast<std::size_t>(same - faces.begin());
    if (index < i)
      impl_->rows[i] = impl_->rows[index];
    else
      impl_->fill(i);
  }
}

TypeSet::~TypeSet() = default;

std::vector<SetGlyph> TypeSet::set(std::string_view utf8, Face face) const {
  std::vector<SetGlyph> line;
  line.reserve(utf8.size());
  impl_->walk(utf8, face, [&](std::size_t, const Row& row, double kern) {
    line.push_back({row.fallback, row.glyph, row.character, row.advance, kern});
  });
  return line;
}

double TypeSet::width(std::string_view utf8, Face face, double size_pt, double tracking_em) const {
  double thousandths = 0;
  int count = 0;
  impl_->walk(utf8, face, [&](std::size_t, const Row& row, double kern) {
    thousandths += row.advance + kern;
    ++count;
  });
  return (thousandths / 1000 + tracking_em * std::max(0, count - 1)) * size_pt * mm_per_pt;
}

std::vector<TypeSet::Position> TypeSet::positions(std::string_view utf8, Face face) const {
  std::vector<Position> line;
  line.reserve(utf8.size());
  double left = 0;
  impl_->walk(utf8, face, [&](std::size_t byte, const Row& row, double kern) {
    line.push_back({byte, left, left + row.advance, row.character == U' '});
    left += row.advance + kern;
  });
  return line;
}

double TypeSet::cap_height(Face face, double size_pt) const {
  return impl_->font(face, false).top(U'H') / 1000 * size_pt * mm_per_pt;
}

double TypeSet::x_height(Face face, double size_pt) const {
  return impl_->font(face, false).top(U'x') / 1000 * size_pt * mm_per_pt;
}

namespace {
constexpr std::string_view letters =
    "abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789";
}

double TypeSet::ascent(Face face, double size_pt) const {
  double top = 0;
  for (const char c : letters)
    top = std::max(top, impl_->font(face, false).top(static_cast<char32_t>(c)));
  return top / 1000 * size_pt * mm_per_pt;
}

double TypeSet::descent(Face face, double size_pt) const {
  double bottom = 0;
  for (const char c : letters.substr(0, 26))
    bottom = std::min(bottom, impl_->font(face, false).bottom(static_cast<char32_t>(c)));
  return -bottom / 1000 * size_pt * mm_per_pt;
}

std::string_view TypeSet::font_bytes(Face face, bool fallback) const {
  return impl_->font(face, fallback).bytes();
}
std::string TypeSet::font_name(Face face, bool fallback) const {
  return impl_->font(face, fallback).name();
}
std::uint64_t TypeSet::font_id(Face face, bool fallback) const {
  return impl_->font(face, fallback).id();
}

}  // namespace duskleaf
