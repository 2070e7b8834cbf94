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

}  // namespace

void BiotSavartCheck::add(const solver::Solution& solution, const solver::RecoveredField& field) {
  const solver::Problem& problem = *solution.problem;
  const auto& parts = problem.section.parts;
  if (!samples_) {
    samples_ = air_samples(problem);
    for (const AirGroup& group : samples_->groups) {
      for (const AirSample& sample : group.samples) at_.push_back(sample.at);
    }
    for (const mesh::Part& part : parts) {
      unit_.emplace_back();
      if (part.kind == mesh::Part::Kind::wall) continue;
      for (const mesh::Point at : at_) unit_.back().push_back(field_of_part(part, at));
    }
    current_square_.assign(parts.size(), 0.0);
    square_.assign(at_.size(), 0.0);
    error_square_.assign(at_.size(), 0.0);
  }
  ++instants_;
  for (std::size_t k = 0; k < parts.size(); ++k) {
    current_square_[k] += std::norm(problem.excitation.current[k]);
  }
  for (int pattern = 0; pattern < solution.pattern_count(); ++pattern) {
    auto direct = field_of_sheets(bound_currents(solution, solution.potential.col(pattern)), at_);
    const auto& current = solution.patterns[static_cast<std::size_t>(pattern)].part_current;
    for (std::size_t k = 0; k < parts.size(); ++k) {
      if (current[k] == 0.0) continue;
      for (std::size_t i = 0; i < at_.size(); ++i) direct[i] += current[k] * unit_[k][i];
    }
    std::size_t i = 0;
    for (const AirGroup& group : samples_->groups) {
      for (const AirSample& sample : group.samples) {
        const mesh::Point error =
            field.flux_density(sample.location, sample.at, pattern) - direct[i];
        square_[i] += dot(direct[i], direct[i]);
        error_square_[i] += dot(error, error);
        ++i;
      }
    }
  }
}

std::vector<Check> BiotSavartCheck::checks() const {
  const auto mean = [this](double square) { return std::sqrt(square / instants_); };
  const auto bars_alone = [&](std::size_t i) {
    double sum = 0.0;
    for (std::size_t k = 0; k < unit_.size(); ++k) {
      if (current_square_[k] > 0.0) sum += mean(current_square_[k]) * norm(unit_[k][i]);
    }
    return sum;
  };
  double worst_rms = 0.0;
  double worst = 0.0;
  mesh::Point worst_at;
  std::string listed;
  std::size_t first = 0;
  for (const AirGroup& group : samples_->groups) {
    const std::size_t count = group.samples.size();
    double squares = 0.0;
    for (std::size_t i = first; i < first + count; ++i) squares += square_[i];
    const double level = mean(squares / static_cast<double>(count));
    squares = 0.0;
    for (std::size_t i = first; i < first + count; ++i) {
      const double error = mean(error_square_[i]);
      const double scale = std::max({mean(square_[i]), 0.1 * level, 0.02 * bars_alone(i)});
      const double relative = scale > 0.0 ? error / scale : error;
      squares += relative * relative;
      if (worse(relative, worst)) {
        worst = relative;
        worst_at = at_[i];
      }
    }
    const double rms = std::sqrt(squares / static_cast<double>(count));
    if (worse(rms, worst_rms)) worst_rms = rms;
    listed += fmt::format("{}{}: {:.3f} %", listed.empty() ? "" : "; ", group.name, 100.0 * rms);
    first += count;
  }
  for (const std::string& name : samples_->left_out) {
    listed += fmt::format("; {}: no room for samples", name);
  }
  const bool enough = at_.size() >= 100;
  if (!enough) worst_rms = worst = NAN;
  return {make_check("biot-savart-rms", worst_rms, 0.005,
                     fmt::format("{} points in air; {}", at_.size(), listed)),
          make_check("biot-savart-worst", worst, 0.03,
                     fmt::format("at ({:.4g}, {:.4g}) mm", 1e3 * worst_at.x, 1e3 * worst_at.y))};
}

}  // namespace barwall::verify
