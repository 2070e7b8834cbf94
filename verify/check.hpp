#pragma once

#include <cmath>
#include <string>
#include <vector>

namespace barwall::verify {

/// One self-check of a run: one measured value against one limit.
struct Check {
  std::string name;  ///< such as "biot-savart-rms"
  double measured = 0.0;
  double limit = 0.0;
  std::string unit = "1";
  bool passed = false;  ///< measured <= limit; false for NaN
  std::string detail;   ///< where the worst place is, and of what
};

/// Builds a check; a measured value that is not a number fails.
inline Check make_check(std::string name, double measured, double limit, std::string detail) {
  return {std::move(name), measured, limit, "1", measured <= limit, std::move(detail)};
}

/// True when an error is worse than the worst so far; what is not a number is worse than any.
inline bool worse(double error, double worst) {
  return !std::isnan(worst) && !(error <= worst);
}

/// True when every check passed and there is at least one.
inline bool sound(const std::vector<Check>& checks) {
  for (const Check& check : checks) {
    if (!check.passed) return false;
  }
  return !checks.empty();
}

}  // namespace barwall::verify
