#include "solver/open_boundary.hpp"

#include <cmath>
#include <numbers>

#include "solver/constants.hpp"

namespace barwall::solver {

double CurrentPattern::boundary_value(mesh::Point at) const {
  if (net == 0.0) return 0.0;
  return -mu_0 * net / (2.0 * std::numbers::pi) * std::log(distance(centroid, at));
}

CurrentPattern pattern_of(const mesh::Section& section, std::vector<double> part_current) {
  CurrentPattern pattern{std::move(part_current), 0.0, {}};
  double magnitude = 0.0;
  mesh::Point moment;
  for (std::size_t k = 0; k < section.parts.size(); ++k) {
    const double current = pattern.part_current[k];
    if (current == 0.0) continue;
    pattern.net += current;
    magnitude += std::abs(current);
    moment += current * centroid(section.parts[k]);
  }
  if (std::abs(pattern.net) <= 1e-12 * magnitude) pattern.net = 0.0;
  if (pattern.net != 0.0) pattern.centroid = (1.0 / pattern.net) * moment;
  return pattern;
}

}  // namespace barwall::solver
