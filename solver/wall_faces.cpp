#include "solver/wall_faces.hpp"

#include <map>
#include <tuple>

#include "mesh/sides.hpp"

namespace barwall::solver {
namespace {

bool lies_on(const mesh::Curve& curve, const mesh::Segment& edge, double contact) {
  return std::holds_alternative<mesh::Segment>(curve) &&
         distance(mesh::Curve{edge}, at(curve, 0.5)) <= contact;
}

}  // namespace

WallFaces::WallFaces(const Problem& problem) : surfaces_(problem, find_faces(problem)) {}

/// Fills in the faces, and returns the pieces of the outline that are their surfaces.
std::vector<std::size_t> WallFaces::find_faces(const Problem& problem) {
  struct Found {
    WallFace face;
    std::vector<std::size_t> pieces;
  };
  std::map<std::tuple<int, int, std::size_t>, Found> found;  // by part, piece and side
  const mesh::Outline& outline = problem.outline;
  for (std::size_t k = 0; k < outline.pieces.size(); ++k) {
    const mesh::OutlinePiece& piece = outline.pieces[k];
    if (piece.left.part >= 0 && piece.right.part >= 0) continue;
    const mesh::Occupant wall = std::max(piece.left, piece.right);
    const mesh::Part& part = problem.section.parts[static_cast<std::size_t>(wall.part)];
    if (part.kind != mesh::Part::Kind::wall) continue;
    if (!problem.materials[static_cast<std::size_t>(wall.part)].magnetic()) continue;
    const mesh::Shape& shape = part.pieces[static_cast<std::size_t>(wall.piece)];
    const auto sides = mesh::sides(shape);
    if (sides.empty()) continue;
    const std::size_t nearest = nearest_side(sides, at(piece.curve, 0.5));
    const mesh::Side& side = sides[nearest];
    const bool frame = std::holds_alternative<mesh::Frame>(shape);
    auto [place, added] = found.try_emplace({wall.part, wall.piece, nearest});
    Found& entry = place->second;
    if (added) {
      entry.face = {wall.part, wall.piece, side.name, side.normal,
                    frame ? length(mesh::Curve{side.edge}) : 0.0};
    }
    if (!frame && lies_on(piece.curve, side.edge, outline.contact)) {
      entry.face.length += length(piece.curve);
    }
    entry.pieces.push_back(k);
  }
  std::vector<std::size_t> pieces;
  for (const auto& [key, entry] : found) {
    faces_.push_back(entry.face);
    first_surface_.push_back(pieces.size());
    pieces.insert(pieces.end(), entry.pieces.begin(), entry.pieces.end());
  }
  first_surface_.push_back(pieces.size());
  return pieces;
}

PulsatingVector WallFaces::force(const Solution& solution, const RecoveredField& field,
                                 std::size_t k) const {
  PulsatingVector sum;
  for (std::size_t s = first_surface_[k]; s < first_surface_[k + 1]; ++s) {
    sum = sum_of(sum, surfaces_.force(solution, field, s));
  }
  return sum;
}

Pulsation push_of(const WallFace& face, const PulsatingVector& force) {
  return sum_of(sum_of({}, force.x, face.normal.x), force.y, face.normal.y);
}

}  // namespace barwall::solver
