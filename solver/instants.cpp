#include "solver/instants.hpp"

#include <algorithm>
#include <cmath>
#include <exception>

#include "solver/energy.hpp"
#include "solver/flux_density.hpp"
#include "solver/local_interpolation.hpp"

namespace barwall::solver {
namespace {

/// Currents below this share of the course's largest are what rounding leaves of a zero.
constexpr double rounding = 1e-12;

/// Far below what lies between the instants; a start foretold well needs one iteration less to get
/// there than to the tolerance of a single solve.
constexpr double newton_tolerance = 1e-8;

/// The factors of the known instants in the value halfway between the k-th and the next: of the six
/// nearest.
Eigen::VectorXd middle_weights(const Course& course, Eigen::Index known, Eigen::Index k) {
  Eigen::VectorXd weights = Eigen::VectorXd::Zero(known);
  const Eigen::Index first =
      course.half_cycle ? k - 2 : std::clamp<Eigen::Index>(k - 2, 0, known - 6);
  const auto factor = local_interpolation(static_cast<double>(k - first) + 0.5);
  for (Eigen::Index i = 0; i < 6; ++i) {
    // Before and after half a cycle the field is minus its own.
    const Eigen::Index at = first + i;
    const bool beyond = at < 0 || at >= known;
    weights[(at + known) % known] += (beyond ? -1.0 : 1.0) * factor[static_cast<std::size_t>(i)];
  }
  return weights;
}

/// Energy of the difference between a field and a guess at it, at the field's own reluctivity.
double energy_of_difference(const Solution& solution, const Eigen::VectorXd& guess) {
  const mesh::FittedGrid& grid = solution.grid();
  const Eigen::VectorXd difference = solution.potential.col(0) - guess;
  double sum = 0.0;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const mesh::Point b = cell_flux_density(grid, t, difference);
    sum += 0.5 * solution.reluctivity[static_cast<std::size_t>(t)] * dot(b, b) *
           triangle_area(grid.corners(t));
  }
  return sum;
}

std::size_t strongest_of(const std::vector<std::shared_ptr<const Solution>>& solutions) {
  std::size_t best = 0;
  double most = -1.0;
  for (std::size_t k = 0; k < solutions.size(); ++k) {
    const double energy = saturable_energy(*solutions[k]).energy;
    // Of equal ones the first, whatever rounding says.
    if (energy > most * (1.0 + 1e-9)) {
      most = energy;
      best = k;
    }
  }
  return best;
}

class InstantSolver {
public:
  InstantSolver(const Problem& problem, const Course& course) : problem_(problem), course_(course) {
    problem_.loops.clear();
  }

  /// Solves the currents at every wt, each from its start; an empty one is none.
  std::vector<std::shared_ptr<const Solution>> solve_all(
      const std::vector<double>& wt,
      const std::function<Eigen::VectorXd(std::size_t)>& start) const {
    std::vector<std::shared_ptr<const Solution>> solutions(wt.size());
    std::vector<std::exception_ptr> failures(wt.size());
    const double least = rounding * largest_current();
#pragma omp parallel
    {
      Workspace workspace;
#pragma omp for schedule(dynamic)
      for (std::size_t k = 0; k < wt.size(); ++k) {
        try {
          auto problem = std::make_shared<Problem>(problem_);
          problem->excitation = {};
          for (const double current : course_.currents(wt[k])) {
            problem->excitation.current.emplace_back(std::abs(current) > least ? current : 0.0);
          }
          SolveOptions options;
          options.newton_tolerance = newton_tolerance;
          options.start = start(k);
          solutions[k] = std::make_shared<Solution>(
              solve(std::shared_ptr<const Problem>(std::move(problem)), options, &workspace));
        } catch (...) {
          failures[k] = std::current_exception();
        }
      }
    }
    for (const std::exception_ptr& failure : failures) {
      if (failure) std::rethrow_exception(failure);
    }
    return solutions;
  }

private:
  double largest_current() const {
    double largest = 0.0;
    constexpr int steps = 48;
    for (int k = 0; k <= steps; ++k) {
      for (const double current : course_.currents(course_.end * k / steps)) {
        largest = std::max(largest, std::abs(current));
      }
    }
    return largest;
  }

