#include "verify/run_checks.hpp"

#include <fmt/format.h>

#include <iterator>
#include <numbers>

#include "verify/ampere_loop.hpp"
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
  append(checks, check_ampere(solution, field, bands.bodies()));
  append(checks, check_forces(*solution.problem, bands.bodies(), force_account(integrals, bands)));
  checks.push_back(check_energy(integrals));
  return checks;
}

void keep_worse(std::vector<Check>& checks, std::vector<Check> others, const std::string& where) {
  for (std::size_t k = 0; k < checks.size(); ++k) {
    if (others[k].measured <= checks[k].measured) continue;  // what is not a number is worse
    if (std::isnan(checks[k].measured)) continue;
    others[k].detail = where + ": " + others[k].detail;
    checks[k] = std::move(others[k]);
  }
}

void CycleChecks::add(double wt, const solver::PartIntegrals& integrals,
                      const solver::RecoveredField& field, const solver::StressBands& bands) {
  biot_savart_.add(integrals.solution(), field);
  forces_.push_back(force_account(integrals, bands));
  std::vector<Check> now = check_ampere(integrals.solution(), field, bands.bodies());
  now.push_back(check_energy(integrals));
  for (std::size_t k = 0; k < now.size(); ++k) {
    now[k].detail = fmt::format("worst instant at wt = {:.4g} deg: {}",
                                wt * 180.0 / std::numbers::pi, now[k].detail);
    if (forces_.size() == 1) {
      worst_.push_back(std::move(now[k]));
    } else if (worse(now[k].measured, worst_[k].measured)) {
      worst_[k] = std::move(now[k]);
    }
  }
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
