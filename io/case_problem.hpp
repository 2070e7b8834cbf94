#pragma once

#include <memory>
#include <vector>

#include "io/case.hpp"
#include "solver/probe.hpp"
#include "solver/problem.hpp"

namespace barwall::io {

/// A case ready to solve, and the places where its field is wanted.
struct ProbedProblem {
  std::shared_ptr<const solver::Problem> problem;
  std::vector<solver::Probe> probes;
};

/// Case -> Section -> FittedGrid -> Problem, fine out to every probe.
/// \throws InputError when no grid fits or it is larger than memory allows
ProbedProblem probed_problem_of(const Case& input);

/// Its problem alone.
/// \throws InputError
std::shared_ptr<const solver::Problem> problem_of(const Case& input);

}  // namespace barwall::io
