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
    BodyForce entry;
    entry.lorentz = bands.bodies()[b].size() == 1 && lorentz_alone(*solution.problem, first);
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
      std::vector<PulsatingVector> forces;
      for (const std::vector<BodyForce>& account : instants) forces.push_back(account[b].*which);
      result[b].*which = solver::over_half_cycle(std::span<const PulsatingVector>(forces));
    };
    for (const auto which :
         {&BodyForce::force, &BodyForce::stress, &BodyForce::inner, &BodyForce::outer}) {
      over(which);
    }
  }
  return result;
}

}  // namespace barwall::verify
