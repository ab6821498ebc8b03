// The working list of the International Meteor Organization (2025 Meteor Shower Calendar, table 5)
// with three southern showers of two further lists: see data/README.md and the table's own lines.
#include "catalogue/showers.hpp"

#include <algorithm>
#include <vector>

#include "base/csv.hpp"
#include "base/embedded.hpp"

namespace duskleaf {
namespace {

std::vector<Shower> read_showers() {
  const CsvTable table(embedded_file("data/showers.csv"));
  std::vector<Shower> all;
  for (std::size_t row = 0; row < table.rows(); ++row) {
    const auto text = [&](std::string_view name) { return table.cell(row, table.column(name)); };
    const auto number = [&](std::string_view name) { return parse_number(text(name)); };
    const auto whole = [&](std::string_view name) {
      return table.integer(row, table.column(name));
    };
    Shower& s = all.emplace_back();
    s.code = text("code");
    s.name = text("name");
    s.start_month = whole("start_month");
    s.start_day = whole("start_day");
    s.end_month = whole("end_month");
    s.end_day = whole("end_day");
    s.peak_longitude = Angle::from_degrees(number("peak_longitude_deg"));
    s.right_ascension = Angle::from_degrees(number("ra_deg"));
    s.declination = Angle::from_degrees(number("dec_deg"));
    s.speed_km_s = number("speed_km_s");
    s.population_index = number("r");
    if (!text("zhr").empty()) s.zhr = number("zhr");
    s.daytime = whole("daytime") != 0;
    s.rise = number("rise");
    s.fall = number("fall");
  }
  return all;
}

}  // namespace

Eigen::Vector3d Shower::direction() const {
  return {cos(declination) * cos(right_ascension), cos(declination) * sin(right_ascension),
          sin(declination)};
}

std::span<const Shower> showers() {
  static const std::vector<Shower> all = read_showers();
  return all;
}

int shower_index(std::string_view code) {
  const std::span<const Shower> all = showers();
  const auto at =
      std::find_if(all.begin(), all.end(), [&](const Shower& s) { return s.code == code; });
  return at == all.end() ? -1 : static_cast<int>(at - all.begin());
}

}  // namespace duskleaf
