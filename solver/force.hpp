#pragma once

#include <vector>

#include "solver/constants.hpp"
#include "solver/cycle.hpp"
#include "solver/part_integrals.hpp"

namespace barwall::solver {

/// Maxwell's stress in air through a surface: its vector area [m], or its unit normal for the
/// stress itself [Pa], bilinear in two fields [T].
inline mesh::Point maxwell_stress(mesh::Point f, mesh::Point g, mesh::Point surface) {
  return (0.5 * nu_0) * (dot(g, surface) * f + dot(f, surface) * g - dot(f, g) * surface);
}

/// J x B over a part, or over one of its pieces (piece >= 0), over the cycle, per metre of run
/// [N/m]; steady currents have a mean alone.
PulsatingVector lorentz_force(const PartIntegrals& integrals, int part, int piece = -1);

/// True for a bar of mu_r = 1: J x B is then all the force on it, and exact.
bool lorentz_alone(const Problem& problem, int part);

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

/// The air round every body of a problem, from which bands are laid: at the nodes the share of
/// the way to the next body.
class StressBands {
public:
  /// \param bodies groups of parts in contact (mesh::bodies)
  StressBands(const Problem& problem, std::vector<std::vector<int>> bodies);

  const std::vector<std::vector<int>>& bodies() const { return bodies_; }

  /// Maxwell stress in a band of air round a body, per metre of run [N/m]: minus the integral of
  /// T grad w, w the band's weight (the "eggshell" form of the closed surface integral).
  /// \param solution of the problem that the bands were made for
  PulsatingVector force(const Solution& solution, int body, const Band& band) const;

private:
  /// The nodes round one body: a window of the grid, row by row.
  struct Surroundings {
    int first_column = 0, last_column = -1, first_row = 0, last_row = -1;
    std::vector<double> share;  ///< of the way to the next body [1]; 1 where no band reaches

    double at(int i, int j) const {
      const int columns = last_column - first_column + 1;
      return share[static_cast<std::size_t>((j - first_row) * columns + i - first_column)];
    }
  };

  std::vector<std::vector<int>> bodies_;
  std::vector<Surroundings> around_;  ///< per body
};

}  // namespace barwall::solver
