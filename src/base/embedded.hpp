#pragma once

#include <optional>
#include <string_view>
#include <vector>

namespace duskleaf {

/// A file compiled into the program: "data/stars.csv", "templates/monthly-handout.yaml",
/// "templates/words/en.yaml", "fonts/regular". Throws std::out_of_range for a name that is not
/// there (a programming error).
std::string_view embedded_file(std::string_view name);
std::optional<std::string_view> find_embedded_file(std::string_view name);
/// Names that begin so, in order.
std::vector<std::string_view> embedded_names(std::string_view prefix);

}  // namespace duskleaf
