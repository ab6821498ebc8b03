// Whether the words that a person wrote can be set: by the fonts' own character maps, through the
// same routine that sets the pages.
#include "run/characters.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace duskleaf {
namespace {

constexpr std::size_t most_named = 8;  // characters that a message lists

bool is_ascii(std::string_view text) {
  return std::all_of(text.begin(), text.end(),
                     [](char c) { return static_cast<unsigned char>(c) < 0x80U; });
}

std::vector<std::string_view> words_of(const Site& site) {
  std::vector<std::string_view> words = {site.name, site.masthead.group, site.masthead.contact};
  for (const Session& session : site.sessions) {
    words.push_back(session.where);
    words.push_back(session.text);
  }
  for (const OwnDate& date : site.dates) words.push_back(date.text);
  for (const auto& [month, note] : site.notes) words.push_back(note);
  return words;
}

/// A text's characters as UTF-8; the text is well-formed, as the order's reader has seen to.
std::vector<std::string_view> characters_of(std::string_view text) {
  std::vector<std::string_view> characters;
  for (std::size_t at = 0; at < text.size();) {
    std::size_t end = at + 1;
    while (end < text.size() && (static_cast<unsigned char>(text[end]) & 0xC0U) == 0x80U) ++end;
    characters.push_back(text.substr(at, end - at));
    at = end;
  }
  return characters;
}

bool lacks(const TypeSet& type, std::string_view text) {
  const std::vector<SetGlyph> glyphs = type.set(text, Face::regular);
  return std::count_if(glyphs.begin(), glyphs.end(), [](const SetGlyph& glyph) {
           return glyph.character == U'?';
         }) > std::count(text.begin(), text.end(), '?');
}

}  // namespace

std::unique_ptr<TypeSet> load_type(const Order::Fonts& fonts) {
  try {
    return std::make_unique<TypeSet>(TypeSet::Files{fonts.regular, fonts.bold, fonts.italic});
  } catch (const std::runtime_error& error) {
    throw FileError(error.what());
  }
}

std::vector<Doubt> missing_characters(const Order& order) {
  const std::unique_ptr<TypeSet> type = load_type(order.fonts);
  std::vector<Doubt> list;
  for (const Site& site : order.sites) {
    std::vector<std::string_view> missing;
    for (const std::string_view text : words_of(site)) {
      if (is_ascii(text) || !lacks(*type, text)) continue;
      for (const std::string_view character : characters_of(text))
        if (lacks(*type, character) &&
            std::find(missing.begin(), missing.end(), character) == missing.end())
          missing.push_back(character);
    }
    if (missing.empty()) continue;
    std::string named;
    for (std::size_t i = 0; i < std::min(missing.size(), most_named); ++i)
      named.append(i > 0 ? " " : "").append(missing[i]);
    if (missing.size() > most_named) named += " ...";
    list.push_back(
        {site.where, fmt::format("{}: the fonts lack {}; each is printed as a question mark",
                                 site.place.id, named)});
  }
  return list;
}

}  // namespace duskleaf
