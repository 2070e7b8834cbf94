#include "mesh/section.hpp"

#include <algorithm>

namespace barwall::mesh {
namespace {

int piece_at(const std::vector<Shape>& pieces, Point point) {
  for (std::size_t k = 0; k < pieces.size(); ++k) {
    if (contains(pieces[k], point)) return static_cast<int>(k);
  }
  return -1;
}

bool cut_away(const Section& section, int part, Point point) {
  return std::any_of(section.openings.begin(), section.openings.end(), [&](const Opening& o) {
    return std::find(o.through.begin(), o.through.end(), part) != o.through.end() &&
           piece_at(o.pieces, point) >= 0;
  });
}

}  // namespace

double area(const Part& part) {
  double sum = 0.0;
  for (const Shape& piece : part.pieces) sum += area(piece);
  return sum;
}

Point centroid(const Part& part) {
  Point moment;
  for (const Shape& piece : part.pieces) moment += area(piece) * centroid(piece);
  return (1.0 / area(part)) * moment;
}

Occupant occupant_at(const Section& section, Point point) {
  for (const auto kind : {Part::Kind::bar, Part::Kind::wall}) {
    for (std::size_t k = section.parts.size(); k-- > 0;) {
      const Part& part = section.parts[k];
      if (part.kind != kind) continue;
      const int piece = piece_at(part.pieces, point);
      if (piece < 0 || cut_away(section, static_cast<int>(k), point)) continue;
      return part.empty ? Occupant{} : Occupant{static_cast<int>(k), piece};
    }
  }
  return {};
}

Box bounds(const Section& section) {
  Box box;
  for (const Part& part : section.parts) {
    for (const Shape& piece : part.pieces) box.include(bounds(piece));
  }
  return box;
}

double half_size(const Section& section) {
  const Box box = bounds(section);
  return 0.5 * std::max(box.width(), box.height());
}

}  // namespace barwall::mesh
