#include "verify/arrangement.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "mesh/sampling.hpp"
#include "solver/flux_density.hpp"
#include "solver/flux_linkage.hpp"
#include "solver/force.hpp"

namespace barwall::verify {
namespace {

/// Gathers a relative r.m.s. error of vectors.
class RelativeError {
public:
  void add(mesh::Point found, mesh::Point exact) {
    error_ += dot(found - exact, found - exact);
    scale_ += dot(exact, exact);
  }
  double value() const { return std::sqrt(error_ / scale_); }

private:
  double error_ = 0.0;
  double scale_ = 0.0;
};

double distance_from(const mesh::Outline& outline, mesh::Point at) {
  double nearest = HUGE_VAL;
  for (const mesh::OutlinePiece& piece : outline.pieces) {
    nearest = std::min(nearest, distance(piece.curve, at));
  }
  return nearest;
}

/// Of B off the outlines and near them.
std::array<double, 2> field_errors(const Arrangement& arrangement,
                                   const solver::Solution& solution) {
  constexpr int points = 10000;
  const solver::RecoveredField field(solution);
  const mesh::Section& section = arrangement.section;
  const mesh::Box& region = arrangement.region;
  RelativeError off;
  RelativeError near;
  for (int k = 0; k < points; ++k) {
    const mesh::Point share = mesh::low_discrepancy_point(k);
    const mesh::Point at{region.low.x + share.x * region.width(),
                         region.low.y + share.y * region.height()};
    const mesh::Location location = locate(solution.grid(), section, at);
    if (solution.grid().occupant(location.triangle) != occupant_at(section, at)) continue;
    const bool is_near = distance_from(solution.problem->outline, at) < arrangement.near;
    (is_near ? near : off).add(field.flux_density(location, at, 0), arrangement.flux_density(at));
  }
  return {off.value(), near.value()};
}

int body_of(const std::vector<std::vector<int>>& bodies, int part) {
  for (std::size_t b = 0; b < bodies.size(); ++b) {
    for (int member : bodies[b]) {
      if (member == part) return static_cast<int>(b);
    }
  }
  return -1;
}

}  // namespace

std::vector<double> errors_of(const Arrangement& arrangement,
                              std::shared_ptr<const mesh::FittedGrid> grid) {
  auto problem = std::make_shared<solver::Problem>();
  problem->section = arrangement.section;
  problem->outline = outline_of(arrangement.section);
  problem->grid = std::move(grid);
  problem->materials = arrangement.materials;
  for (double current : arrangement.currents) problem->excitation.current.push_back(current);
  for (const Arrangement::Inductance& known : arrangement.inductances) {
    problem->loops.push_back(known.loop);
  }
  const auto solution = solver::solve(problem, {1e-12, arrangement.boundary});

  const auto [off, near] = field_errors(arrangement, solution);
  std::vector<double> errors{off, near};
  const solver::PartIntegrals integrals(solution);
  if (!arrangement.forces.empty()) {
    const solver::StressBands bands(*problem, bodies(problem->outline));
    RelativeError lorentz;
    RelativeError stress;
    for (const Arrangement::Force& force : arrangement.forces) {
      const auto on_body =
          bands.force(solution, body_of(bands.bodies(), force.part), solver::whole_band);
      stress.add({on_body.x.mean, on_body.y.mean}, force.exact);
      if (arrangement.currents[static_cast<std::size_t>(force.part)] == 0.0) continue;
      const auto on_current = solver::lorentz_force(integrals, force.part);
      lorentz.add({on_current.x.mean, on_current.y.mean}, force.exact);
    }
    errors.push_back(lorentz.value());
    if (!arrangement.boundary) errors.push_back(stress.value());
  }
  if (!arrangement.inductances.empty()) {
    RelativeError inductance;
    for (const Arrangement::Inductance& known : arrangement.inductances) {
      inductance.add({loop_inductance(integrals, known.loop), 0.0}, {known.exact, 0.0});
    }
    errors.push_back(inductance.value());
  }
  return errors;
}

}  // namespace barwall::verify
