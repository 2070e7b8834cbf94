#pragma once

#include <optional>
#include <vector>

#include "mesh/section.hpp"
#include "verify/hand_value.hpp"

namespace barwall::verify {

/// Inductance [H/m] of the loop of bars (indices of parts) that go and return, per metre of run:
/// (mu_0 / 2 pi) ln(D^2 / (R_go R_back)), D the geometric mean distance of the two sides from each
/// other, R each side's from itself. Every side shares its current by area over all pieces of its
/// bars. Walls count for nothing.
///
/// None where a bar is a frame or a polygon, whose mean distances no handbook gives, or a side is
/// empty.
std::optional<HandValue> hand_inductance(const mesh::Section& section, const std::vector<int>& go,
                                         const std::vector<int>& back);

}  // namespace barwall::verify
