#include "tests/support/random_sections.hpp"

#include <cmath>
#include <numbers>
#include <random>

#include "tests/support/sections.hpp"

namespace barwall::support {
namespace {

using namespace mesh;

class Generator {
public:
  explicit Generator(unsigned seed) : random_(seed) {}

  Section run() {
    const int tiles = 1 + pick(5);
    double x = 0.0;
    double low = 0.0;
    double high = 0.0;
    for (int k = 0; k < tiles; ++k) {
      const double size = log_uniform(4.0, 120.0) * mm;
      const double y = uniform(-0.3, 0.3) * size;
      tile({x + 0.5 * size, y}, size);
      low = std::min(low, y - 0.5 * size);
      high = std::max(high, y + 0.5 * size);
      x += size + log_uniform(0.3, 40.0) * mm;
    }
    if (pick(3) == 0) enclose(x, low, high);
    return section_;
  }

private:
  int pick(int n) { return static_cast<int>(random_() % static_cast<unsigned>(n)); }
  double uniform(double a, double b) {
    return a + (b - a) * static_cast<double>(random_()) / 4294967296.0;
  }
  double log_uniform(double a, double b) { return a * std::pow(b / a, uniform(0.0, 1.0)); }
  double turn() { return pick(2) == 0 ? 0.0 : uniform(-1.6, 1.6); }
  std::string name() { return "part " + std::to_string(section_.parts.size() + 1); }
  int add(Part part) {
    section_.parts.push_back(std::move(part));
    return static_cast<int>(section_.parts.size()) - 1;
  }

  /// Something within a circle of the tile's size.
  void tile(Point c, double size) {
    switch (pick(9)) {
      case 0:
        add(bar(name(), {solid(c, size)}));
        break;
      case 1:
        add(steel_wall(name(), {solid(c, size)}));
        break;
      case 2:
        nested_frame(c, size);
        break;
      case 3:
        nested_tube(c, size);
        break;
      case 4:
        touching(c, size);
        break;
      case 5:
        overlapping_walls(c, size);
        break;
      case 6:
        pieces(c, size);
        break;
      case 7:
        slotted(c, size);
        break;
      default:
        angle(c, size);
        break;
    }
  }

  Shape solid(Point c, double size) {
    const double thin = log_uniform(0.03, 0.7) * size;
    switch (pick(4)) {
      case 0:
        return Rectangle{c, thin, 0.7 * size, turn()};
      case 1:
        return Round{c, uniform(0.3, 0.9) * size};
      case 2:
        return Tube{c, 0.9 * size, uniform(0.05, 0.4) * size};
      default:
        return polygon(c, 0.45 * size);
    }
  }

  Shape polygon(Point c, double radius) {
    const int corners = 3 + pick(6);
    const double start = uniform(0.0, 6.0);
    Polygon shape;
    for (int k = 0; k < corners; ++k) {
      const double a = start + 2.0 * std::numbers::pi * (k + uniform(-0.2, 0.2)) / corners;
      const double r = radius * uniform(0.6, 1.0);
      shape.corners.push_back(c + r * Point{std::cos(a), std::sin(a)});
    }
    return shape;
  }

  void nested_frame(Point c, double size) {
    const double t = log_uniform(0.02, 0.1) * size;
    add(steel_wall(name(), {Frame{c, 0.68 * size, 0.6 * size, t, turn()}}));
    add(bar(name(), {solid(c, 0.25 * size)}));
  }

  void nested_tube(Point c, double size) {
    const double t = log_uniform(0.02, 0.1) * size;
    add(steel_wall(name(), {Tube{c, 0.95 * size, t}}));
    const double d = 0.25 * size;
    for (double sign : {-1.0, 1.0}) {
      add(bar(name(), {Round{c + Point{sign * 0.18 * size, 0.02 * size}, d}}));
    }
  }

  void touching(Point c, double size) {
    const double w = uniform(0.1, 0.3) * size;
    const double h = uniform(0.1, 0.3) * size;
    add(bar(name(), {Rectangle{c - Point{0.5 * w, 0.0}, w, h, 0.0}}));
    if (pick(2) == 0) {
      add(bar(name(), {Rectangle{c + Point{0.5 * w, uniform(-0.3, 0.3) * h}, w, h, 0.0}}));
    } else {
      add(bar(name(), {Round{c + Point{0.4 * w, 0.0}, 0.8 * w}}));
    }
    add(steel_wall(
        name(), {Rectangle{c - Point{0.5 * w, 0.5 * h + 0.03 * size}, 2.5 * w, 0.06 * size, 0.0}}));
  }

  void overlapping_walls(Point c, double size) {
    const double t = log_uniform(0.04, 0.12) * size;
    add(steel_wall(name(), {Rectangle{c, 0.7 * size, t, turn()}}));
    add(steel_wall(name(), {Rectangle{c + Point{0.1 * size, 0.05 * size}, t, 0.6 * size, turn()}}));
  }

  void pieces(Point c, double size) {
    const double w = log_uniform(0.04, 0.15) * size;
    const double turned_by = pick(3) == 0 ? turn() : 0.0;
    std::vector<Shape> shapes;
    for (int k = -1; k <= 1; ++k) {
      const Point shift = turned(Point{2.0 * k * w, 0.0}, turned_by);
      shapes.emplace_back(Rectangle{c + shift, w, 0.6 * size, turned_by});
    }
    add(bar(name(), std::move(shapes)));
  }

  void slotted(Point c, double size) {
    const double t = log_uniform(0.03, 0.1) * size;
    const int wall = add(steel_wall(name(), {Frame{c, 0.68 * size, 0.6 * size, t, 0.0}}));
    const double gap = log_uniform(0.02, 0.2) * size;
    section_.openings.push_back(
        {"slot " + std::to_string(wall),
         {wall},
         {Rectangle{c + Point{uniform(-0.1, 0.1) * size, 0.3 * size}, gap, 0.3 * size, 0.0}}});
  }

  void angle(Point c, double size) {
    const double t = log_uniform(0.04, 0.1) * size;
    const double a = 0.25 * size;
    const double by = turn();
    Polygon shape;
    for (const Point p : {Point{-a, -a}, Point{a, -a}, Point{a, -a + t}, Point{-a + t, -a + t},
                          Point{-a + t, a}, Point{-a, a}}) {
      shape.corners.push_back(c + turned(p, by));
    }
    add(steel_wall(name(), {shape}));
  }

  void enclose(double width, double low, double high) {
    const double margin = log_uniform(3.0, 60.0) * mm;
    const double t = log_uniform(1.0, 6.0) * mm;
    const Point c{0.5 * width, 0.5 * (low + high)};
    add(steel_wall(
        name(), {Frame{c, width + 2.0 * (margin + t), high - low + 2.0 * (margin + t), t, 0.0}}));
  }

  std::mt19937 random_;
  Section section_;
};

}  // namespace

mesh::Section random_section(unsigned seed) {
  return Generator(seed).run();
}

bool straight(const mesh::Section& section) {
  for (const mesh::Part& part : section.parts) {
    for (const mesh::Shape& piece : part.pieces) {
      if (std::holds_alternative<Round>(piece) || std::holds_alternative<Tube>(piece)) return false;
    }
  }
  return true;
}

}  // namespace barwall::support
