#include "verify/biot_savart_check.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "verify/air_samples.hpp"
#include "verify/bound_currents.hpp"
#include "verify/filled_bar.hpp"
#include "verify/sheet_sum.hpp"

namespace barwall::verify {
namespace {

/// B [T] at a point of 1 A in one part, spread over its pieces by area.
mesh::Point field_of_part(const mesh::Part& part, mesh::Point at) {
  const double whole = area(part);
  mesh::Point b;
  for (const mesh::Shape& piece : part.pieces) b += field_of(piece, area(piece) / whole, at);
  return b;
}

/// The direct sum at every sample: per load pattern B [T], and the sum of the single bars' |B|.
struct DirectSum {
  std::vector<std::vector<mesh::Point>> b;  ///< per pattern, per point
  std::vector<double> bars_alone;           ///< per point [T]
};

DirectSum direct_sum(const solver::Solution& solution, const std::vector<mesh::Point>& at) {
  const solver::Problem& problem = *solution.problem;
  DirectSum sum;
  for (int k = 0; k < solution.pattern_count(); ++k) {
    sum.b.push_back(field_of_sheets(bound_currents(solution, solution.potential.col(k)), at));
  }
  sum.bars_alone.assign(at.size(), 0.0);
  for (std::size_t part = 0; part < problem.section.parts.size(); ++part) {
    const auto current = problem.excitation.current[part];
    if (current == 0.0) continue;
    for (std::size_t i = 0; i < at.size(); ++i) {
      const mesh::Point unit = field_of_part(problem.section.parts[part], at[i]);
      sum.b[0][i] += current.real() * unit;
      if (sum.b.size() == 2) sum.b[1][i] += current.imag() * unit;
      sum.bars_alone[i] += std::abs(current) * norm(unit);
    }
  }
  return sum;
}

/// Length of a field over all load patterns.
template <class Component>
double magnitude(int patterns, Component component) {
  double square = 0.0;
  for (int k = 0; k < patterns; ++k) square += dot(component(k), component(k));
  return std::sqrt(square);
}

}  // namespace

std::vector<Check> check_biot_savart(const solver::Solution& solution,
                                     const solver::RecoveredField& field) {
  const AirSamples samples = air_samples(*solution.problem);
  std::vector<mesh::Point> at;
  for (const AirGroup& group : samples.groups) {
    for (const AirSample& sample : group.samples) at.push_back(sample.at);
  }
  const DirectSum direct = direct_sum(solution, at);
  const int patterns = solution.pattern_count();

  double worst_rms = 0.0;
  double worst = 0.0;
  mesh::Point worst_at;
  std::string listed;
  std::size_t first = 0;
  for (const AirGroup& group : samples.groups) {
    const std::size_t count = group.samples.size();
    const auto b_at = [&](std::size_t i) {
      return magnitude(patterns,
                       [&](int k) { return direct.b[static_cast<std::size_t>(k)][first + i]; });
    };
    double level = 0.0;
    for (std::size_t i = 0; i < count; ++i) level += b_at(i) * b_at(i);
    level = std::sqrt(level / static_cast<double>(count));
    double squares = 0.0;
    for (std::size_t i = 0; i < count; ++i) {
      const AirSample& sample = group.samples[i];
      const double error = magnitude(patterns, [&](int k) {
        return field.flux_density(sample.location, sample.at, k) -
               direct.b[static_cast<std::size_t>(k)][first + i];
      });
      const double scale = std::max({b_at(i), 0.1 * level, 0.02 * direct.bars_alone[first + i]});
      const double relative = scale > 0.0 ? error / scale : error;
      squares += relative * relative;
      if (!(relative <= worst)) {  // a NaN becomes the worst
        worst = relative;
        worst_at = sample.at;
      }
    }
    const double rms = std::sqrt(squares / static_cast<double>(count));
    if (!(rms <= worst_rms)) worst_rms = rms;
    listed += fmt::format("{}{}: {:.3f} %", listed.empty() ? "" : "; ", group.name, 100.0 * rms);
    first += count;
  }
  for (const std::string& name : samples.left_out) {
    listed += fmt::format("; {}: no room for samples", name);
  }
  const bool enough = at.size() >= 100;
  if (!enough) worst_rms = worst = NAN;
  return {make_check("biot-savart-rms", worst_rms, 0.005,
                     fmt::format("{} points in air; {}", at.size(), listed)),
          make_check("biot-savart-worst", worst, 0.03,
                     fmt::format("at ({:.4g}, {:.4g}) mm", 1e3 * worst_at.x, 1e3 * worst_at.y))};
}

}  // namespace barwall::verify
