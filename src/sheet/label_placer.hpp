#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "sheet/marks.hpp"
#include "sheet/type.hpp"

namespace duskleaf {

/// Where labels may stand: a box, or the part of it within a circle (a dome).
struct LabelRegion {
  Box box;
  Point centre;
  double radius = 0;  // mm; 0: the whole box
  bool contains(const Box&) const;
};

/// One way to set a label: one line, or two under each other.
struct LabelForm {
  std::vector<std::string> lines;
  Face face = Face::regular;
  double size_pt = 7.5;
  double tracking_em = 0;
};

/// A label that a chart would like to carry.
struct LabelRequest {
  std::vector<LabelForm> forms;  // as wished first, then shorter and shorter
  double importance = 0;         // the greater, the earlier it chooses its place
  Point point;                   // the centre of what it names
  double clearance_mm = 0;       // its radius
  std::vector<Point> places;     // centres to stand on, best first; empty: beside the point
  double cost_limit = 8;         // how much it may cover before it takes a shorter form or goes
  Ink ink;
  double side_gap_mm =
      0.55;              // free room to its left and right, so that two names do not read as one
  bool nearest = false;  // no other hard dot may stand as near to the label as its own
  double leader_room_mm = 0;  // on a leader line: how far (and 0.5 mm) from other hard dots
  bool leader = false;        // with no seat beside its point, it may stand off with a leader line
};

struct PlacedLabel {
  std::size_t request;
  std::size_t form;
  Box box;                                             // of the letters, without padding
  std::vector<Text> texts;                             // ready to draw
  std::optional<std::pair<Point, Point>> leader = {};  // from the point's edge to the letters
};

/// Finds room for labels among stars and lines. Greedy, in falling importance; the same input gives
/// the same page. Lengths in mm. Two labels keep at least `padding_mm` between their letters'
/// boxes.
class LabelPlacer {
 public:
  static constexpr double padding_mm = 0.55;

  LabelPlacer(const TypeSet&, const LabelRegion&);

  /// A dot that labels should not cover; `hard`: must not.
  void add_dot(Point centre, double diameter_mm, bool hard);
  /// A line that labels should not cross; cost per mm of it that a label covers.
  void add_line(Point from, Point to, double cost_per_mm);

  /// Places all requests; those that find no room are left out.
  std::vector<PlacedLabel> place(const std::vector<LabelRequest>&);

  /// What a box would cover; nullopt where it cannot stand or where that comes to more than
  /// `limit`. Labels of another make (turned ones) ask and then reserve.
  std::optional<double> cost_of(const Box&, double limit = 1e9,
                                double side_gap_mm = padding_mm) const;
  void reserve(const Box&, double side_gap_mm = padding_mm);
  const std::vector<Box>& reserved() const { return boxes_; }

  /// The box of a form whose upper left corner is at the origin.
  Box measure(const LabelForm&) const;

 private:
  struct Dot {
    Point centre;
    double radius;
    bool hard;
  };
  struct Line {
    Point from, to;
    double cost_per_mm;
  };
  struct Cell {
    std::vector<std::uint32_t> dots;          // by their centres
    std::vector<std::uint32_t> lines, boxes;  // by all cells that they touch
  };
  template <class Visit>
  void for_cells(const Box&, Visit) const;
  std::optional<PlacedLabel> seat(const LabelRequest&) const;
  std::optional<PlacedLabel> seat_with_leader(const LabelRequest&, std::size_t form) const;
  bool nearer_to_another(const Box&, const LabelRequest&, bool on_leader) const;
  bool leader_is_clear(Point from, Point to, Point own) const;
  std::vector<Text> set(const LabelForm&, const Box&, Ink) const;

  const TypeSet& type_;
  LabelRegion region_;
  int columns_, rows_;
  std::vector<Cell> cells_;
  std::vector<Dot> dots_;
  std::vector<Line> lines_;
  std::vector<Box> boxes_;
  std::vector<double> side_gaps_;  // of the boxes
  double largest_dot_ = 0, largest_gap_ = padding_mm;
  // The last question that met each line, so that none counts twice.
  mutable std::vector<std::uint32_t> line_seen_;
  mutable std::uint32_t question_ = 0;
};

/// The pieces of a polyline that lie outside all the boxes grown by `gap_mm`: lines make way for
/// labels.
std::vector<std::vector<Point>> break_at(const std::vector<Point>& line, const std::vector<Box>&,
                                         double gap_mm);

/// Length of the part of a segment inside a box.
double length_inside(Point from, Point to, const Box&);

/// Capitals of a Latin name: ASCII and the Latin-1 letters.
std::string capitals(std::string_view utf8);

}  // namespace duskleaf
