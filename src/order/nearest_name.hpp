#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace duskleaf {

/// Edit distance of two words: insertions, deletions, substitutions and swaps of neighbours each
/// count one; letters' case is ignored (ASCII).
int edit_distance(std::string_view a, std::string_view b);

/// The known name nearest to `word`, empty when none is near (more than a third of the word would
/// change). The first in order wins a tie.
std::string nearest_name(std::string_view word, const std::vector<std::string>& known);
std::string nearest_name(std::string_view word, const std::vector<std::string_view>& known);

/// "a, b or c".
std::string listed(const std::vector<std::string_view>& names);

}  // namespace duskleaf
