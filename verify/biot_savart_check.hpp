#pragma once

#include <optional>
#include <vector>

#include "solver/flux_density.hpp"
#include "verify/air_samples.hpp"
#include "verify/check.hpp"

namespace barwall::verify {

/// Compares the grid's B in air with the direct Biot-Savart sum over the bars (closed forms) and
/// the steel's bound currents, at samples of every stretch of air. Each error is relative to the
/// largest of |B| there, a tenth of the r.m.s. |B| of its group, and 2 % of the sum of the
/// magnitudes of the single bars' fields. With a frequency these and the error are r.m.s. values,
/// over the instants where there are several.
class BiotSavartCheck {
public:
  /// Takes a solution, or the next of the instants of a cycle, all of one problem.
  void add(const solver::Solution& solution, const solver::RecoveredField& field);

  /// \return "biot-savart-rms", the r.m.s. over the worst group, limit 0.5 %, and
  ///         "biot-savart-worst", limit 3 %
  std::vector<Check> checks() const;

private:
  std::optional<AirSamples> samples_;
  std::vector<mesh::Point> at_;                 ///< all samples, group by group
  std::vector<std::vector<mesh::Point>> unit_;  ///< per part, per sample: B of 1 A in it [T]
  int instants_ = 0;
  std::vector<double> current_square_;  ///< per part, summed over instants [A2]
  std::vector<double> square_;          ///< per sample: |B|^2 of the direct sum
  std::vector<double> error_square_;    ///< per sample: of the difference
};

}  // namespace barwall::verify
