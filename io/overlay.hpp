#pragma once

#include <cstdint>
#include <functional>
#include <optional>
#include <vector>

#include "mesh/shape.hpp"

namespace barwall::io {

/// Counts the work of the overlap tests, in steps of a few nanoseconds, so that no input makes
/// them run without end.
struct Effort {
  std::int64_t left = 2'000'000'000;
  bool spent() const { return left < 0; }
};

/// Looks for a region of the plane, cut up by the curves, where `wanted` holds: every region
/// within `window` that is more than three times `depth` wide [m] is asked about at a point
/// at least `depth` away from all curves. Regions that are thinner, as rounding leaves them
/// between outlines in contact, are passed over.
/// \return such a point, or nothing; nothing also when the effort is spent
std::optional<mesh::Point> find_region(const std::vector<mesh::Curve>& curves,
                                       const mesh::Box& window, double depth, Effort& effort,
                                       const std::function<bool(mesh::Point)>& wanted);

/// A shape with what the overlap tests ask of it again and again.
struct Outline {
  mesh::Shape shape;
  mesh::Box box;                    ///< round it [m]
  double thickness = 0.0;           ///< mesh::thickness [m]
  std::vector<mesh::Curve> curves;  ///< its whole boundary
};

Outline outline_of(const mesh::Shape& shape);

/// Width [m] of the thinnest overlap that counts, for a part this thick: 1e-6 of the thickness,
/// but never within the rounding of the coordinates in the box.
double depth_that_counts(double thickness, const mesh::Box& box);

/// False when boxes along the shapes' own axes show that the two cannot overlap.
bool may_overlap(const Outline& a, const Outline& b);

/// A point inside both shapes where they overlap by more than 1e-6 of the smaller thickness;
/// contact along an edge or at a point is no overlap.
std::optional<mesh::Point> overlap(const Outline& a, const Outline& b, Effort& effort);

}  // namespace barwall::io
