// UTF-8 by RFC 3629: no overlong forms, no surrogates, nothing above U+10FFFF.
#include <cerrno>
#include <cstring>
#include <filesystem>
#include <fmt/format.h>
#include <fstream>

#include "order/yaml_reader.hpp"

namespace duskleaf {
namespace {

/// Length of the well-formed UTF-8 character at `at`, 0 when it is none.
std::size_t character_length(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) -> unsigned {
    return at + i < text.size() ? static_cast<unsigned char>(text[at + i]) : 0U;
  };
  const auto tail = [&](std::size_t i) { return (byte(i) & 0xC0U) == 0x80U; };
  const unsigned lead = byte(0);
  if (lead < 0x80U) return 1;
  if (lead >= 0xC2U && lead <= 0xDFU) return tail(1) ? 2 : 0;
  if (lead >= 0xE0U && lead <= 0xEFU) {
    const bool overlong = lead == 0xE0U && byte(1) < 0xA0U;
    const bool surrogate = lead == 0xEDU && byte(1) > 0x9FU;
    return tail(1) && tail(2) && !overlong && !surrogate ? 3 : 0;
  }
  if (lead >= 0xF0U && lead <= 0xF4U) {
    const bool overlong = lead == 0xF0U && byte(1) < 0x90U;
    const bool too_high = lead == 0xF4U && byte(1) > 0x8FU;
    return tail(1) && tail(2) && tail(3) && !overlong && !too_high ? 4 : 0;
  }
  return 0;
}

}  // namespace

std::string read_file(const std::string& path, std::size_t limit) {
  namespace fs = std::filesystem;
  std::error_code error;
  const fs::file_status status = fs::status(path, error);
  if (!fs::exists(status)) throw FileError(fmt::format("{}: there is no such file", path));
  if (fs::is_directory(status))
    throw FileError(fmt::format("{}: this is a folder, not a file", path));
  std::ifstream file(path, std::ios::binary);
  if (!file) throw FileError(fmt::format("{}: cannot be read ({})", path, std::strerror(errno)));
  std::string bytes;
  char buffer[65536];
  while (file.read(buffer, sizeof buffer) || file.gcount() > 0) {
    bytes.append(buffer, static_cast<std::size_t>(file.gcount()));
    if (bytes.size() > limit)
      throw FileError(
          fmt::format("{}: larger than {} kB, the most that is read", path, limit / 1000));
  }
  if (file.bad()) throw FileError(fmt::format("{}: cannot be read to its end", path));
  return bytes;
}

std::string clean_text(std::string_view bytes, const std::string& file) {
  if (bytes.starts_with("\xEF\xBB\xBF")) bytes.remove_prefix(3);
  std::string text;
  text.reserve(bytes.size());
  Location here{file, 1, 1};
  for (std::size_t at = 0; at < bytes.size();) {
    const std::size_t length = character_length(bytes, at);
    if (length == 0)
      throw OrderError(
          here, fmt::format("byte 0x{:02X} is not UTF-8", static_cast<unsigned char>(bytes[at])),
          "save the file as UTF-8 text");
    const char c = bytes[at];
    if (length == 1 && ((c >= 0 && c < ' ' && c != '\t' && c != '\n' && c != '\r') || c == 0x7F))
      throw OrderError(here, fmt::format("control character 0x{:02X}", static_cast<unsigned>(c)),
                       "plain text was expected");
    if (c == '\r' || c == '\n') {
      if (c == '\r' && at + 1 < bytes.size() && bytes[at + 1] == '\n') ++at;
      text += '\n';
      ++here.line;
      here.column = 1;
    } else {
      text.append(bytes.substr(at, length));
      ++here.column;
    }
    at += length;
  }
  return text;
}

int column_of(std::string_view line, std::size_t byte) {
  int column = 1;
  for (const char c : line.substr(0, byte))
    if ((static_cast<unsigned char>(c) & 0xC0U) != 0x80U) ++column;
  return column;
}

}  // namespace duskleaf
