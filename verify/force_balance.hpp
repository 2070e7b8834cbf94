#pragma once

#include <vector>

#include "solver/force.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// Checks of the forces, errors relative to the largest force of the section, but not less than
/// 1 % of mu_0 (sum of |I|)^2 / (2 pi section size), limits 0.5 %:
/// "force-balance": the forces on all bodies sum to zero; "force-agreement": J x B against
/// Maxwell stress for every bar of mu_r = 1 that touches nothing; "stress-bands": the stress in
/// the inner against the outer half of the air round each body. With a frequency the mean and
/// both parts of the pulsation count.
std::vector<Check> check_forces(const solver::PartIntegrals& integrals,
                                const solver::StressBands& bands);

}  // namespace barwall::verify
