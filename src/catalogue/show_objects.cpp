// The table's own first lines name its sources; data/make/show_objects.py derives it.
#include "catalogue/show_objects.hpp"

#include <algorithm>
#include <array>
#include <limits>
#include <stdexcept>
#include <string>
#include <vector>

#include "base/csv.hpp"
#include "base/embedded.hpp"
#include "catalogue/constellations.hpp"
#include "catalogue/stars.hpp"

namespace duskleaf {
namespace {

constexpr std::array<std::string_view, 7> class_names = {
    "double-star",      "open-cluster", "globular-cluster", "nebula",
    "planetary-nebula", "galaxy",       "star-cloud"};

ShowClass class_of(std::string_view name) {
  const auto at = std::find(class_names.begin(), class_names.end(), name);
  if (at == class_names.end())
    throw std::runtime_error("show_objects.csv: no such kind: " + std::string(name));
  return static_cast<ShowClass>(at - class_names.begin());
}

std::vector<ShowObject> read_show_objects() {
  const CsvTable table(embedded_file("data/show_objects.csv"));
  const std::size_t code = table.column("code"), name = table.column("name"),
                    kind = table.column("kind"), rank = table.column("rank"),
                    ra = table.column("ra_deg"), dec = table.column("dec_deg"),
                    magnitude = table.column("magnitude"),
                    second = table.column("second_magnitude"), size = table.column("size_arcmin"),
                    ratio = table.column("axis_ratio"), area = table.column("constellation"),
                    hr = table.column("hr"), look = table.column("look"),
                    bare_eye = table.column("bare_eye"), memory = table.column("from_memory");
  std::vector<ShowObject> all;
  for (std::size_t i = 0; i < table.rows(); ++i) {
    const Angle a = Angle::from_degrees(table.number(i, ra)),
                d = Angle::from_degrees(table.number(i, dec));
    ShowObject& object = all.emplace_back();
    object.code = table.cell(i, code);
    object.name = table.cell(i, name);
    object.sort = class_of(table.cell(i, kind));
    object.rank = table.integer(i, rank);
    object.direction = {cos(d) * cos(a), cos(d) * sin(a), sin(d)};
    object.magnitude = table.number(i, magnitude);
    object.second_magnitude = table.cell(i, second).empty()
                                  ? std::numeric_limits<double>::quiet_NaN()
                                  : table.number(i, second);
    object.size = Angle::from_arcminutes(table.number(i, size));
    object.axis_ratio = table.number(i, ratio);
    object.constellation = constellation_index(table.cell(i, area));
    object.star = table.cell(i, hr).empty() ? -1 : star_index(table.integer(i, hr));
    object.look = table.cell(i, look);
    object.bare_eye = !table.cell(i, bare_eye).empty();
    object.by_memory = !table.cell(i, memory).empty();
  }
  return all;
}

}  // namespace

std::string_view show_class_name(ShowClass sort) {
  return class_names[static_cast<std::size_t>(sort)];
}

std::span<const ShowObject> show_objects() {
  static const std::vector<ShowObject> all = read_show_objects();
  return all;
}

}  // namespace duskleaf
