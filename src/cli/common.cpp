// What several commands share: how they speak, and how options narrow an order.
#include <charconv>
#include <cstdio>
#include <fmt/format.h>

#include "cli/commands.hpp"
#include "order/nearest_name.hpp"

namespace duskleaf {

void say(const std::string& line) {
  std::fwrite(line.data(), 1, line.size(), stderr);
  std::fputc('\n', stderr);
}

void say_doubts(const std::vector<Doubt>& list, bool with_not_printed) {
  for (const Doubt& doubt : list)
    if (with_not_printed || !doubt.not_printed)
      say(fmt::format("{}:{}:{}: warning: {}", doubt.where.file, doubt.where.line,
                      doubt.where.column, doubt.text));
}

void print(const std::string& text) {
  const bool whole = std::fwrite(text.data(), 1, text.size(), stdout) == text.size();
  if (!whole || std::fflush(stdout) != 0) throw FileError("standard output cannot be written");
}

void change_year(Order& order, int year) {
  if (year == 2100 && order.span.first_month > 1)
    throw CommandLineError(
        fmt::format("--year {}: the twelve months of {} would end after 2100", year, order.path));
  order.span.first_year = year;
}

void check_site(const std::vector<Order>& orders, const std::string& id) {
  std::vector<std::string> ids;
  for (const Order& order : orders)
    for (const Site& site : order.sites) {
      if (site.place.id == id) return;
      ids.push_back(site.place.id);
    }
  const std::string near = nearest_name(id, ids);
  throw CommandLineError(
      fmt::format("--site {}: no site has this id{}", id,
                  near.empty() ? "" : fmt::format("; did you mean '{}'?", near)));
}

std::pair<int, int> parse_share(const std::string& text) {
  const char* const end = text.data() + text.size();
  int part = 0, parts = 0;
  const auto first = std::from_chars(text.data(), end, part);
  bool right = first.ec == std::errc{} && first.ptr != end && *first.ptr == '/';
  if (right) {
    const auto second = std::from_chars(first.ptr + 1, end, parts);
    right = second.ec == std::errc{} && second.ptr == end;
  }
  if (!right || part < 1 || part > parts)
    throw CommandLineError(
        fmt::format("--share {}: expected K/N with K from 1 to N, such as 2/8", text));
  return {part, parts};
}

}  // namespace duskleaf
