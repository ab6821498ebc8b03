// Bands from top to bottom: first those of known height, then those with a block that fills what
// room is left, then the shares of the rest. What shares need at least is kept free for them.
#include "sheet/page_layout.hpp"

#include <algorithm>

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

void append_moved(std::vector<Mark>& to, std::vector<Mark>& from, double down) {
  for (Mark& mark : from) {
    std::visit(Mover{1, 0, down}, mark);
    to.push_back(std::move(mark));
  }
}

bool fills(const PageTemplate::Column& column) {
  return std::any_of(column.blocks.begin(), column.blocks.end(),
                     [](const PageTemplate::Block& block) { return block.fill; });
}
bool fills(const PageTemplate::Band& band) {
  return std::any_of(band.columns.begin(), band.columns.end(),
                     [](const PageTemplate::Column& column) { return fills(column); });
}

/// The layout of one page; every block is drawn once.
class PageLayout {
 public:
  /// The room between the margins, mm, and how many lines a list that fills the room must keep.
  PageLayout(const BlockContext& context, double width, double height, int fewest_lines)
      : context_(context), width_(width), height_(height), fewest_lines_(fewest_lines) {}

  /// The marks, with the room's top left corner at the origin.
  std::vector<Mark> draw(const PageTemplate::Page& page) {
    std::vector<std::vector<Mark>> marks(page.bands.size());
    std::vector<double> heights(page.bands.size(), 0.0);
    double taken = 0, kept = 0, shares = 0;
    const auto draw_own = [&](std::size_t i, double room) {
      const PageTemplate::Band& band = page.bands[i];
      heights[i] = draw_band(band, room, marks[i]);
      if (band.steps > 0) heights[i] = std::max(heights[i], band.steps * grid_step_mm);
      if (heights[i] > 0) taken += heights[i] + band.gap_mm;
    };
    for (std::size_t i = 0; i < page.bands.size(); ++i) {
      const PageTemplate::Band& band = page.bands[i];
      if (band.share > 0) {
        shares += band.share;
        taken += band.gap_mm;
        kept += least_height(band);
      } else if (!fills(band)) {
        draw_own(i, band.steps > 0 ? band.steps * grid_step_mm : height_);
      }
    }
    if (!page.bands.empty()) taken -= page.bands.back().gap_mm;
    for (std::size_t i = 0; i < page.bands.size(); ++i)
      if (const PageTemplate::Band& band = page.bands[i]; band.share <= 0 && fills(band))
        draw_own(i, std::max(0.0, band.steps > 0 ? band.steps * grid_step_mm
                                                 : height_ - taken - kept - band.gap_mm));
    for (std::size_t i = 0; i < page.bands.size(); ++i)
      if (page.bands[i].share > 0)
        heights[i] =
            draw_band(page.bands[i],
                      std::max(0.0, (height_ - taken) * page.bands[i].share / shares), marks[i]);

    std::vector<Mark> whole;
    double y = 0;
    for (std::size_t i = 0; i < page.bands.size(); ++i) {
      append_moved(whole, marks[i], y);
      if (heights[i] > 0) y += heights[i] + page.bands[i].gap_mm;
    }
    overfull_ = y - page.bands.back().gap_mm - height_;
    return whole;
  }
  /// By how many mm the last page drawn was longer than its room; 0 or less: it fits.
  double overfull() const { return overfull_; }

 private:
  double least_height(const PageTemplate::Band& band) const {
    double most = 0;
    for (const PageTemplate::Column& column : band.columns) {
      double sum = 0;
      for (const PageTemplate::Block& block : column.blocks)
        if (!block.over && block.spec->least_height != nullptr)
          sum += block.spec->least_height(context_);
      most = std::max(most, sum);
    }
    return most;
  }

  /// Draws a band with its top left corner at the origin; returns its height.
  double draw_band(const PageTemplate::Band& band, double room, std::vector<Mark>& out) {
    double tallest = 0;
    for (const PageTemplate::Column& column : band.columns)
      tallest = std::max(tallest, draw_column(column, room, out));
    return tallest;
  }

