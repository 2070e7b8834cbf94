#include "solver/fault_solve.hpp"

#include <algorithm>
#include <numbers>

namespace barwall::solver {
namespace {

using Forces = PartForces<PulsatingVector>;

/// Of the course of a series, which is to be looked at: an instant every 15 degrees will do.
constexpr InstantOptions along_course{12, 24};

/// Solves the course of the series at a closing angle.
void solve_course(FaultSolution& result, const Problem& problem, const FaultCurrent& fault,
                  double closing) {
  const Course course = fault_course(fault, closing, problem.section.parts.size());
  result.course = solve_instants(problem, course, along_course);
  for (const double wt : result.course->wt) {
    result.course_seconds.push_back(seconds_per_unit(fault) * wt);
  }
}

Forces forces_on(const Solution& solution, const ForceGeometry& geometry, bool faces) {
  std::optional<RecoveredField> field;
  if (faces && !geometry.faces.faces().empty()) field.emplace(solution);
  return forces_of(PartIntegrals(solution), geometry, field ? &*field : nullptr);
}

/// \param faces with the pushes on the walls' faces
std::vector<Forces> forces_at(const Instants& instants, const ForceGeometry& geometry, bool faces) {
  std::vector<Forces> forces;
  for (const auto& solution : instants.solution) {
    forces.push_back(forces_on(*solution, geometry, faces));
  }
  return forces;
}

/// The closing angle of the largest force on a bar; 0 where any will do.
double worst_closing(const FaultCurrent& fault, const PartForces<FaultExtremes>& extremes) {
  double largest = -1.0;
  double closing = 0.0;
  for (const int bar : fault.bars) {
    const auto& found = extremes.part[static_cast<std::size_t>(bar)];
    // Of forces that symmetry makes equal the first, whatever rounding says.
    if (!found || found->peak.magnitude <= largest * (1.0 + 1e-9)) continue;
    largest = found->peak.magnitude;
    closing = found->peak.closing.value_or(0.0);
  }
  return closing;
}

std::optional<double> given_closing(const FaultCurrent& fault) {
  const auto* alternating = std::get_if<AlternatingFault>(&fault.course);
  return alternating != nullptr ? alternating->closing : std::nullopt;
}

/// Levels in a fault from the field of its sustained currents.
std::vector<FieldLevel> levels_of(const FaultCurrent& fault, const Solution& sustained) {
  if (const auto closing = given_closing(fault)) {
    // Of every two opposite crests of a place's sustained field the offset raises one, less and
    // less: the largest comes in the first cycle.
    constexpr int steps = 120;
    std::vector<std::complex<double>> factors;
    for (int k = 0; k <= steps; ++k) {
      const FaultInstant now = fault_instant(std::get<AlternatingFault>(fault.course),
                                             2.0 * std::numbers::pi * k / steps, *closing);
      factors.push_back(std::polar(now.scale, now.angle));
    }
    return field_levels(sustained, factors);
  }
  std::vector<FieldLevel> levels = field_levels(sustained);
  const double scale = largest_scale(fault).scale;
  for (FieldLevel& level : levels) {
    level.mean *= scale;
    level.high *= scale;
  }
  return levels;
}

/// The problem's solution with the sustained currents in place of its own, scaled.
Solution solve_sustained(Problem problem, const FaultCurrent& fault, double scale = 1.0) {
  problem.excitation = sustained_excitation(fault, problem.section.parts.size());
  for (auto& current : problem.excitation.current) current *= scale;
  problem.loops.clear();
  return solve(std::make_shared<const Problem>(std::move(problem)));
}

FaultSolution with_constant_permeability(const Problem& problem, const FaultCurrent& fault,
                                         const ForceGeometry& geometry) {
  const Solution solution = solve_sustained(problem, fault);
  const Forces forces = forces_on(solution, geometry, true);
  FaultSolution result;
  result.extremes =
      transformed(forces, [&](const PulsatingVector& force) { return extremes_of(fault, force); });
  result.levels = levels_of(fault, solution);
  result.series = fault_series(
      fault, given_closing(fault).value_or(worst_closing(fault, result.extremes)), forces);
  return result;
}

/// Half a turn of the sustained currents, scaled.
Instants half_turn(const Problem& problem, const FaultCurrent& fault, double scale) {
  return solve_instants(
      problem, half_cycle_of(sustained_excitation(fault, problem.section.parts.size()), scale));
}

void add_histories(FaultSolution& result, const Instants& instants) {
  for (const auto& solution : instants.solution) result.newton.push_back(solution->newton);
}

FaultSolution with_saturable_steel(const Problem& problem, const FaultCurrent& fault,
                                   const ForceGeometry& geometry) {
  FaultSolution result;
  const auto* alternating = std::get_if<AlternatingFault>(&fault.course);
  const auto closing = given_closing(fault);
  if (closing) {
    solve_course(result, problem, fault, *closing);
    const auto first_cycle = forces_at(*result.course, geometry, true);
    const Instants sustained_instants = half_turn(problem, fault, 1.0);
    add_histories(result, sustained_instants);
    const auto later = forces_at(sustained_instants, geometry, true);
    const Forces sustained = over_half_cycle(std::span<const Forces>(later));
    // Each force's way through the first cycle, with the sustained one at the end.
    std::vector<Forces> all = first_cycle;
    all.push_back(sustained);
    result.extremes =
        combined(std::span<const Forces>(all), [&](const std::vector<PulsatingVector>& force) {
          const auto cycle = means_of(std::span(force).first(force.size() - 1));
          return extremes_over_first_cycle(*alternating, cycle, force.back());
        });
    result.levels = field_levels(*result.course);
    result.series = fault_series(fault, *closing, std::span<const Forces>(first_cycle));
    return result;
  }
  const auto extremes_at_largest = [&](const Forces& forces) {
    return transformed(forces, [&](const PulsatingVector& force) {
      return extremes_at_largest_scale(fault, force);
    });
  };
  if (alternating != nullptr) {
    const Instants largest = half_turn(problem, fault, largest_scale(fault).scale);
    add_histories(result, largest);
    const auto forces = forces_at(largest, geometry, true);
    result.extremes = extremes_at_largest(over_half_cycle(std::span<const Forces>(forces)));
    result.levels = field_levels(largest);
  } else {
    const Solution largest = solve_sustained(problem, fault, largest_scale(fault).scale);
    result.newton.push_back(largest.newton);
    result.extremes = extremes_at_largest(forces_on(largest, geometry, true));
    result.levels = field_levels(largest);
  }
  if (std::holds_alternative<DirectPeak>(fault.course)) return result;
  const double worst = worst_closing(fault, result.extremes);
  solve_course(result, problem, fault, worst);
  const auto forces = forces_at(*result.course, geometry, false);
  result.series = fault_series(fault, worst, std::span<const Forces>(forces));
  return result;
}

}  // namespace

FaultSolution solve_fault(const Problem& problem, const FaultCurrent& fault,
                          const ForceGeometry& geometry) {
  return saturable(problem) ? with_saturable_steel(problem, fault, geometry)
                            : with_constant_permeability(problem, fault, geometry);
}

}  // namespace barwall::solver
