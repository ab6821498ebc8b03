#include "sheet/label_placer.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numeric>

// Point-feature label placement with a fixed set of candidate seats, taken greedily by importance:
// the sequential method of Christensen, Marks & Shieber (1995), ACM Transactions on Graphics 14,
// 203, with costs for what a seat covers.

namespace duskleaf {
namespace {

constexpr double cell_mm = 5.0;

bool overlap(const Box& a, const Box& b) {
  return a.x < b.right() && b.x < a.right() && a.y < b.bottom() && b.y < a.bottom();
}

Box grown(const Box& b, double by) {
  return {b.x - by, b.y - by, b.width + 2 * by, b.height + 2 * by};
}

/// Liang & Barsky (1984): the parameters between which a segment runs inside a box.
std::optional<std::pair<double, double>> inside_part(Point a, Point b, const Box& box) {
  double enter = 0, leave = 1;
  const double dx = b.x - a.x, dy = b.y - a.y;
  const std::array<std::pair<double, double>, 4> edges = {
      {{-dx, a.x - box.x}, {dx, box.right() - a.x}, {-dy, a.y - box.y}, {dy, box.bottom() - a.y}}};
  for (const auto& [p, q] : edges) {
    if (p == 0) {
      if (q < 0) return std::nullopt;
    } else if (p < 0) {
      enter = std::max(enter, q / p);
    } else {
      leave = std::min(leave, q / p);
    }
  }
  if (enter >= leave) return std::nullopt;
  return std::pair{enter, leave};
}

bool has_descender(std::string_view words) {
  return words.find_first_of("gjpqyQ,;()") != std::string_view::npos;
}

bool has_small_letters(std::string_view words) {
  return std::any_of(words.begin(), words.end(), [](char c) { return c >= 'a' && c <= 'z'; });
}

struct Seat {
  double dx, dy;  // which side of the point: -1, 0, 1
  double cost;
};
// To the right first, as one reads; above and below last, where neighbours of a row of stars stand.
constexpr std::array<Seat, 8> seats = {{{1, 0, 0.0},
                                        {1, -1, 0.4},
                                        {1, 1, 0.5},
                                        {-1, 0, 0.6},
                                        {-1, -1, 0.9},
                                        {-1, 1, 1.0},
                                        {0, -1, 0.8},
                                        {0, 1, 0.9}}};
constexpr std::array<std::pair<double, double>, 3> distances = {
    {{0.55, 0.0}, {1.5, 1.2}, {2.7, 2.6}}};

}  // namespace

bool LabelRegion::contains(const Box& b) const {
  if (b.x < box.x || b.y < box.y || b.right() > box.right() || b.bottom() > box.bottom())
    return false;
  if (radius <= 0) return true;
  for (const Point p : {Point{b.x, b.y}, Point{b.right(), b.y}, Point{b.x, b.bottom()},
                        Point{b.right(), b.bottom()}})
    if (std::hypot(p.x - centre.x, p.y - centre.y) > radius) return false;
  return true;
}

LabelPlacer::LabelPlacer(const TypeSet& type, const LabelRegion& region)
    : type_(type),
      region_(region),
      columns_(std::max(1, static_cast<int>(std::ceil(region.box.width / cell_mm)))),
      rows_(std::max(1, static_cast<int>(std::ceil(region.box.height / cell_mm)))),
      cells_(static_cast<std::size_t>(columns_ * rows_)) {}

template <class Visit>
void LabelPlacer::for_cells(const Box& box, Visit visit) const {
  const auto column = [&](double x) {
    return std::clamp(static_cast<int>(std::floor((x - region_.box.x) / cell_mm)), 0, columns_ - 1);
  };
  const auto row = [&](double y) {
    return std::clamp(static_cast<int>(std::floor((y - region_.box.y) / cell_mm)), 0, rows_ - 1);
  };
  for (int r = row(box.y); r <= row(box.bottom()); ++r)
    for (int c = column(box.x); c <= column(box.right()); ++c)
      visit(static_cast<std::size_t>(r) * static_cast<std::size_t>(columns_) +
            static_cast<std::size_t>(c));
}

void LabelPlacer::add_dot(Point centre, double diameter_mm, bool hard) {
  const auto index = static_cast<std::uint32_t>(dots_.size());
  const double r = diameter_mm / 2;
  dots_.push_back({centre, r, hard});
  largest_dot_ = std::max(largest_dot_, r);
  for_cells({centre.x, centre.y, 0, 0},
            [&](std::size_t cell) { cells_[cell].dots.push_back(index); });
}

void LabelPlacer::add_line(Point from, Point to, double cost_per_mm) {
  // Long lines go in as short ones, so that few cells hold them.
  const int pieces =
      std::max(1, static_cast<int>(std::hypot(to.x - from.x, to.y - from.y) / (2 * cell_mm)));
  for (int i = 0; i < pieces; ++i) {
    const auto at = [&](int k) {
      const double t = static_cast<double>(k) / pieces;
      return Point{from.x + t * (to.x - from.x), from.y + t * (to.y - from.y)};
    };
    const Point a = at(i), b = at(i + 1);
    const auto index = static_cast<std::uint32_t>(lines_.size());
    lines_.push_back({a, b, cost_per_mm});
    line_seen_.push_back(0);
    for_cells({std::min(a.x, b.x), std::min(a.y, b.y), std::abs(a.x - b.x), std::abs(a.y - b.y)},
              [&](std::size_t cell) { cells_[cell].lines.push_back(index); });
  }
}

void LabelPlacer::reserve(const Box& box, double side_gap_mm) {
  const auto index = static_cast<std::uint32_t>(boxes_.size());
  boxes_.push_back(box);
  side_gaps_.push_back(side_gap_mm);
  largest_gap_ = std::max(largest_gap_, side_gap_mm);
  for_cells(box, [&](std::size_t cell) { cells_[cell].boxes.push_back(index); });
}

std::optional<double> LabelPlacer::cost_of(const Box& box, double limit, double side_gap_mm) const {
  const Box padded = grown(box, padding_mm);
  if (!region_.contains(padded)) return std::nullopt;
  bool stands = true;
  const auto widened = [&](double gap) {
    return Box{box.x - gap, padded.y, box.width + 2 * gap, padded.height};
  };
  for_cells(widened(std::max(side_gap_mm, largest_gap_)), [&](std::size_t cell) {
    for (const auto i : cells_[cell].boxes)
      stands = stands && !overlap(widened(std::max(side_gap_mm, side_gaps_[i])), boxes_[i]);
  });
  if (!stands) return std::nullopt;

  double cost = 0;
  constexpr double hard_margin = 0.25, soft_margin = 0.1;
  for_cells(grown(box, largest_dot_ + hard_margin), [&](std::size_t cell) {
    for (const auto i : cells_[cell].dots) {
      const Dot& dot = dots_[i];
      const double reach = dot.radius + (dot.hard ? hard_margin : soft_margin);
      const double dx = std::max({box.x - dot.centre.x, 0.0, dot.centre.x - box.right()});
      const double dy = std::max({box.y - dot.centre.y, 0.0, dot.centre.y - box.bottom()});
      if (dx * dx + dy * dy >= reach * reach) continue;
      stands = stands && !dot.hard;
      cost += 1.0 + 6.0 * dot.radius;
    }
  });
  if (!stands || cost > limit) return std::nullopt;
  ++question_;
  for_cells(padded, [&](std::size_t cell) {
    for (const auto i : cells_[cell].lines) {
      if (line_seen_[i] == question_) continue;
      line_seen_[i] = question_;
      const Line& line = lines_[i];
      cost += line.cost_per_mm * length_inside(line.from, line.to, padded);
    }
  });
  if (cost > limit) return std::nullopt;
  return cost;
}

Box LabelPlacer::measure(const LabelForm& form) const {
  Box box;
  for (std::size_t i = 0; i < form.lines.size(); ++i) {
    const std::string& words = form.lines[i];
    double width = type_.width(words, form.face, form.size_pt, form.tracking_em);
    width -= form.tracking_em * form.size_pt * mm_per_pt;  // none after the last letter
    box.width = std::max(box.width, width);
    const bool last = i + 1 == form.lines.size();
    if (!last) {
      box.height += form.size_pt * 1.06 * mm_per_pt;
    } else {
      box.height += has_small_letters(words) ? type_.ascent(form.face, form.size_pt)
                                             : type_.cap_height(form.face, form.size_pt);
      if (has_descender(words)) box.height += type_.descent(form.face, form.size_pt);
    }
  }
  return box;
}

std::vector<Text> LabelPlacer::set(const LabelForm& form, const Box& box, Ink ink) const {
  std::vector<Text> texts;
  const bool low = has_descender(form.lines.back());
  double baseline = box.bottom() - (low ? type_.descent(form.face, form.size_pt) : 0.0);
  baseline -= static_cast<double>(form.lines.size() - 1) * form.size_pt * 1.06 * mm_per_pt;
  for (const std::string& words : form.lines) {
    const double width = type_.width(words, form.face, form.size_pt, form.tracking_em) -
                         form.tracking_em * form.size_pt * mm_per_pt;
    texts.push_back({.start = {box.x + (box.width - width) / 2, baseline},
                     .words = words,
                     .face = form.face,
                     .size_pt = form.size_pt,
                     .ink = ink,
                     .tracking_em = form.tracking_em});
    baseline += form.size_pt * 1.06 * mm_per_pt;
  }
  return texts;
}

std::optional<PlacedLabel> LabelPlacer::seat(const LabelRequest& request) const {
  for (std::size_t f = 0; f < request.forms.size(); ++f) {
    const Box size = measure(request.forms[f]);
    std::optional<Box> best;
    double least = request.cost_limit;
    const auto consider = [&](double x, double y, double extra) {
      if (extra >= least) return;
      const Box box{x, y, size.width, size.height};
      const auto cost = cost_of(box, least - extra, request.side_gap_mm);
      if (!cost || *cost + extra >= least) return;
      if (request.nearest && nearer_to_another(box, request, false)) return;
      least = *cost + extra;
      best = box;
    };
    for (std::size_t i = 0; i < request.places.size(); ++i)
      consider(request.places[i].x - size.width / 2, request.places[i].y - size.height / 2,
               0.12 * static_cast<double>(i));
    if (request.places.empty()) {
      for (const auto& [gap, far_cost] : distances) {
        // So far off, a name still finds its reader only if it is of the few that matter.
        if (4 * far_cost > request.cost_limit) break;
        const double reach = request.clearance_mm + gap;
        for (const Seat& s : seats) {
          const double slant = s.dx != 0 && s.dy != 0 ? 0.72 : 1.0;
          const double x = s.dx > 0   ? request.point.x + slant * reach
                           : s.dx < 0 ? request.point.x - slant * reach - size.width
                                      : request.point.x - size.width / 2;
          const double y = s.dy > 0   ? request.point.y + slant * reach
                           : s.dy < 0 ? request.point.y - slant * reach - size.height
                                      : request.point.y - size.height / 2;
          consider(x, y, s.cost + far_cost);
        }
      }
    }
    if (best) return PlacedLabel{0, f, *best, set(request.forms[f], *best, request.ink)};
  }
  if (request.leader)
    for (std::size_t f = 0; f < request.forms.size(); ++f)
      if (auto label = seat_with_leader(request, f)) return label;
  return std::nullopt;
}

std::vector<PlacedLabel> LabelPlacer::place(const std::vector<LabelRequest>& requests) {
  std::vector<std::size_t> order(requests.size());
  std::iota(order.begin(), order.end(), std::size_t{0});
  std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
    return requests[a].importance > requests[b].importance;
  });
  std::vector<PlacedLabel> placed;
  for (const std::size_t i : order) {
    auto label = seat(requests[i]);
    if (!label) continue;
    label->request = i;
    reserve(label->box, requests[i].side_gap_mm);
    if (label->leader) add_line(label->leader->first, label->leader->second, 8);
    placed.push_back(std::move(*label));
  }
  return placed;
}

