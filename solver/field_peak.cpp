#include "solver/field_peak.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>

#include "solver/cycle.hpp"

namespace barwall::solver {

PeakFinder::PeakFinder(int instants) : finer_(8 * instants, instants) {
  for (int row = 0; row < finer_.rows(); ++row) {
    const double wt = std::numbers::pi * row / static_cast<double>(finer_.rows());
    for (int k = 0; k < instants; ++k) finer_(row, k) = odd_interpolation(instants, k, wt);
  }
}

double PeakFinder::peak(std::span<const mesh::Point> values) const {
  assert(static_cast<Eigen::Index>(values.size()) == finer_.cols());
  using Pairs = Eigen::Matrix<double, Eigen::Dynamic, 2, Eigen::RowMajor>;
  static_assert(sizeof(mesh::Point) == 2 * sizeof(double));
  const Eigen::Map<const Pairs> b(&values.front().x, finer_.cols(), 2);
  const Eigen::VectorXd square = (finer_ * b).rowwise().squaredNorm();
  Eigen::Index best = 0;
  square.maxCoeff(&best);
  // A parabola through the largest and its neighbours; the square repeats every half cycle.
  const Eigen::Index n = square.size();
  const double before = square[(best + n - 1) % n];
  const double after = square[(best + 1) % n];
  const double bend = 2.0 * square[best] - before - after;
  const double rise = bend > 0.0 ? 0.125 * (after - before) * (after - before) / bend : 0.0;
  return std::sqrt(square[best] + rise);
}

}  // namespace barwall::solver
