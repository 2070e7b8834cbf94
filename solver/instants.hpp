#pragma once

#include <Eigen/Dense>
#include <functional>
#include <memory>
#include <numbers>
#include <vector>

#include "solver/magnetostatics.hpp"

namespace barwall::solver {

// With saturable steel a field is not a sum of the fields of single currents. Currents that change
// are then solved instant by instant, as steady ones.

/// How the currents of a section go from one instant to the last.
struct Course {
  /// Currents [A], one per part, at wt [rad].
  std::function<std::vector<double>(double wt)> currents;
  double end = std::numbers::pi;  ///< instants from wt = 0 to here [rad]
  /// The currents at the end are minus those at the start, and so on: half a cycle of alternating
  /// current. The end itself is then no instant.
  bool half_cycle = true;
};

/// Half a cycle of alternating currents, scaled: scale sqrt(2) Re(I exp(j wt)).
Course half_cycle_of(const Excitation& excitation, double scale = 1.0);

/// Solutions at evenly spaced instants, in order.
struct Instants {
  bool half_cycle = true;                                 ///< see Course
  std::vector<double> wt;                                 ///< [rad]
  std::vector<std::shared_ptr<const Solution>> solution;  ///< of steady currents, without loops
  /// How far the field at the instants added last was from what the others had foretold: the
  /// largest energy norm of a difference, relative to the field's own largest.
  double surprise = 0.0;
  std::size_t strongest = 0;  ///< the one whose field has the largest energy

  std::size_t size() const { return wt.size(); }
};

/// No course is divided into more intervals than this.
inline constexpr int most_instants = 48;

struct InstantOptions {
  int first = 6;           ///< intervals to begin with, even for half a cycle
  int most = most_instants; ///< intervals at most
  double surprise = 1e-2;  ///< no more instants are added once they hold no more surprise than this
};

/// Solves a course of currents. The first instants are solved on their own, from the coarse grid;
/// then one is added in the middle of every interval, started from what those around it foretell,
/// until they foretell it well. What is found does not depend on the number of threads.
/// \param problem its own currents count for nothing
/// \throws SolveError, NewtonError of the first instant that fails
Instants solve_instants(const Problem& problem, const Course& course,
                        const InstantOptions& options = {});

/// What stands for a problem with alternating currents and saturable steel where one field is
/// wanted: the fundamental of A; reluctivity, and 1 A in the bars of loops, at the strongest
/// instant. \throws SolveError
Solution fundamental_of(std::shared_ptr<const Problem> problem, const Instants& half_cycle);

/// The solution of an instant once more, with its problem's loops.
/// \throws SolveError
Solution with_loops(const Solution& instant, const std::vector<Loop>& loops);

}  // namespace barwall::solver
