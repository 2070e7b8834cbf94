#pragma once

#include <array>
#include <functional>
#include <memory>
#include <span>
#include <string>
#include <vector>

#include "mesh/fitted_grid.hpp"

namespace barwall::verify {

// The accuracy ladder: problems with known solutions, each solved on three grids, every one with
// each interval of the one before it halved. An error falls as a power of the spacing; that power,
// the observed order, tells a sound scheme from one that is merely close.

/// Cells across every bar, wall and gap on the three grids.
inline constexpr std::array<int, 3> ladder_cells{3, 6, 12};

/// A band that a value has to lie in.
struct Band {
  double least = 0.0;
  double most = 0.0;

  bool holds(double value) const { return value >= least && value <= most; }  // false for NaN
};

/// The scheme is of second order.
inline constexpr Band second_order{1.7, 2.4};
/// Beside a curved outline nodes were moved by shares of the spacing that change from one to the
/// next, and the error of A changes with them: B is of first order in a layer one cell thick.
/// Over a region of fixed width r.m.s. errors then fall with the power 1.5, more before the layer
/// has come to dominate.
inline constexpr Band layer_order{1.2, 2.4};

/// The error on the middle grid may be twice what it was when the ladder was set up, or a quarter
/// of it: an error far too small is as suspect as one too large.
constexpr Band error_band(double measured) {
  return {0.25 * measured, 2.0 * measured};
}

/// One error of a problem and what it has to be.
struct LadderQuantity {
  std::string name;
  Band error;  ///< relative, on the middle grid
  Band order = second_order;
};

/// A problem with a known solution.
struct LadderProblem {
  std::string name;
  mesh::Section section;
  mesh::GridOptions grid;  ///< all but cells_across
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
  bool in_band() const;
};

/// The grid of a problem.
std::shared_ptr<const mesh::FittedGrid> grid_of(const LadderProblem& problem, int cells_across);

/// Solves a problem on its three grids. The norms are those of errors_of (verify/arrangement.hpp)
/// and error_of (verify/manufactured.hpp).
/// \throws solver::SolveError, mesh::GridError
std::vector<LadderRow> climb(const LadderProblem& problem);

/// The problems of the ladder, in the order they are printed.
std::vector<LadderProblem> ladder_problems();

}  // namespace barwall::verify
