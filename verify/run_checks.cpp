#include "verify/run_checks.hpp"

#include "verify/ampere_loop.hpp"
#include "verify/biot_savart_check.hpp"
#include "verify/energy_check.hpp"
#include "verify/force_balance.hpp"

namespace barwall::verify {

std::vector<Check> run_checks(const solver::PartIntegrals& integrals,
                              const solver::RecoveredField& field,
                              const solver::StressBands& bands) {
  const solver::Solution& solution = integrals.solution();
  std::vector<Check> checks = check_biot_savart(solution, field);
  const auto add = [&checks](const std::vector<Check>& more) {
    checks.insert(checks.end(), more.begin(), more.end());
  };
  add(check_ampere(solution, field, bands.bodies()));
  add(check_forces(integrals, bands));
  add({check_energy(integrals)});
  return checks;
}

}  // namespace barwall::verify
