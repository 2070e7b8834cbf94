#pragma once

#include <Eigen/Core>
#include <optional>

#include "mesh/point.hpp"
#include "solver/cycle.hpp"
#include "solver/fault_current.hpp"

namespace barwall::solver {

// The largest forces of a fault.
//
// Where they are quadratic in its currents, as they are while no permeability depends on the field,
// the force at an instant is scale^2 times that of the sustained currents at the same angle
// (fault_current.hpp). With the worst closing angle every angle can be had at every instant, so
// that the extremes are those of the sustained currents times the square of the largest scale:
// exact, without a search in time. With a given closing angle, time is searched.
//
// With saturable steel the force at the largest scale is found for every angle, and over the first
// cycle for a given closing; forces are taken to be largest where the currents are.

/// A force in the currents of the bars named: F = sum over j, k of i_j i_k f_jk, per metre of run.
/// Symmetric, one row and column per bar named [N/m per A^2].
struct QuadraticForce {
  Eigen::MatrixXd x;
  Eigen::MatrixXd y;
};

/// The force of the sustained currents: over the cycle, or of steady currents a mean alone. The
/// same comes from a solution with sustained_excitation.
PulsatingVector sustained_force(const FaultCurrent& fault, const QuadraticForce& force);

/// The smallest or largest value that a component takes.
struct FaultExtreme {
  double value = 0.0;             ///< [N/m]
  std::optional<double> seconds;  ///< after closing; absent: approached, or at an unknown instant
  /// Of the first bar's driving voltage, worst: 0 <= closing < pi [rad]; absent where any will do
  /// and for direct current.
  std::optional<double> closing;
};

/// The largest magnitude.
struct FaultPeak {
  double magnitude = 0.0;  ///< [N/m]
  mesh::Point value;       ///< the force itself, whose direction it is
  std::optional<double> seconds;
  std::optional<double> closing;
};

struct FaultExtremes {
  FaultExtreme x_max, x_min, y_max, y_min;
  FaultPeak peak;
};

/// From closing on, when nothing flows yet, so that x_min and y_min are 0 or less. With a given
/// closing angle the first ten cycles are searched, more until the offset has fallen to a
/// hundredth, at most 150; and, where it has, the sustained currents that are approached. Without
/// resistance the first cycle repeats.
FaultExtremes extremes_of(const FaultCurrent& fault, const PulsatingVector& sustained);

/// Where every angle can be had at every instant: a direct current, or the worst closing angle.
/// \param at_largest the force over the angle, the currents at their largest scale
FaultExtremes extremes_at_largest_scale(const FaultCurrent& fault,
                                        const PulsatingVector& at_largest);

/// For a given closing angle.
/// \param first_cycle the force at wt = k 2 pi / n, k = 0 to n, since closing
/// \param sustained the force of the sustained currents, which are approached
FaultExtremes extremes_over_first_cycle(const AlternatingFault& fault,
                                        const std::vector<mesh::Point>& first_cycle,
                                        const PulsatingVector& sustained);
FaultExtremes extremes_of(const FaultCurrent& fault, const QuadraticForce& force);

}  // namespace barwall::solver
