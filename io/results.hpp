#pragma once

#include <functional>
#include <memory>
#include <string>
#include <utility>
#include <vector>

#include "io/case.hpp"
#include "solver/figures.hpp"
#include "verify/check.hpp"

namespace barwall::io {

/// Seconds spent in each stage of a run, in order.
using StageTimes = std::vector<std::pair<std::string, double>>;

/// Everything that one run of a case found: what the results folder is written from.
struct Results {
  Case input;
  std::shared_ptr<const solver::Problem> problem;
  std::shared_ptr<const solver::Solution> solution;
  std::shared_ptr<const solver::RecoveredField> field;
  solver::Figures figures;
  std::vector<verify::Check> checks;
  StageTimes stages;

  bool alternating() const { return problem->excitation.alternating(); }
  /// "sound" or "unsound", from the checks alone.
  std::string verdict() const;
  /// "full" or "indicative", from the notices.
  std::string validity() const;
  /// "none", "met", "exceeded" or "undecided".
  std::string limits() const;
  /// 0 sound, 1 a check failed, 4 sound but a limit is exceeded or undecided.
  int exit_code() const;
};

/// Case -> Section -> FittedGrid -> Problem, ready to solve.
/// \throws InputError when no grid fits or it is larger than memory allows
std::shared_ptr<const solver::Problem> problem_of(const Case& input);

/// Probe places with their points.
std::vector<solver::Probe> probes_of(const Case& input, const mesh::Outline& outline);

/// The main job up to the files: grid, solve, figures, checks, notices.
/// \param on_stage told the name of each stage as it begins
/// \throws InputError, solver::SolveError
Results run_case(Case input, const std::function<void(const std::string&)>& on_stage = {});

}  // namespace barwall::io
