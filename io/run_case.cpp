#include "io/results.hpp"

#include <chrono>

#include "io/case_problem.hpp"
#include "solver/cycle_recovery.hpp"
#include "solver/fault_figures.hpp"
#include "solver/saturation_notices.hpp"
#include "verify/hand_figures.hpp"
#include "verify/notices.hpp"
#include "verify/run_checks.hpp"

namespace barwall::io {
namespace {

class Stopwatch {
public:
  Stopwatch(StageTimes& stages, const std::function<void(const std::string&)>& on_stage)
      : stages_(stages), on_stage_(on_stage) {}
  void begin(const std::string& name) {
    end();
    name_ = name;
    if (on_stage_) on_stage_(name);
  }
  void end() {
    const auto now = std::chrono::steady_clock::now();
    if (!name_.empty()) {
      stages_.emplace_back(name_, std::chrono::duration<double>(now - last_).count());
    }
    name_.clear();
    last_ = now;
  }

private:
  StageTimes& stages_;
  const std::function<void(const std::string&)>& on_stage_;
  std::string name_;
  std::chrono::steady_clock::time_point last_ = std::chrono::steady_clock::now();
};

/// One run, from the case to what the files are written from.
class Run {
public:
  Run(Case input, const std::function<void(const std::string&)>& on_stage)
      : watch_(results_.stages, on_stage) {
    results_.input = std::move(input);
  }

  Results complete() {
    watch_.begin("grid");
    ProbedProblem probed = probed_problem_of(results_.input);
    results_.problem = std::move(probed.problem);
    probes_ = std::move(probed.probes);
    const Problem& problem = *results_.problem;
    geometry_.emplace(problem);
    const solver::Readings readings =
        saturable(problem) && results_.alternating() ? instant_by_instant() : at_once();
    results_.figures = figures_of(problem, *geometry_, readings, probes_, results_.input.circuits);
    add_notices(verify::notices_of(problem, results_.figures, results_.input.circuits,
                                   results_.input.run_length_m));
    const solver::FaultCurrent* fault = nullptr;
    if (results_.input.fault) {
      watch_.begin("fault");
      fault = &results_.input.fault->current;
      add_fault(*fault);
    }
    verify::add_hand_values(results_.figures, problem, fault);
    watch_.end();
    return std::move(results_);
  }

private:
  using Problem = solver::Problem;

  /// Steady currents, or alternating ones whose fields can be added.
  solver::Readings at_once() {
    watch_.begin("solve");
    results_.solution = std::make_shared<solver::Solution>(solve(results_.problem));
    watch_.begin("figures");
    results_.field = std::make_shared<solver::RecoveredField>(*results_.solution);
    const solver::PartIntegrals integrals(*results_.solution);
    auto readings = readings_of(integrals, *results_.field, *geometry_, probes_);
    watch_.begin("checks");
    results_.checks = verify::run_checks(integrals, *results_.field, geometry_->bands);
    return readings;
  }

  /// Alternating currents in saturable steel.
  solver::Readings instant_by_instant() {
    watch_.begin("solve");
    const Problem& problem = *results_.problem;
    results_.instants = solve_instants(problem, solver::half_cycle_of(problem.excitation));
    const solver::Instants& instants = *results_.instants;
    const auto fundamental =
        std::make_shared<solver::Solution>(fundamental_of(results_.problem, instants));
    results_.solution = fundamental;
    watch_.begin("figures and checks");
    std::vector<solver::Readings> readings;
    verify::CycleChecks checks;
    solver::CycleRecovery recovery(static_cast<int>(instants.size()));
    for (std::size_t k = 0; k < instants.size(); ++k) {
      const solver::RecoveredField field(*instants.solution[k]);
      const solver::PartIntegrals integrals(*instants.solution[k]);
      readings.push_back(readings_at_instant(integrals, field, *geometry_, probes_));
      checks.add(instants.wt[k], integrals, field, geometry_->bands);
      recovery.add(field);
    }
    results_.field = std::make_shared<solver::RecoveredField>(recovery.over_cycle(*fundamental));
    results_.checks = checks.checks(problem, geometry_->bands.bodies());
    auto cycle = over_half_cycle(std::span<const solver::Readings>(readings));
    cycle.levels = field_levels(instants);
    cycle.loops = loop_inductances(solver::PartIntegrals(*fundamental));
    cycle.loops_at = instants.wt[instants.strongest];
    return cycle;
  }

  void add_fault(const solver::FaultCurrent& fault) {
    const Problem& problem = *results_.problem;
    results_.fault = solve_fault(problem, fault, *geometry_);
    std::optional<solver::Supports> supports;
    if (const auto& given = results_.input.supports) supports = {given->span, given->strength};
    results_.figures.fault = fault_figures(fault, problem, *geometry_, *results_.fault, supports);
    if (const auto& course = results_.fault->course) {
      const solver::Solution& strongest = *course->solution[course->strongest];
      const solver::RecoveredField field(strongest);
      verify::keep_worse(
          results_.checks,
          verify::run_checks(solver::PartIntegrals(strongest), field, geometry_->bands),
          "in the fault");
    }
    const auto& levels = results_.fault->levels;
    add_notices(saturation_notices(problem, levels, "in the fault"));
    add_notices(table_notices(problem, levels, "in the fault"));
  }

  void add_notices(const std::vector<solver::Notice>& notices) {
    auto& all = results_.figures.notices;
    all.insert(all.end(), notices.begin(), notices.end());
  }

  Results results_;
  Stopwatch watch_;
  std::vector<solver::Probe> probes_;
  std::optional<solver::ForceGeometry> geometry_;
};

}  // namespace

Results run_case(Case input, const std::function<void(const std::string&)>& on_stage) {
  return Run(std::move(input), on_stage).complete();
}

}  // namespace barwall::io
