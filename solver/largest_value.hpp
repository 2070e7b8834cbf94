#pragma once

#include <functional>

namespace barwall::solver {

/// Where a function is largest.
struct LargestValue {
  double at = 0.0;
  double value = 0.0;
};

/// The largest value of a smooth function on [low, high]: an even scan of `steps` intervals, then
/// each local maximum of the scan, and each end, narrowed within its two neighbouring intervals.
/// Sure where maxima lie two intervals or more apart. Of values equal to 1e-12 of the largest
/// magnitude scanned, the first.
LargestValue largest_value(const std::function<double(double)>& function, double low, double high,
                           int steps);

}  // namespace barwall::solver