bool LabelPlacer::nearer_to_another(const Box& box, const LabelRequest& request,
                                    bool on_leader) const {
  const auto gap_to = [&](Point p, double radius) {
    return std::hypot(std::max({box.x - p.x, 0.0, p.x - box.right()}),
                      std::max({box.y - p.y, 0.0, p.y - box.bottom()})) -
           radius;
  };
  constexpr double margin = 0.5;
  const double own =
      on_leader ? request.leader_room_mm : gap_to(request.point, request.clearance_mm);
  bool nearer = false;
  for_cells(grown(box, std::max(0.0, own) + margin + largest_dot_), [&](std::size_t cell) {
    for (const auto i : cells_[cell].dots) {
      const Dot& dot = dots_[i];
      const double off = std::hypot(dot.centre.x - request.point.x, dot.centre.y - request.point.y);
      nearer = nearer || (dot.hard && off > 0.01 && gap_to(dot.centre, dot.radius) < own + margin);
    }
  });
  return nearer;
}

bool LabelPlacer::leader_is_clear(Point from, Point to, Point own) const {
  constexpr double margin = 0.3;
  for (const Box& box : boxes_)
    if (length_inside(from, to, grown(box, margin)) > 0) return false;
  const double dx = to.x - from.x, dy = to.y - from.y, square = dx * dx + dy * dy;
  for (const Dot& dot : dots_) {
    if (!dot.hard || std::hypot(dot.centre.x - own.x, dot.centre.y - own.y) < 0.01) continue;
    const double t = std::clamp(
        ((dot.centre.x - from.x) * dx + (dot.centre.y - from.y) * dy) / square, 0.0, 1.0);
    if (std::hypot(from.x + t * dx - dot.centre.x, from.y + t * dy - dot.centre.y) <
        dot.radius + margin)
      return false;
  }
  return true;
}

