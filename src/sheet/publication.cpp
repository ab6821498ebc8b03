#include "sheet/publication.hpp"

#include "base/embedded.hpp"
#include "sheet/page_layout.hpp"

namespace duskleaf {
namespace {

/// A template's title is a key of the words, or a user's own text.
std::string own_or_known(const Words& words, const std::string& text,
                         std::initializer_list<std::pair<std::string_view, std::string>> values) {
  return words.has(text) ? words(text, values) : text;
}

}  // namespace

SheetDocument make_handout(const Order& order, const Site& site, const Publication& publication,
                           const SiteYear& year, const SkyYear& sky_year,
                           const SiteHappenings& happenings, const YearEphemeris& ephemeris,
                           const std::vector<int>& month_indices, const TypeSet& type,
                           Tally& tally) {
  const PageTemplate page_template = load_template(order, publication);
  const Words words(order.language, order.clock_12);
  const Theme theme = publication.ink == InkMode::grey ? Theme::grey() : Theme::colour();
  const auto [width, height] = *paper_size(publication.paper);

  SheetDocument document;
  const std::string group = site.masthead.group.empty() ? site.name : site.masthead.group;
  const auto month_of_index = [&](int index) {
    const auto [y, m] = year.span.month(index);
    return words("masthead.month", {{"month", words.month_name(m)}, {"year", std::to_string(y)}});
  };
  std::string period = month_of_index(month_indices.front());
  if (month_indices.size() > 1) period += " – " + month_of_index(month_indices.back());
  document.title =
      own_or_known(words, page_template.title, {{"site", site.name}, {"period", period}});
  document.subject =
      own_or_known(words, page_template.subject, {{"site", site.name}, {"period", period}});
  document.author = group;
  document.language = order.language;
  for (int index : month_indices) {
    const BlockContext context{order,    site,       publication, year,  index, ephemeris,
                               sky_year, happenings, type,        words, theme, tally};
    for (const PageTemplate::Page& page : page_template.pages) {
      Sheet sheet{width, height, {}, draw_page(context, page_template, page, width, height)};
      if (!page.bookmark.empty()) {
        const auto [y, m] = year.span.month(index);
        sheet.bookmark = own_or_known(
            words, page.bookmark, {{"month", words.month_name(m)}, {"year", std::to_string(y)}});
      }
      document.sheets.push_back(std::move(sheet));
    }
  }
  return document;
}

void check_template(const Order& order, const Publication& publication) {
  load_template(order, publication);
}

bool is_printable_template(std::string_view name) {
  return find_embedded_file("templates/" + std::string(name) + ".yaml").has_value();
}

}  // namespace duskleaf
