// The starter order: every key that a first page wants, and as comments those that may come later.
#include "cli/starter_order.hpp"

#include <fmt/format.h>

#include "base/csv.hpp"
#include "order/order.hpp"

namespace duskleaf {
namespace {

std::string quoted(const std::string& text) {
  std::string out = "\"";
  for (const char c : text) {
    if (c == '"' || c == '\\') out += '\\';
    out += c == '\n' || c == '\t' ? ' ' : c;
  }
  return out + '"';
}

std::string number_or_quoted(const std::string& text) {
  try {
    parse_number(text);
    return text;
  } catch (const std::runtime_error&) {
    return quoted(text);
  }
}

constexpr std::string_view text_form = R"(# An order: what to print, and for which places.
#   duskleaf proof FILE     checks it
#   duskleaf press FILE     writes the PDFs
year: {year}                  # or  start: {year}-09  for twelve months from there
language: en
clock: 24                   # or 12

publications:
  - template: monthly-handout
    paper: A4               # or letter
    months: all             # or [3, 4, 5]
    ink: colour             # or grey

sites:
  # the id names the folder of the PDFs{place_note}
  - id: {id}
    name: {name}
    latitude: {latitude}          # degrees, north positive; "54 10 48 N" also reads
    longitude: {longitude}          # degrees, east positive
    time_zone: {zone}
    chart_hour: "21:30"     # civil time of the evening charts; or dusk; or a list of twelve
    # elevation: 35 m
    # limiting_magnitude: 5 # the faintest star seen there: about 4 in a town, 5 at its edge, 6 in the country
    # masthead:
    #   group: The group's name
    #   contact: How to reach it
    #   link: https://group.example
    #   logo: logo.png      # a PNG beside this file
    # sessions:
    #   - {{ when: first friday, from: "20:30", to: "22:30", where: The old jetty, aim: dark }}
    # notes: {{ 3: "Words of your own for March." }}
)";

}  // namespace

std::string id_from_name(const std::string& name) {
  std::string id;
  bool gap = false;
  for (const char c : name) {
    const char small = c >= 'A' && c <= 'Z' ? static_cast<char>(c + 32) : c;
    if (!((small >= 'a' && small <= 'z') || (small >= '0' && small <= '9'))) {
      gap = true;
      continue;
    }
    if (gap && !id.empty()) id += '-';
    gap = false;
    id += small;
  }
  id = id.substr(0, 40);
  while (id.ends_with('-')) id.pop_back();
  return id.empty() || id == "pairs" ? "home" : id;
}

std::string starter_order(const StarterPlace& place) {
  return fmt::format(
      fmt::runtime(text_form), fmt::arg("year", place.year),
      fmt::arg("id", id_from_name(place.name)), fmt::arg("name", quoted(place.name)),
      fmt::arg("latitude", number_or_quoted(place.latitude)),
      fmt::arg("longitude", number_or_quoted(place.longitude)),
      fmt::arg("zone", quoted(place.time_zone)),
      fmt::arg("place_note", place.invented ? "; this place is invented: put yours here" : ""));
}

std::string trouble_with(const StarterPlace& place) {
  try {
    parse_order(starter_order(place), "order");
    return "";
  } catch (const OrderError& error) {
    const Location& at = error.where();
    return std::string(error.what())
        .substr(fmt::format("{}:{}:{}: ", at.file, at.line, at.column).size());
  }
}

}  // namespace duskleaf