  Problem problem_;
  const Course& course_;
};

}  // namespace

Course half_cycle_of(const Excitation& excitation, double scale) {
  Course course;
  course.currents = [current = excitation.current, scale](double wt) {
    std::vector<double> now;
    for (const std::complex<double>& phasor : current) {
      now.push_back(scale * std::numbers::sqrt2 * (phasor * std::polar(1.0, wt)).real());
    }
    return now;
  };
  return course;
}

Instants solve_instants(const Problem& problem, const Course& course,
                        const InstantOptions& options) {
  const InstantSolver solver(problem, course);
  Instants result;
  int intervals = options.first;
  const int ends = course.half_cycle ? 0 : 1;
  for (int k = 0; k < intervals + ends; ++k) result.wt.push_back(course.end * k / intervals);
  result.solution = solver.solve_all(result.wt, [](std::size_t) { return Eigen::VectorXd(); });
  while (2 * intervals <= options.most) {
    const auto known = static_cast<Eigen::Index>(result.size());
    std::vector<double> middle;
    for (int k = 0; k < intervals; ++k) middle.push_back(course.end * (k + 0.5) / intervals);
    std::vector<Eigen::VectorXd> foretold;
    for (Eigen::Index k = 0; k < intervals; ++k) {
      const Eigen::VectorXd weight = middle_weights(course, known, k);
      foretold.emplace_back(Eigen::VectorXd::Zero(problem.grid->node_count()));
      for (Eigen::Index i = 0; i < known; ++i) {
        if (weight[i] == 0.0) continue;
        foretold.back() +=
            weight[i] * result.solution[static_cast<std::size_t>(i)]->potential.col(0);
      }
    }
    const auto added = solver.solve_all(middle, [&](std::size_t k) { return foretold[k]; });
    double difference = 0.0;
    double energy = 0.0;
    Instants finer;
    for (std::size_t k = 0; k < result.size(); ++k) {
      finer.wt.push_back(result.wt[k]);
      finer.solution.push_back(result.solution[k]);
      energy = std::max(energy, field_energy(*result.solution[k]).mean);
      if (k >= added.size()) continue;
      finer.wt.push_back(middle[k]);
      finer.solution.push_back(added[k]);
      energy = std::max(energy, field_energy(*added[k]).mean);
      difference = std::max(difference, energy_of_difference(*added[k], foretold[k]));
    }
    finer.surprise = energy > 0.0 ? std::sqrt(difference / energy) : 0.0;
    result = std::move(finer);
    intervals *= 2;
    if (result.surprise <= options.surprise) break;
  }
  result.half_cycle = course.half_cycle;
  result.strongest = strongest_of(result.solution);
  return result;
}

Solution with_loops(const Solution& instant, const std::vector<Loop>& loops) {
  auto problem = std::make_shared<Problem>(*instant.problem);
  problem->loops = loops;
  SolveOptions options;
  options.start = instant.potential.col(0);
  return solve(std::shared_ptr<const Problem>(std::move(problem)), options);
}

Solution fundamental_of(std::shared_ptr<const Problem> problem, const Instants& half_cycle) {
  Solution result = with_loops(*half_cycle.solution[half_cycle.strongest], problem->loops);
  result.patterns = load_patterns(*problem);
  result.potential = Eigen::MatrixXd::Zero(problem->grid->node_count(), 2);
  const double share = std::numbers::sqrt2 / static_cast<double>(half_cycle.size());
  for (std::size_t k = 0; k < half_cycle.size(); ++k) {
    const auto& potential = half_cycle.solution[k]->potential;
    result.potential.col(0) += share * std::cos(half_cycle.wt[k]) * potential;
    result.potential.col(1) -= share * std::sin(half_cycle.wt[k]) * potential;
  }
  result.newton.clear();
  result.problem = std::move(problem);
  return result;
}

}  // namespace barwall::solver
