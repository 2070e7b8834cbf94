#pragma once

#include <memory>

#include "solver/constants.hpp"
#include "tests/support/problems.hpp"

namespace barwall::support {

/// A steel of our own making: knee near 1.5 T.
inline std::shared_ptr<const solver::BhCurve> test_steel() {
  static const auto curve =
      std::make_shared<const solver::BhCurve>(solver::make_bh_curve({{0, 0},
                                                                     {50, 0.05},
                                                                     {100, 0.16},
                                                                     {200, 0.45},
                                                                     {400, 0.85},
                                                                     {700, 1.12},
                                                                     {1200, 1.33},
                                                                     {2500, 1.52},
                                                                     {5000, 1.66},
                                                                     {10000, 1.79},
                                                                     {20000, 1.92},
                                                                     {40000, 2.03},
                                                                     {80000, 2.12},
                                                                     {160000, 2.23}}));
  return curve;
}

/// A curve that is a straight line of the given permeability up to 2 T.
inline std::shared_ptr<const solver::BhCurve> straight_line(double relative_permeability) {
  std::vector<solver::BhPoint> points;
  for (double b : {0.0, 0.4, 0.7, 1.3, 2.0}) {
    points.push_back({b * solver::nu_0 / relative_permeability, b});
  }
  return std::make_shared<const solver::BhCurve>(solver::make_bh_curve(std::move(points)));
}

/// The problem with the last part of saturable steel, and a coarse grid to start from.
inline std::shared_ptr<solver::Problem> with_curve(std::shared_ptr<solver::Problem> problem,
                                                   std::shared_ptr<const solver::BhCurve> curve) {
  problem->materials.back() = solver::saturable_material("steel", std::move(curve));
  mesh::GridOptions options;
  options.cells_across = 2;
  if (solver::has_net_current(problem->excitation)) options.wide = 42.0;
  problem->coarse_grid =
      std::make_shared<mesh::FittedGrid>(make_grid(problem->section, problem->outline, options));
  return problem;
}

/// B [T] that goes with H [A/m] on a curve.
inline double flux_density_of(const solver::BhCurve& curve, double field) {
  double low = 0.0;
  double high = 10.0 + solver::mu_0 * field;
  for (int k = 0; k < 200; ++k) {
    const double middle = 0.5 * (low + high);
    (curve.field(middle) < field ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

}  // namespace barwall::support
