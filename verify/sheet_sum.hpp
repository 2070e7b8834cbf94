#pragma once

#include <span>
#include <vector>

#include "mesh/point.hpp"
#include "verify/current_sheet.hpp"

namespace barwall::verify {

/// B [T] at each of `at` of all the sheets together: the field of magnetised steel once its bound
/// currents are known. A sheet nearer than two of its widths (measured from its middle) is taken
/// in closed form, as in field_of_sheet; a farther one by its multipole series, whose truncation
/// is below 3e-10 of that sheet's own field. The points are shared among threads; a point's sum
/// is always taken in the order of the sheets, so the result does not depend on their number.
std::vector<mesh::Point> field_of_sheets(std::span<const CurrentSheet> sheets,
                                         std::span<const mesh::Point> at);

}  // namespace barwall::verify
