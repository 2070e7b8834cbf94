#include <fmt/format.h>
#include <sys/sysinfo.h>

#include <algorithm>
#include <chrono>

#include "io/input_error.hpp"
#include "io/results.hpp"
#include "mesh/offset_line.hpp"
#include "solver/fault_figures.hpp"
#include "verify/hand_figures.hpp"
#include "verify/notices.hpp"
#include "verify/run_checks.hpp"

namespace barwall::io {
namespace {

/// Memory that a direct solve of n nodes takes, by measurement: about 31 n log2 n bytes for the
/// factor and 700 n for everything else.
double bytes_needed(double nodes) {
  return nodes * (31.0 * std::log2(nodes) + 700.0);
}

/// Largest number of nodes that three quarters of the free memory hold.
double nodes_that_fit() {
  struct sysinfo info {};
  sysinfo(&info);
  const double free = 0.75 * static_cast<double>(info.freeram + info.bufferram) * info.mem_unit;
  double nodes = 1e4;
  while (nodes < 2e8 && bytes_needed(1.1 * nodes) < free) nodes *= 1.1;
  return nodes;
}

/// Half-sizes out to which a net current's field is checked: 20 section sizes and a little.
constexpr double net_current_zone = 42.0;

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

bool inside(const std::vector<mesh::Point>& line, mesh::Point point) {
  return contains(mesh::Polygon{line}, point);
}

std::vector<mesh::Point> points_around(const mesh::Outline& outline, double clearance, int count) {
  auto lines = offset_lines(outline, visible_parts(outline), clearance);
  // Lines within others run round parts in the hollow of another: not outermost.
  std::vector<std::vector<mesh::Point>> outermost;
  for (auto& line : lines) {
    const bool hidden = std::any_of(outermost.begin(), outermost.end(),
                                    [&](const auto& outer) { return inside(outer, line.front()); });
    if (!hidden) outermost.push_back(std::move(line));
  }
  const auto length = [](const std::vector<mesh::Point>& line) {
    double sum = 0.0;
    for (std::size_t k = 0; k < line.size(); ++k) {
      sum += distance(line[k], line[(k + 1) % line.size()]);
    }
    return sum;
  };
  double whole = 0.0;
  for (const auto& line : outermost) whole += length(line);
  std::vector<mesh::Point> points;
  for (const auto& line : outermost) {
    const auto share = static_cast<int>(std::lround(count * length(line) / whole));
    for (mesh::Point p : spread_along(line, std::max(2, share))) points.push_back(p);
  }
  return points;
}

/// The case's problem, all but its grid.
std::shared_ptr<solver::Problem> problem_without_grid(const Case& input) {
  auto problem = std::make_shared<solver::Problem>();
  problem->section = input.section;
  problem->outline = outline_of(input.section);
  problem->materials = input.materials;
  problem->excitation = input.excitation;
  problem->loops = input.loops;
  return problem;
}

/// Gives a problem its grid, fine out to every probe, and with saturable steel the coarser one on
/// which the solve begins.
void set_grids(solver::Problem& problem, const Case& input,
               const std::vector<solver::Probe>& probes) {
  if (saturable(problem) && input.excitation.alternating()) {
    throw InputError(
        fmt::format("{}: saturable steel is solved for steady currents only; leave out "
                    "frequency_hz, or give relative_permeability in place of the B-H table",
                    input.grid_place));
  }
  if (saturable(problem) && input.fault) {
    throw InputError(
        fmt::format("{}: with saturable steel a [fault] is not solved; give relative_permeability "
                    "in place of the B-H table",
                    input.grid_place));
  }
  mesh::GridOptions options;
  options.cells_across = input.grid.cells_across;
  options.reach = input.grid.reach;
  if (has_net_current(input.excitation)) options.wide = net_current_zone;
  options.max_nodes = nodes_that_fit();
  for (const solver::Probe& probe : probes) {
    for (mesh::Point point : probe.points) options.fine.include(point);
  }
  try {
    problem.grid =
        std::make_shared<mesh::FittedGrid>(make_grid(input.section, problem.outline, options));
  } catch (const mesh::GridError& error) {
    throw InputError(fmt::format("{}: {}", input.grid_place, error.what()));
  }
  if (!saturable(problem)) return;
  try {
    options.cells_across = std::max(1, options.cells_across / 2);
    problem.coarse_grid =
        std::make_shared<mesh::FittedGrid>(make_grid(input.section, problem.outline, options));
  } catch (const mesh::GridError&) {  // then the solve begins from zero
  }
}

}  // namespace

std::vector<solver::Probe> probes_of(const Case& input, const mesh::Outline& outline) {
  std::vector<solver::Probe> probes;
  for (const ProbeRequest& request : input.probes) {
    solver::Probe probe{request.name,
                        {},
                        request.kind != ProbeRequest::Kind::point,
                        request.limit_t,
                        request.limit_from};
    switch (request.kind) {
      case ProbeRequest::Kind::point:
        probe.points = {request.at};
        break;
      case ProbeRequest::Kind::line:
        for (int k = 0; k < request.points; ++k) {
          const double t = static_cast<double>(k) / (request.points - 1);
          probe.points.push_back(between(request.from, request.to, t));
        }
        break;
      case ProbeRequest::Kind::around:
        probe.points = points_around(outline, request.clearance, request.points);
        break;
    }
    probes.push_back(std::move(probe));
  }
  return probes;
}

std::shared_ptr<const solver::Problem> problem_of(const Case& input) {
  auto problem = problem_without_grid(input);
  set_grids(*problem, input, probes_of(input, problem->outline));
  return problem;
}

Results run_case(Case input, const std::function<void(const std::string&)>& on_stage) {
  Results results;
  results.input = std::move(input);
  Stopwatch watch(results.stages, on_stage);
  watch.begin("grid");
  auto problem = problem_without_grid(results.input);
  const auto probes = probes_of(results.input, problem->outline);
  set_grids(*problem, results.input, probes);
  results.problem = problem;
  watch.begin("solve");
  auto solution = std::make_shared<solver::Solution>(solve(results.problem));
  results.solution = solution;
  watch.begin("figures");
  results.field = std::make_shared<solver::RecoveredField>(*solution);
  const solver::PartIntegrals integrals(*solution);
  const solver::StressBands bands(*results.problem, bodies(results.problem->outline));
  results.figures = figures_of(integrals, *results.field, bands, probes, results.input.circuits);
  watch.begin("checks");
  results.checks = verify::run_checks(integrals, *results.field, bands);
  for (auto& notice : verify::notices_of(*results.problem, results.figures, results.input.circuits,
                                         results.input.run_length_m)) {
    results.figures.notices.push_back(std::move(notice));
  }
  const solver::FaultCurrent* fault = nullptr;
  if (results.input.fault) {
    watch.begin("fault");
    fault = &results.input.fault->current;
    const auto sustained = solve(solver::fault_problem(*results.problem, *fault));
    std::optional<solver::Supports> supports;
    if (const auto& given = results.input.supports) supports = {given->span, given->strength};
    results.figures.fault =
        fault_figures(*fault, solver::PartIntegrals(sustained), bands, supports);
    for (auto& notice : saturation_notices(*results.problem, field_levels(sustained),
                                           largest_scale(*fault).scale, "in the fault")) {
      results.figures.notices.push_back(std::move(notice));
    }
  }
  verify::add_hand_values(results.figures, *results.problem, fault);
  watch.end();
  return results;
}

}  // namespace barwall::io
