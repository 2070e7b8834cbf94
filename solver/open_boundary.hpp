#pragma once

#include <vector>

#include "solver/problem.hpp"

namespace barwall::solver {

/// A pattern of currents, one per part [A], and the far field that goes with it.
struct CurrentPattern {
  std::vector<double> part_current;
  double net = 0.0;      ///< sum of the currents [A]; 0 exactly when it vanishes to rounding
  mesh::Point centroid;  ///< of the currents, where the net current is not 0 [m]

  /// A on the outer boundary [Wb/m]: 0, or -(mu_0 net / 2 pi) ln(distance from centroid / 1 m).
  double boundary_value(mesh::Point at) const;
};

/// Completes a pattern from its currents and the parts' shapes.
CurrentPattern pattern_of(const mesh::Section& section, std::vector<double> part_current);

}  // namespace barwall::solver
