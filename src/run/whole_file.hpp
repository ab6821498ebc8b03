#pragma once

#include <filesystem>
#include <string_view>

namespace duskleaf {

/// Writes a file whole or not at all: into a file beside it, then renamed over it. Folders on the way are made. Throws
/// FileError; what was begun is then removed.
void write_whole(const std::filesystem::path&, std::string_view bytes);

/// Makes the folder where it is missing and tries whether a file can be made in it. Throws FileError.
void check_writable_folder(const std::filesystem::path&);

}  // namespace duskleaf
