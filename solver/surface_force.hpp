#pragma once

#include <array>
#include <vector>

#include "solver/cycle.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {

/// The force on single surfaces that face air, from Maxwell's stress T: what each piece of an
/// outline takes of its body's force.
///
/// Towards a corner of steel the field grows as r^(-1/3) and the stress as r^(-2/3): a tenth of a
/// plate's load may lie within a cell of its corners, where no grid's stress is right. The push
/// along a straight surface's normal is therefore the work that the air's stress does when the
/// surface moves outward by one while every other surface rests or slides in itself (virtual work:
/// J. L. Coulomb, IEEE Trans. Magn. 19, 1983, from memory): minus the integral of T grad v, v the
/// displacement, which does not jump at the corners. Work of shear on the surfaces that slide is
/// taken off. The error falls at least as the spacing does; at cells_across = 4, beside a
/// right-angled corner of high permeability, it is 0.2 %, beside one of 30 degrees 0.8 %.
///
/// Shear, and the force on curved surfaces, are sums over the grid's edges, of B's normal component
/// as A differs along the edge and mu_0 times the tangential H in the steel behind. Shear is small
/// beside the push but at corners that saturate, where it gathers more closely than a grid tells:
/// what is missed of it counts as push of the surface that meets there. In a duct a third of which
/// is saturated that was 0.9 % of the largest push.
class SurfaceForces {
public:
  /// \param pieces of the problem's outline, by index, each with air on one side
  SurfaceForces(const Problem& problem, const std::vector<std::size_t>& pieces);

  /// The force on the k-th of the pieces over the cycle, per metre of run [N/m].
  /// \param solution of the problem that this was made for, or of one that differs in its currents
  ///        and materials alone
  PulsatingVector force(const Solution& solution, const RecoveredField& field, std::size_t k) const;

private:
  /// An edge of the grid between the air and what it surrounds.
  struct Edge {
    int from = 0;
    int to = 0;
    int region = 0;      ///< of what is not air
    mesh::Point normal;  ///< unit, into the air
    double length = 0.0;
    mesh::Point slip;  ///< displacement at the middle whose work is taken off, per unit of push
  };
  /// A triangle of air with the displacements of its corners, per unit of push.
  struct Moved {
    int triangle = 0;
    std::array<mesh::Point, 3> by;
  };
  struct Surface {
    bool straight = true;
    mesh::Point normal;  ///< of a straight one, unit, into the air
    std::vector<Edge> edges;
    std::vector<Moved> moved;
    std::vector<Edge> slid;
  };
  class Displacement;

  static std::vector<std::vector<Edge>> edges_of_pieces(const Problem& problem);
  static std::vector<Moved> band_of(const Problem& problem, const Displacement& displacement);

  std::vector<Surface> surfaces_;
};

}  // namespace barwall::solver
