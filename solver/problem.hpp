#pragma once

#include <memory>
#include <vector>

#include "mesh/fitted_grid.hpp"
#include "solver/excitation.hpp"
#include "solver/material.hpp"

namespace barwall::solver {

/// A section on its grid with materials and currents: all that the field depends on.
struct Problem {
  mesh::Section section;
  mesh::Outline outline;
  std::shared_ptr<const mesh::FittedGrid> grid;
  /// A coarser grid of the section, on which a nonlinear solve finds its start; may be null.
  std::shared_ptr<const mesh::FittedGrid> coarse_grid;
  std::vector<Material> materials;  ///< one per part
  Excitation excitation;            ///< one current per part
  std::vector<Loop> loops;          ///< whose inductance is wanted
};

/// True when a part's material has a magnetising curve: the field is then not a sum of fields of
/// single currents.
bool saturable(const Problem& problem);

/// Relative permeability of each of the grid's occupants; air is 1, saturable steel has its initial
/// one.
std::vector<double> permeability_by_region(const Problem& problem);

/// Reluctivity [m/H] of each of the grid's occupants.
std::vector<double> reluctivity_by_region(const Problem& problem);

/// H [A/m] that goes with a flux density B [T] in one of the grid's occupants.
mesh::Point field_strength(const Problem& problem, int region, mesh::Point flux_density);

/// Area of each of the grid's occupants as the triangles make it up [m2].
std::vector<double> area_by_region(const mesh::FittedGrid& grid);

/// Current density [A/m2] of each of the grid's occupants when part k carries `part_current[k]`,
/// spread evenly over the triangles of the part, so that the current is exact on any grid.
std::vector<double> density_by_region(const Problem& problem,
                                      const std::vector<double>& part_current);

}  // namespace barwall::solver
