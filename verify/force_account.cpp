#include "verify/force_account.hpp"

namespace barwall::verify {

using solver::PulsatingVector;

std::vector<BodyForce> force_account(const solver::PartIntegrals& integrals,
                                     const solver::StressBands& bands) {
  const solver::Solution& solution = integrals.solution();
  std::vector<BodyForce> account;
  for (std::size_t b = 0; b < bands.bodies().size(); ++b) {
    const int body = static_cast<int>(b);
    const int first = bands.bodies()[b].front();
    const auto part = static_cast<std::size_t>(first);
    BodyForce entry;
    entry.lorentz = bands.bodies()[b].size() == 1 &&
                    solution.problem->section.parts[part].kind == mesh::Part::Kind::bar &&
                    !solution.problem->materials[part].magnetic();
    entry.stress = bands.force(solution, body, solver::whole_band);
    entry.inner = bands.force(solution, body, solver::inner_band);
    entry.outer = bands.force(solution, body, solver::outer_band);
    entry.force = entry.lorentz ? lorentz_force(integrals, first) : entry.stress;
    account.push_back(std::move(entry));
  }
  return account;
}

std::vector<BodyForce> over_half_cycle(std::span<const std::vector<BodyForce>> instants) {
  std::vector<BodyForce> result = instants.front();
  for (std::size_t b = 0; b < result.size(); ++b) {
    const auto over = [&](PulsatingVector BodyForce::*which) {
      std::vector<mesh::Point> values;
      for (const std::vector<BodyForce>& account : instants) {
        const PulsatingVector& force = account[b].*which;
        values.push_back({force.x.mean, force.y.mean});
      }
      result[b].*which = solver::pulsation_through(std::span<const mesh::Point>(values));
    };
    for (const auto which :
         {&BodyForce::force, &BodyForce::stress, &BodyForce::inner, &BodyForce::outer}) {
      over(which);
    }
  }
  return result;
}

}  // namespace barwall::verify
