#pragma once

#include <optional>
#include <vector>

#include "solver/fault_extremes.hpp"
#include "solver/fault_series.hpp"
#include "solver/wall_field.hpp"

namespace barwall::solver {

/// What a fault does to a section.
struct FaultSolution {
  PartForces<FaultExtremes> extremes;
  std::vector<FieldLevel> levels;  ///< per part, of the largest field in the fault
  /// At the given closing angle, else at the one with the largest force on a bar.
  FaultSeries series;
  /// With saturable steel the histories of the solves for the extremes, one after the other.
  std::vector<std::vector<NewtonReport>> newton;
  std::optional<Instants> course;      ///< with saturable steel the instants of the series
  std::vector<double> course_seconds;  ///< their times since closing
};

/// Solves the field of a fault's currents, which own nothing to the problem's own, and finds its
/// largest forces. Constant permeability needs one solve of the sustained currents; saturable steel
/// half a turn at the largest scale, and the series' course.
/// \throws SolveError, NewtonError
FaultSolution solve_fault(const Problem& problem, const FaultCurrent& fault,
                          const ForceGeometry& geometry);

}  // namespace barwall::solver
