#pragma once

#include <optional>

#include "solver/material.hpp"

namespace barwall::solver {

/// Resistivity of a material [ohm m] at 20 degrees Celsius: the one that the case gives, or else a
/// typical one of copper, aluminium, brass, stainless and of magnetic steel; none for any other
/// material. No field depends on it; it says how far alternating currents and flux reach.
std::optional<double> resistivity_of(const Material& material);

}  // namespace barwall::solver
