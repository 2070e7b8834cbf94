#pragma once

#include <functional>
#include <memory>
#include <vector>

#include "mesh/fitted_grid.hpp"
#include "solver/problem.hpp"

namespace barwall::verify {

/// An arrangement of bars and steel posed as a case would pose it, and what is known of it.
struct Arrangement {
  mesh::Section section;
  std::vector<solver::Material> materials;  ///< one per part
  std::vector<double> currents;             ///< one per part [A], steady
  mesh::Box region;                         ///< where the field is compared [m]
  double near = 0.0;  ///< closer to an outline than this a point counts as near it [m]

  std::function<mesh::Point(mesh::Point)> flux_density;  ///< exact B [T]
  /// A on the outer boundary [Wb/m], where the open boundary's values do not apply.
  std::function<double(mesh::Point)> boundary;

  /// A bar's or a wall's force per metre of run [N/m].
  struct Force {
    int part = -1;
    mesh::Point exact;
  };
  std::vector<Force> forces;

  /// A loop whose inductance [H/m] is known.
  struct Inductance {
    solver::Loop loop;
    double exact = 0.0;
  };
  std::vector<Inductance> inductances;
};

/// Errors of the scheme's solution of an arrangement on a grid, relative:
///
/// 1. B off the outlines: r.m.s. of the vector error over r.m.s. of B, over those of 10000
///    low-discrepancy points of the region, bars and steel included, that lie farther than `near`
///    from every outline;
/// 2. B near the outlines: the same over the other points. One that the exact outline and the
///    grid's chords give to different parts is left out: within the chord's height of an outline
///    it is the place that is in error, not the field;
/// 3. with forces: r.m.s. over the bars of the vector error of J x B over r.m.s. of the force;
/// 4. with forces, unless `boundary` is given, whose boundary would cut the bands of air: the same
///    over bars and walls of the Maxwell stress in the whole band round each;
/// 5. with loops: r.m.s. of the error of their inductances over r.m.s. of these.
std::vector<double> errors_of(const Arrangement& arrangement,
                              std::shared_ptr<const mesh::FittedGrid> grid);

}  // namespace barwall::verify
