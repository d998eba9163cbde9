/// The marks shared by all pictures, a legend that explains them, and a placer that keeps labels apart.
///
/// Marks differ in shape as well as in colour: filled circle stable node, open circle unstable node,
/// half-filled diamond saddle, crossed square degenerate, star feed, small cross measured.
#pragma once

#include <functional>
#include <string>
#include <vector>

#include "engine/survey.hpp"
#include "reports/svg.hpp"

namespace stillshed {

/// Colours, safe for the common forms of colour blindness and different in grey.
namespace ink {
inline constexpr const char* kText = "#1b2b34";
inline constexpr const char* kSoft = "#5b6f7a";
inline constexpr const char* kCurve = "#6f8794";
inline constexpr const char* kBoundary = "#7d1f45";
inline constexpr const char* kFeed = "#e08a00";
inline constexpr const char* kGrid = "#dfe5e8";
}  // namespace ink

void draw_node(Svg& svg, Point at, NodeType node, double radius = 6.0);
void draw_star(Svg& svg, Point at, double radius = 9.0);
void draw_measured(Svg& svg, Point at, double radius = 5.0);
/// A filled arrow head whose tip lies half its length ahead of `at`; `direction` has unit length.
void draw_arrow(Svg& svg, Point at, Point direction, double size, const char* colour);

[[nodiscard]] const char* node_words(NodeType node);  ///< "stable node", ...

/// Rows of mark + words under a picture.
class Legend {
 public:
  using Draw = std::function<void(Svg&, Point)>;  ///< draws a sample, centred, at most 34 wide
  void add(std::string words, Draw draw);
  [[nodiscard]] double height(int columns) const;
  void draw(Svg& svg, Point corner, double width, int columns) const;

 private:
  struct Entry {
    std::string words;
    Draw draw;
  };
  std::vector<Entry> entries_;
};

struct Rectangle {
  double left = 0.0;
  double top = 0.0;
  double right = 0.0;
  double bottom = 0.0;
};
[[nodiscard]] double overlap_area(const Rectangle& a, const Rectangle& b);

/// Rough width of text set in a proportional face.
[[nodiscard]] double text_width(std::string_view text, double font_size);

/// The font size asked for, or the smaller one at which the text is at most that wide (never below 9).
[[nodiscard]] double fitting_size(std::string_view text, double font_size, double width);

/// Finds room for labels: tries places around an anchor and takes the one that covers least.
class LabelPlacer {
 public:
  explicit LabelPlacer(Rectangle canvas) : canvas_(canvas) {}
  void keep_clear(const Rectangle& area) { areas_.push_back(area); }
  void keep_clear(const std::vector<Point>& polyline, double weight = 1.0);

  struct Place {
    Point baseline;  ///< where the text starts (Anchor::start)
    Rectangle area;
    double cost = 0.0;  ///< 0: covers nothing
  };
  /// The chosen area is kept clear from then on.
  Place place(Point anchor, std::string_view text, double font_size, double gap);

 private:
  struct Spot {
    Point at;
    double weight = 1.0;
  };
  [[nodiscard]] double cost(const Rectangle& area) const;
  Rectangle canvas_;
  std::vector<Rectangle> areas_;
  std::vector<Spot> spots_;
};

}  // namespace stillshed
