#include <fmt/format.h>
#include <fstream>
#include <sstream>

#include "sheet/blocks/blocks.hpp"
#include "sheet/picture_size.hpp"
#include "sheet/qr_code.hpp"
#include "sheet/setting.hpp"

namespace duskleaf {
namespace {

std::string position(const BlockContext& c) {
  const Observer& o = c.year.place.observer;
  const double lat = o.latitude.degrees(), lon = o.longitude.degrees();
  return c.words("masthead.position",
                 {{"latitude", c.words.number(std::abs(lat), 2)},
                  {"north_or_south", c.words(lat < 0 ? "direction-short.8" : "direction-short.0")},
                  {"longitude", c.words.number(std::abs(lon), 2)},
                  {"east_or_west", c.words(lon < 0 ? "direction-short.12" : "direction-short.4")}});
}

/// Under the month: what the charts show, and when another moment than the chart hour, why.
std::string charts_line(const BlockContext& c) {
  const EveningSky& evening = c.evening();
  const Zone& zone = c.year.place.zone;
  const std::string date = c.words.day_month(zone.civil(evening.moment).date());
  const std::string hour = c.words.time(zone.civil(evening.chart_moment));
  const std::string moment = c.words.time(zone.civil(evening.moment));
  switch (evening.shift) {
    case EveningShift::none:
      return c.words("masthead.charts", {{"date", date}, {"time", hour}});
    case EveningShift::waits_for_dark:
      return c.words("masthead.charts-later", {{"date", date}, {"hour", hour}, {"time", moment}});
    case EveningShift::darkest_moment:
      return c.words("masthead.charts-darkest", {{"date", date}, {"time", moment}});
    case EveningShift::no_stars:
      break;
  }
  return c.words("masthead.charts-bright", {{"date", date}, {"time", moment}});
}

}  // namespace

double draw_masthead(const BlockContext& c, const BlockOptions& options, const Box& area,
                     std::vector<Mark>& out) {
  Setter set(c, out);
  const bool side_b = options.get("side") == "back";
  const auto [year, month] = c.year.span.month(c.month_index);
  const std::string title = c.words(
      "masthead.month", {{"month", c.words.month_name(month)}, {"year", std::to_string(year)}});
  if (side_b) {
    const Style style{Face::light, 17, c.theme.blue};
    set.left(area.x, area.y + 6.2, title, style);
    const double used = set.width(title, style);
    const std::string& group = c.site.masthead.group.empty() ? c.site.name : c.site.masthead.group;
    const Style group_style{Face::bold, 9, c.theme.black},
        quiet{Face::italic, c.theme.body_pt, c.theme.soft};
    set.right(area.right(), area.y + 6.2, group, group_style);
    // A long name takes the place of the explanation.
    const double room = area.width - used - set.width(group, group_style) - 9;
    if (set.width(c.words("masthead.back"), quiet) <= room)
      set.left(area.x + used + 3, area.y + 6.2, c.words("masthead.back"), quiet);
    return 8.0;
  }

  const double height = std::min(area.height, 20.0);
  double right = area.right();
  if (!c.site.masthead.link.empty()) {
    const double size = height - 2.5;
    const Box square{right - size, area.y, size, size};
    out.push_back(Fill{qr_code(c.site.masthead.link, square), c.theme.blue});
    out.push_back(Link{square, c.site.masthead.link});
    right -= size + 3;
  }
  if (!c.site.masthead.logo.empty()) {
    std::ifstream file(c.site.masthead.logo, std::ios::binary);
    std::ostringstream bytes;
    bytes << file.rdbuf();
    auto png = std::make_shared<const std::string>(bytes.str());
    if (const auto size = png_size(*png)) {
      const double scale = std::min((height - 2) / size->second, 34.0 / size->first);
      const double w = size->first * scale, h = size->second * scale;
      out.push_back(Image{{right - w, area.y + (height - h) / 2, w, h},
                          png,
                          c.words("masthead.logo", {{"group", c.site.masthead.group}}),
                          c.publication.ink == InkMode::grey});
      right -= w + 4;
    }
  }
  const Style big{Face::light, 29, c.theme.blue};
  set.left(area.x, area.y + 9.4, title, big);
  const double left_end = area.x + set.width(title, big) + 6;
  const std::string line = charts_line(c);
  const double text_room = right - area.x;
  // The group stands beside the month, the charts' line below both.
  double baseline = area.y + 4.2;
  const std::string& group = c.site.masthead.group;
  const auto row = [&](const std::string& text, const Style& style, double pitch) {
    if (text.empty()) return;
    // A long name runs over several lines beside the month.
    for (const std::string& piece :
         break_lines(c.type, text, style.face, style.size_pt, right - left_end)) {
      set.right(right, baseline, piece, style);
      baseline += pitch;
    }
  };
  row(group.empty() ? c.site.name : group, {Face::bold, 11, c.theme.black}, 4.3);
  row(group.empty() || group == c.site.name ? position(c) : c.site.name + "  ·  " + position(c),
      set.small(), 3.5);
  row(c.site.masthead.contact, set.small(), 3.5);
  const Style charts{Face::regular, 9, c.theme.black};
  double used = std::max(13.2, baseline - area.y - 2.2);
  for (const std::string& text :
       break_lines(c.type, line, charts.face, charts.size_pt, text_room)) {
    set.left(area.x, area.y + used + 3.0, text, charts);
    used += 4.1;
  }
  return std::max(height, used + 0.5);
}

}  // namespace duskleaf
