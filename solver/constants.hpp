#pragma once

#include <numbers>

namespace barwall::solver {

/// Permeability of vacuum [H/m]. The exact SI value before 2019; the measured value of today
/// differs by 1.3e-10, far below anything computed here.
inline constexpr double mu_0 = 4.0e-7 * std::numbers::pi;

/// Reluctivity of vacuum, 1 / mu_0 [m/H].
inline constexpr double nu_0 = 1.0 / mu_0;

}  // namespace barwall::solver
