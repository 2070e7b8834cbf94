#pragma once

#include <span>

#include "mesh/point.hpp"

namespace barwall::verify {

/// B [T] of a uniform current density [A/m2], out of the page, that fills a simple polygon
/// (either orientation of its corners). Exact inside, outside, on edges and corners: the area
/// integral of J / (z - z') turned into a sum over edges, and a multipole series about the
/// centroid from six radii on, where the sum would cancel. Relative error below 1e-12 for bars no
/// thinner than a hundredth of their length. Throws std::invalid_argument with fewer than three
/// corners or an empty area.
/// Source: Green's theorem; the same potentials for a rectangle in B. Hague, Electromagnetic
/// Problems in Electrical Engineering, 1929 (from memory).
mesh::Point field_of_polygon(std::span<const mesh::Point> corners, double density, mesh::Point at);

/// A [Wb/m] of the same, -(mu_0 / 2 pi) times the integral of J ln(r / 1 m).
double potential_of_polygon(std::span<const mesh::Point> corners, double density, mesh::Point at);

/// Area [m2] of a polygon, negative when its corners run clockwise.
double signed_area(std::span<const mesh::Point> corners);

/// Centroid [m] of a polygon; throws std::invalid_argument if it encloses no area.
mesh::Point centroid_of(std::span<const mesh::Point> corners);

}  // namespace barwall::verify
