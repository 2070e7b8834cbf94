#include "verify/run_checks.hpp"

#include <fmt/format.h>

#include <iterator>
#include <numbers>

#include "verify/energy_check.hpp"
#include "verify/force_balance.hpp"

namespace barwall::verify {
namespace {

void append(std::vector<Check>& to, std::vector<Check> more) {
  to.insert(to.end(), std::make_move_iterator(more.begin()), std::make_move_iterator(more.end()));
}

}  // namespace

std::vector<Check> run_checks(const solver::PartIntegrals& integrals,
                              const solver::RecoveredField& field,
                              const solver::StressBands& bands) {
  const solver::Solution& solution = integrals.solution();
  BiotSavartCheck biot_savart;
  biot_savart.add(solution, field);
  std::vector<Check> checks = biot_savart.checks();
  append(checks, AmpereCheck(*solution.problem, bands.bodies()).checks(solution, field));
  append(checks, check_forces(*solution.problem, bands.bodies(), force_account(integrals, bands)));
  checks.push_back(check_energy(integrals));
  return checks;
}

void keep_worse(std::vector<Check>& checks, std::vector<Check> others, const std::string& where) {
  for (std::size_t k = 0; k < others.size(); ++k) {
    if (k < checks.size() && !worse(others[k].measured, checks[k].measured)) continue;
    others[k].detail = where + ": " + others[k].detail;
    if (k < checks.size()) {
      checks[k] = std::move(others[k]);
    } else {
      checks.push_back(std::move(others[k]));
    }
  }
}

void CycleChecks::add(double wt, const solver::PartIntegrals& integrals,
                      const solver::RecoveredField& field, const solver::StressBands& bands) {
  biot_savart_.add(integrals.solution(), field);
  forces_.push_back(force_account(integrals, bands));
  if (!ampere_) ampere_.emplace(*integrals.solution().problem, bands.bodies());
  std::vector<Check> now = ampere_->checks(integrals.solution(), field);
  now.push_back(check_energy(integrals));
  keep_worse(worst_, std::move(now),
             fmt::format("worst instant at wt = {:.4g} deg", wt * 180.0 / std::numbers::pi));
}

std::vector<Check> CycleChecks::checks(const solver::Problem& problem,
                                       const std::vector<std::vector<int>>& bodies) const {
  std::vector<Check> checks = biot_savart_.checks();
  append(checks, {worst_.begin(), worst_.end() - 1});
  append(checks, check_forces(problem, bodies,
                              over_half_cycle(std::span<const std::vector<BodyForce>>(forces_))));
  checks.push_back(worst_.back());
  return checks;
}

}  // namespace barwall::verify
