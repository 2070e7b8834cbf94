#include "solver/part_integrals.hpp"

#include "solver/assembly.hpp"
#include "solver/flux_density.hpp"

namespace barwall::solver {

PartIntegrals::PartIntegrals(const Solution& solution) : solution_(&solution) {
  const mesh::FittedGrid& grid = solution.grid();
  const auto& occupants = grid.occupants;
  regions_.resize(solution.problem->section.parts.size());
  for (std::size_t r = 1; r < occupants.size(); ++r) {
    regions_[static_cast<std::size_t>(occupants[r].part)].push_back(r);
  }
  area_ = area_by_region(grid);
  for (const CurrentPattern& pattern : solution.patterns) {
    density_.push_back(density_by_region(*solution.problem, pattern.part_current));
  }
  const auto count = static_cast<Eigen::Index>(occupants.size());
  potential_ = Eigen::MatrixXd::Zero(count, solution.potential.cols());
  unit_potential_ = Eigen::MatrixXd::Zero(count, solution.unit_potential.cols());
  unit_change_ = Eigen::MatrixXd::Zero(count, solution.unit_change.cols());
  flux_.assign(solution.patterns.size(), std::vector<mesh::Point>(occupants.size()));
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const auto region = grid.region[static_cast<std::size_t>(t)];
    if (region == 0) continue;
    const auto n = grid.triangle(t);
    const auto corners = grid.corners(t);
    const double whole = triangle_area(corners);
    const auto share = control_areas(corners);
    for (std::size_t k = 0; k < 3; ++k) {
      potential_.row(region) += share[k] * solution.potential.row(n[k]);
      unit_potential_.row(region) += share[k] * solution.unit_potential.row(n[k]);
      if (unit_change_.cols() > 0) {
        unit_change_.row(region) += share[k] * solution.unit_change.row(n[k]);
      }
    }
    for (std::size_t c = 0; c < flux_.size(); ++c) {
      flux_[c][static_cast<std::size_t>(region)] +=
          whole * cell_flux_density(grid, t, solution.potential.col(static_cast<int>(c)));
    }
  }
}

double PartIntegrals::area(int part) const {
  double sum = 0.0;
  for (std::size_t r : regions_[static_cast<std::size_t>(part)]) sum += area_[r];
  return sum;
}

double PartIntegrals::mean(const Eigen::MatrixXd& integral, int part, int column) const {
  double sum = 0.0;
  for (std::size_t r : regions_[static_cast<std::size_t>(part)]) {
    sum += integral(static_cast<Eigen::Index>(r), column);
  }
  return sum / area(part);
}

double PartIntegrals::mean_potential(int part, int pattern) const {
  return mean(potential_, part, pattern);
}

double PartIntegrals::mean_unit_potential(int part, int unit) const {
  return mean(unit_potential_, part, unit);
}

double PartIntegrals::mean_unit_change(int part, int unit) const {
  return mean(unit_change_, part, unit);
}

mesh::Point PartIntegrals::lorentz_force(int part, int piece, int current, int field) const {
  mesh::Point force;
  for (std::size_t r : regions_[static_cast<std::size_t>(part)]) {
    if (piece >= 0 && solution_->grid().occupants[r].piece != piece) continue;
    const double density = density_[static_cast<std::size_t>(current)][r];
    // J z x B = J (-By, Bx)
    force += density * quarter_turn(flux_[static_cast<std::size_t>(field)][r]);
  }
  return force;
}

}  // namespace barwall::solver
