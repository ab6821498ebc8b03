#pragma once

#include <filesystem>
#include <fstream>
#include <string_view>

namespace duskleaf {

/// A file that appears whole or not at all: written beside its place, then renamed over it. What
/// was begun and not finished is removed. A symbolic link stays and its target is written; into a
/// device or a pipe the bytes go straight.
class WholeFile {
 public:
  /// Folders on the way are made. Throws FileError.
  explicit WholeFile(const std::filesystem::path&);
  ~WholeFile();
  WholeFile(const WholeFile&) = delete;
  WholeFile& operator=(const WholeFile&) = delete;

  std::ostream& stream() { return stream_; }
  /// Puts the file in its place. Throws FileError when it, or any writing before, failed.
  void finish();

 private:
  std::filesystem::path path_, part_;
  std::ofstream stream_;
};

/// All at once. Throws FileError.
void write_whole(const std::filesystem::path&, std::string_view bytes);

/// Makes the folder where it is missing and tries whether a file can be made in it. Throws
/// FileError.
void check_writable_folder(const std::filesystem::path&);

}  // namespace duskleaf
