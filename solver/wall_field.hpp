#pragma once

#include <vector>

#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// |B| within a part; with a frequency the largest magnitude in the cycle at each place.
struct FieldLevel {
  double mean = 0.0;  ///< averaged over the part's area [T]
  double high = 0.0;  ///< exceeded on 1 % of the part's area [T]
};

/// The level in every part of the section, by index; zeros for one that does not show.
std::vector<FieldLevel> field_levels(const Solution& solution);

}  // namespace barwall::solver
