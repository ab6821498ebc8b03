// Files that an order names: pictures by the PNG specification (W3C, 2nd ed. 2003), read whole by
// libpng so that a broken one is found before a page is drawn; fonts by the first four bytes of an
// OpenType file (ISO/IEC 14496-22).
#include <filesystem>
#include <fmt/format.h>
#include <png.h>

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
  const std::string_view begin = std::string_view(bytes).substr(0, 4);
  if (begin != std::string_view("\0\1\0\0", 4) && begin != "OTTO" && begin != "true")
    throw OrderError(where, fmt::format("{}: this is not a font", path), std::string(expected));
}

}  // namespace duskleaf
