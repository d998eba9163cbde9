/// Writes one SVG picture: shapes, text, a title and a description for those who cannot see it.
///
/// Coordinates in user units, y downwards, written with two decimals. `style` is a list of SVG presentation
/// attributes written by the caller; text content is escaped here. The picture needs no outside style sheet.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace stillshed {

struct Point {
  double x = 0.0;
  double y = 0.0;
};

[[nodiscard]] inline Point operator+(Point a, Point b) {
  return {a.x + b.x, a.y + b.y};
}
[[nodiscard]] inline Point operator-(Point a, Point b) {
  return {a.x - b.x, a.y - b.y};
}
[[nodiscard]] inline Point operator*(double s, Point a) {
  return {s * a.x, s * a.y};
}
[[nodiscard]] double length(Point a);

/// Where text hangs on its point.
enum class Anchor { start, middle, end };

class Svg {
 public:
  /// `id` must be unique in the page that holds the picture.
  Svg(double width, double height, std::string_view id, std::string_view title, std::string_view description);

  void line(Point from, Point to, std::string_view style);
  void polyline(const std::vector<Point>& points, std::string_view style);
  void polygon(const std::vector<Point>& points, std::string_view style);
  void rectangle(Point corner, double width, double height, std::string_view style);
  void circle(Point centre, double radius, std::string_view style);
  void text(Point at, std::string_view content, std::string_view style, Anchor anchor = Anchor::start,
            double rotation_deg = 0.0);
  /// The picture; call once.
  [[nodiscard]] std::string finish();

 private:
  void number(double value);
  void points(const std::vector<Point>& points);
  std::string text_;
};

/// Drops points that lie closer than `distance` to the last one kept; both ends stay.
[[nodiscard]] std::vector<Point> thinned(const std::vector<Point>& points, double distance);

/// A point at a share (0..1) of the length of a polyline, and the direction there.
struct PointOnLine {
  Point at;
  Point direction;  ///< unit length
};
[[nodiscard]] PointOnLine point_along(const std::vector<Point>& points, double share);
[[nodiscard]] double polyline_length(const std::vector<Point>& points);

}  // namespace stillshed
