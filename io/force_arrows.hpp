#pragma once

#include <string>
#include <vector>

#include "io/frame.hpp"
#include "io/label_placement.hpp"
#include "io/results.hpp"

namespace barwall::io {

/// A force per metre of run [N/m] and where its arrow starts [m].
struct ForceArrow {
  std::string name;  ///< of the bar, wall or body
  mesh::Point at;
  mesh::Point force;
};

/// The forces on bars, walls and bodies of parts in contact; with a frequency each one's peak, in
/// its direction. A bar's starts at its centroid, another's at the outline that it pushes on.
std::vector<ForceArrow> force_arrows(const Results& results);

/// Pixels per N/m.
struct ArrowScale {
  double pixels = 0.0;
  double reference = 0.0;  ///< a round force for the scale's own arrow [N/m]; 0: no forces
  double least = 0.0;      ///< smaller forces get no arrow [N/m]
};
ArrowScale arrow_scale(const std::vector<ForceArrow>& arrows, double pixels_per_metre);

void draw_arrow(Canvas& canvas, PagePoint from, PagePoint to);

/// Draws the arrows and blocks their places for labels.
void draw_forces(Canvas& canvas, const std::vector<ForceArrow>& arrows, const ArrowScale& scale,
                 const Frame& frame, LabelPlacement& labels);

}  // namespace barwall::io
