// Interpolation at Chebyshev nodes and Clenshaw's recurrence: W. H. Press et al., Numerical
// Recipes, 3rd ed. 2007, 5.8-5.9.
#include "ephemeris/chebyshev.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace duskleaf {
namespace {

constexpr int smallest_split = 64;

double node(int k, int nodes) { return std::cos(std::numbers::pi * (k + 0.5) / nodes); }

}  // namespace

PieceLayout PieceLayout::covering(double from, double to, double piece_days, int nodes) {
  return {from, piece_days, std::max(1, static_cast<int>(std::ceil((to - from) / piece_days))),
          nodes};
}

std::vector<double> PieceLayout::node_times() const {
  std::vector<double> times;
  times.reserve(static_cast<std::size_t>(pieces) * static_cast<std::size_t>(nodes));
  for (int p = 0; p < pieces; ++p)
    for (int k = 0; k < nodes; ++k)
      times.push_back(from + piece_days * (p + 0.5 * (1.0 + node(k, nodes))));
  return times;
}

ChebyshevTable::ChebyshevTable(const PieceLayout& layout,
                               const std::vector<Eigen::Vector3d>& values)
    : nodes_(layout.nodes), from_(layout.from), slots_per_day_(1.0 / layout.piece_days) {
  for (int p = 0; p < layout.pieces; ++p) {
    slots_.push_back(pieces_.size());
    add_piece(layout.from + layout.piece_days * (p + 0.5), 0.5 * layout.piece_days,
              values.data() + static_cast<std::ptrdiff_t>(p) * layout.nodes);
  }
}

ChebyshevTable::ChebyshevTable(const PieceLayout& layout, const Function& f)
    : ChebyshevTable(layout, [&] {
        std::vector<Eigen::Vector3d> values;
        for (double t : layout.node_times()) values.push_back(f(t));
        return values;
      }()) {}

ChebyshevTable ChebyshevTable::adaptive(const PieceLayout& layout, double tolerance,
                                        const Function& f) {
  ChebyshevTable table;
  table.nodes_ = layout.nodes;
  table.from_ = layout.from;
  table.slots_per_day_ = smallest_split / layout.piece_days;
  std::vector<Eigen::Vector3d> values(static_cast<std::size_t>(layout.nodes));
  const std::function<void(double, int)> cover = [&](double begin, int slots) {
    const double half = 0.5 * slots / table.slots_per_day_;
    const double middle = begin + half;
    for (int k = 0; k < layout.nodes; ++k)
      values[static_cast<std::size_t>(k)] = f(middle + half * node(k, layout.nodes));
    table.add_piece(middle, half, values.data());
    const auto misses = [&](double x) {
      const Eigen::Vector3d truth = f(middle + half * x);
      return (table.evaluate(table.pieces_.back(), middle + half * x) - truth).norm() >
             tolerance * truth.norm();
    };
    if (slots > 1 &&
        (misses(-0.99) || misses(-0.61) || misses(0.07) || misses(0.53) || misses(0.98))) {
      table.pieces_.pop_back();
      table.coefficients_.resize(table.coefficients_.size() -
                                 static_cast<std::size_t>(layout.nodes));
      cover(begin, slots / 2);
      cover(middle, slots / 2);
      return;
    }
    table.slots_.insert(table.slots_.end(), static_cast<std::size_t>(slots),
                        table.pieces_.size() - 1);
  };
  for (int p = 0; p < layout.pieces; ++p)
    cover(layout.from + p * layout.piece_days, smallest_split);
  return table;
}

void ChebyshevTable::add_piece(double middle, double half, const Eigen::Vector3d* values) {
  pieces_.push_back({middle, half, coefficients_.size()});
  for (int j = 0; j < nodes_; ++j) {
    Eigen::Vector3d c = Eigen::Vector3d::Zero();
    for (int k = 0; k < nodes_; ++k)
      c += values[k] * std::cos(std::numbers::pi * j * (k + 0.5) / nodes_);
    coefficients_.push_back(c * ((j == 0 ? 1.0 : 2.0) / nodes_));
  }
}

const ChebyshevTable::Piece& ChebyshevTable::piece_at(double days) const {
  const auto slot = static_cast<std::ptrdiff_t>((days - from_) * slots_per_day_);
  const auto last = static_cast<std::ptrdiff_t>(slots_.size()) - 1;
  return pieces_[slots_[static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(slot, 0, last))]];
}

Eigen::Vector3d ChebyshevTable::evaluate(const Piece& piece, double days) const {
  const double x = (days - piece.middle) / piece.half;
  const Eigen::Vector3d* const c = coefficients_.data() + piece.first;
  Eigen::Vector3d b1 = Eigen::Vector3d::Zero(), b2 = Eigen::Vector3d::Zero();
  for (int j = nodes_ - 1; j > 0; --j) {
    const Eigen::Vector3d b0 = c[j] + 2.0 * x * b1 - b2;
    b2 = b1;
    b1 = b0;
  }
  return c[0] + x * b1 - b2;
}

Eigen::Vector3d ChebyshevTable::operator()(double days) const {
  return evaluate(piece_at(days), days);
}

Eigen::Vector3d ChebyshevTable::rate(double days) const {
  const Piece& piece = piece_at(days);
  const double x = (days - piece.middle) / piece.half;
  const Eigen::Vector3d* const c = coefficients_.data() + piece.first;
  // T_j' = j U_(j-1); Clenshaw for the second kind.
  Eigen::Vector3d b1 = Eigen::Vector3d::Zero(), b2 = Eigen::Vector3d::Zero();
  for (int j = nodes_ - 1; j > 0; --j) {
    const Eigen::Vector3d b0 = j * c[j] + 2.0 * x * b1 - b2;
    b2 = b1;
    b1 = b0;
  }
  return b1 / piece.half;
}

}  // namespace duskleaf
