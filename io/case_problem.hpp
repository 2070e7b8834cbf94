#pragma once

#include <memory>
#include <vector>

#include "io/case.hpp"
#include "solver/probe.hpp"
#include "solver/problem.hpp"

namespace barwall::io {

/// Case -> Section -> FittedGrid -> Problem, ready to solve.
/// \throws InputError when no grid fits or it is larger than memory allows
std::shared_ptr<const solver::Problem> problem_of(const Case& input);

/// Probe places with their points.
std::vector<solver::Probe> probes_of(const Case& input, const mesh::Outline& outline);

}  // namespace barwall::io
