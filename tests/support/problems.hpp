#pragma once

#include <memory>

#include "solver/problem.hpp"

namespace barwall::support {

/// How a test problem is gridded.
struct TestGrid {
  int cells_across = 4;
  double reach = 400.0;
  mesh::Box probes = {};  ///< the fine zone covers this too
};

/// A section with its outlines, grid, permeabilities and currents; steady unless a frequency is
/// given.
inline std::shared_ptr<solver::Problem> problem_of(mesh::Section section,
                                                   const std::vector<double>& permeability,
                                                   const std::vector<std::complex<double>>& current,
                                                   const TestGrid& grid = {},
                                                   double frequency_hz = 0.0) {
  auto problem = std::make_shared<solver::Problem>();
  problem->section = std::move(section);
  problem->outline = outline_of(problem->section);
  mesh::GridOptions options;
  options.cells_across = grid.cells_across;
  options.reach = grid.reach;
  options.fine = grid.probes;
  if (solver::has_net_current({frequency_hz, current})) options.wide = 42.0;
  problem->grid =
      std::make_shared<mesh::FittedGrid>(make_grid(problem->section, problem->outline, options));
  for (double mu : permeability) problem->materials.push_back({"test", mu});
  problem->excitation.current = current;
  problem->excitation.frequency_hz = frequency_hz;
  return problem;
}

}  // namespace barwall::support
