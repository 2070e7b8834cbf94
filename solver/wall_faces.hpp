#pragma once

#include <string>
#include <vector>

#include "solver/surface_force.hpp"

namespace barwall::solver {

/// What a face is, in a sentence for whoever reads its figures.
inline constexpr const char* wall_face_rule =
    "A face is one side of a wall's shape with all the surface in air that lies nearest to it; of "
    "a "
    "frame that is a panel, its outer and its inner surface, cut at the mitres. Its push is along "
    "the side's outward normal. Its mean pressure is the push over the side's length in air, for a "
    "frame's panel over its whole outer length.";

/// A side of a wall's shape, see `wall_face_rule`. Surface in contact with another part, covered or
/// cut away counts to none; what an opening lays bare counts to the side nearest to its middle.
struct WallFace {
  int part = -1;
  int piece = 0;        ///< of the part, from 0
  std::string side;     ///< "left", "right", "top", "bottom" (before turning), or "side 1" ...
  mesh::Point normal;   ///< unit, out of the wall's shape; for a frame's panel out of the frame
  double length = 0.0;  ///< that the mean pressure is taken over [m]; 0 when none of the side is in
                        ///< air, only what an opening lays bare
};

/// The faces of a problem's walls of magnetic material that are made of rectangles, frames and
/// polygons. The static field pulls at no other wall; tubes and rounds have no faces.
class WallFaces {
public:
  explicit WallFaces(const Problem& problem);

  /// By part, piece and the order of the shape's sides.
  const std::vector<WallFace>& faces() const { return faces_; }

  /// The force on the k-th face over the cycle, per metre of run [N/m].
  /// \param solution of the problem that this was made for, or of one that differs in its currents
  ///        and materials alone
  PulsatingVector force(const Solution& solution, const RecoveredField& field, std::size_t k) const;

private:
  std::vector<std::size_t> find_faces(const Problem& problem);

  std::vector<WallFace> faces_;
  std::vector<std::size_t> first_surface_;  ///< of each face, and one past the last face's last
  SurfaceForces surfaces_;                  ///< those of a face one after the other
};

/// The part of a face's force along its normal: positive when the face is drawn outward [N/m].
Pulsation push_of(const WallFace& face, const PulsatingVector& force);

}  // namespace barwall::solver
