#include "solver/part_forces.hpp"

namespace barwall::solver {
namespace {

/// The force on a part that shows.
std::optional<PulsatingVector> force_on_part(const PartIntegrals& integrals,
                                             const StressBands& bands, int part) {
  const Solution& solution = integrals.solution();
  if (lorentz_alone(*solution.problem, part)) return lorentz_force(integrals, part);
  const auto& bodies = bands.bodies();
  for (std::size_t b = 0; b < bodies.size(); ++b) {
    if (bodies[b].size() > 1 || bodies[b].front() != part) continue;
    return bands.force(solution, static_cast<int>(b), whole_band);
  }
  return {};
}

}  // namespace

PartForces<PulsatingVector> forces_of(const PartIntegrals& integrals, const ForceGeometry& geometry,
                                      const RecoveredField* field) {
  const StressBands& bands = geometry.bands;
  const Problem& problem = *integrals.solution().problem;
  PartForces<PulsatingVector> result;
  result.part.resize(problem.section.parts.size());
  result.piece.resize(problem.section.parts.size());
  for (int part : visible_parts(problem.outline)) {
    const auto k = static_cast<std::size_t>(part);
    result.part[k] = force_on_part(integrals, bands, part);
    const mesh::Part& p = problem.section.parts[k];
    if (!lorentz_alone(problem, part)) continue;
    for (std::size_t piece = 0; p.pieces.size() > 1 && piece < p.pieces.size(); ++piece) {
      result.piece[k].push_back(lorentz_force(integrals, part, static_cast<int>(piece)));
    }
  }
  for (std::size_t b = 0; b < bands.bodies().size(); ++b) {
    if (bands.bodies()[b].size() < 2) continue;
    result.body.push_back(bands.force(integrals.solution(), static_cast<int>(b), whole_band));
  }
  const auto& faces = geometry.faces.faces();
  for (std::size_t k = 0; field != nullptr && k < faces.size(); ++k) {
    const PulsatingVector force = geometry.faces.force(integrals.solution(), *field, k);
    result.push.push_back({push_of(faces[k], force), {}});
  }
  return result;
}

PartForces<PulsatingVector> over_half_cycle(std::span<const PartForces<PulsatingVector>> instants) {
  return combined(instants, [](const std::vector<PulsatingVector>& forces) {
    return over_half_cycle(std::span<const PulsatingVector>(forces));
  });
}

}  // namespace barwall::solver
