#include "solver/field_peak.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>

#include "solver/local_interpolation.hpp"

namespace barwall::solver {
namespace {

constexpr int steps = 8;  ///< between neighbouring instants

}  // namespace

PeakFinder::PeakFinder() {
  for (int k = -steps; k <= steps; ++k) {
    between_.push_back(local_interpolation(2.5 + 0.5 * static_cast<double>(k) / steps));
  }
}

double PeakFinder::peak(std::span<const mesh::Point> values) const {
  const auto n = static_cast<std::ptrdiff_t>(values.size());
  assert(n >= 6);
  std::ptrdiff_t best = 0;
  for (std::ptrdiff_t k = 1; k < n; ++k) {
    const auto at = [&](std::ptrdiff_t i) { return values[static_cast<std::size_t>(i)]; };
    if (dot(at(k), at(k)) > dot(at(best), at(best))) best = k;
  }
  // On either side of the largest value the middle interval of the six values round it.
  double largest = 0.0;
  for (const std::ptrdiff_t first : {best - 3, best - 2}) {
    std::array<mesh::Point, 6> six;
    for (std::ptrdiff_t i = 0; i < 6; ++i) {
      const std::ptrdiff_t k = first + i;
      const mesh::Point value = values[static_cast<std::size_t>((k + n) % n)];
      six[static_cast<std::size_t>(i)] = k < 0 || k >= n ? -value : value;
    }
    std::array<double, 2 * steps + 1> square{};
    for (std::size_t s = 0; s < square.size(); ++s) {
      mesh::Point b;
      for (std::size_t i = 0; i < 6; ++i) b += between_[s][i] * six[i];
      square[s] = dot(b, b);
    }
    const auto top =
        static_cast<std::size_t>(std::max_element(square.begin(), square.end()) - square.begin());
    largest = std::max(largest, square[top]);
    if (top == 0 || top + 1 == square.size()) continue;
    // A parabola through the largest and its neighbours.
    const double bend = 2.0 * square[top] - square[top - 1] - square[top + 1];
    const double rise = square[top + 1] - square[top - 1];
    if (bend > 0.0) largest = std::max(largest, square[top] + 0.125 * rise * rise / bend);
  }
  return std::sqrt(largest);
}

}  // namespace barwall::solver
