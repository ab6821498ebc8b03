// A rename within one folder replaces a file at once (POSIX rename), so that a reader meets the old
// file or the new one.
#include "run/whole_file.hpp"

#include <cerrno>
#include <cstring>
#include <fmt/format.h>
#include <fstream>
#include <unistd.h>

#include "order/order.hpp"

namespace duskleaf {
namespace fs = std::filesystem;
namespace {

void make_folders(const fs::path& folder) {
  std::error_code error;
  if (!folder.empty()) fs::create_directories(folder, error);
  if (error)
    throw FileError(
        fmt::format("{}: the folder cannot be made ({})", folder.string(), error.message()));
}

}  // namespace

void write_whole(const fs::path& path, std::string_view bytes) {
  make_folders(path.parent_path());
  // The process's number keeps two runs into one folder apart.
  const fs::path part =
      path.parent_path() / fmt::format(".{}.{}.part", path.filename().string(), ::getpid());
  std::error_code error;
  errno = 0;
  std::ofstream file(part, std::ios::binary | std::ios::trunc);
  file.write(bytes.data(), static_cast<std::streamsize>(bytes.size()));
  file.close();
  if (!file) {
    const std::string reason = std::strerror(errno);
    fs::remove(part, error);
    throw FileError(fmt::format("{}: cannot be written ({})", path.string(), reason));
  }
  fs::rename(part, path, error);
  if (error) {
    const std::string reason = error.message();
    fs::remove(part, error);
    throw FileError(fmt::format("{}: cannot be written ({})", path.string(), reason));
  }
}

void check_writable_folder(const fs::path& folder) {
  make_folders(folder);
  const fs::path probe = folder / fmt::format(".duskleaf.{}.part", ::getpid());
  const bool opened = std::ofstream(probe).is_open();
  const std::string reason = std::strerror(errno);
  std::error_code ignored;
  fs::remove(probe, ignored);
  if (!opened)
    throw FileError(fmt::format("{}: no file can be written there ({})", folder.string(), reason));
}

}  // namespace duskleaf
