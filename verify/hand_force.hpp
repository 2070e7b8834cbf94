#pragma once

#include <optional>

#include "mesh/section.hpp"
#include "solver/excitation.hpp"
#include "verify/hand_value.hpp"

namespace barwall::verify {

/// Force [N/m] on a bar (index of a part) by all other bars that carry current: the sum over pairs
/// of pieces, each sharing its bar's current by area, of mu_0 I_1 I_2 / 2 pi d along the line of
/// centres, times the factor k12 where the two are equal flat bars face to face or edge to edge
/// (bar_pair), and as long wires elsewhere. Walls count for nothing.
///
/// None where no hand formula applies: the bar or all others carry no current, or one of two
/// conductors reaches round the other, as a tube round its core.
std::optional<HandForce> hand_force(const mesh::Section& section,
                                    const solver::Excitation& excitation, int bar);

}  // namespace barwall::verify
