#pragma once

#include <Eigen/Dense>
#include <vector>

#include "solver/magnetostatics.hpp"
#include "verify/current_sheet.hpp"

namespace barwall::verify {

/// The bound currents of the magnetised steel of one potential: on every triangle edge the sheet
/// K = jump of M along the edge [A/m], M = B / mu_0 - H, B of the scheme on each triangle.
/// Together with the free currents they make the field everywhere, in air without steel.
std::vector<CurrentSheet> bound_currents(const solver::Solution& solution,
                                         const Eigen::Ref<const Eigen::VectorXd>& potential);

}  // namespace barwall::verify
