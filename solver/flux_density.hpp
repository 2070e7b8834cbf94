#pragma once

#include <Eigen/Dense>
#include <cstdint>
#include <vector>

#include "mesh/sampling.hpp"
#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// B of the scheme on one triangle, constant there: (dA/dy, -dA/dx) [T].
mesh::Point cell_flux_density(const mesh::FittedGrid& grid, int triangle,
                              const Eigen::Ref<const Eigen::VectorXd>& potential);

/// The second-order field: A's gradient and second derivatives at every node, once for each
/// occupant that meets there, never averaged across an outline.
///
/// At each node a polynomial is fitted to A over the nodes of the same occupant within two cells
/// (recovery by local least squares: Z. Zhang and A. Naga, SIAM J. Sci. Comput. 26, 2005), here
/// one that satisfies -div grad A = mu J exactly, as A does where the permeability is constant:
/// the source's own quadratic and the harmonic polynomials up to the third degree. In
/// saturable steel they are harmonic in coordinates along and across B that are stretched as the
/// steel differs in reluctivity along and across it.
class RecoveredField {
public:
  explicit RecoveredField(const Solution& solution);

  /// Places: one per node, then one more for each further occupant at a node on an outline.
  int place_count() const { return static_cast<int>(node_of_place_.size()); }
  int node_of_place(int place) const { return node_of_place_[static_cast<std::size_t>(place)]; }
  int region_of_place(int place) const { return region_of_place_[static_cast<std::size_t>(place)]; }
  /// The place of a node as seen from an occupant.
  int place(int node, int region) const;
  /// Places of a triangle's corners.
  std::array<int, 3> places(int triangle) const;

  /// B [T] of one load pattern at a place.
  mesh::Point flux_density(int place, int pattern) const {
    return field_[static_cast<std::size_t>(pattern)][static_cast<std::size_t>(place)].b;
  }

  /// H [A/m] of one load pattern at a place, in the place's own occupant.
  mesh::Point field_strength(int place, int pattern) const;

  /// Root of the summed squares of the r.m.s. of B's components, and B's largest magnitude in the
  /// cycle, at a place [T]. Of steady currents both are |B|.
  double rms(int place) const;
  double peak(int place) const;

  /// The r.m.s. at a point of a triangle [T].
  double rms(const mesh::Location& at, mesh::Point point) const;

  /// B [T] of one load pattern at a point of a triangle: from the three corners' values and
  /// slopes, exact where B is quadratic.
  mesh::Point flux_density(const mesh::Location& at, mesh::Point point, int pattern) const;

  /// A [Wb/m] of one load pattern at a point of a triangle, exact where A is quadratic.
  double potential(const mesh::Location& at, mesh::Point point, int pattern) const;

private:
  friend class CycleRecovery;
  struct Local {
    mesh::Point b;     ///< [T]
    mesh::Point b_dx;  ///< dB/dx [T/m]
    mesh::Point b_dy;  ///< dB/dy [T/m]
  };
  void number_places();
  void fit_place(int place, std::vector<int>& nodes, const std::vector<double>& source,
                 const BhCurve* curve);
  bool gather_window(int node, int region, std::vector<int>& nodes) const;
  void gather_layers(int node, int region, int layers, std::vector<int>& nodes) const;

  const Solution* solution_;
  std::vector<int> node_of_place_;
  std::vector<std::int32_t> region_of_place_;
  std::vector<std::int32_t> first_region_;             ///< per node
  std::vector<std::pair<std::int64_t, int>> further_;  ///< (node * regions + region) -> place
  std::vector<std::vector<Local>> field_;              ///< per pattern, per place
  // Of a cycle that holds more than its fundamental; else empty and made from field_.
  std::vector<std::vector<mesh::Point>> strength_;  ///< per pattern, per place [A/m]
  std::vector<double> rms_;                         ///< per place [T]
  std::vector<double> peak_;                        ///< per place [T]
};

}  // namespace barwall::solver
