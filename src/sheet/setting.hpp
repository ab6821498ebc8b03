#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "sheet/block.hpp"

namespace duskleaf {

/// How a piece of type looks.
struct Style {
  Face face = Face::regular;
  double size_pt = 8.5;
  Ink ink;
  double tracking_em = 0;
};

/// Sets type into a list of marks. All lengths in mm, baselines measured from the sheet's top.
class Setter {
 public:
  Setter(const BlockContext& context, std::vector<Mark>& out) : context_(context), out_(out) {}

  Style body() const { return {Face::regular, context_.theme.body_pt, context_.theme.black}; }
  Style table() const {
    return {Face::condensed, context_.theme.table_pt + 0.5, context_.theme.black};
  }
  Style small() const { return {Face::regular, context_.theme.table_pt, context_.theme.soft}; }
  Style strong(Style s) const {
    s.face = s.face == Face::condensed ? Face::condensed_bold : Face::bold;
    return s;
  }

  double width(std::string_view text, const Style& s) const {
    return context_.type.width(text, s.face, s.size_pt, s.tracking_em);
  }
  void left(double x, double baseline, std::string_view text, const Style&);
  void right(double x, double baseline, std::string_view text, const Style&);
  void centre(double x, double baseline, std::string_view text, const Style&);
  /// Sets at `x` left-aligned, shrunk to no less than 80 % where it is wider than `room`; notes it
  /// when even that is too wide.
  void fitted(double x, double baseline, std::string_view text, const Style&, double room);
  /// Broken into lines from `top` on; returns the height used.
  double paragraph(double x, double top, double width, std::string_view text, const Style&,
                   double leading = 1.28);
  /// A hanging first word or two in bold before the rest of a paragraph.
  double lead_in(double x, double top, double width, std::string_view bold, std::string_view rest,
                 const Style&, double leading = 1.28);
  /// The title of a block with a rule above it; an aside stands right-aligned. Returns the height
  /// used.
  double heading(double x, double top, double width, std::string_view title,
                 std::string_view aside = {});
  void rule(double x1, double x2, double y, const Ink&, double width_mm);

 private:
  const BlockContext& context_;
  std::vector<Mark>& out_;
};

}  // namespace duskleaf
