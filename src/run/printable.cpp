// What of an order this version prints: the order file is read whole ahead of the pages that come
// later.
#include "run/printable.hpp"

#include <fmt/format.h>

#include "base/embedded.hpp"
#include "sheet/publication.hpp"

namespace duskleaf {
namespace {

bool has_words(const std::string& language) {
  return find_embedded_file("templates/words/" + language + ".yaml").has_value();
}
bool is_printed(const Publication& publication) {
  return publication.template_is_path || is_printable_template(publication.template_name);
}

/// A template file that cannot be read is told where the order names it.
void check_template_file(const Order& order, const Publication& publication) {
  try {
    check_template(order, publication);
  } catch (const FileError& error) {
    throw OrderError(publication.where, error.what(),
                     "expected a page template, named relative to the order");
  }
}

}  // namespace

std::vector<Doubt> unprinted(const Order& order) {
  std::vector<Doubt> list;
  if (!has_words(order.language))
    list.push_back(
        {order.language_at,
         fmt::format("the language '{}' is not printed yet by this version", order.language),
         true});
  for (const Publication& publication : order.publications) {
    if (is_printed(publication))
      check_template_file(order, publication);
    else
      list.push_back({publication.where,
                      fmt::format("the template {} is not printed yet by this version",
                                  publication.template_name),
                      true});
  }
  return list;
}

void check_printable(const Order& order) {
  const std::vector<Doubt> list = unprinted(order);
  if (!list.empty())
    throw OrderError(list[0].where, list[0].text,
                     "leave it out; proof lists all that is not printed yet");
}

}  // namespace duskleaf
