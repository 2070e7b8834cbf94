#pragma once

#include <vector>

#include "io/case.hpp"
#include "io/case_parts.hpp"

namespace barwall::io {

/// Reads [[probe]]; the lines at 200 mm and 1000 mm distance where there is none.
std::vector<ProbeRequest> read_probes(const CaseTable& root);

/// Reads [[loop]]; every pair of up to 10 bars, in file order, where there is none.
std::vector<solver::Loop> read_loops(const CaseTable& root, const CaseParts& parts);

/// Reads [grid].
GridRequest read_grid(const CaseTable& root);

}  // namespace barwall::io
