#pragma once

#include <span>
#include <vector>

#include "solver/force.hpp"

namespace barwall::verify {

/// The force on one body, found in several ways, per metre of run [N/m].
struct BodyForce {
  bool lorentz = false;            ///< a bar of mu_r = 1 alone: J x B stands beside the stress
  solver::PulsatingVector force;   ///< as the figures give it: J x B where that is exact
  solver::PulsatingVector stress;  ///< in the whole band of air round it
  solver::PulsatingVector inner;   ///< in the inner half of the band
  solver::PulsatingVector outer;   ///< in the outer half
};

/// The forces on all bodies of the bands, in order.
std::vector<BodyForce> force_account(const solver::PartIntegrals& integrals,
                                     const solver::StressBands& bands);

/// The account over the cycle from those at the instants k pi / n of its half, k = 0 to n - 1.
std::vector<BodyForce> over_half_cycle(std::span<const std::vector<BodyForce>> instants);

}  // namespace barwall::verify
