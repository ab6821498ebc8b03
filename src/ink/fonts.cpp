// Composite fonts of ISO 32000-1, 9.7: Type0 with Identity-H, a CIDFontType2 (TrueType) or
// CIDFontType0 (PostScript outlines) descendant, and a ToUnicode CMap (9.10.3) of bfchar and
// bfrange lines.
#include "ink/fonts.hpp"

#include <fmt/format.h>
#include <set>
#include <utility>

#include "ink/compress.hpp"
#include "ink/font_subset.hpp"

namespace duskleaf {
namespace {

using Object = QPDFObjectHandle;

constexpr unsigned first_ascii = 0x20, last_ascii = 0x7E;

Object packed_stream(QPDF& pdf, const std::string& packed) {
  Object stream = Object::newStream(&pdf);
  stream.replaceStreamData(packed, Object::newName("/FlateDecode"), Object::newNull());
  return stream;
}

/// Six letters from the glyphs in use, as the standard asks of a subset's name (9.6.4).
std::string subset_tag(const std::set<unsigned>& glyphs) {
  std::uint64_t hash = 14695981039346656037U;  // FNV-1a, 64 bits
  for (const unsigned glyph : glyphs) hash = (hash ^ glyph) * 1099511628211U;
  std::string tag;
  for (int i = 0; i < 6; ++i, hash /= 26) tag += static_cast<char>('A' + hash % 26);
  return tag;
}

std::string utf16_hex(char32_t c) {
  if (c < 0x10000) return fmt::format("{:04X}", static_cast<std::uint32_t>(c));
  const auto rest = static_cast<std::uint32_t>(c) - 0x10000;
  return fmt::format("{:04X}{:04X}", 0xD800 + (rest >> 10), 0xDC00 + (rest & 0x3FF));
}

}  // namespace

FontInUse::FontInUse(std::uint64_t id, std::string_view bytes, std::string name)
    : id_(id),
      bytes_(bytes),
      name_(std::move(name)),
      postscript_outlines_(has_postscript_outlines(bytes)),
      slots_(last_ascii + 1) {}

unsigned FontInUse::code(const SetGlyph& glyph) {
  unsigned code = glyph.character;
  if (postscript_outlines_) {
    // There is no CIDToGIDMap for these: the code is the glyph.
    code = glyph.glyph;
    if (code >= slots_.size()) slots_.resize(code + 1);
  } else if (code < first_ascii || code > last_ascii) {
    const auto [place, is_new] =
        codes_.try_emplace(glyph.character, static_cast<unsigned>(slots_.size()));
    code = place->second;
    if (is_new) slots_.emplace_back();
  }
  Slot& slot = slots_[code];
  if (slot.character == 0) slot = {glyph.character, glyph.glyph, glyph.advance};
  return code;
}

Object FontInUse::widths() const {
  Object all = Object::newArray();
  for (std::size_t code = 0; code < slots_.size(); ++code) {
    if (slots_[code].character == 0) continue;
    Object run = Object::newArray();
    const std::size_t first = code;
    for (; code < slots_.size() && slots_[code].character != 0; ++code)
      run.appendItem(Object::newReal(slots_[code].width, 1, true));
    all.appendItem(Object::newInteger(static_cast<long long>(first)));
    all.appendItem(run);
  }
  return all;
}

std::string FontInUse::to_unicode() const {
  std::string map =
      "/CIDInit /ProcSet findresource begin 12 dict begin begincmap\n"
      "/CIDSystemInfo <</Registry (Adobe) /Ordering (UCS) /Supplement 0>> def\n"
      "/CMapName /Adobe-Identity-UCS def /CMapType 2 def\n"
      "1 begincodespacerange <0000> <FFFF> endcodespacerange\n";
  std::vector<std::string> lines;
  for (std::size_t code = 0; code < slots_.size(); ++code)
    if (slots_[code].character != 0)
      lines.push_back(fmt::format("<{:04X}> <{}>\n", code, utf16_hex(slots_[code].character)));
  constexpr std::size_t most = 100;  // lines in one bfchar section
  for (std::size_t first = 0; first < lines.size(); first += most) {
    const std::size_t count = std::min(most, lines.size() - first);
    map += fmt::format("{} beginbfchar\n", count);
    for (std::size_t i = first; i < first + count; ++i) map += lines[i];
    map += "endbfchar\n";
  }
  return map + "endcmap CMapName currentdict /CMap defineresource pop end end\n";
}

Object FontInUse::make(QPDF& pdf) const {
  std::set<unsigned> glyphs{0};
  for (const Slot& slot : slots_)
    if (slot.character != 0) glyphs.insert(slot.glyph);
  const std::shared_ptr<const FontSubset> subset = font_subset(id_, bytes_, glyphs);
  const FontFacts facts = font_facts(bytes_);
  const Object name = Object::newName(fmt::format("/{}+{}", subset_tag(glyphs), name_));

  Object program = packed_stream(pdf, subset->packed);
  Object descriptor = Object::newDictionary();
  if (postscript_outlines_) {
    program.getDict().replaceKey("/Subtype", Object::newName("/CIDFontType0C"));
    descriptor.replaceKey("/FontFile3", program);
  } else {
    program.getDict().replaceKey("/Length1",
                                 Object::newInteger(static_cast<long long>(subset->length)));
    descriptor.replaceKey("/FontFile2", program);
  }
  Object box = Object::newArray();
  for (const int edge : facts.box) box.appendItem(Object::newInteger(edge));
  constexpr int symbolic = 4, italic = 64;
  descriptor.replaceKey("/Type", Object::newName("/FontDescriptor"));
  descriptor.replaceKey("/FontName", name);
  descriptor.replaceKey("/Flags",
                        Object::newInteger(symbolic | (facts.italic_angle != 0 ? italic : 0)));
  descriptor.replaceKey("/FontBBox", box);
  descriptor.replaceKey("/ItalicAngle", Object::newReal(facts.italic_angle, 1, true));
  descriptor.replaceKey("/Ascent", Object::newInteger(facts.ascent));
  descriptor.replaceKey("/Descent", Object::newInteger(facts.descent));
  descriptor.replaceKey("/CapHeight", Object::newInteger(facts.cap_height));
  descriptor.replaceKey("/StemV", Object::newInteger(facts.stem_v));

  Object descendant = Object::newDictionary();
  descendant.replaceKey("/Type", Object::newName("/Font"));
  descendant.replaceKey("/Subtype",
                        Object::newName(postscript_outlines_ ? "/CIDFontType0" : "/CIDFontType2"));
  descendant.replaceKey("/BaseFont", name);
  descendant.replaceKey("/CIDSystemInfo",
                        Object::parse("<</Registry (Adobe) /Ordering (Identity) /Supplement 0>>"));
  descendant.replaceKey("/FontDescriptor", pdf.makeIndirectObject(descriptor));
  descendant.replaceKey("/W", widths());
  if (!postscript_outlines_) {
    std::string map;
    for (const Slot& slot : slots_) {
      const unsigned glyph = slot.character == 0 ? 0 : subset->new_glyph.at(slot.glyph);
      map += static_cast<char>(glyph >> 8);
      map += static_cast<char>(glyph & 0xFF);
    }
    descendant.replaceKey("/CIDToGIDMap", packed_stream(pdf, deflated(map)));
  }

  Object descendants = Object::newArray();
  descendants.appendItem(pdf.makeIndirectObject(descendant));
  Object font = Object::newDictionary();
  font.replaceKey("/Type", Object::newName("/Font"));
  font.replaceKey("/Subtype", Object::newName("/Type0"));
  font.replaceKey("/BaseFont", name);
  font.replaceKey("/Encoding", Object::newName("/Identity-H"));
  font.replaceKey("/DescendantFonts", descendants);
  font.replaceKey("/ToUnicode", packed_stream(pdf, deflated(to_unicode())));
  return pdf.makeIndirectObject(font);
}

std::size_t DocumentFonts::index(Face face, bool fallback) {
  int& known = index_of_face_[static_cast<std::size_t>(face) * 2 + (fallback ? 1 : 0)];
  if (known >= 0) return static_cast<std::size_t>(known);
  const std::uint64_t id = type_.font_id(face, fallback);
  const auto [place, is_new] = index_of_id_.try_emplace(id, fonts_.size());
  if (is_new)
    fonts_.emplace_back(id, type_.font_bytes(face, fallback), type_.font_name(face, fallback));
  known = static_cast<int>(place->second);
  return place->second;
}

Object DocumentFonts::make(QPDF& pdf) const {
  Object fonts = Object::newDictionary();
  for (std::size_t i = 0; i < fonts_.size(); ++i)
    fonts.replaceKey(fmt::format("/F{}", i), fonts_[i].make(pdf));
  return fonts;
}

}  // namespace duskleaf
