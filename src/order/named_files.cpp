// Files that an order names: pictures by the PNG specification (W3C, 2nd ed. 2003), read whole by
// libpng so that a broken one is found before a page is drawn; fonts by the first four bytes of an
// OpenType file (ISO/IEC 14496-22).
#include <filesystem>
#include <fmt/format.h>
#include <png.h>
#include <set>

#include "order/site_reader.hpp"

namespace duskleaf {
namespace {

constexpr std::size_t largest_logo_bytes = 10'000'000;
constexpr unsigned largest_logo_side = 4096;  // pixels
constexpr std::size_t largest_font_bytes = 50'000'000;

std::string read_named(const std::string& path, const Location& where, std::size_t limit,
                       std::string_view expected) {
  try {
    return read_file(path, limit);
  } catch (const FileError& error) {
    throw OrderError(where, error.what(), std::string(expected));
  }
}

std::size_t number_at(std::string_view bytes, std::size_t at, std::size_t length) {
  std::size_t number = 0;
  for (const char c : bytes.substr(at, length))
    number = number << 8U | static_cast<unsigned char>(c);
  return number;
}

/// What is wrong with a font by its table directory (OpenType 1.9, "Organization of an OpenType
/// font"): a file cut short in copying, or one of another kind. Empty when nothing is.
std::string font_trouble(std::string_view bytes) {
  const std::string_view begin = bytes.substr(0, 4);
  if (begin == "ttcf") return "this is a collection of several fonts";
  if (begin != std::string_view("\0\1\0\0", 4) && begin != "OTTO" && begin != "true")
    return "this is not a font";
  constexpr std::size_t head = 12, entry = 16;
  const std::size_t tables = bytes.size() < head ? 0 : number_at(bytes, 4, 2);
  if (tables == 0 || bytes.size() < head + tables * entry) return "the font is cut short";
  std::set<std::string_view> found;
  for (std::size_t i = 0; i < tables; ++i) {
    const std::size_t at = head + i * entry;
    if (number_at(bytes, at + 8, 4) + number_at(bytes, at + 12, 4) > bytes.size())
      return "the font is cut short";
    found.insert(bytes.substr(at, 4));
  }
  for (const std::string_view needed : {"cmap", "head", "hhea", "hmtx", "maxp"})
    if (!found.contains(needed)) return fmt::format("the font lacks its table '{}'", needed);
  const bool outlines = (found.contains("glyf") && found.contains("loca")) ||
                        found.contains("CFF ") || found.contains("CFF2");
  return outlines ? "" : "the font has no outlines";
}

}  // namespace

std::string folder_of(const std::string& path) {
  return std::filesystem::path(path).parent_path().string();
}

std::string path_in(const std::string& folder, const std::string& named) {
  return (std::filesystem::path(folder) / named).string();
}

void check_logo(const std::string& path, const Location& where) {
  constexpr std::string_view expected = "expected a PNG picture, named relative to the order";
  const std::string bytes = read_named(path, where, largest_logo_bytes, expected);
  png_image image{};
  image.version = PNG_IMAGE_VERSION;
  const auto refuse = [&](const std::string& what) {
    png_image_free(&image);
    throw OrderError(where, fmt::format("{}: {}", path, what), std::string(expected));
  };
  if (bytes.empty()) refuse("the file is empty");
  if (png_image_begin_read_from_memory(&image, bytes.data(), bytes.size()) == 0)
    refuse(fmt::format("not a whole PNG picture ({})", image.message));
  if (image.width > largest_logo_side || image.height > largest_logo_side)
    refuse(fmt::format("the picture is {} by {} pixels, more than {} a side", image.width,
                       image.height, largest_logo_side));
  image.format = PNG_FORMAT_RGBA;
  std::vector<png_byte> pixels(PNG_IMAGE_SIZE(image));
  if (png_image_finish_read(&image, nullptr, pixels.data(), 0, nullptr) == 0)
    refuse(fmt::format("not a whole PNG picture ({})", image.message));
}

void check_font(const std::string& path, const Location& where) {
  constexpr std::string_view expected =
      "expected a TrueType or OpenType font file, named relative to the order";
  const std::string bytes = read_named(path, where, largest_font_bytes, expected);
  if (const std::string trouble = font_trouble(bytes); !trouble.empty())
    throw OrderError(where, fmt::format("{}: {}", path, trouble), std::string(expected));
}

}  // namespace duskleaf
