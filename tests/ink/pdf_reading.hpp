#pragma once

#include <array>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <gtest/gtest.h>
#include <qpdf/Buffer.hh>
#include <qpdf/QPDF.hh>
#include <qpdf/QPDFObjectHandle.hh>
#include <stdexcept>
#include <string>
#include <vector>

#include "ink/pdf.hpp"

namespace duskleaf {

inline const TypeSet& test_type() {
  static const TypeSet type;
  return type;
}

/// A PDF read back by libqpdf.
struct ReadPdf {
  std::string bytes;
  QPDF pdf;
  explicit ReadPdf(const SheetDocument& document) : bytes(make_pdf(document, test_type())) {
    pdf.setSuppressWarnings(true);
    pdf.processMemoryFile("test", bytes.data(), bytes.size());
  }
  QPDFObjectHandle page(std::size_t i) { return pdf.getAllPages().at(i); }
  /// Page operators as text.
  std::string content(std::size_t i) { return data(page(i).getKey("/Contents")); }
  static std::string data(QPDFObjectHandle stream) {
    const auto buffer = stream.getStreamData(qpdf_dl_all);
    return {reinterpret_cast<const char*>(buffer->getBuffer()), buffer->getSize()};
  }
};

/// What `pdftotext` prints, its complaints included.
inline std::string text_of(const std::string& pdf, const std::string& options) {
  const auto* const test = testing::UnitTest::GetInstance()->current_test_info();
  const std::filesystem::path file = std::filesystem::path(testing::TempDir()) /
                                     (std::string("duskleaf_") + test->name() + ".pdf");
  std::ofstream(file, std::ios::binary) << pdf;
  FILE* const pipe =
      popen(("pdftotext -enc UTF-8 " + options + " '" + file.string() + "' - 2>&1").c_str(), "r");
  if (pipe == nullptr) throw std::runtime_error("pdftotext cannot be run (Debian: poppler-utils)");
  std::string text;
  std::array<char, 4096> part{};
  for (std::size_t n = 0; (n = fread(part.data(), 1, part.size(), pipe)) > 0;)
    text.append(part.data(), n);
  const int status = pclose(pipe);
  std::filesystem::remove(file);
  if (status != 0) throw std::runtime_error("pdftotext failed: " + text);
  return text;
}

inline std::size_t count(const std::string& text, const std::string& part) {
  std::size_t times = 0;
  for (std::size_t at = text.find(part); at != std::string::npos; at = text.find(part, at + 1))
    ++times;
  return times;
}

inline SheetDocument document_of(std::vector<Mark> marks) {
  return {"Title", "Author", "Subject", "en", {Sheet{210, 297, "", std::move(marks)}}};
}

}  // namespace duskleaf
