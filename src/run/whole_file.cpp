// A rename within one folder replaces a file at once (POSIX rename), so that a reader meets the old
// file or the new one.
#include "run/whole_file.hpp"

#include <cerrno>
#include <cstring>
#include <fmt/format.h>
#include <unistd.h>

#include "order/order.hpp"

namespace duskleaf {
namespace fs = std::filesystem;
namespace {

void make_folders(const fs::path& folder) {
  std::error_code error;
  if (!folder.empty()) fs::create_directories(folder, error);
  // create_directories is content with a file of that name; a file cannot hold others.
  if (!error && !folder.empty() && !fs::is_directory(folder, error) && !error)
    error = std::make_error_code(std::errc::not_a_directory);
  if (error)
    throw FileError(
        fmt::format("{}: the folder cannot be made ({})", folder.string(), error.message()));
}

[[noreturn]] void refuse(const fs::path& path, const std::string& reason) {
  throw FileError(fmt::format("{}: cannot be written ({})", path.string(), reason));
}

/// The process's number keeps two runs into one folder apart.
fs::path part_beside(const fs::path& path) {
  return path.parent_path() / fmt::format(".{}.{}.part", path.filename().string(), ::getpid());
}

/// Where a symbolic link leads (also to a file that is not there yet); other paths as they are.
fs::path target_of(const fs::path& path) {
  std::error_code error;
  if (!fs::is_symlink(path, error)) return path;
  const fs::path target = fs::weakly_canonical(path.parent_path() / fs::read_symlink(path, error));
  return error ? path : target;
}

bool is_device_or_pipe(const fs::path& path) {
  std::error_code error;
  const fs::file_type type = fs::status(path, error).type();
  return type == fs::file_type::character || type == fs::file_type::block ||
         type == fs::file_type::fifo || type == fs::file_type::socket;
}

}  // namespace

WholeFile::WholeFile(const fs::path& path) : path_(target_of(path)) {
  make_folders(path_.parent_path());
  if (!is_device_or_pipe(path_)) part_ = part_beside(path_);
  stream_.open(part_.empty() ? path_ : part_, std::ios::binary | std::ios::trunc);
  if (!stream_) refuse(path_, std::strerror(errno));
}

WholeFile::~WholeFile() {
  std::error_code ignored;
  if (!part_.empty()) fs::remove(part_, ignored);
}

void WholeFile::finish() {
  errno = 0;
  stream_.close();
  if (!stream_) refuse(path_, errno != 0 ? std::strerror(errno) : "the disk may be full");
  if (part_.empty()) return;
  std::error_code error;
  fs::rename(part_, path_, error);
  if (error) refuse(path_, error.message());
  part_.clear();
}

void write_whole(const fs::path& path, std::string_view bytes) {
  WholeFile file(path);
  file.stream().write(bytes.data(), static_cast<std::streamsize>(bytes.size()));
  file.finish();
}

void check_writable_folder(const fs::path& folder) {
  make_folders(folder);
  const fs::path probe = part_beside(folder / "duskleaf");
  const bool opened = std::ofstream(probe).is_open();
  const std::string reason = std::strerror(errno);
  std::error_code ignored;
  fs::remove(probe, ignored);
  if (!opened)
    throw FileError(fmt::format("{}: no file can be written there ({})", folder.string(), reason));
}

}  // namespace duskleaf