  /// The blocks that fill the room are drawn when the others have theirs.
  double draw_column(const PageTemplate::Column& column, double room, std::vector<Mark>& out) {
    const double cell = (width_ + grid_gutter_mm) / grid_columns;
    const double x = cell * (column.first - 1),
                 width = cell * (column.last - column.first + 1) - grid_gutter_mm;
    std::vector<std::vector<Mark>> marks(column.blocks.size());
    std::vector<double> heights(column.blocks.size(), 0.0);
    double used = 0;
    for (const bool filling : {false, true})
      for (std::size_t i = 0; i < column.blocks.size(); ++i) {
        const PageTemplate::Block& block = column.blocks[i];
        if (block.over || block.fill != filling) continue;
        const Box area{x, 0, width, std::max(0.0, room - used)};
        heights[i] = filling ? draw_filling(block, area, marks[i])
                             : block.spec->draw(context_, block.options, area, marks[i]);
        if (heights[i] > 0) used += heights[i] + between_blocks_mm;
      }
    double y = 0, bottom = 0;
    Box last{x, 0, width, room};
    for (std::size_t i = 0; i < column.blocks.size(); ++i) {
      const PageTemplate::Block& block = column.blocks[i];
      if (block.over) {
        block.spec->draw(context_, block.options, last, out);
      } else if (heights[i] > 0) {
        append_moved(out, marks[i], y);
        last = {x, y, width, heights[i]};
        bottom = y + heights[i];
        y = bottom + between_blocks_mm;
      }
    }
    return bottom;
  }

  /// A list that is too long for the room is drawn again with fewer lines, by its option `most`.
  double draw_filling(const PageTemplate::Block& block, const Box& area, std::vector<Mark>& out) {
    const Tally before = context_.tally;
    const auto draw = [&](const BlockOptions& options) {
      context_.tally = before;
      out.clear();
      return block.spec->draw(context_, options, area, out);
    };
    double height = draw(block.options);
    const auto most = block.options.values.find("most");
    if (height <= area.height || most == block.options.values.end()) return height;
    BlockOptions fewer = block.options;
    int fits = fewest_lines_,
        too_many = std::min(static_cast<int>(std::stod(most->second)), longest_list);
    while (too_many - fits > 1) {
      const int middle = (fits + too_many) / 2;
      fewer.values["most"] = std::to_string(middle);
      (draw(fewer) <= area.height ? fits : too_many) = middle;
    }
    fewer.values["most"] = std::to_string(fits);
    return draw(fewer);
  }

  static constexpr int longest_list = 64;
  static constexpr double between_blocks_mm = 2.0;
  const BlockContext& context_;
  double width_, height_;
  int fewest_lines_;
  double overfull_ = 0;
};

}  // namespace

std::vector<Mark> draw_page(const BlockContext& context, const PageTemplate& page_template,
                            const PageTemplate::Page& page, double width, double height) {
  const double margin = page_template.margin_mm;
  const int labels_before = context.tally.labels_left_out;
  const std::size_t notes_before = context.tally.notes.size();
  std::vector<Mark> marks;
  double overfull = 0;
  double scale = 1;
  const auto draw = [&](int fewest_lines) {
    context.tally.labels_left_out = labels_before;
    context.tally.notes.resize(notes_before);
    PageLayout layout(context, (width - 2 * margin) / scale, (height - 2 * margin) / scale,
                      fewest_lines);
    marks = layout.draw(page);
    overfull = layout.overfull();
    return overfull < 0.05;
  };
  // A little smaller rather than lists of a line or two; then what it takes.
  const auto fits_reduced = [&](int fewest_lines, double smallest) {
    for (scale = 1; !draw(fewest_lines); scale -= 0.025)
      if (scale < smallest + 0.01) return false;
    return true;
  };
  const bool fits =
      fits_reduced(3, 1) || fits_reduced(2, 1) || fits_reduced(3, 0.925) || fits_reduced(1, 0.875);
  if (!fits)
    context.tally.notes.push_back("a page is too full by " + context.words.number(overfull, 1) +
                                  " mm");
  else if (scale < 1)
    context.tally.notes.push_back("a page is reduced to " + context.words.number(100 * scale, 1) +
                                  " % to hold all its words");
  for (Mark& mark : marks) std::visit(Mover{scale, margin, margin}, mark);
  return marks;
}

}  // namespace duskleaf
