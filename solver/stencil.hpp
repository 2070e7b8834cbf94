#pragma once

#include <cstddef>
#include <vector>

namespace barwall::solver {

/// A symmetric nine-point operator on columns x rows nodes: for each node its diagonal and its
/// couplings to the right, up, upper right and upper left; the other four follow by symmetry.
/// Couplings that would leave the grid are zero.
template <class Scalar>
struct Stencil {
  int columns = 0;
  int rows = 0;
  std::vector<Scalar> diagonal, right, up, up_right, up_left;

  Stencil(int columns_, int rows_)
      : columns(columns_),
        rows(rows_),
        diagonal(size()),
        right(size()),
        up(size()),
        up_right(size()),
        up_left(size()) {}

  std::size_t size() const {
    return static_cast<std::size_t>(columns) * static_cast<std::size_t>(rows);
  }

  /// Adds `value` to the coupling of two neighbouring nodes, in either order, or, when they are
  /// the same, to the diagonal.
  void add(int first, int second, Scalar value) {
    const int low = first < second ? first : second;
    const int step = first < second ? second - first : first - second;
    const auto n = static_cast<std::size_t>(low);
    if (step == 0) {
      diagonal[n] += value;
    } else if (step == 1) {
      right[n] += value;
    } else if (step == columns) {
      up[n] += value;
    } else if (step == columns + 1) {
      up_right[n] += value;
    } else {
      up_left[n] += value;
    }
  }
};

/// y = K x over all nodes; x and y hold columns * rows values, node (i, j) at j * columns + i.
template <class Scalar, class In, class Out>
void apply(const Stencil<Scalar>& k, const In& x, Out& y) {
  const int c = k.columns;
  for (int j = 0; j < k.rows; ++j) {
    for (int i = 0; i < c; ++i) {
      const int n = j * c + i;
      const auto at = [](int m) { return static_cast<std::size_t>(m); };
      Scalar sum = k.diagonal[at(n)] * x[n];
      if (i + 1 < c) sum += k.right[at(n)] * x[n + 1];
      if (i > 0) sum += k.right[at(n - 1)] * x[n - 1];
      if (j + 1 < k.rows) {
        sum += k.up[at(n)] * x[n + c];
        if (i + 1 < c) sum += k.up_right[at(n)] * x[n + c + 1];
        if (i > 0) sum += k.up_left[at(n)] * x[n + c - 1];
      }
      if (j > 0) {
        sum += k.up[at(n - c)] * x[n - c];
        if (i > 0) sum += k.up_right[at(n - c - 1)] * x[n - c - 1];
        if (i + 1 < c) sum += k.up_left[at(n - c + 1)] * x[n - c + 1];
      }
      y[n] = sum;
    }
  }
}

}  // namespace barwall::solver
