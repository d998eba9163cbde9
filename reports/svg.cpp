#include "reports/svg.hpp"

#include <cmath>

#include "params/errors.hpp"
#include "reports/format.hpp"

namespace stillshed {

double length(Point a) {
  return std::hypot(a.x, a.y);
}

Svg::Svg(double width, double height, std::string_view id, std::string_view title, std::string_view description) {
  text_ = "<svg xmlns=\"http://www.w3.org/2000/svg\" role=\"img\" viewBox=\"0 0 ";
  number(width);
  text_ += ' ';
  number(height);
  const std::string name = escape_markup(id);
  text_ += "\" aria-labelledby=\"" + name + "-title " + name + "-text\" font-family=\"inherit\">\n";
  text_ += "<title id=\"" + name + "-title\">" + escape_markup(title) + "</title>\n";
  text_ += "<desc id=\"" + name + "-text\">" + escape_markup(description) + "</desc>\n";
}

void Svg::number(double value) {
  expects(std::isfinite(value), "Svg: not a finite coordinate");
  std::string digits = fixed(value, 2);
  digits.erase(digits.find_last_not_of('0') + 1);
  if (digits.back() == '.') {
    digits.pop_back();
  }
  text_ += digits;
}

void Svg::points(const std::vector<Point>& points) {
  bool first = true;
  for (const Point& point : points) {
    if (!first) {
      text_ += ' ';
    }
    first = false;
    number(point.x);
    text_ += ',';
    number(point.y);
  }
}

void Svg::line(Point from, Point to, std::string_view style) {
  text_ += "<line x1=\"";
  number(from.x);
  text_ += "\" y1=\"";
  number(from.y);
  text_ += "\" x2=\"";
  number(to.x);
  text_ += "\" y2=\"";
  number(to.y);
  text_ += "\" ";
  text_ += style;
  text_ += "/>\n";
}

void Svg::polyline(const std::vector<Point>& points_, std::string_view style) {
  text_ += "<polyline points=\"";
  points(points_);
  text_ += "\" fill=\"none\" ";
  text_ += style;
  text_ += "/>\n";
}

void Svg::polygon(const std::vector<Point>& points_, std::string_view style) {
  text_ += "<polygon points=\"";
  points(points_);
  text_ += "\" ";
  text_ += style;
  text_ += "/>\n";
}

void Svg::rectangle(Point corner, double width, double height, std::string_view style) {
  text_ += "<rect x=\"";
  number(corner.x);
  text_ += "\" y=\"";
  number(corner.y);
  text_ += "\" width=\"";
  number(width);
  text_ += "\" height=\"";
  number(height);
  text_ += "\" ";
  text_ += style;
  text_ += "/>\n";
}

void Svg::circle(Point centre, double radius, std::string_view style) {
  text_ += "<circle cx=\"";
  number(centre.x);
  text_ += "\" cy=\"";
  number(centre.y);
  text_ += "\" r=\"";
  number(radius);
  text_ += "\" ";
  text_ += style;
  text_ += "/>\n";
}

void Svg::text(Point at, std::string_view content, std::string_view style, Anchor anchor, double rotation_deg) {
  text_ += "<text x=\"";
  number(at.x);
  text_ += "\" y=\"";
  number(at.y);
  text_ += '"';
  if (anchor != Anchor::start) {
    text_ += anchor == Anchor::middle ? " text-anchor=\"middle\"" : " text-anchor=\"end\"";
  }
  if (rotation_deg != 0.0) {
    text_ += " transform=\"rotate(";
    number(rotation_deg);
    text_ += ' ';
    number(at.x);
    text_ += ' ';
    number(at.y);
    text_ += ")\"";
  }
  text_ += ' ';
  text_ += style;
  text_ += '>';
  text_ += escape_markup(content);
  text_ += "</text>\n";
}

std::string Svg::finish() {
  text_ += "</svg>\n";
  return std::move(text_);
}

std::vector<Point> thinned(const std::vector<Point>& points, double distance) {
  std::vector<Point> kept;
  for (std::size_t k = 0; k < points.size(); ++k) {
    const bool last = k + 1 == points.size();
    if (kept.empty() || length(points[k] - kept.back()) >= distance) {
      kept.push_back(points[k]);
    } else if (last && kept.size() > 1) {
      kept.back() = points[k];
    } else if (last) {
      kept.push_back(points[k]);
    }
  }
  return kept;
}

double polyline_length(const std::vector<Point>& points) {
  double sum = 0.0;
  for (std::size_t k = 1; k < points.size(); ++k) {
    sum += length(points[k] - points[k - 1]);
  }
  return sum;
}

PointOnLine point_along(const std::vector<Point>& points, double share) {
  expects(points.size() >= 2, "point_along: a line needs two points");
  double left = share * polyline_length(points);
  for (std::size_t k = 1; k < points.size(); ++k) {
    const Point step = points[k] - points[k - 1];
    const double size = length(step);
    if (size > 0.0 && (left <= size || k + 1 == points.size())) {
      return {points[k - 1] + (left / size) * step, (1.0 / size) * step};
    }
    left -= size;
  }
  return {points.back(), {1.0, 0.0}};
}

}  // namespace stillshed
