#pragma once

#include <memory>

#include "solver/figures.hpp"
#include "tests/support/problems.hpp"

namespace barwall::support {

/// A problem solved and ready to be asked.
struct Solved {
  std::shared_ptr<const solver::Problem> problem;
  std::shared_ptr<const solver::Solution> solution;
  std::shared_ptr<const solver::RecoveredField> field;
  std::shared_ptr<const solver::PartIntegrals> integrals;
  std::shared_ptr<const solver::ForceGeometry> geometry;

  mesh::Point b(mesh::Point at, int pattern = 0) const {
    return field->flux_density(locate(*problem->grid, problem->section, at), at, pattern);
  }
  solver::Figures figures(const std::vector<solver::Probe>& probes = {}) const {
    return figures_of(*problem, *geometry, readings_of(*integrals, *field, *geometry, probes),
                      probes, {});
  }
  /// The value at an address; NaN when there is none.
  double value(const solver::Figures& from, const std::string& address) const {
    for (const auto& [name, figure] : addresses(from)) {
      if (name == address) return figure->value;
    }
    return solver::not_given;
  }
};

inline Solved solved(std::shared_ptr<solver::Problem> problem) {
  Solved result;
  result.problem = problem;
  auto solution = std::make_shared<solver::Solution>(solve(problem));
  result.field = std::make_shared<solver::RecoveredField>(*solution);
  result.integrals = std::make_shared<solver::PartIntegrals>(*solution);
  result.geometry = std::make_shared<solver::ForceGeometry>(*problem);
  result.solution = std::move(solution);
  return result;
}

}  // namespace barwall::support
