#include "solver/largest_value.hpp"

#include <algorithm>
#include <boost/math/tools/minima.hpp>
#include <cassert>
#include <cmath>
#include <limits>
#include <vector>

namespace barwall::solver {

LargestValue largest_value(const std::function<double(double)>& function, double low, double high,
                           int steps) {
  assert(steps > 0 && low < high);
  const double step = (high - low) / steps;
  std::vector<double> value(static_cast<std::size_t>(steps) + 1);
  double magnitude = 0.0;
  for (std::size_t k = 0; k < value.size(); ++k) {
    value[k] = function(low + static_cast<double>(k) * step);
    magnitude = std::max(magnitude, std::abs(value[k]));
  }
  LargestValue best{low, value.front()};
  const auto offer = [&](double at, double offered) {
    if (offered > best.value + 1e-12 * magnitude) best = {at, offered};
  };
  constexpr int bits = std::numeric_limits<double>::digits / 2;
  for (std::size_t k = 0; k < value.size(); ++k) {
    const bool rises = k == 0 || value[k] >= value[k - 1];
    const bool falls = k + 1 == value.size() || value[k] >= value[k + 1];
    if (!rises || !falls) continue;
    const double at = low + static_cast<double>(k) * step;
    const auto [crest, minus] = boost::math::tools::brent_find_minima(
        [&](double x) { return -function(x); }, std::max(low, at - step), std::min(high, at + step),
        bits);
    // The scan's own place where narrowing gains nothing: ends, and functions that stand still.
    if (-minus > value[k] + 1e-15 * magnitude) {
      offer(crest, -minus);
    } else {
      offer(at, value[k]);
    }
  }
  return best;
}

}  // namespace barwall::solver
