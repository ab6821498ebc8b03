// Subsets by HarfBuzz. Tables kept are those that ISO 32000-1, 9.9 asks of an embedded TrueType
// program for a CID font (glyf, head, hhea, hmtx, loca, maxp); hinting goes, since the built-in
// faces have none and print does not need it.
#include "ink/font_subset.hpp"

#include <algorithm>
#include <cmath>
#include <hb-ot.h>
#include <hb-subset.h>
#include <hb.h>
#include <map>
#include <mutex>
#include <stdexcept>
#include <utility>
#include <vector>

#include "ink/compress.hpp"

namespace duskleaf {
namespace {

template <auto destroy>
struct Destroy {
  template <typename T>
  void operator()(T* object) const {
    destroy(object);
  }
};
using Blob = std::unique_ptr<hb_blob_t, Destroy<hb_blob_destroy>>;
using FontFace = std::unique_ptr<hb_face_t, Destroy<hb_face_destroy>>;
using SubsetInput = std::unique_ptr<hb_subset_input_t, Destroy<hb_subset_input_destroy>>;
using SubsetPlan = std::unique_ptr<hb_subset_plan_t, Destroy<hb_subset_plan_destroy>>;

constexpr hb_tag_t cff = HB_TAG('C', 'F', 'F', ' ');

FontFace open(std::string_view bytes) {
  const Blob blob(hb_blob_create(bytes.data(), static_cast<unsigned>(bytes.size()),
                                 HB_MEMORY_MODE_READONLY, nullptr, nullptr));
  return FontFace(hb_face_create(blob.get(), 0));
}

Blob table(hb_face_t* face, hb_tag_t tag) { return Blob(hb_face_reference_table(face, tag)); }

std::string_view content(const Blob& blob) {
  unsigned length = 0;
  const char* const data = hb_blob_get_data(blob.get(), &length);
  return {data, length};
}

FontSubset cut(std::string_view bytes, const std::set<unsigned>& glyphs) {
  const FontFace face = open(bytes);
  const bool postscript = !content(table(face.get(), cff)).empty();
  const SubsetInput input(hb_subset_input_create_or_fail());
  if (!input) throw std::bad_alloc();
  hb_set_t* const wanted = hb_subset_input_glyph_set(input.get());
  for (const unsigned glyph : glyphs) hb_set_add(wanted, glyph);
  hb_set_t* const dropped = hb_subset_input_set(input.get(), HB_SUBSET_SETS_DROP_TABLE_TAG);
  std::vector<hb_tag_t> tags(64);
  auto count = static_cast<unsigned>(tags.size());
  const unsigned total = hb_face_get_table_tags(face.get(), 0, &count, tags.data());
  tags.resize(std::min<std::size_t>(total, tags.size()));
  const std::set<hb_tag_t> kept{HB_TAG('g', 'l', 'y', 'f'),
                                HB_TAG('h', 'e', 'a', 'd'),
                                HB_TAG('h', 'h', 'e', 'a'),
                                HB_TAG('h', 'm', 't', 'x'),
                                HB_TAG('l', 'o', 'c', 'a'),
                                HB_TAG('m', 'a', 'x', 'p'),
                                cff};
  for (const hb_tag_t tag : tags)
    if (!kept.contains(tag)) hb_set_add(dropped, tag);
  unsigned flags = HB_SUBSET_FLAGS_NO_HINTING;
  if (postscript) flags |= HB_SUBSET_FLAGS_RETAIN_GIDS;
  hb_subset_input_set_flags(input.get(), flags);

  const SubsetPlan plan(hb_subset_plan_create_or_fail(face.get(), input.get()));
  const FontFace small(plan ? hb_subset_plan_execute_or_fail(plan.get()) : nullptr);
  if (!small) throw std::runtime_error("a font could not be cut to the characters in use");
  const Blob program =
      postscript ? table(small.get(), cff) : Blob(hb_face_reference_blob(small.get()));
  FontSubset subset{deflated(content(program)), content(program).size(), {}};
  const hb_map_t* const mapping = hb_subset_plan_old_to_new_glyph_mapping(plan.get());
  for (const unsigned glyph : glyphs) subset.new_glyph.emplace(glyph, hb_map_get(mapping, glyph));
  return subset;
}

int read_i16(std::string_view bytes, std::size_t at) {
  if (at + 2 > bytes.size()) return 0;
  const auto byte = [&](std::size_t i) {
    return static_cast<unsigned>(static_cast<unsigned char>(bytes[i]));
  };
  return static_cast<std::int16_t>(byte(at) << 8 | byte(at + 1));
}

}  // namespace

std::shared_ptr<const FontSubset> font_subset(std::uint64_t id, std::string_view bytes,
                                              const std::set<unsigned>& glyphs) {
  using Key = std::pair<std::uint64_t, std::set<unsigned>>;
  static std::mutex mutex;
  static std::map<Key, std::shared_ptr<const FontSubset>> cache;
  constexpr std::size_t most = 256;  // about 15 kB each
  Key key(id, glyphs);
  {
    const std::scoped_lock lock(mutex);
    if (const auto found = cache.find(key); found != cache.end()) return found->second;
  }
  auto subset = std::make_shared<const FontSubset>(cut(bytes, glyphs));
  const std::scoped_lock lock(mutex);
  if (cache.size() >= most) cache.clear();
  return cache.emplace(std::move(key), std::move(subset)).first->second;
}

bool has_postscript_outlines(std::string_view bytes) {
  return !content(table(open(bytes).get(), cff)).empty();
}

FontFacts font_facts(std::string_view bytes) {
  const FontFace face = open(bytes);
  const Blob head_blob = table(face.get(), HB_TAG('h', 'e', 'a', 'd'));
  const Blob hhea_blob = table(face.get(), HB_TAG('h', 'h', 'e', 'a'));
  const Blob os2_blob = table(face.get(), HB_TAG('O', 'S', '/', '2'));
  const Blob post_blob = table(face.get(), HB_TAG('p', 'o', 's', 't'));
  const double scale = 1000.0 / hb_face_get_upem(face.get());
  const auto value = [&](const Blob& blob, std::size_t at) {
    return static_cast<int>(std::lround(read_i16(content(blob), at) * scale));
  };
  FontFacts facts{};
  for (std::size_t i = 0; i < 4; ++i) facts.box[i] = value(head_blob, 36 + 2 * i);
  facts.ascent = value(hhea_blob, 4);
  facts.descent = value(hhea_blob, 6);
  const bool has_cap_height = read_i16(content(os2_blob), 0) >= 2;
  facts.cap_height = has_cap_height ? value(os2_blob, 88) : facts.ascent;
  // No table holds the stems' width; viewers need it only for a font that is not embedded. From
  // memory: 50 + (weight/65)^2.
  const double weight = read_i16(content(os2_blob), 4);
  facts.stem_v = static_cast<int>(std::lround(50 + weight * weight / 65.0 / 65.0));
  facts.italic_angle = read_i16(content(post_blob), 4);  // whole degrees are enough here
  return facts;
}

}  // namespace duskleaf
