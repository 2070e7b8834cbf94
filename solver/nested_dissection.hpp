#pragma once

#include <vector>

namespace barwall::solver {

/// Order of elimination of a columns x rows grid of nodes with nine-point couplings: halves
/// first, the separating line between them last, recursively (A. George, SIAM J. Numer. Anal.
/// 10, 1973). Entry k is the node (row-major number) eliminated k-th.
std::vector<int> nested_dissection(int columns, int rows);

}  // namespace barwall::solver
