#pragma once

#include <optional>
#include <vector>

#include "solver/flux_density.hpp"
#include "verify/ampere_loop.hpp"
#include "verify/biot_savart_check.hpp"
#include "verify/check.hpp"
#include "verify/force_account.hpp"

namespace barwall::verify {

/// All self-checks of a solved section, in the order they are printed.
std::vector<Check> run_checks(const solver::PartIntegrals& integrals,
                              const solver::RecoveredField& field,
                              const solver::StressBands& bands);

/// Puts each of other checks of the same section in the place of its own where it is worse, or
/// where there is none yet, and says in its detail where that was.
void keep_worse(std::vector<Check>& checks, std::vector<Check> others, const std::string& where);

/// The self-checks of alternating currents that were solved instant by instant: those of forces and
/// of Biot-Savart fields over the cycle; of the others the worst instant counts.
class CycleChecks {
public:
  /// Takes the next of the instants k pi / n of half a cycle.
  void add(double wt, const solver::PartIntegrals& integrals, const solver::RecoveredField& field,
           const solver::StressBands& bands);

  /// \param problem with its alternating currents
  /// \param bodies of the bands
  std::vector<Check> checks(const solver::Problem& problem,
                            const std::vector<std::vector<int>>& bodies) const;

private:
  BiotSavartCheck biot_savart_;
  std::optional<AmpereCheck> ampere_;
  std::vector<Check> worst_;  ///< so far, of Ampere's law and the energy
  std::vector<std::vector<BodyForce>> forces_;
};

}  // namespace barwall::verify
