// Measuring by HarfBuzz after the OpenType specification (tables cmap, hmtx, GPOS, kern, OS/2).
// Only kerning and the digit forms are taken from the layout tables: no ligatures, so that each
// character keeps its own glyph.
#include "sheet/type_font.hpp"

#include <algorithm>
#include <array>
#include <atomic>
#include <cctype>
#include <cmath>
#include <fstream>
#include <hb-ot.h>
#include <hb.h>
#include <iterator>
#include <new>
#include <utility>

#include "order/order.hpp"

namespace duskleaf {
namespace {

// Ranges whose kerning is remembered: Latin, Greek, Cyrillic, general punctuation.
struct Range {
  char32_t first, last;
};
constexpr std::array<Range, 4> kerned{
    {{0x20, 0x17F}, {0x370, 0x3FF}, {0x400, 0x45F}, {0x2010, 0x203F}}};
constexpr int slot_count = 0x160 + 0x90 + 0x60 + 0x30;
constexpr int bias = 0x4000;

constexpr char32_t character_of_slot(int slot) {
  for (const Range& range : kerned) {
    const int length = static_cast<int>(range.last - range.first) + 1;
    if (slot < length) return range.first + static_cast<char32_t>(slot);
    slot -= length;
  }
  return 0;
}

constexpr hb_feature_t feature(hb_tag_t tag, std::uint32_t value) {
  return {tag, value, HB_FEATURE_GLOBAL_START, HB_FEATURE_GLOBAL_END};
}
constexpr std::array features{
    feature(HB_TAG('k', 'e', 'r', 'n'), 1), feature(HB_TAG('t', 'n', 'u', 'm'), 1),
    feature(HB_TAG('l', 'n', 'u', 'm'), 1), feature(HB_TAG('l', 'i', 'g', 'a'), 0),
    feature(HB_TAG('c', 'l', 'i', 'g'), 0), feature(HB_TAG('c', 'a', 'l', 't'), 0),
    feature(HB_TAG('r', 'l', 'i', 'g'), 0), feature(HB_TAG('c', 'c', 'm', 'p'), 0),
    feature(HB_TAG('l', 'o', 'c', 'l'), 0)};

/// Shapes one or two characters; each thread has its own buffer.
hb_buffer_t* shape(hb_font_t* font, const std::uint32_t* characters, int count) {
  thread_local const std::unique_ptr<hb_buffer_t, decltype(&hb_buffer_destroy)> buffer(
      hb_buffer_create(), &hb_buffer_destroy);
  hb_buffer_t* const line = buffer.get();
  hb_buffer_clear_contents(line);
  hb_buffer_add_codepoints(line, characters, count, 0, count);
  hb_buffer_set_direction(line, HB_DIRECTION_LTR);
  // The language is named so that the process's locale has no say.
  static const hb_language_t english = hb_language_from_string("en", -1);
  hb_buffer_set_language(line, english);
  hb_script_t script = HB_SCRIPT_LATIN;
  for (int i = 0; i < count; ++i) {
    const hb_script_t own = hb_unicode_script(hb_unicode_funcs_get_default(), characters[i]);
    if (own != HB_SCRIPT_COMMON && own != HB_SCRIPT_INHERITED && own != HB_SCRIPT_UNKNOWN)
      script = own;
  }
  hb_buffer_set_script(line, script);
  hb_shape(font, line, features.data(), static_cast<unsigned>(features.size()));
  return line;
}

std::string name_of(hb_face_t* face, const std::string& label) {
  std::array<char, 128> text{};
  unsigned size = text.size();
  hb_ot_name_get_utf8(face, HB_OT_NAME_ID_POSTSCRIPT_NAME, hb_language_from_string("en", -1), &size,
                      text.data());
  std::string name;
  for (const char c : std::string(text.data()))
    if (std::isalnum(static_cast<unsigned char>(c)) != 0 || c == '-') name += c;
  if (!name.empty()) return name;
  for (const char c : label)
    if (std::isalnum(static_cast<unsigned char>(c)) != 0) name += c;
  return name.empty() ? "Font" : name;
}

bool has_table(hb_face_t* face, hb_tag_t tag) {
  hb_blob_t* const table = hb_face_reference_table(face, tag);
  const bool found = hb_blob_get_length(table) > 0;
  hb_blob_destroy(table);
  return found;
}

/// OS/2 fsType (offset 8): value 2 in its lowest four bits is "restricted licence embedding".
bool may_be_embedded(hb_face_t* face) {
  hb_blob_t* const table = hb_face_reference_table(face, HB_TAG('O', 'S', '/', '2'));
  unsigned length = 0;
  const char* const data = hb_blob_get_data(table, &length);
  const bool allowed = length < 10 || (data[9] & 0x0F) != 2;
  hb_blob_destroy(table);
  return allowed;
}

}  // namespace

void Font::Release::operator()(hb_face_t* face) const { hb_face_destroy(face); }
void Font::Release::operator()(hb_font_t* font) const { hb_font_destroy(font); }

Font::Font(std::string_view bytes, const std::string& label) : bytes_(bytes) {
  static std::atomic<std::uint64_t> count{0};
  id_ = ++count;
  hb_blob_t* const blob = hb_blob_create(bytes.data(), static_cast<unsigned>(bytes.size()),
                                         HB_MEMORY_MODE_READONLY, nullptr, nullptr);
  face_.reset(hb_face_create(blob, 0));
  hb_blob_destroy(blob);
  font_.reset(hb_font_create(face_.get()));
  const bool outlines = has_table(face_.get(), HB_TAG('g', 'l', 'y', 'f')) ||
                        has_table(face_.get(), HB_TAG('C', 'F', 'F', ' '));
  if (!outlines || hb_face_get_glyph_count(face_.get()) == 0)
    throw FileError(
        label +
        ": is not a font that can be embedded; expected a TrueType or OpenType file (.ttf, .otf)");
  if (!may_be_embedded(face_.get()))
    throw FileError(
        label +
        ": the font's licence bits (OS/2 fsType 2) forbid embedding; expected a font that may be");
  const unsigned units = hb_face_get_upem(face_.get());
  per_mille_ = 1000.0 / units;
  hb_font_set_scale(font_.get(), static_cast<int>(units), static_cast<int>(units));
  hb_font_make_immutable(font_.get());
  if (!glyph(U'?') || !glyph(U' '))
    throw FileError(label + ": has no question mark or space; expected a font with Latin letters");
  name_ = name_of(face_.get(), label);
  // calloc: the pages of pairs that never occur cost nothing.
  kerning_.reset(static_cast<std::int16_t*>(
      std::calloc(static_cast<std::size_t>(slot_count) * slot_count, sizeof(std::int16_t))));
  if (!kerning_) throw std::bad_alloc();
}

std::shared_ptr<const Font> Font::read(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  std::string bytes{std::istreambuf_iterator<char>(file), std::istreambuf_iterator<char>()};
  if (!file || bytes.empty())
    throw FileError(path + ": the font cannot be read; expected a TrueType or OpenType file");
  struct Holder {
    std::string bytes;
    Font font;
    Holder(std::string content, const std::string& label)
        : bytes(std::move(content)), font(bytes, label) {}
  };
  const auto holder = std::make_shared<const Holder>(std::move(bytes), path);
  return {holder, &holder->font};
}

std::optional<Font::Glyph> Font::glyph(char32_t character) const {
  hb_codepoint_t id = 0;
  if (hb_font_get_nominal_glyph(font_.get(), character, &id) == 0 || id == 0) return std::nullopt;
  if (character >= U'0' && character <= U'9') {
    const std::uint32_t one = character;
    unsigned count = 0;
    const hb_glyph_info_t* const info =
        hb_buffer_get_glyph_infos(shape(font_.get(), &one, 1), &count);
    if (count == 1 && info[0].codepoint != 0) id = info[0].codepoint;
  }
  return Glyph{id, hb_font_get_glyph_h_advance(font_.get(), id) * per_mille_};
}

std::vector<bool> Font::coverage(char32_t end) const {
  std::vector<bool> has(end);
  const std::unique_ptr<hb_set_t, decltype(&hb_set_destroy)> all(hb_set_create(), &hb_set_destroy);
  hb_face_collect_unicodes(face_.get(), all.get());
  for (hb_codepoint_t c = HB_SET_VALUE_INVALID; hb_set_next(all.get(), &c) != 0 && c < end;)
    has[c] = true;
  return has;
}

double Font::kern(char32_t left, char32_t right) const {
  const std::array<std::uint32_t, 2> pair{left, right};
  unsigned count = 0;
  hb_buffer_t* const line = shape(font_.get(), pair.data(), 2);
  const hb_glyph_info_t* const info = hb_buffer_get_glyph_infos(line, &count);
  if (count != 2) return 0;
  const hb_glyph_position_t* const place = hb_buffer_get_glyph_positions(line, &count);
  return (place[0].x_advance - hb_font_get_glyph_h_advance(font_.get(), info[0].codepoint)) *
         per_mille_;
}

double Font::kern_of_slots(int left_slot, int right_slot) const {
  std::int16_t& place = kerning_.get()[left_slot * slot_count + right_slot];
  // Two threads that ask at once compute the same value, so the order of their writes does not
  // matter.
  const std::atomic_ref<std::int16_t> remembered(place);
  int value = remembered.load(std::memory_order_relaxed);
  if (value == 0) {
    const double thousandths = kern(character_of_slot(left_slot), character_of_slot(right_slot));
    const long units = std::lround(thousandths / per_mille_);
    value = static_cast<int>(std::clamp<long>(units, -bias + 1, bias - 1)) + bias;
    remembered.store(static_cast<std::int16_t>(value), std::memory_order_relaxed);
  }
  return (value - bias) * per_mille_;
}

int Font::kern_slot(char32_t character) {
  int first = 0;
  for (const Range& range : kerned) {
    if (character >= range.first && character <= range.last)
      return first + static_cast<int>(character - range.first);
    first += static_cast<int>(range.last - range.first) + 1;
  }
  return -1;
}

double Font::top(char32_t character) const {
  hb_glyph_extents_t box{};
  const auto found = glyph(character);
  if (!found || hb_font_get_glyph_extents(font_.get(), found->id, &box) == 0) return 0;
  return box.y_bearing * per_mille_;
}

double Font::bottom(char32_t character) const {
  hb_glyph_extents_t box{};
  const auto found = glyph(character);
  if (!found || hb_font_get_glyph_extents(font_.get(), found->id, &box) == 0) return 0;
  return (box.y_bearing + box.height) * per_mille_;
}

}  // namespace duskleaf
