#pragma once

#include <memory>
#include <string>
#include <utility>
#include <vector>

#include "almanac/happenings.hpp"
#include "sheet/block.hpp"

namespace duskleaf {

/// Everything that a block may look at, for one month of a site. Tables of an ephemeris are made
/// once for a year.
struct MonthScene {
  Order order;
  Site site;
  Publication publication;
  SiteYear year;
  SkyYear sky_year;
  SiteHappenings happenings;
  std::shared_ptr<const YearEphemeris> ephemeris;
  TypeSet type;
  Words words;
  Theme theme = Theme::colour();
  Tally tally;
  int month_index;

  MonthScene(double latitude, double longitude, const char* zone, int year_number, int month,
             bool clock_12 = false)
      : words("en", clock_12), month_index(month - 1) {
    order.span = {year_number, 1};
    order.clock_12 = clock_12;
    site.name = "Long Meadow";
    site.place.id = "meadow";
    site.place.observer = {Angle::from_degrees(latitude), Angle::from_degrees(longitude), 0};
    site.place.zone = *Zone::load(zone);
    site.place.chart_hours.fill({std::chrono::minutes(21 * 60 + 30)});
  }

  /// The site's year; computed happenings, or none at all.
  void compute(bool with_happenings, bool with_evenings = false) {
    const auto [from, to] = ephemeris_span(order.span);
    ephemeris = std::make_shared<YearEphemeris>(from, to);
    year = make_site_year(*ephemeris, site.place, order.span, {with_evenings});
    if (!with_happenings) return;
    sky_year = make_sky_year(*ephemeris, order.span);
    happenings = make_site_happenings(*ephemeris, year, sky_year);
  }

  BlockContext context() {
    return {order,    site,       publication, year,  month_index, *ephemeris,
            sky_year, happenings, type,        words, theme,       tally};
  }
};

/// What the marks say: one string for each piece of type, and all of them in one.
inline void collect_words(const std::vector<Mark>& marks, std::vector<std::string>& out) {
  for (const Mark& mark : marks) {
    if (const auto* text = std::get_if<Text>(&mark)) out.push_back(text->words);
    if (const auto* group = std::get_if<std::shared_ptr<ClipGroup>>(&mark))
      collect_words((*group)->marks, out);
  }
}
inline std::string all_words(const std::vector<Mark>& marks) {
  std::vector<std::string> pieces;
  collect_words(marks, pieces);
  std::string text;
  for (const std::string& piece : pieces) text += piece + " ";
  return text;
}

}  // namespace duskleaf
