#include <cstdint>
#include <gtest/gtest.h>
#include <png.h>

#include "ink/pdf_reading.hpp"

namespace duskleaf {
namespace {

/// A PNG of `width` pixels a row from bytes in the order red, green, blue, alpha.
std::shared_ptr<const std::string> png_of(const std::vector<std::uint8_t>& rgba, unsigned width) {
  png_image image{};
  image.version = PNG_IMAGE_VERSION;
  image.width = width;
  image.height = static_cast<unsigned>(rgba.size()) / 4 / width;
  image.format = PNG_FORMAT_RGBA;
  png_alloc_size_t size = 0;
  if (png_image_write_to_memory(&image, nullptr, &size, 0, rgba.data(), 0, nullptr) == 0)
    throw std::runtime_error(image.message);
  auto png = std::make_shared<std::string>(size, '\0');
  if (png_image_write_to_memory(&image, png->data(), &size, 0, rgba.data(), 0, nullptr) == 0)
    throw std::runtime_error(image.message);
  return png;
}

QPDFObjectHandle pictures(ReadPdf& read) {
  return read.page(0).getKey("/Resources").getKey("/XObject");
}

const std::vector<std::uint8_t> four_pixels{255, 0, 0,   255, 0,  255, 0,  255,
                                            0,   0, 255, 255, 10, 20,  30, 255};

TEST(PdfPicture, PixelsComeBack) {
  ReadPdf read(document_of({Image{{10, 10, 20, 20}, png_of(four_pixels, 2)}}));
  QPDFObjectHandle image = pictures(read).getKey("/P0");
  EXPECT_EQ(image.getDict().getKey("/Width").getIntValue(), 2);
  EXPECT_EQ(image.getDict().getKey("/Height").getIntValue(), 2);
  EXPECT_EQ(image.getDict().getKey("/ColorSpace").getName(), "/DeviceRGB");
  EXPECT_FALSE(image.getDict().hasKey("/SMask"));
  EXPECT_EQ(ReadPdf::data(image), std::string("\xFF\0\0\0\xFF\0\0\0\xFF\x0A\x14\x1E", 12));
  EXPECT_EQ(count(read.content(0), "5669 0 0 5669 2835 75685 cm /P0 Do"), 1U) << read.content(0);
}

TEST(PdfPicture, TransparencyIsAMask) {
  std::vector<std::uint8_t> pixels = four_pixels;
  pixels[7] = 128;
  ReadPdf read(document_of({Image{{10, 10, 20, 20}, png_of(pixels, 2)}}));
  QPDFObjectHandle mask = pictures(read).getKey("/P0").getDict().getKey("/SMask");
  ASSERT_TRUE(mask.isStream());
  EXPECT_EQ(mask.getDict().getKey("/ColorSpace").getName(), "/DeviceGray");
  EXPECT_EQ(ReadPdf::data(mask), "\xFF\x80\xFF\xFF");
}

TEST(PdfPicture, GreysNeedOneChannelAndColoursCanBecomeGrey) {
  ReadPdf read(document_of({Image{{0, 0, 9, 9}, png_of({7, 7, 7, 255, 200, 200, 200, 255}, 2)},
                            Image{{0, 0, 9, 9}, png_of(four_pixels, 4), "", true}}));
  EXPECT_EQ(ReadPdf::data(pictures(read).getKey("/P0")), "\x07\xC8");
  // Luma weights 0.2126, 0.7152, 0.0722 (ITU-R BT.709-6, 3.2) of 255.
  EXPECT_EQ(ReadPdf::data(pictures(read).getKey("/P1")).substr(0, 3), "\x36\xB6\x12");
}

TEST(PdfPicture, TheSamePictureIsStoredOnce) {
  SheetDocument document = document_of({});
  document.sheets.clear();
  for (int page = 0; page < 3; ++page)
    document.sheets.push_back({210, 297, "", {Image{{10, 10, 20, 20}, png_of(four_pixels, 2)}}});
  ReadPdf read(document);
  EXPECT_EQ(pictures(read).getKeys().size(), 1U);
  EXPECT_EQ(count(read.content(2), "/P0 Do"), 1U);
}

TEST(PdfPicture, BrokenOnesAreRefused) {
  const std::string whole = *png_of(four_pixels, 2);
  std::string bent = whole;
  bent[bent.size() / 2] ^= 0x55;
  for (const std::string& bytes :
       {std::string(), std::string("no picture at all"), whole.substr(0, 40), bent}) {
    try {
      make_pdf(document_of({Image{{0, 0, 9, 9}, std::make_shared<const std::string>(bytes)}}),
               test_type());
      ADD_FAILURE() << bytes.size() << " bytes were drawn";
    } catch (const std::runtime_error& error) {
      EXPECT_NE(std::string(error.what()).find("expected a PNG file"), std::string::npos)
          << error.what();
    }
  }
}

TEST(PdfPicture, ABrokenOneIsRefusedTheSecondTimeToo) {
  const Image broken{{0, 0, 9, 9}, std::make_shared<const std::string>("\x89PNG")};
  for (int i = 0; i < 2; ++i)
    EXPECT_THROW(make_pdf(document_of({broken}), test_type()), std::runtime_error);
}

}  // namespace
}  // namespace duskleaf
