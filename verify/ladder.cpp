#include "verify/ladder.hpp"

#include <cmath>

namespace barwall::verify {

double LadderRow::order() const {
  return std::log2(error[1] / error[2]);
}

bool LadderRow::in_band() const {
  return quantity.order.holds(order()) && quantity.error.holds(error[1]);
}

std::shared_ptr<const mesh::FittedGrid> grid_of(const LadderProblem& problem, int cells_across) {
  mesh::GridOptions options = problem.grid;
  options.cells_across = cells_across;
  return std::make_shared<mesh::FittedGrid>(
      make_grid(problem.section, outline_of(problem.section), options));
}

std::vector<LadderRow> climb(const LadderProblem& problem) {
  std::vector<LadderRow> rows;
  for (const LadderQuantity& quantity : problem.quantities) {
    rows.push_back({problem.name, quantity, {}});
  }
  for (std::size_t step = 0; step < ladder_cells.size(); ++step) {
    const auto errors = problem.errors(grid_of(problem, ladder_cells[step]));
    for (std::size_t k = 0; k < rows.size(); ++k) rows[k].error[step] = errors.at(k);
  }
  return rows;
}

}  // namespace barwall::verify
