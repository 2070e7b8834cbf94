#pragma once

#include <optional>

#include "solver/fault_extremes.hpp"
#include "tests/support/problems.hpp"

namespace barwall::support {

inline constexpr double fault_hertz = 50.0;

/// A fault between the first two or three parts of a section.
inline solver::FaultCurrent alternating_fault(std::size_t bars, double symmetrical, double r_over_x,
                                              std::optional<double> closing = {}) {
  solver::FaultCurrent fault{{0, 1, 2},
                             solver::AlternatingFault{fault_hertz, symmetrical, r_over_x, closing}};
  fault.bars.resize(bars);
  return fault;
}

/// A section without load, its last part of the given permeability, on few nodes.
inline std::shared_ptr<solver::Problem> on_small_grid(const mesh::Section& section,
                                                      double permeability) {
  std::vector<double> all(section.parts.size(), 1.0);
  all.back() = permeability;
  const std::vector<std::complex<double>> none(section.parts.size(), 0.0);
  return problem_of(section, all, none, {2, 5.0}, fault_hertz);
}

/// What is told of an extreme, its value 0 or more where it has the sign of its name.
struct Told {
  double value;
  std::optional<double> seconds;
  std::optional<double> closing;
};

/// x_max, x_min, y_max, y_min and the peak.
inline std::vector<Told> told_by(const solver::FaultExtremes& e) {
  return {{e.x_max.value, e.x_max.seconds, e.x_max.closing},
          {-e.x_min.value, e.x_min.seconds, e.x_min.closing},
          {e.y_max.value, e.y_max.seconds, e.y_max.closing},
          {-e.y_min.value, e.y_min.seconds, e.y_min.closing},
          {e.peak.magnitude, e.peak.seconds, e.peak.closing}};
}

}  // namespace barwall::support
