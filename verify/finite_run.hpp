#pragma once

#include <span>

#include "mesh/point.hpp"
#include "mesh/shape.hpp"

namespace barwall::verify {

/// A bar's cross-section with the current [A] spread evenly over it.
struct BarCurrent {
  mesh::Shape shape;
  double current = 0.0;
};

/// The field of the same bars [T], in air, once endless and once as a straight run.
struct RunField {
  mesh::Point endless;
  mesh::Point mid_span;
};

/// B of bars in air at a point of the section, endless and at mid-span of a straight run of
/// `run_length` [m] whose supply and return lie beyond its ends and are left out. The endless
/// field is the closed form; what a finite run lacks of it varies slowly over a bar and is summed
/// over filaments, so the result holds inside the bars too. Throws std::invalid_argument unless
/// run_length > 0.
RunField field_of_run(std::span<const BarCurrent> bars, double run_length, mesh::Point at);

}  // namespace barwall::verify
