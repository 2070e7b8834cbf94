#pragma once

#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// |B| within a part; with a frequency the largest magnitude in the cycle at each place.
struct FieldLevel {
  double mean = 0.0;  ///< averaged over the part's area [T]
  double high = 0.0;  ///< exceeded on 1 % of the part's area [T]
};

FieldLevel field_level(const Solution& solution, int part);

}  // namespace barwall::solver
