#pragma once

#include <functional>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "sheet/block.hpp"
#include "sheet/label_placer.hpp"

namespace duskleaf {

/// Diameter in mm of a star's dot. Area follows brightness, but not in full proportion, which no
/// page could hold: area goes with the 0.7th power of it. Sirius 2.6 mm, magnitude 5 0.33 mm.
double star_dot_mm(double magnitude);

/// The faintest stars that a chart of this size shows, whatever the sky is like.
inline constexpr double chart_limit = 5.0;

/// The stars that charts can need, brightest first: charted ones down to the chart's limit and
/// those of figures.
struct ChartStar {
  int index;  // into stars()
  bool in_figure;
};
std::span<const ChartStar> chart_stars();

/// What joins the stars of a figure: dark enough for a copy of a copy.
inline constexpr double figure_line_mm = 0.2;
Ink figure_ink(const Theme&);

/// How a curve across a chart is drawn.
struct GuideStyle {
  double width_mm;
  Ink ink;
  std::vector<double> dash_mm;
  double label_cost_per_mm;  // what a label pays for lying across it
  double label_lift_mm = 0;  // how much farther off its own label stands
};

/// A chart being made: stars, figures, curves, bodies and labels gather here, then `finish` finds
/// room for the labels, lets the lines make way for them and draws all in order.
class SkyChart {
 public:
  /// `outline` bounds what is drawn, `labels` (somewhat smaller) where labels may stand; `clip` is
  /// the outline as a path.
  SkyChart(const BlockContext&, const LabelRegion& outline, const LabelRegion& labels, Path clip,
           double dot_scale = 1);

  /// Places the stars of chart_stars() and draws those within the outline that are bright enough,
  /// with a limit of their own for those that figures join. `project` gives nothing for a star that
  /// the chart's plane cannot hold.
  void add_stars(double faintest, double faintest_of_figures,
                 const std::function<std::optional<Point>(int star)>& project);
  /// A chart that closes on itself says so before figures and names are added; mm.
  void set_period(double mm) { period_ = mm; }
  /// Lines of the figures of which at least two stars are drawn.
  void add_figures();
  /// Names of constellations that `wanted` lets through, near their figures: the main ones in
  /// `face` with `importance`, the others quieter in `quiet` and after everything else.
  void name_constellations(const std::function<bool(int figure)>& wanted, Face face, Face quiet,
                           double size_pt, double importance);
  /// Names of the brightest named stars, at most `most` and none fainter than `faintest`; `always`
  /// ones whatever comes.
  void name_stars(double faintest, std::size_t most, std::span<const int> always_hr);
  /// Asterisms and the landmarks among them, which come before the constellations.
  void name_asterisms();

  /// A curve, given as the stretches of it that the chart holds. A label is set along it where
  /// there is room, before all other labels (`first`) or after them.
  void add_guide(const std::vector<std::vector<Point>>& stretches, const GuideStyle&,
                 const std::string& label = {}, bool first = false);
  /// A label that interrupts a line, on the first free one of these points.
  void label_on_line(const std::string& words, const std::vector<Point>& places);

  // Planets, Moon and Sun with a name are drawn only where the name finds room.
  void add_planet(Point, double magnitude, const std::string& name);
  void add_moon(Point, double lit, Angle bright_limb_from_up, const std::string& name);
  /// A small Moon with its date; the one of the chart's own evening is larger and bold.
  void add_passing_moon(Point, double lit, Angle bright_limb_from_up, const std::string& date,
                        bool own_evening);
  static constexpr double sun_radius_mm = 1.5;
  void add_sun(Point, const std::string& name);
  /// Any other mark; its dot-like extent keeps labels away.
  void add_mark(Mark, Point centre, double diameter_mm);
  void add_mark(Mark mark) { bodies_.push_back({std::move(mark), {}}); }
  void wish(LabelRequest request) { wishes_.push_back(std::move(request)); }

  bool holds(Point p) const;
  const BlockContext& context() const { return context_; }
  LabelPlacer& placer() { return placer_; }
  /// Where a star stands; nothing when it is not drawn.
  std::optional<Point> drawn_star(int index) const;

  /// Draws everything after the ground. Labels that found no room are counted in the tally.
  void finish(std::vector<Mark>& out);

  /// After finish: all labels, those along curves too, as boxes.
  const std::vector<PlacedLabel>& labels() const { return labels_; }
  const std::vector<Box>& label_boxes() const { return placer_.reserved(); }

 private:
  struct Guide {
    std::vector<std::vector<Point>> stretches;
    GuideStyle style;
    std::string label;
    bool first;
  };
  struct Body {
    Mark mark;
    std::optional<std::size_t> wish;  // drawn only with this label
  };
  void label_guide(const Guide&, std::vector<Mark>& texts);
  void wish_for_body(std::vector<Mark> marks, LabelRequest request);
  LabelForm plain(std::string words) const;

  const BlockContext& context_;
  LabelRegion outline_;
  Path clip_;
  double dot_scale_;
  double period_ = 0;
  LabelPlacer placer_;
  std::vector<std::optional<Point>> at_;     // by star index
  std::vector<std::uint8_t> bright_enough_;  // by star index
  std::vector<std::uint8_t> drawn_;          // by star index
  Dots dots_;
  std::vector<Guide> guides_;
  std::vector<std::vector<Point>> figure_lines_;
  std::vector<Body> bodies_;
  std::vector<LabelRequest> wishes_;
  std::vector<PlacedLabel> labels_;
};

/// A direction in the horizon frame from hour angle and declination at a latitude.
Horizontal horizontal_of(Angle hour_angle, Angle declination, Angle latitude);
/// The inverse: hour angle (-180..180 degrees) and declination.
std::pair<Angle, Angle> equatorial_of(const Horizontal&, Angle latitude);
/// Right ascension and declination of the ecliptic at a longitude, mean obliquity of J2000 (good to
/// 0.02 degrees, 1900-2100).
std::pair<Angle, Angle> ecliptic_point(Angle longitude);
}  // namespace duskleaf
