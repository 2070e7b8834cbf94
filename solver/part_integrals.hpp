#pragma once

#include <vector>

#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// Integrals of A and B over every occupant of a solution's grid, all taken in one pass: what
/// forces on currents, flux linkages and inductances are made of.
class PartIntegrals {
public:
  explicit PartIntegrals(const Solution& solution);

  const Solution& solution() const { return *solution_; }

  /// A part's area as the triangles make it up [m2].
  double area(int part) const;
  /// Mean of A over a part [Wb/m] in one load pattern.
  double mean_potential(int part, int pattern) const;
  /// Mean of A over a part for 1 A in the bar `unit_bars[unit]` alone [Wb/(m A)].
  double mean_unit_potential(int part, int unit) const;
  /// With saturable steel, change of the mean of A over a part with the current in that bar, at the
  /// operating point [Wb/(m A)].
  double mean_unit_change(int part, int unit) const;
  /// J x B over a part, or over one of its pieces (piece >= 0), per metre of run [N/m]: the force
  /// on the currents of load pattern `current` in the field of pattern `field`.
  mesh::Point lorentz_force(int part, int piece, int current, int field) const;

private:
  double mean(const Eigen::MatrixXd& integral, int part, int column) const;

  const Solution* solution_;
  std::vector<std::vector<std::size_t>> regions_;  ///< per part: its occupants
  std::vector<double> area_;                       ///< per occupant [m2]
  Eigen::MatrixXd potential_;       ///< integral of A over occupants, a column per load [Wb m]
  Eigen::MatrixXd unit_potential_;  ///< the same of the unit fields
  Eigen::MatrixXd unit_change_;     ///< and of their changes at the operating point
  std::vector<std::vector<mesh::Point>> flux_;  ///< per load, per occupant: integral of B [T m2]
  std::vector<std::vector<double>> density_;    ///< per load, per occupant [A/m2]
};

}  // namespace barwall::solver
