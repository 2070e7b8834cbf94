#include "io/case_problem.hpp"

#include <fmt/format.h>
#include <omp.h>
#include <sys/sysinfo.h>

#include <algorithm>
#include <cmath>

#include "io/input_error.hpp"
#include "mesh/offset_line.hpp"
#include "solver/instants.hpp"

namespace barwall::io {
namespace {

/// Memory that a direct solve of n nodes takes, by measurement: about 31 n log2 n bytes for the
/// factor and 700 n for everything else.
double bytes_needed(double nodes) {
  return nodes * (31.0 * std::log2(nodes) + 700.0);
}

/// What the instants of a cycle and of a fault in saturable steel take beside: each thread a factor
/// of its own, each instant its potential, its reluctivity and its field while that is gathered.
double bytes_of_instants(double nodes) {
  constexpr double an_instant = 8.0 + 2.0 * 8.0 + 16.0;
  return nodes * (31.0 * std::log2(nodes) * (omp_get_max_threads() - 1) +
                  2.0 * solver::most_instants * an_instant);
}

/// Largest number of nodes that three quarters of the free memory hold.
/// \param instants whether the problem is solved instant by instant
double nodes_that_fit(bool instants) {
  struct sysinfo info {};
  sysinfo(&info);
  const double free = 0.75 * static_cast<double>(info.freeram + info.bufferram) * info.mem_unit;
  const auto fits = [&](double nodes) {
    return bytes_needed(nodes) + (instants ? bytes_of_instants(nodes) : 0.0) < free;
  };
  double nodes = 1e4;
  while (nodes < 2e8 && fits(1.1 * nodes)) nodes *= 1.1;
  return nodes;
}

/// Half-sizes out to which a net current's field is checked: 20 section sizes and a little.
constexpr double net_current_zone = 42.0;

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
  mesh::GridOptions options;
  options.cells_across = input.grid.cells_across;
  options.reach = input.grid.reach;
  if (has_net_current(input.excitation)) options.wide = net_current_zone;
  options.max_nodes =
      nodes_that_fit(saturable(problem) && (input.excitation.alternating() || input.fault));
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

/// Probe places with their points.
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

}  // namespace

ProbedProblem probed_problem_of(const Case& input) {
  auto problem = problem_without_grid(input);
  auto probes = probes_of(input, problem->outline);
  set_grids(*problem, input, probes);
  return {std::move(problem), std::move(probes)};
}

std::shared_ptr<const solver::Problem> problem_of(const Case& input) {
  return probed_problem_of(input).problem;
}

}  // namespace barwall::io
