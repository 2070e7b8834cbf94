#pragma once

#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// Mean of A over a part's area [Wb/m]: the flux linkage per metre of run of its evenly spread
/// current.
double mean_potential(const Solution& solution, int part,
                      const Eigen::Ref<const Eigen::VectorXd>& potential);

/// Inductance of a loop per metre of run [H/m]: (mean A over the go bars - mean A over the
/// return bars) / I with the loop alone carrying I, shared by area within each side.
double loop_inductance(const Solution& solution, const Loop& loop);

}  // namespace barwall::solver
