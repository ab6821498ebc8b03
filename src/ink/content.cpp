// Page operators of ISO 32000-1, 8 and 9, written small: whole numbers under one page matrix, a
// state operator only where the state changes, strokes of one state painted at once, stars as
// zero-length lines with round caps.
#include "ink/content.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <numbers>
#include <optional>

namespace duskleaf {
namespace {

constexpr double units_per_mm = 100 * 72.0 / 25.4;
constexpr double units_per_pt = 100;
// Dots are drawn in steps of this size, so that many share one line width: a fiftieth of a
// millimetre, which no eye sees.
constexpr long dot_step = 5;

long units(double mm) { return std::lround(mm * units_per_mm); }

/// What the page's graphics state holds; `nullopt` or -1: not set since the state was last saved.
struct State {
  std::optional<Ink> fill, stroke;
  long line_width = -1;
  int round = -1;
  std::vector<double> dash;
  std::size_t font = SIZE_MAX;
  long size = -1;
  long tracking = 0;
};

class Writer {
 public:
  Writer(const Sheet& sheet, DocumentFonts& fonts, DocumentPictures& pictures)
      : height_(units(sheet.height_mm)), fonts_(fonts), pictures_(pictures) {
    out_ = ".01 0 0 .01 0 0 cm\n";
    draw(sheet.marks);
  }
  std::string take() { return std::move(out_); }

 private:
  void draw(const std::vector<Mark>& marks) {
    for (const Mark& mark : marks) std::visit([this](const auto& m) { draw(m); }, mark);
    finish();
  }

  void draw(const Stroke& stroke) {
    if (stroke.path.verbs.empty()) return;
    end_text();
    set_line(stroke.width_mm, stroke.round, stroke.dash_mm, stroke.ink);
    put(stroke.path);
    stroke_open_ = true;
  }

  void draw(const Fill& fill) {
    if (fill.path.verbs.empty()) return;
    finish();
    set_fill(fill.ink);
    put(fill.path);
    op(fill.even_odd ? "f*" : "f");
  }

  void draw(const Dots& dots) {
    end_text();
    std::vector<std::pair<long, Point>> sorted;
    sorted.reserve(dots.dots.size());
    for (const Dots::Dot& dot : dots.dots) {
      const long steps = std::lround(dot.diameter_mm * units_per_mm / dot_step);
      sorted.emplace_back(std::max(1L, steps), dot.centre);
    }
    std::ranges::stable_sort(sorted, {}, &std::pair<long, Point>::first);
    for (const auto& [steps, centre] : sorted) {
      set_line(static_cast<double>(steps * dot_step) / units_per_mm, true, {}, dots.ink);
      point(centre);
      op("m");
      point(centre);
      op("l");
      stroke_open_ = true;
    }
  }

  void draw(const Text& text) {
    const std::vector<SetGlyph> line = fonts_.type().set(text.words, text.face);
    if (line.empty()) return;
    end_stroke();
    set_fill(text.ink);
    if (!text_open_) {
      op("BT");
      text_open_ = true;
      line_x_ = line_y_ = 0;
      turned_ = false;
    }
    const long tracking = std::lround(text.tracking_em * text.size_pt * units_per_pt);
    if (tracking != state_.tracking) {
      number(tracking);
      op("Tc");
      state_.tracking = tracking;
    }
    place(text);
    show(line, text);
  }

  void draw(const Image& image) {
    if (!image.png) return;
    finish();
    const std::string name = pictures_.name(image);
    op("q");
    number(units(image.box.width));
    out_ += "0 0 ";
    number(units(image.box.height));
    point({image.box.x, image.box.bottom()});
    out_ += "cm " + name + " Do Q\n";
  }

  void draw(const Link&) {}

  void draw(const std::shared_ptr<ClipGroup>& group) {
    if (!group || group->clip.verbs.empty()) return;
    finish();
    const State outside = state_;
    op("q");
    put(group->clip);
    op("W n");
    draw(group->marks);
    op("Q");
    state_ = outside;
  }

  // ---- state

  void set_fill(const Ink& ink) {
    if (state_.fill == ink) return;
    end_stroke();
    colour(ink, "g", "rg");
    state_.fill = ink;
  }

  void set_line(double width_mm, bool round, const std::vector<double>& dash, const Ink& ink) {
    const long width = std::max(1L, units(width_mm));
    const int shape = round ? 1 : 0;
    if (state_.stroke == ink && state_.line_width == width && state_.round == shape &&
        state_.dash == dash)
      return;
    end_stroke();
    if (state_.stroke != ink) colour(ink, "G", "RG");
    if (state_.line_width != width) {
      number(width);
      op("w");
    }
    if (state_.round != shape) {
      number(shape);
      out_ += "J ";
      number(shape);
      op("j");
    }
    if (state_.dash != dash) {
      out_ += "[";
      for (const double part : dash) number(units(part));
      op("] 0 d");
    }
    state_.stroke = ink;
    state_.line_width = width;
    state_.round = shape;
    state_.dash = dash;
  }

