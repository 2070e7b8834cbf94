#pragma once

#include <vector>

#include "mesh/fitted_grid.hpp"

namespace barwall::mesh {

/// A place from which no way leads out but through a ring of chosen parts.
struct Hollow {
  std::vector<int> ring;         ///< the chosen parts that close round it, by index, ascending
  std::vector<Occupant> within;  ///< what else lies in it, also inside rings within it, ascending
};

/// The hollows that chosen parts enclose, outer ones before those within them.
///
/// Told by the grid's triangles, so that painting, openings and contact are as the field sees them:
/// chosen parts hold together where their triangles share a node, everything else where they share
/// an edge. A hollow that something fills entirely is one too.
/// \param chosen one per part of the section
std::vector<Hollow> hollows(const FittedGrid& grid, const std::vector<bool>& chosen);

}  // namespace barwall::mesh
