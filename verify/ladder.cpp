#include "verify/ladder.hpp"

#include <algorithm>
#include <cmath>

namespace barwall::verify {

double LadderRow::order() const {
  return std::log2(error[1] / error[2]);
}

bool LadderRow::order_in_band() const {
  return order() >= quantity.order.least && order() <= quantity.order.most;  // false for NaN
}

bool LadderRow::error_in_band() const {
  return error[1] <= error_margin * quantity.expected_error &&
         error[1] >= quantity.expected_error / error_margin;
}

std::shared_ptr<const mesh::FittedGrid> grid_of(const LadderProblem& problem, int cells_across) {
  mesh::GridOptions options = problem.grid;
  options.cells_across = cells_across;
  return std::make_shared<mesh::FittedGrid>(
      make_grid(problem.section, outline_of(problem.section), options));
}

std::vector<LadderRow> climb(const LadderProblem& problem) {
  std::vector<LadderRow> rows;
  for (const LadderQuantity& quantity : problem.quantities)
    rows.push_back({problem.name, quantity});
  int cells_across = problem.grid.cells_across;
  for (std::size_t step = 0; step < 3; ++step, cells_across *= 2) {
    const auto errors = problem.errors(grid_of(problem, cells_across));
    for (std::size_t k = 0; k < rows.size(); ++k) rows[k].error[step] = errors.at(k);
  }
  return rows;
}

bool sound(std::span<const LadderRow> rows) {
  return !rows.empty() &&
         std::all_of(rows.begin(), rows.end(), [](const LadderRow& row) { return row.in_band(); });
}

}  // namespace barwall::verify
