#pragma once

#include <string>
#include <string_view>

namespace duskleaf {

/// The smallest order, in parts that a test replaces one by one. All places are invented.
struct OrderText {
  std::string head = "year: 2027\n";
  std::string publications = "publications:\n  - template: monthly-handout\n";
  std::string sites =
      "sites:\n"
      "  - id: reed-lake\n"
      "    name: Reed Lake\n"
      "    latitude: 52.5\n"
      "    longitude: 5.5\n"
      "    time_zone: Europe/Amsterdam\n";
  std::string text() const { return head + publications + sites; }
};

/// The smallest order with further lines for its one site (indented by four spaces).
inline std::string with_site_lines(std::string_view lines) {
  OrderText order;
  order.sites += lines;
  return order.text();
}
/// With another line in place of the one that begins so.
inline std::string with_line(const std::string& begin, const std::string& line) {
  std::string text = OrderText().text();
  const std::size_t at = text.find(begin);
  return text.replace(at, text.find('\n', at) - at, line);
}
inline std::string with_head(const std::string& head) {
  OrderText order;
  order.head = head;
  return order.text();
}
inline std::string with_publications(const std::string& lines) {
  OrderText order;
  order.publications = "publications:\n" + lines;
  return order.text();
}

/// what() of the OrderError that reading this gives; "no error" when it reads well.
std::string message_of(std::string_view text);

}  // namespace duskleaf
