#include "mesh/sides.hpp"

namespace barwall::mesh {
namespace {

/// Sides between corners that run round a shape either way; one where it goes straight on ends
/// none. \param names of the sides that begin at the corners
std::vector<Side> sides_between(const std::vector<Point>& corners,
                                const std::vector<std::string>& names) {
  const std::size_t count = corners.size();
  std::vector<std::size_t> kept;
  double area = 0.0;
  for (std::size_t k = 0; k < count; ++k) {
    const Point before = corners[k] - corners[(k + count - 1) % count];
    const Point after = corners[(k + 1) % count] - corners[k];
    const double sine = cross(before, after) / (norm(before) * norm(after));
    if (std::abs(sine) > 1e-9 || dot(before, after) < 0.0) kept.push_back(k);
    // About the first corner: no cancellation for a small shape far from the origin.
    area += cross(corners[k] - corners[0], after);
  }
  std::vector<Side> result;
  for (std::size_t k = 0; k < kept.size(); ++k) {
    const Segment edge{corners[kept[k]], corners[kept[(k + 1) % kept.size()]]};
    const Point left = left_normal(edge, 0.5);  // within a shape that runs counter-clockwise
    result.push_back({names[kept[k]], edge, area > 0.0 ? -left : left});
  }
  return result;
}

}  // namespace

std::vector<Side> sides(const Shape& shape) {
  if (const auto* polygon = std::get_if<Polygon>(&shape)) {
    std::vector<std::string> names;
    for (std::size_t k = 1; k <= polygon->corners.size(); ++k) {
      names.push_back("side " + std::to_string(k));
    }
    return sides_between(polygon->corners, names);
  }
  if (std::holds_alternative<Round>(shape) || std::holds_alternative<Tube>(shape)) return {};
  std::vector<Point> corners;  // from the lower left, counter-clockwise
  const auto chains = boundary(shape);
  for (const Curve& edge : chains.front()) corners.push_back(at(edge, 0.0));
  const auto around = sides_between(corners, {"bottom", "right", "top", "left"});
  return {around[3], around[1], around[2], around[0]};
}

std::size_t nearest_side(const std::vector<Side>& sides, Point point) {
  std::size_t nearest = 0;
  double least = HUGE_VAL;
  for (std::size_t k = 0; k < sides.size(); ++k) {
    const double away = distance(Curve{sides[k].edge}, point);
    if (away >= least * (1.0 - 1e-9)) continue;  // equal but for rounding
    nearest = k;
    least = away;
  }
  return nearest;
}

}  // namespace barwall::mesh
