#include "solver/saturation_notices.hpp"

#include <fmt/format.h>

namespace barwall::solver {

std::vector<Notice> table_notices(const Problem& problem, const std::vector<FieldLevel>& levels,
                                  const std::string& when) {
  std::vector<Notice> notices;
  for (std::size_t k = 0; k < levels.size(); ++k) {
    if (levels[k].share_beyond_table == 0.0) continue;
    notices.push_back(
        {"beyond the B-H table",
         fmt::format("\"{}\" {}: {:.3g} % of its area lies above {:.4g} T, where its B-H table "
                     "ends; there B is taken to rise as in vacuum",
                     problem.section.parts[k].name, when, 100.0 * levels[k].share_beyond_table,
                     problem.materials[k].curve->table_end()),
         false});
  }
  return notices;
}

std::vector<Notice> saturation_notices(const Problem& problem,
                                       const std::vector<FieldLevel>& levels,
                                       const std::string& when) {
  std::vector<Notice> notices;
  for (std::size_t k = 0; k < levels.size(); ++k) {
    const Material& material = problem.materials[k];
    const double high = levels[k].high;
    if (!material.magnetic() || material.saturable() || high <= steel_saturates_at) continue;
    notices.push_back(
        {"saturation",
         fmt::format("\"{}\" {}: B above {:.3g} T on 1 % of its area at a constant permeability; "
                     "steel saturates near {:.1f} T, which weakens its effect on forces and lets "
                     "more field through: give it a B-H table, or a lower permeability",
                     problem.section.parts[k].name, when, high, steel_saturates_at),
         true});
  }
  return notices;
}

}  // namespace barwall::solver
