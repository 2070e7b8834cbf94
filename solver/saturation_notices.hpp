#pragma once

#include <string>
#include <vector>

#include "solver/figures.hpp"

namespace barwall::solver {

/// Notices of parts of saturable steel that are driven beyond their B-H tables, with how much of
/// each.
/// \param levels of every part (field_levels)
/// \param when what drives them, such as "in the fault"
std::vector<Notice> table_notices(const Problem& problem, const std::vector<FieldLevel>& levels,
                                  const std::string& when);

/// Notices of parts of constant permeability that are driven beyond what steel follows.
/// \param levels of every part (field_levels)
/// \param when what drives them, such as "in the fault"
std::vector<Notice> saturation_notices(const Problem& problem,
                                       const std::vector<FieldLevel>& levels,
                                       const std::string& when);

}  // namespace barwall::solver
