#pragma once

#include <array>

namespace barwall::solver {

/// Factors of six evenly spaced values, at 0 to 5, in the value at `x` of the polynomial through
/// them. In the middle exact to the sixth order, and blind to what lies beyond: what leaps
/// elsewhere in the cycle, as B in saturated steel does when the current changes its sign, does not
/// ring here.
inline std::array<double, 6> local_interpolation(double x) {
  std::array<double, 6> factor{};
  for (int i = 0; i < 6; ++i) {
    double product = 1.0;
    for (int j = 0; j < 6; ++j) {
      if (j != i) product *= (x - j) / (i - j);
    }
    factor[static_cast<std::size_t>(i)] = product;
  }
  return factor;
}

}  // namespace barwall::solver
