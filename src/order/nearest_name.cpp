// Restricted edit distance of Damerau (1964), Communications of the ACM 7, 171, by the usual table.
#include "order/nearest_name.hpp"

#include <algorithm>

namespace duskleaf {
namespace {

char lower(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

}  // namespace

int edit_distance(std::string_view a, std::string_view b) {
  a = a.substr(0, 200);
  b = b.substr(0, 200);
  std::vector<int> before(b.size() + 1), last(b.size() + 1), now(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) last[j] = static_cast<int>(j);
  for (std::size_t i = 1; i <= a.size(); ++i) {
    now[0] = static_cast<int>(i);
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const bool same = lower(a[i - 1]) == lower(b[j - 1]);
      now[j] = std::min({last[j] + 1, now[j - 1] + 1, last[j - 1] + (same ? 0 : 1)});
      if (i > 1 && j > 1 && lower(a[i - 1]) == lower(b[j - 2]) &&
          lower(a[i - 2]) == lower(b[j - 1]))
        now[j] = std::min(now[j], before[j - 2] + 1);
    }
    std::swap(before, last);
    std::swap(last, now);
  }
  return last[b.size()];
}

std::string nearest_name(std::string_view word, const std::vector<std::string_view>& known) {
  std::string_view best;
  int best_distance = std::max(2, static_cast<int>(word.size()) / 3) + 1;
  for (const std::string_view name : known) {
    const int distance = edit_distance(word, name);
    if (distance < best_distance &&
        distance < static_cast<int>(std::max(word.size(), name.size()))) {
      best_distance = distance;
      best = name;
    }
  }
  return std::string(best);
}

std::string nearest_name(std::string_view word, const std::vector<std::string>& known) {
  return nearest_name(word, std::vector<std::string_view>(known.begin(), known.end()));
}

std::string listed(const std::vector<std::string_view>& names) {
  std::string text;
  for (std::size_t i = 0; i < names.size(); ++i) {
    if (i > 0) text += i + 1 == names.size() ? " or " : ", ";
    text += names[i];
  }
  return text;
}

}  // namespace duskleaf
