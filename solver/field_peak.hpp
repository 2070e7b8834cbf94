#pragma once

#include <array>
#include <span>
#include <vector>

#include "mesh/point.hpp"

namespace barwall::solver {

/// Finds the largest magnitude that a field, B at one place, has between the instants of half a
/// cycle as well as at them.
class PeakFinder {
public:
  PeakFinder();

  /// \param values at the instants k pi / n, k = 0 to n - 1, n six or more
  double peak(std::span<const mesh::Point> values) const;

private:
  /// For places on both sides of the third of six values, what each of these counts.
  std::vector<std::array<double, 6>> between_;
};

}  // namespace barwall::solver
