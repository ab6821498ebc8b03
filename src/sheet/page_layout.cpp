// Bands from top to bottom: first those of known height, then those with a block that fills what
// room is left, then the shares of the rest. What shares need at least is kept free for them.
// What has no room gives way in an order (gives): a page is read outdoors by red light, and less of
// it is better than smaller (this project's own choice). Type is reduced only where the order's own
// words leave no room for the cautions at the foot.
#include "sheet/page_layout.hpp"

#include <algorithm>
#include <array>

#include "base/csv.hpp"

namespace duskleaf {
namespace {

/// Scales a mark about the origin, then shifts it.
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

/// How much a page gives way: how many lines each list that fills the room keeps at least, and the
/// value of the blocks' option `leave-out`.
struct Give {
  int fewest_lines, left_out;
};
constexpr double smallest_scale = 0.56;
constexpr std::array<Give, 7> gives{{{3, 0}, {3, 1}, {3, 2}, {2, 2}, {2, 3}, {1, 3}, {0, 3}}};

/// A band with its first block that may roam at the end of another column, for each such column.
std::vector<PageTemplate::Band> roamed(const PageTemplate::Band& band) {
  std::vector<PageTemplate::Band> bands;
  for (std::size_t i = 0; i < band.columns.size(); ++i)
    for (std::size_t k = 0; k < band.columns[i].blocks.size(); ++k) {
      if (!band.columns[i].blocks[k].roam) continue;
      for (std::size_t j = 0; j < band.columns.size(); ++j) {
        if (j == i) continue;
        bands.push_back(band);
        auto& home = bands.back().columns[i].blocks;
        bands.back().columns[j].blocks.push_back(home[k]);
        home.erase(home.begin() + static_cast<std::ptrdiff_t>(k));
      }
      return bands;
    }
  return bands;
}

bool fills(const PageTemplate::Column& column) {
  return std::any_of(column.blocks.begin(), column.blocks.end(),
                     [](const PageTemplate::Block& block) { return block.fill; });
}
bool fills(const PageTemplate::Band& band) {
  return std::any_of(band.columns.begin(), band.columns.end(),
                     [](const PageTemplate::Column& column) { return fills(column); });
}

/// The layout of one page.
class PageLayout {
 public:
  /// The room between the margins, mm.
  PageLayout(const BlockContext& context, double width, double height, const Give& give)
      : context_(context), width_(width), height_(height), give_(give) {}

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
    // What stands last has no gap below it.
    for (std::size_t i = page.bands.size(); i-- > 0;)
      if (page.bands[i].share > 0 || heights[i] > 0 || fills(page.bands[i])) {
        taken -= page.bands[i].gap_mm;
        break;
      }
    for (std::size_t i = 0; i < page.bands.size(); ++i)
      if (const PageTemplate::Band& band = page.bands[i]; band.share <= 0 && fills(band))
        draw_own(i, std::max(0.0, band.steps > 0 ? band.steps * grid_step_mm
                                                 : height_ - taken - kept - band.gap_mm));
    for (std::size_t i = 0; i < page.bands.size(); ++i)
      if (page.bands[i].share > 0)
        heights[i] =
            draw_band(page.bands[i],
                      std::max(0.0, (height_ - taken) * page.bands[i].share / shares), marks[i]);

    double length = 0, gap = 0;
    int gaps = -1;
    for (std::size_t i = 0; i < page.bands.size(); ++i)
      if (heights[i] > 0) {
        length += gap + heights[i];
        gap = page.bands[i].gap_mm;
        ++gaps;
      }
    overfull_ = length - height_;
    // What is left over is spread between the bands.
    const double more =
        gaps > 0 ? std::clamp(-overfull_ / static_cast<double>(gaps), 0.0, most_spread_mm) : 0.0;
    std::vector<Mark> whole;
    double y = 0;
    for (std::size_t i = 0; i < page.bands.size(); ++i) {
      append_moved(whole, marks[i], y);
      if (heights[i] > 0) y += heights[i] + page.bands[i].gap_mm + more;
    }
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

