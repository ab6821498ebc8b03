#pragma once

#include <algorithm>
#include <cstdlib>
#include <fstream>
#include <iterator>
#include <string>
#include <sys/wait.h>
#include <vector>

#include "order/scratch_folder.hpp"

namespace duskleaf {

/// What the real program said and answered.
struct Answer {
  int code;
  std::string out, err;
};

inline std::string bytes_of(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(file), {}};
}

/// Runs the program with these arguments, standard input empty, in a scratch folder's files.
/// `before` goes before the program's name (env settings); `out_to` takes standard output
/// elsewhere.
inline Answer run(const ScratchFolder& folder, const std::vector<std::string>& arguments,
                  const std::string& before = "", const std::string& out_to = "") {
  const std::string out = folder.file("stdout.txt"), err = folder.file("stderr.txt");
  std::string command =
      "cd '" + folder.path().string() + "' && " + before + " '" DUSKLEAF_PROGRAM "'";
  for (const std::string& argument : arguments) command += " '" + argument + "'";
  command += " </dev/null >'" + (out_to.empty() ? out : out_to) + "' 2>'" + err + "'";
  const int status = std::system(command.c_str());
  Answer answer{WIFEXITED(status) ? WEXITSTATUS(status) : -1, out_to.empty() ? bytes_of(out) : "",
                bytes_of(err)};
  std::filesystem::remove(out);
  std::filesystem::remove(err);
  return answer;
}

/// Every file below the folder, relative to it, sorted.
inline std::vector<std::string> files_below(const std::string& folder) {
  std::vector<std::string> files;
  if (!std::filesystem::exists(folder)) return files;
  for (const auto& entry : std::filesystem::recursive_directory_iterator(folder))
    if (entry.is_regular_file())
      files.push_back(std::filesystem::relative(entry.path(), folder).string());
  std::sort(files.begin(), files.end());
  return files;
}

}  // namespace duskleaf
