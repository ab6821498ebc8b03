#pragma once

#include <Eigen/Dense>
#include <functional>
#include <vector>

namespace duskleaf {

/// How a span of time is cut: equal pieces, each with so many Chebyshev nodes. Times in days, any
/// origin.
struct PieceLayout {
  double from;
  double piece_days;
  int pieces;
  int nodes;

  /// Enough pieces to cover [from, to].
  static PieceLayout covering(double from, double to, double piece_days, int nodes);
  /// The times of all nodes, piece by piece.
  std::vector<double> node_times() const;
};

/// A vector function of time as Chebyshev polynomials on pieces of the span. Evaluation outside the
/// span extrapolates: the caller checks.
class ChebyshevTable {
 public:
  using Function = std::function<Eigen::Vector3d(double days)>;

  ChebyshevTable() = default;
  /// From values at layout.node_times().
  ChebyshevTable(const PieceLayout&, const std::vector<Eigen::Vector3d>& values);
  ChebyshevTable(const PieceLayout&, const Function&);
  /// Halves a piece, down to 1/64, until the polynomial meets the function within `tolerance`
  /// (length of the difference over length of the vector) at points between the nodes.
  static ChebyshevTable adaptive(const PieceLayout&, double tolerance, const Function&);

  Eigen::Vector3d operator()(double days) const;
  /// Derivative, per day.
  Eigen::Vector3d rate(double days) const;

 private:
  struct Piece {
    double middle, half;
    std::size_t first;  // index into coefficients_
  };
  void add_piece(double middle, double half, const Eigen::Vector3d* values);
  Eigen::Vector3d evaluate(const Piece&, double days) const;
  const Piece& piece_at(double days) const;

  int nodes_ = 0;
  double from_ = 0.0, slots_per_day_ = 0.0;
  std::vector<std::size_t> slots_;  // equal slots of time -> piece
  std::vector<Piece> pieces_;
  std::vector<Eigen::Vector3d> coefficients_;
};

}  // namespace duskleaf