  /// Draws a band with its top left corner at the origin; returns its height. A block that may roam
  /// goes where the columns' ends differ least.
  double draw_band(const PageTemplate::Band& band, double room, std::vector<Mark>& out) {
    const Tally before = context_.tally;
    double tallest = 0;
    const auto draw = [&](const PageTemplate::Band& b) {
      context_.tally = before;
      out.clear();
      tallest = 0;
      double sum = 0;
      for (const PageTemplate::Column& column : b.columns) {
        const double height = draw_column(column, room, out);
        sum += height;
        tallest = std::max(tallest, height);
      }
      return tallest * static_cast<double>(b.columns.size()) - sum;  // what the shorter ones miss
    };
    const double missing = draw(band);
    if (missing < worth_roaming_mm) return tallest;
    for (const PageTemplate::Band& other : roamed(band))
      if (draw(other) < missing - worth_roaming_mm / 2 && tallest <= room + 0.01) return tallest;
    draw(band);
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
                             : block.spec->draw(context_, given(block.options), area, marks[i]);
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

  BlockOptions given(BlockOptions options) const {
    const auto left_out = options.values.find("leave-out");
    if (left_out != options.values.end() && options.number("leave-out") < give_.left_out)
      left_out->second = std::to_string(give_.left_out);
    return options;
  }

  /// A list that is too long for the room is drawn again with fewer lines, by its option `most`; a
  /// page that may do without it has no line of it.
  double draw_filling(const PageTemplate::Block& block, const Box& area, std::vector<Mark>& out) {
    const Tally before = context_.tally;
    const auto draw = [&](const BlockOptions& options) {
      context_.tally = before;
      out.clear();
      return block.spec->draw(context_, options, area, out);
    };
    BlockOptions options = given(block.options);
    double height = draw(options);
    const auto most = options.values.find("most");
    if (height <= area.height || most == options.values.end()) return height;
    int too_many = std::min(options.number("most"), longest_list),
        fits = std::min(give_.fewest_lines, too_many);
    while (too_many - fits > 1) {
      const int middle = (fits + too_many) / 2;
      most->second = std::to_string(middle);
      (draw(options) <= area.height ? fits : too_many) = middle;
    }
    most->second = std::to_string(fits);
    if (fits > 0) return draw(options);
    context_.tally = before;
    out.clear();
    return 0;
  }

  static constexpr int longest_list = 64;
  static constexpr double between_blocks_mm = 2.0, most_spread_mm = 3.0, worth_roaming_mm = 30.0;
  const BlockContext& context_;
  double width_, height_;
  Give give_;
  double overfull_ = 0;
};

}  // namespace

std::vector<Mark> draw_page(const BlockContext& context, const PageTemplate& page_template,
                            const PageTemplate::Page& page, double width, double height) {
  const double margin = page_template.margin_mm;
  const Tally before = context.tally;
  std::vector<Mark> marks;
  double overfull = 0;
  const auto fits = [&](const Give& give, double scale) {
    context.tally = before;
    PageLayout layout(context, (width - 2 * margin) / scale, (height - 2 * margin) / scale, give);
    marks = layout.draw(page);
    overfull = layout.overfull();
    return overfull < 0.05;
  };
  double scale = 1;
  bool done = std::any_of(gives.begin(), gives.end(), [&](const Give& g) { return fits(g, 1); });
  // The order's own words may be too many even so: small type is better than a foot cut off, where
  // the cautions stand.
  while (!done && scale > smallest_scale) done = fits(gives.back(), scale -= 0.05);
  if (!done)
    context.tally.notes.push_back("a page is too full by " + context.words.number(overfull, 1) +
                                  " mm");
  else if (scale < 1)
    context.tally.notes.push_back("a page is reduced to " + context.words.number(100 * scale, 0) +
                                  " % to hold all its words");
  for (Mark& mark : marks) std::visit(Mover{scale, margin, margin}, mark);
  return marks;
}

}  // namespace duskleaf
