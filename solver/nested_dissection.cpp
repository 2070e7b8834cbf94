#include "solver/nested_dissection.hpp"

namespace barwall::solver {
namespace {

struct Block {
  int i0, i1, j0, j1;  ///< half open
};

void dissect(const Block& block, int columns, std::vector<int>& order) {
  const int width = block.i1 - block.i0;
  const int height = block.j1 - block.j0;
  if (width <= 0 || height <= 0) return;
  if (width * height <= 36) {
    for (int j = block.j0; j < block.j1; ++j) {
      for (int i = block.i0; i < block.i1; ++i) order.push_back(j * columns + i);
    }
    return;
  }
  if (width >= height) {
    const int middle = block.i0 + width / 2;
    dissect({block.i0, middle, block.j0, block.j1}, columns, order);
    dissect({middle + 1, block.i1, block.j0, block.j1}, columns, order);
    for (int j = block.j0; j < block.j1; ++j) order.push_back(j * columns + middle);
  } else {
    const int middle = block.j0 + height / 2;
    dissect({block.i0, block.i1, block.j0, middle}, columns, order);
    dissect({block.i0, block.i1, middle + 1, block.j1}, columns, order);
    for (int i = block.i0; i < block.i1; ++i) order.push_back(middle * columns + i);
  }
}

}  // namespace

std::vector<int> nested_dissection(int columns, int rows) {
  std::vector<int> order;
  order.reserve(static_cast<std::size_t>(columns) * static_cast<std::size_t>(rows));
  dissect({0, columns, 0, rows}, columns, order);
  return order;
}

}  // namespace barwall::solver
