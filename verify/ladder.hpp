#pragma once

#include <array>
#include <functional>
#include <memory>
#include <span>
#include <string>
#include <vector>

#include "mesh/fitted_grid.hpp"

namespace barwall::verify {

// The accuracy ladder: problems with known solutions, each solved on three grids of which every
// one has twice the cells of the one before it along both axes. An error falls as a power of the
// spacing; that power, the observed order, tells a sound scheme from a merely close one.

/// Where the observed order has to lie: the scheme is of second order.
struct OrderBand {
  double least = 1.7;
  double most = 2.4;
};
inline constexpr OrderBand second_order{};

/// One measured error of a problem and what it has to be.
struct LadderQuantity {
  std::string name;
  double expected_error = 0.0;  ///< relative, on the middle grid, as measured when it was sound
  OrderBand order = second_order;
};

/// The middle grid's error may be this many times larger, or smaller, than expected. An error
/// far too small is as suspect as one too large.
inline constexpr double error_margin = 2.0;

/// A problem with a known solution.
struct LadderProblem {
  std::string name;
  mesh::Section section;
  mesh::GridOptions grid;  ///< its cells_across is that of the coarsest grid
  std::vector<LadderQuantity> quantities;
  /// Solves on a grid of the section; relative errors, one for each quantity.
  std::function<std::vector<double>(std::shared_ptr<const mesh::FittedGrid>)> errors;
};

/// One line of the ladder: one quantity of one problem.
struct LadderRow {
  std::string problem;
  LadderQuantity quantity;
  std::array<double, 3> error{};  ///< relative, from the coarsest grid to the finest

  /// log2 of the ratio of the two finest grids' errors.
  double order() const;
  bool order_in_band() const;
  bool error_in_band() const;
  bool in_band() const { return order_in_band() && error_in_band(); }
};

/// The grid of a problem with `cells_across` cells across every bar, wall and gap.
std::shared_ptr<const mesh::FittedGrid> grid_of(const LadderProblem& problem, int cells_across);

/// Solves a problem on its three grids. Norms: see the makers of the problems.
std::vector<LadderRow> climb(const LadderProblem& problem);

/// True when there are rows and every one is in its bands.
bool sound(std::span<const LadderRow> rows);

/// The problems of the ladder, in the order they are printed.
std::vector<LadderProblem> ladder_problems();

}  // namespace barwall::verify
