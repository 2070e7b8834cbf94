#pragma once

#include <vector>

#include "solver/flux_density.hpp"

namespace barwall::solver {

/// Gathers the recovered fields at the instants of half a cycle, k pi / n, into the recovered field
/// over the cycle, one at a time so that never all of them are held.
class CycleRecovery {
public:
  /// \param instants n, even
  explicit CycleRecovery(int instants);

  /// Takes the next instant's field.
  void add(const RecoveredField& field);

  /// The field of a solution that holds the fundamental, once all instants are in: its fundamental
  /// phasors of B and H, and r.m.s. and peak of all that B does in the cycle.
  RecoveredField over_cycle(const Solution& fundamental);

private:
  int instants_;
  std::vector<RecoveredField> gathered_;     ///< empty, or one
  std::vector<std::vector<mesh::Point>> b_;  ///< per instant, per place [T]
};

}  // namespace barwall::solver