std::optional<PlacedLabel> LabelPlacer::seat_with_leader(const LabelRequest& request,
                                                         std::size_t form) const {
  const Box size = measure(request.forms[form]);
  const Point own = request.point;
  std::optional<PlacedLabel> best;
  double least = 2 * request.cost_limit;
  constexpr int directions = 24;
  for (const double far : {2.5, 4.0, 5.5, 7.0, 9.0, 11.5, 14.0})
    for (int k = 0; k < directions; ++k) {
      const double turn = 2 * std::numbers::pi * k / directions, c = std::cos(turn),
                   s = -std::sin(turn);
      const double reach = request.clearance_mm + far;
      const Box box{own.x + reach * c + (c - 1) / 2 * size.width,
                    own.y + reach * s + (s - 1) / 2 * size.height, size.width, size.height};
      const auto cost = cost_of(box, least - far, request.side_gap_mm);
      if (!cost || *cost + far >= least) continue;
      // To the nearest letter's edge, a hair short of it.
      const Point near{std::clamp(own.x, box.x, box.right()),
                       std::clamp(own.y, box.y, box.bottom())};
      const double length = std::hypot(near.x - own.x, near.y - own.y);
      const double start = request.clearance_mm + 0.1, end = length - 0.3;
      if (end - start < 0.8) continue;
      const auto along = [&](double mm) {
        return Point{own.x + mm / length * (near.x - own.x),
                     own.y + mm / length * (near.y - own.y)};
      };
      if (nearer_to_another(box, request, true) || !leader_is_clear(along(start), along(end), own))
        continue;
      least = *cost + far;
      best = PlacedLabel{0, form, box, {}, std::pair{along(start), along(end)}};
    }
  if (best) best->texts = set(request.forms[form], best->box, request.ink);
  return best;
}

