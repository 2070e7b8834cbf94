#pragma once

#include "mesh/section.hpp"

namespace barwall::support {

/// A random valid section, the same for the same seed: tiles of bars of every shape, turned,
/// thin, tiny beside large, in pieces; bars nested in frames and tubes; walls that touch, overlap
/// and carry openings; sometimes all within an enclosure.
mesh::Section random_section(unsigned seed);

/// True when the section has no circular outline.
bool straight(const mesh::Section& section);

}  // namespace barwall::support
