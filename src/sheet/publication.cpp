#include "sheet/publication.hpp"

#include <algorithm>

#include "base/embedded.hpp"
#include "sheet/template.hpp"

namespace duskleaf {
namespace {

/// Scales about the origin, then shifts.
struct Mover {
  double scale, dx, dy;
  void point(Point& p) const { p = {p.x * scale + dx, p.y * scale + dy}; }
  void box(Box& b) const {
    b = {b.x * scale + dx, b.y * scale + dy, b.width * scale, b.height * scale};
  }
  void path(Path& p) const {
    for (Point& q : p.points) point(q);
  }
  void operator()(Stroke& m) const {
    path(m.path);
    m.width_mm *= scale;
    for (double& dash : m.dash_mm) dash *= scale;
  }
  void operator()(Fill& m) const { path(m.path); }
  void operator()(Dots& m) const {
    for (auto& dot : m.dots) {
      point(dot.centre);
      dot.diameter_mm *= scale;
    }
  }
  void operator()(Text& m) const {
    point(m.start);
    m.size_pt *= scale;
  }
  void operator()(Image& m) const { box(m.box); }
  void operator()(Link& m) const { box(m.box); }
  void operator()(std::shared_ptr<ClipGroup>& m) const {
    path(m->clip);
    for (Mark& mark : m->marks) std::visit(*this, mark);
  }
};

/// The layout of one page: bands of known height first, then shares of what remains; every block is
/// drawn once.
class PageLayout {
 public:
  /// The room between the margins, mm.
  PageLayout(const BlockContext& context, double width, double height)
      : context_(context), width_(width), height_(height) {}

  /// The marks, with the room's top left corner at the origin.
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
        heights[i] =
            draw_band(page.bands[i],
                      std::max(0.0, (height_ - taken) * page.bands[i].share / shares), marks[i]);

    std::vector<Mark> whole;
    double y = 0;
    for (std::size_t i = 0; i < page.bands.size(); ++i) {
      for (Mark& mark : marks[i]) {
        std::visit(Mover{1, 0, y}, mark);
        whole.push_back(std::move(mark));
      }
      if (heights[i] > 0) y += heights[i] + page.bands[i].gap_mm;
    }
    overfull_ = y - page.bands.back().gap_mm - height_;
    return whole;
  }
  /// By how many mm the last page drawn was longer than its room; 0 or less: it fits.
  double overfull() const { return overfull_; }

 private:
  /// Draws a band with its top left corner at the origin; returns its height.
  double draw_band(const PageTemplate::Band& band, double room, std::vector<Mark>& out) {
    const double cell = (width_ + grid_gutter_mm) / grid_columns;
    double tallest = 0;
    for (const PageTemplate::Column& column : band.columns) {
      const double x = cell * (column.first - 1),
                   width = cell * (column.last - column.first + 1) - grid_gutter_mm;
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

  static constexpr double between_blocks_mm = 2.0;
  const BlockContext& context_;
  double width_, height_;
  double overfull_ = 0;
};

/// A page whose own words make it too long is laid out on a larger sheet and reduced, in steps,
/// down to seven eighths.
std::vector<Mark> draw_page(const BlockContext& context, const PageTemplate& page_template,
                            const PageTemplate::Page& page, double width, double height) {
  const double margin = page_template.margin_mm;
  const int labels_before = context.tally.labels_left_out;
  const std::size_t notes_before = context.tally.notes.size();
  std::vector<Mark> marks;
  double overfull = 0;
  double scale = 1;
  for (; scale > 0.87; scale -= 0.025) {
    context.tally.labels_left_out = labels_before;
    context.tally.notes.resize(notes_before);
    PageLayout layout(context, (width - 2 * margin) / scale, (height - 2 * margin) / scale);
    marks = layout.draw(page);
    overfull = layout.overfull();
    if (overfull < 0.05) break;
  }
  if (overfull >= 0.05)
    context.tally.notes.push_back("a page is too full by " + context.words.number(overfull, 1) +
                                  " mm");
  else if (scale < 1)
    context.tally.notes.push_back("a page is reduced to " + context.words.number(100 * scale, 1) +
                                  " % to hold all its words");
  for (Mark& mark : marks) std::visit(Mover{scale, margin, margin}, mark);
  return marks;
}

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
