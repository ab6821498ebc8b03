// Image XObjects of ISO 32000-1, 8.9: 8 bits a channel, transparency as a soft mask (11.6.5.3). PNG
// (ISO/IEC 15948) is read by libpng; rows keep PNG's "up" filter, which suits logos' flat areas.
#include "ink/pictures.hpp"

#include <cmath>
#include <cstdint>
#include <mutex>
#include <png.h>
#include <stdexcept>

#include "ink/compress.hpp"

namespace duskleaf {

struct DocumentPictures::Packed {
  long width, height;
  bool grey;
  std::string colours, mask;  // zlib streams; mask empty: opaque
};

namespace {

constexpr long most_pixels = 40'000'000;

struct Pixels {
  long width = 0, height = 0;
  std::vector<std::uint8_t> rgba;
};

Pixels decode(const std::string& png) {
  png_image image{};
  image.version = PNG_IMAGE_VERSION;
  const auto fail = [&](const std::string& why) {
    png_image_free(&image);
    throw std::runtime_error("a picture cannot be drawn: " + why + "; expected a PNG file");
  };
  if (png_image_begin_read_from_memory(&image, png.data(), png.size()) == 0) fail(image.message);
  if (static_cast<long>(image.width) * static_cast<long>(image.height) > most_pixels)
    fail("it has more than 40 million pixels");
  image.format = PNG_FORMAT_RGBA;
  Pixels pixels{image.width, image.height, std::vector<std::uint8_t>(PNG_IMAGE_SIZE(image))};
  if (png_image_finish_read(&image, nullptr, pixels.rgba.data(), 0, nullptr) == 0)
    fail(image.message);
  return pixels;
}

/// Rows of `channels` bytes a pixel, each row led by PNG's filter byte 2 and less the row above.
std::string pack_rows(const std::vector<std::uint8_t>& samples, long width, long height,
                      int channels) {
  const auto stride = static_cast<std::size_t>(width * channels);
  std::string rows;
  rows.reserve((stride + 1) * static_cast<std::size_t>(height));
  for (std::size_t start = 0; start < samples.size(); start += stride) {
    rows += '\2';
    for (std::size_t i = start; i < start + stride; ++i)
      rows += static_cast<char>(samples[i] - (start == 0 ? 0 : samples[i - stride]));
  }
  return deflated(rows);
}

/// Luma of ITU-R BT.709 on the coded values: near enough for a picture in greys.
std::uint8_t grey_of(const std::uint8_t* rgb) {
  return static_cast<std::uint8_t>(
      std::lround(0.2126 * rgb[0] + 0.7152 * rgb[1] + 0.0722 * rgb[2]));
}

QPDFObjectHandle image_object(QPDF& pdf, long width, long height, bool grey,
                              const std::string& packed) {
  using Object = QPDFObjectHandle;
  Object decode = Object::newDictionary();
  decode.replaceKey("/Predictor", Object::newInteger(15));
  decode.replaceKey("/Colors", Object::newInteger(grey ? 1 : 3));
  decode.replaceKey("/Columns", Object::newInteger(width));
  Object image = Object::newStream(&pdf);
  image.replaceStreamData(packed, Object::newName("/FlateDecode"), decode);
  Object about = image.getDict();
  about.replaceKey("/Type", Object::newName("/XObject"));
  about.replaceKey("/Subtype", Object::newName("/Image"));
  about.replaceKey("/Width", Object::newInteger(width));
  about.replaceKey("/Height", Object::newInteger(height));
  about.replaceKey("/ColorSpace", Object::newName(grey ? "/DeviceGray" : "/DeviceRGB"));
  about.replaceKey("/BitsPerComponent", Object::newInteger(8));
  return image;
}

}  // namespace

std::shared_ptr<const DocumentPictures::Packed> DocumentPictures::pack(const Image& image) {
  const Pixels pixels = decode(*image.png);
  std::vector<std::uint8_t> colours, mask;
  bool opaque = true;
  bool grey = true;
  for (std::size_t i = 0; i < pixels.rgba.size(); i += 4) {
    const std::uint8_t* const p = &pixels.rgba[i];
    opaque = opaque && p[3] == 255;
    grey = grey && p[0] == p[1] && p[1] == p[2];
  }
  grey = grey || image.grey;
  for (std::size_t i = 0; i < pixels.rgba.size(); i += 4) {
    const std::uint8_t* const p = &pixels.rgba[i];
    if (grey)
      colours.push_back(grey_of(p));
    else
      colours.insert(colours.end(), p, p + 3);
    if (!opaque) mask.push_back(p[3]);
  }
  return std::make_shared<const Packed>(
      Packed{pixels.width, pixels.height, grey,
             pack_rows(colours, pixels.width, pixels.height, grey ? 1 : 3),
             opaque ? std::string() : pack_rows(mask, pixels.width, pixels.height, 1)});
}

std::string DocumentPictures::name(const Image& image) {
  const auto [place, is_new] = index_.try_emplace({*image.png, image.grey}, pictures_.size());
  if (is_new) {
    held_.push_back(image.png);
    pictures_.push_back(nullptr);
    // A site's files carry the same logo one after the other: packed once.
    static std::mutex mutex;
    static std::map<std::pair<std::string, bool>, std::shared_ptr<const Packed>> cache;
    constexpr std::size_t most = 16;
    const std::pair key(*image.png, image.grey);
    std::shared_ptr<const Packed> packed;
    {
      const std::scoped_lock lock(mutex);
      if (const auto found = cache.find(key); found != cache.end()) packed = found->second;
    }
    if (!packed) {
      packed = pack(image);
      const std::scoped_lock lock(mutex);
      if (cache.size() >= most) cache.clear();
      cache.emplace(key, packed);
    }
    pictures_.back() = packed;
  }
  return "/P" + std::to_string(place->second);
}

QPDFObjectHandle DocumentPictures::make(QPDF& pdf) const {
  QPDFObjectHandle all = QPDFObjectHandle::newDictionary();
  for (std::size_t i = 0; i < pictures_.size(); ++i) {
    const Packed& picture = *pictures_[i];
    QPDFObjectHandle image =
        image_object(pdf, picture.width, picture.height, picture.grey, picture.colours);
    if (!picture.mask.empty())
      image.getDict().replaceKey(
          "/SMask", image_object(pdf, picture.width, picture.height, true, picture.mask));
    all.replaceKey("/P" + std::to_string(i), image);
  }
  return all;
}

}  // namespace duskleaf