  void colour(const Ink& ink, std::string_view grey, std::string_view rgb) {
    fraction(ink.r);
    if (ink.r == ink.g && ink.g == ink.b) return op(grey);
    fraction(ink.g);
    fraction(ink.b);
    op(rgb);
  }

  void end_stroke() {
    if (stroke_open_) op("S");
    stroke_open_ = false;
  }
  void end_text() {
    if (text_open_) op("ET");
    text_open_ = false;
  }
  void finish() {
    end_stroke();
    end_text();
  }

  // ---- text

  void place(const Text& text) {
    const long x = units(text.start.x), y = height_ - units(text.start.y);
    if (text.turn_degrees != 0 || turned_) {
      const double angle = text.turn_degrees * std::numbers::pi / 180;
      const double c = std::cos(angle), s = std::sin(angle);
      for (const double part : {c, s, -s, c}) fraction(part);
      number(x);
      number(y);
      op("Tm");
      turned_ = text.turn_degrees != 0;
    } else {
      number(x - line_x_);
      number(y - line_y_);
      op("Td");
    }
    line_x_ = x;
    line_y_ = y;
  }

  void show(const std::vector<SetGlyph>& line, const Text& text) {
    const long size = std::lround(text.size_pt * units_per_pt);
    std::size_t next = 0;
    while (next < line.size()) {
      const std::size_t index = fonts_.index(text.face, line[next].fallback);
      FontInUse& font = fonts_[index];
      if (state_.font != index || state_.size != size) {
        out_ += "/F";
        number(static_cast<long>(index));
        number(size);
        op("Tf");
        state_.font = index;
        state_.size = size;
      }
      const std::size_t begin = out_.size();
      out_ += "[(";
      bool moved = false;
      const bool other = line[next].fallback;
      for (; next < line.size() && line[next].fallback == other; ++next) {
        const SetGlyph& glyph = line[next];
        const unsigned code = font.code(glyph);
        byte(code >> 8);
        byte(code & 0xFF);
        const long back = -std::lround(glyph.kern_after + glyph.advance - font.width(code));
        if (back == 0 || next + 1 == line.size()) continue;
        out_ += ')';
        number(back);
        out_.back() = '(';
        moved = true;
      }
      if (moved) {
        op(")]TJ");
      } else {
        out_.erase(begin, 1);
        op(")Tj");
      }
    }
  }

  /// A byte of a literal string. Line ends inside strings are not kept by readers, so a return is
  /// written escaped.
  void byte(unsigned value) {
    const char c = static_cast<char>(value);
    if (c == '\r') {
      out_ += "\\r";
      return;
    }
    if (c == '(' || c == ')' || c == '\\') out_ += '\\';
    out_ += c;
  }

  // ---- paths and numbers

  void put(const Path& path) {
    std::size_t next = 0;
    for (const Path::Verb verb : path.verbs) {
      switch (verb) {
        case Path::Verb::move:
          point(path.points[next++]);
          op("m");
          break;
        case Path::Verb::line:
          point(path.points[next++]);
          op("l");
          break;
        case Path::Verb::curve:
          for (int i = 0; i < 3; ++i) point(path.points[next++]);
          op("c");
          break;
        case Path::Verb::close:
          op("h");
          break;
      }
    }
  }

  void point(Point p) {
    number(units(p.x));
    number(height_ - units(p.y));
  }

  void number(long value) {
    std::array<char, 24> digits{};
    const auto end = std::to_chars(digits.data(), digits.data() + digits.size(), value).ptr;
    out_.append(digits.data(), end);
    out_ += ' ';
  }

  /// A number from -1 to 1 to four decimals.
  void fraction(double value) {
    const long scaled = std::lround(std::abs(value) * 10000);
    if (value < 0 && scaled != 0) out_ += '-';
    if (scaled >= 10000) {
      out_ += "1 ";
      return;
    }
    if (scaled == 0) {
      out_ += "0 ";
      return;
    }
    std::array<char, 5> text{
        '.', static_cast<char>('0' + scaled / 1000), static_cast<char>('0' + scaled / 100 % 10),
        static_cast<char>('0' + scaled / 10 % 10), static_cast<char>('0' + scaled % 10)};
    std::size_t length = text.size();
    while (text[length - 1] == '0') --length;
    out_.append(text.data(), length);
    out_ += ' ';
  }

  void op(std::string_view name) {
    out_ += name;
    out_ += '\n';
  }

  long height_;
  DocumentFonts& fonts_;
  DocumentPictures& pictures_;
  std::string out_;
  State state_;
  bool stroke_open_ = false;  // path segments wait for their S
  bool text_open_ = false;
  bool turned_ = false;  // the text matrix is not upright
  long line_x_ = 0, line_y_ = 0;
};

}  // namespace

std::string page_content(const Sheet& sheet, DocumentFonts& fonts, DocumentPictures& pictures) {
  return Writer(sheet, fonts, pictures).take();
}

}  // namespace duskleaf
