#pragma once

#include <vector>

#include "solver/cycle.hpp"
#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// J x B over a part, or over one of its pieces (piece >= 0), per metre of run [N/m]: the force
/// on the currents of load pattern `current` in the field of pattern `field`.
mesh::Point lorentz_force(const Solution& solution, int part, int piece, int current, int field);

/// Lorentz force over the cycle; steady currents have a mean alone.
PulsatingVector lorentz_force(const Solution& solution, int part, int piece = -1);

/// Where the stress round a body is taken: the band of air in which the weight falls from 1 at
/// share `from` of the way to the next body to 0 at share `to`. Shares are of the distances,
/// d / (d + d'), d to the body and d' to the nearest other one.
struct Band {
  double from = 0.1;
  double to = 0.9;
};

inline constexpr Band whole_band{0.1, 0.9};
inline constexpr Band inner_band{0.1, 0.5};
inline constexpr Band outer_band{0.5, 0.9};

/// Distances of the grid's nodes from bodies, from which bands are laid.
class StressBands {
public:
  /// \param bodies groups of parts in contact (mesh::bodies)
  StressBands(const Solution& solution, std::vector<std::vector<int>> bodies);

  const std::vector<std::vector<int>>& bodies() const { return bodies_; }

  /// Maxwell stress in a band of air round a body, per metre of run [N/m]: minus the integral of
  /// T grad w, w the band's weight (the "eggshell" form of the closed surface integral).
  PulsatingVector force(int body, const Band& band) const;

private:
  double weight(int body, int node, const Band& band) const;

  const Solution* solution_;
  std::vector<std::vector<int>> bodies_;
  std::vector<int> body_of_part_;
  int first_column_ = 0, last_column_ = 0, first_row_ = 0, last_row_ = 0;
  std::vector<std::vector<double>> distance_;  ///< per body, per node [m]
  double cap_ = 0.0;
};

}  // namespace barwall::solver
