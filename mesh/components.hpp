#pragma once

#include <algorithm>
#include <numeric>
#include <vector>

namespace barwall::mesh {

/// Triangles joined into components; a component is known by its first triangle.
class Components {
public:
  explicit Components(int triangles) : parent_(static_cast<std::size_t>(triangles)) {
    std::iota(parent_.begin(), parent_.end(), 0);
  }
  int of(int triangle) {
    while (parent(triangle) != triangle) {
      parent(triangle) = parent(parent(triangle));
      triangle = parent(triangle);
    }
    return triangle;
  }
  void join(int first, int second) {
    const auto [low, high] = std::minmax({of(first), of(second)});
    parent(high) = low;
  }

private:
  int& parent(int triangle) { return parent_[static_cast<std::size_t>(triangle)]; }

  std::vector<int> parent_;
};

}  // namespace barwall::mesh
