#pragma once

#include <string>
#include <vector>

#include "solver/flux_density.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// Checks Ampere's law along closed paths in air, errors relative to the largest bar current,
/// limits 0.5 %:
/// "long-wire": mean tangential H times 2 pi r on circles at 2, 5 and 20 section sizes against
/// the net current, and round every bar where a circle in air fits against the bar's current;
/// "ampere-loops": along a line at constant clearance round every body, half way to its
/// neighbours, against the current inside.
/// The paths are laid once and serve every solution of the problem, whatever its currents.
class AmpereCheck {
public:
  /// \param bodies groups of parts in contact (mesh::bodies)
  AmpereCheck(const solver::Problem& problem, const std::vector<std::vector<int>>& bodies);

  /// "long-wire", then "ampere-loops".
  std::vector<Check> checks(const solver::Solution& solution,
                            const solver::RecoveredField& field) const;

private:
  struct Circle {
    mesh::Point centre;
    double radius = 0.0;
    int bar = -1;  ///< within it alone; -1: all
    std::string place;
  };
  struct Within {
    std::size_t part = 0;
    double share = 0.0;  ///< of the part's current
  };
  struct Line {
    std::vector<mesh::Point> points;  ///< closed
    std::vector<Within> within;
    std::string place;
  };

  std::vector<Circle> circles_;
  std::string without_circle_;  ///< names of bars that no circle in air fits round
  std::vector<Line> lines_;
};

}  // namespace barwall::verify
