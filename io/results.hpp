#pragma once

#include <functional>
#include <memory>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "io/case.hpp"
#include "solver/fault_solve.hpp"
#include "solver/figures.hpp"
#include "verify/check.hpp"

namespace barwall::io {

/// Seconds spent in each stage of a run, in order.
using StageTimes = std::vector<std::pair<std::string, double>>;

/// Everything that one run of a case found: what the results folder is written from.
struct Results {
  Case input;
  std::shared_ptr<const solver::Problem> problem;
  /// With alternating currents in saturable steel the fundamental of the field, its permeability
  /// that of the strongest instant.
  std::shared_ptr<const solver::Solution> solution;
  std::shared_ptr<const solver::RecoveredField> field;
  /// With alternating currents in saturable steel, half a cycle.
  std::optional<solver::Instants> instants;
  std::optional<solver::FaultSolution> fault;
  solver::Figures figures;
  std::vector<verify::Check> checks;
  StageTimes stages;

  bool alternating() const { return problem->excitation.alternating(); }
  /// Names of the fault's bars, in its order; only with a fault.
  std::vector<std::string> fault_bars() const;
  /// True with a fault whose course over time is known.
  bool fault_over_time() const { return fault && !fault->series.seconds.empty(); }
  /// "sound" or "unsound", from the checks alone.
  std::string verdict() const;
  /// "full" or "indicative", from the notices.
  std::string validity() const;
  /// "none", "met", "exceeded" or "undecided".
  std::string limits() const;
  /// 0 sound, 1 a check failed, 4 sound but a limit is exceeded or undecided.
  int exit_code() const;
};

/// The main job up to the files: grid, solve, figures, checks, notices.
/// \param on_stage told the name of each stage as it begins
/// \throws InputError, solver::SolveError
Results run_case(Case input, const std::function<void(const std::string&)>& on_stage = {});

}  // namespace barwall::io
