#pragma once

#include <cstdio>
#include <span>

#include "verify/ladder.hpp"

namespace barwall::io {

/// Solves the problems one after another and prints each one's errors, observed orders and bands
/// as it is done, at most 100 columns wide. Returns 0 when all are in their bands and 1 otherwise.
/// \throws solver::SolveError, mesh::GridError
int print_ladder(std::FILE* out, std::span<const verify::LadderProblem> problems);

/// The same with the built-in problems.
int print_ladder(std::FILE* out);

}  // namespace barwall::io
