#pragma once

#include <vector>

#include "io/case_parts.hpp"
#include "solver/excitation.hpp"

namespace barwall::io {

/// The currents of all parts, and the circuits they come from.
struct CaseCurrents {
  solver::Excitation excitation;
  std::vector<solver::Circuit> circuits;
};

/// Reads frequency_hz, [[three_phase]], and current_a and phase_deg of the bars.
/// \throws InputError; also for a bar whose current is given twice or not at all
CaseCurrents read_currents(const CaseTable& root, const CaseParts& parts);

}  // namespace barwall::io