double length_inside(Point from, Point to, const Box& box) {
  const auto part = inside_part(from, to, box);
  if (!part) return 0;
  return (part->second - part->first) * std::hypot(to.x - from.x, to.y - from.y);
}

std::vector<std::vector<Point>> break_at(const std::vector<Point>& line,
                                         const std::vector<Box>& boxes, double gap_mm) {
  std::vector<std::vector<Point>> pieces;
  std::vector<Point> piece;
  const auto end_piece = [&] {
    if (piece.size() > 1) pieces.push_back(piece);
    piece.clear();
  };
  for (std::size_t i = 0; i + 1 < line.size(); ++i) {
    const Point a = line[i], b = line[i + 1];
    const auto at = [&](double t) { return Point{a.x + t * (b.x - a.x), a.y + t * (b.y - a.y)}; };
    std::vector<std::pair<double, double>> cuts;
    for (const Box& box : boxes)
      if (const auto part = inside_part(a, b, grown(box, gap_mm))) cuts.push_back(*part);
    std::sort(cuts.begin(), cuts.end());
    double t = 0;
    if (piece.empty()) piece.push_back(a);
    for (const auto& [enter, leave] : cuts) {
      if (enter > t) {
        piece.push_back(at(enter));
      }
      if (leave > t) {
        end_piece();
        t = leave;
        if (t < 1) piece.push_back(at(t));
      }
    }
    if (t < 1) piece.push_back(b);
  }
  end_piece();
  return pieces;
}

std::string capitals(std::string_view utf8) {
  std::string out(utf8);
  for (std::size_t i = 0; i < out.size(); ++i) {
    const auto c = static_cast<unsigned char>(out[i]);
    if (c >= 'a' && c <= 'z') out[i] = static_cast<char>(c - 'a' + 'A');
    if (c == 0xC3 && i + 1 < out.size()) {  // U+00E0 to U+00FE lie 32 above their capitals, but for
                                            // the division sign
      const auto d = static_cast<unsigned char>(out[i + 1]);
      if (d >= 0xA0 && d <= 0xBE && d != 0xB7) out[i + 1] = static_cast<char>(d - 0x20);
      ++i;
    }
  }
  return out;
}

}  // namespace duskleaf
