#pragma once

#include <Eigen/Dense>
#include <span>

#include "mesh/point.hpp"

namespace barwall::solver {

/// Finds the largest magnitude that a field, B at one place, has between the instants of half a
/// cycle as well as at them.
class PeakFinder {
public:
  /// \param instants at k pi / n, k = 0 to n - 1; n is even
  explicit PeakFinder(int instants);

  /// \param values at the instants, as many as those
  double peak(std::span<const mesh::Point> values) const;

private:
  /// What each instant counts at places eight times as close, those beyond the half cycle too.
  Eigen::MatrixXd finer_;
};

}  // namespace barwall::solver
