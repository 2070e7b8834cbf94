#pragma once

#include <vector>

#include "io/case_text.hpp"
#include "mesh/section.hpp"

namespace barwall::io {

/// Refuses overlaps: of bars, of the pieces of one bar, and of a bar and a wall outside the
/// wall's openings. What a wall of air covers is no wall. Contact is allowed.
/// \param places of each part's shape
/// \throws InputError at the later one of two bars, or at the bar that overlaps a wall
void check_overlaps(const CaseText& text, const mesh::Section& section,
                    const std::vector<Place>& places);

}  // namespace barwall::io
