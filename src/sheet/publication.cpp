#include "sheet/publication.hpp"

#include <algorithm>

#include "base/embedded.hpp"
#include "sheet/template.hpp"

namespace duskleaf {
namespace {

struct Mover {
  double dx, dy;
  void point(Point& p) const {
    p.x += dx;
    p.y += dy;
  }
  void box(Box& b) const {
    b.x += dx;
    b.y += dy;
  }
  void path(Path& p) const {
    for (Point& q : p.points) point(q);
  }
  void operator()(Stroke& m) const { path(m.path); }
  void operator()(Fill& m) const { path(m.path); }
  void operator()(Dots& m) const {
    for (auto& dot : m.dots) point(dot.centre);
  }
  void operator()(Text& m) const { point(m.start); }
  void operator()(Image& m) const { box(m.box); }
  void operator()(Link& m) const { box(m.box); }
  void operator()(std::shared_ptr<ClipGroup>& m) const {
    path(m->clip);
    for (Mark& mark : m->marks) std::visit(*this, mark);
  }
};

/// The layout of one page: bands of known height first, then shares of what remains; every block is drawn once.
class PageLayout {
 public:
  PageLayout(const BlockContext& context, const PageTemplate& page_template, double width, double height)
      : context_(context),
        margin_(page_template.margin_mm),
        width_(width - 2 * margin_),
        height_(height - 2 * margin_) {}

  std::vector<Mark> draw(const PageTemplate::Page& page) {
    std::vector<std::vector<Mark>> marks(page.bands.size());
    std::vector<double> heights(page.bands.size(), 0.0);
    double taken = 0, shares = 0;
    for (std::size_t i = 0; i < page.bands.size(); ++i) {
      const PageTemplate::Band& band = page.bands[i];
      if (band.share > 0) {
        shares += band.share;
        taken += band.gap_mm;
        continue;
      }
      heights[i] = draw_band(band, band.steps > 0 ? band.steps * grid_step_mm : height_, marks[i]);
      if (band.steps > 0) heights[i] = std::max(heights[i], band.steps * grid_step_mm);
      if (heights[i] > 0) taken += heights[i] + band.gap_mm;
    }
    if (!page.bands.empty()) taken -= page.bands.back().gap_mm;
    for (std::size_t i = 0; i < page.bands.size(); ++i)
      if (page.bands[i].share > 0)
        heights[i] = draw_band(page.bands[i], std::max(0.0, (height_ - taken) * page.bands[i].share / shares), marks[i]);

    std::vector<Mark> whole;
    double y = margin_;
    for (std::size_t i = 0; i < page.bands.size(); ++i) {
      for (Mark& mark : marks[i]) {
        std::visit(Mover{margin_, y}, mark);
        whole.push_back(std::move(mark));
      }
      if (heights[i] > 0) y += heights[i] + page.bands[i].gap_mm;
    }
    const double overfull = y - page.bands.back().gap_mm - margin_ - height_;
    if (overfull > 0.05) context_.tally.notes.push_back("a page is " + context_.words.number(overfull, 1) + " mm too full");
    return whole;
  }

 private:
  /// Draws a band with its top left corner at the origin; returns its height.
  double draw_band(const PageTemplate::Band& band, double room, std::vector<Mark>& out) {
    const double cell = (width_ + grid_gutter_mm) / grid_columns;
    double tallest = 0;
    for (const PageTemplate::Column& column : band.columns) {
      const double x = cell * (column.first - 1), width = cell * (column.last - column.first + 1) - grid_gutter_mm;
      double y = 0;
      Box last{x, 0, width, room};
      for (const PageTemplate::Block& block : column.blocks) {
        if (block.over) {
          block.spec->draw(context_, block.options, last, out);
          continue;
        }
        const Box area{x, y, width, room - y};
        const double used = block.spec->draw(context_, block.options, area, out);
        if (used <= 0) continue;
        last = {x, y, width, used};
        tallest = std::max(tallest, y + used);
        y += used + between_blocks_mm;
      }
    }
    return tallest;
  }

  static constexpr double between_blocks_mm = 2.5;
  const BlockContext& context_;
  double margin_, width_, height_;
};

}  // namespace

SheetDocument make_handout(const Order& order, const Site& site, const Publication& publication, const SiteYear& year,
                           const YearEphemeris& ephemeris, const std::vector<int>& month_indices, const TypeSet& type,
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
  document.title = words(page_template.title, {{"site", site.name}, {"period", period}});
  document.subject = words(page_template.subject, {{"site", site.name}, {"period", period}});
  document.author = group;
  document.language = order.language;
  for (int index : month_indices) {
    const BlockContext context{order, site, publication, year, index, ephemeris, type, words, theme, tally};
    for (const PageTemplate::Page& page : page_template.pages) {
      Sheet sheet{width, height, {}, PageLayout(context, page_template, width, height).draw(page)};
      if (!page.bookmark.empty()) {
        const auto [y, m] = year.span.month(index);
        sheet.bookmark = words(page.bookmark, {{"month", words.month_name(m)}, {"year", std::to_string(y)}});
      }
      document.sheets.push_back(std::move(sheet));
    }
  }
  return document;
}

void check_template(const Order& order, const Publication& publication) { load_template(order, publication); }

bool is_printable_template(std::string_view name) {
  return find_embedded_file("templates/" + std::string(name) + ".yaml").has_value();
}

}  // namespace duskleaf
