#include "tests/engine/hand_charts.hpp"

#include <algorithm>

namespace stillshed::testing {

namespace {

void add_point(Chart& chart, const char* id, const Composition& x, double temperature_K, NodeType node) {
  FixedPoint point;
  point.id = id;
  point.x = x;
  for (int i = 0; i < x.size(); ++i) {
    if (x[i] > 0.0) {
      point.members.push_back(i);
    }
  }
  point.temperature_K = temperature_K;
  point.node = node;
  chart.fixed_points.push_back(point);
}

int index_of(const Chart& chart, const char* id) {
  for (std::size_t k = 0; k < chart.fixed_points.size(); ++k) {
    if (chart.fixed_points[k].id == id) {
      return static_cast<int>(k);
    }
  }
  throw LogicError(id);
}

const Composition& place(const Chart& chart, const char* id) {
  return chart.fixed_points[static_cast<std::size_t>(index_of(chart, id))].x;
}

void add_boundary(Chart& chart, const char* from, const char* to, Confines confines,
                  const std::vector<Composition>& on_the_way = {}) {
  Boundary boundary;
  boundary.id = "b";
  boundary.id += std::to_string(chart.boundaries.size() + 1);
  boundary.from = index_of(chart, from);
  boundary.to = index_of(chart, to);
  boundary.confines = confines;
  boundary.curve.points.push_back(place(chart, from));
  for (const Composition& point : on_the_way) {
    boundary.curve.points.push_back(point);
  }
  boundary.curve.points.push_back(place(chart, to));
  chart.boundaries.push_back(boundary);
}

Region& add_region(Chart& chart, const char* unstable, const char* stable, std::vector<std::string> boundaries,
                   std::vector<Composition> polygon) {
  Region region;
  region.id = "r";
  region.id += std::to_string(chart.regions.size() + 1);
  region.unstable_node = index_of(chart, unstable);
  region.stable_node = index_of(chart, stable);
  region.boundaries = std::move(boundaries);
  region.polygon = std::move(polygon);
  chart.regions.push_back(region);
  return chart.regions.back();
}

std::vector<Composition> inner(const Chart& chart, std::size_t boundary, bool backwards) {
  std::vector<Composition> points = chart.boundaries[boundary].curve.points;
  points.erase(points.begin());
  points.pop_back();
  if (backwards) {
    std::reverse(points.begin(), points.end());
  }
  return points;
}

std::vector<Composition> joined(std::vector<Composition> a, const std::vector<Composition>& b,
                                const std::vector<Composition>& c = {}) {
  a.insert(a.end(), b.begin(), b.end());
  a.insert(a.end(), c.begin(), c.end());
  return a;
}

}  // namespace

Chart symmetric_chart() {
  const double third = 1.0 / 3.0;
  Chart chart;
  chart.status = Status::complete;
  add_point(chart, "az4(A,B,C)", {third, third, third}, 338.0, NodeType::unstable_node);
  add_point(chart, "az1(A,B)", {0.5, 0.5, 0.0}, 341.0, NodeType::saddle);
  add_point(chart, "az2(A,C)", {0.5, 0.0, 0.5}, 341.0, NodeType::saddle);
  add_point(chart, "az3(B,C)", {0.0, 0.5, 0.5}, 341.0, NodeType::saddle);
  add_point(chart, "A", {1.0, 0.0, 0.0}, 350.0, NodeType::stable_node);
  add_point(chart, "B", {0.0, 1.0, 0.0}, 350.0, NodeType::stable_node);
  add_point(chart, "C", {0.0, 0.0, 1.0}, 350.0, NodeType::stable_node);
  add_boundary(chart, "az4(A,B,C)", "az1(A,B)", Confines::bottoms);
  add_boundary(chart, "az4(A,B,C)", "az2(A,C)", Confines::bottoms);
  add_boundary(chart, "az4(A,B,C)", "az3(B,C)", Confines::bottoms);
  const auto p = [&](const char* id) { return place(chart, id); };
  add_region(chart, "az4(A,B,C)", "A", {"b1", "b2"}, {p("az4(A,B,C)"), p("az1(A,B)"), p("A"), p("az2(A,C)")});
  add_region(chart, "az4(A,B,C)", "B", {"b1", "b3"}, {p("az4(A,B,C)"), p("az3(B,C)"), p("B"), p("az1(A,B)")});
  add_region(chart, "az4(A,B,C)", "C", {"b2", "b3"}, {p("az4(A,B,C)"), p("az2(A,C)"), p("C"), p("az3(B,C)")});
  return chart;
}

Chart zeotropic_chart() {
  Chart chart;
  chart.status = Status::complete;
  add_point(chart, "A", {1.0, 0.0, 0.0}, 340.0, NodeType::unstable_node);
  add_point(chart, "B", {0.0, 1.0, 0.0}, 350.0, NodeType::saddle);
  add_point(chart, "C", {0.0, 0.0, 1.0}, 360.0, NodeType::stable_node);
  add_region(chart, "A", "C", {}, {place(chart, "A"), place(chart, "B"), place(chart, "C")});
  return chart;
}

Chart walled_chart(const std::vector<std::pair<double, double>>& on_the_way) {
  Chart chart;
  chart.status = Status::complete;
  add_point(chart, "A", {1.0, 0.0, 0.0}, 340.0, NodeType::unstable_node);
  add_point(chart, "B", {0.0, 1.0, 0.0}, 341.0, NodeType::unstable_node);
  add_point(chart, "az1(A,B)", {0.5, 0.5, 0.0}, 350.0, NodeType::saddle);
  add_point(chart, "C", {0.0, 0.0, 1.0}, 360.0, NodeType::stable_node);
  std::vector<Composition> points;
  for (const auto& [a, b] : on_the_way) {
    points.push_back({a, b, 1.0 - a - b});
  }
  add_boundary(chart, "az1(A,B)", "C", Confines::overheads, points);
  const auto p = [&](const char* id) { return place(chart, id); };
  add_region(chart, "A", "C", {"b1"}, joined({p("A"), p("az1(A,B)")}, points, {p("C")}));
  add_region(chart, "B", "C", {"b1"}, joined({p("B"), p("C")}, inner(chart, 0, true), {p("az1(A,B)")}));
  return chart;
}

Chart curved_chart() {
  Chart chart;
  chart.status = Status::complete;
  const double mu = 0.65877923;
  add_point(chart, "zeta", {1.0, 0.0, 0.0}, 330.0, NodeType::unstable_node);
  add_point(chart, "az1(mu,alpha)", {0.0, mu, 1.0 - mu}, 351.369195, NodeType::saddle);
  add_point(chart, "mu", {0.0, 1.0, 0.0}, 355.0, NodeType::stable_node);
  add_point(chart, "alpha", {0.0, 0.0, 1.0}, 365.0, NodeType::stable_node);
  std::vector<Composition> points;
  for (const auto& [z, m] : std::vector<std::pair<double, double>>{
           {0.79996, 0.09295}, {0.7, 0.16063}, {0.59989, 0.23038}, {0.39976, 0.37224}}) {
    points.push_back({z, m, 1.0 - z - m});
  }
  add_boundary(chart, "zeta", "az1(mu,alpha)", Confines::bottoms, points);
  const auto p = [&](const char* id) { return place(chart, id); };
  add_region(chart, "zeta", "mu", {"b1"}, joined({p("zeta")}, points, {p("az1(mu,alpha)"), p("mu")}));
  add_region(chart, "zeta", "alpha", {"b1"},
             joined({p("zeta"), p("alpha"), p("az1(mu,alpha)")}, inner(chart, 0, true)));
  return chart;
}

Chart binary_chart(double azeotrope_B, bool minimum) {
  Chart chart;
  chart.status = Status::complete;
  const NodeType pure = minimum ? NodeType::stable_node : NodeType::unstable_node;
  const NodeType middle = minimum ? NodeType::unstable_node : NodeType::stable_node;
  add_point(chart, "az1(A,B)", {1.0 - azeotrope_B, azeotrope_B}, minimum ? 341.0 : 357.0, middle);
  add_point(chart, "A", {1.0, 0.0}, 350.0, pure);
  add_point(chart, "B", {0.0, 1.0}, 352.0, pure);
  const auto p = [&](const char* id) { return place(chart, id); };
  // The two ends, by rising x_A.
  add_region(chart, minimum ? "az1(A,B)" : "A", minimum ? "A" : "az1(A,B)", {}, {p("az1(A,B)"), p("A")});
  add_region(chart, minimum ? "az1(A,B)" : "B", minimum ? "B" : "az1(A,B)", {}, {p("B"), p("az1(A,B)")});
  return chart;
}

Chart upside_down(const Chart& chart) {
  Chart result = chart;
  for (FixedPoint& point : result.fixed_points) {
    point.temperature_K = 700.0 - point.temperature_K;
    if (point.node == NodeType::unstable_node) {
      point.node = NodeType::stable_node;
    } else if (point.node == NodeType::stable_node) {
      point.node = NodeType::unstable_node;
    }
  }
  for (Boundary& boundary : result.boundaries) {
    std::swap(boundary.from, boundary.to);
    std::reverse(boundary.curve.points.begin(), boundary.curve.points.end());
    boundary.confines = boundary.confines == Confines::bottoms ? Confines::overheads : Confines::bottoms;
  }
  for (Region& region : result.regions) {
    std::swap(region.unstable_node, region.stable_node);
  }
  return result;
}

Composition renumbered(const Composition& x, const std::vector<int>& order) {
  Composition result(x.size());
  for (int i = 0; i < x.size(); ++i) {
    result[order[static_cast<std::size_t>(i)]] = x[i];
  }
  return result;
}

Chart renumbered(const Chart& chart, const std::vector<int>& order) {
  Chart result = chart;
  for (FixedPoint& point : result.fixed_points) {
    point.x = renumbered(point.x, order);
    for (int& member : point.members) {
      member = order[static_cast<std::size_t>(member)];
    }
    std::sort(point.members.begin(), point.members.end());
  }
  for (Boundary& boundary : result.boundaries) {
    for (Composition& point : boundary.curve.points) {
      point = renumbered(point, order);
    }
  }
  for (Region& region : result.regions) {
    for (Composition& point : region.polygon) {
      point = renumbered(point, order);
    }
  }
  return result;
}

}  // namespace stillshed::testing
