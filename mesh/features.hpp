#pragma once

#include <vector>

#include "mesh/outline.hpp"
#include "mesh/spacing.hpp"

namespace barwall::mesh {

/// What a section's outlines ask of the grid along one axis.
struct AxisFeatures {
  // Spacings at cells_across = 4.
  std::vector<SpacingSource> smooth;  ///< from widths, gaps and edges
  std::vector<SpacingSource> sharp;   ///< at corners towards which the field grows without bound
  std::vector<WantedLine> lines;
};

struct Features {
  AxisFeatures x;
  AxisFeatures y;
};

/// Spacings and lines for a section: a quarter of every width and gap across it, a thirty-second of
/// a circle's diameter, finer towards the edges of bars, and at the corners of parts with sharp
/// corners a twenty-fifth of their thickness.
Features features_of(const Section& section, const Outline& outline);

}  // namespace barwall::mesh
