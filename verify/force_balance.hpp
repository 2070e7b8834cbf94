#pragma once

#include <vector>

#include "verify/check.hpp"
#include "verify/force_account.hpp"

namespace barwall::verify {

/// Checks of the forces, limits 0.5 %: "force-balance": the forces on all bodies sum to zero;
/// "force-agreement": J x B against Maxwell stress for every bar of mu_r = 1 that touches nothing;
/// "stress-bands": the stress in the inner against the outer half of the air round each body.
///
/// Errors are relative to the largest force of the section, but not less than 1 % of mu_0 (sum of
/// |I|)^2 / (2 pi section size); those of a force above a tenth of that to the force itself. Over a
/// cycle sizes are the largest magnitudes in it.
/// \param bodies groups of parts in contact, one per entry of the account
std::vector<Check> check_forces(const solver::Problem& problem,
                                const std::vector<std::vector<int>>& bodies,
                                const std::vector<BodyForce>& account);

}  // namespace barwall::verify
