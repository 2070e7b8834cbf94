#pragma once

#include <vector>

namespace barwall::verify {

/// Nodes in (-1, 1), ascending, and weights, which add up to 2.
struct QuadratureRule {
  std::vector<double> nodes;
  std::vector<double> weights;
};

/// The Gauss-Legendre rule with `points` nodes, exact for polynomials up to degree
/// 2 points - 1. Throws std::invalid_argument if points < 1.
QuadratureRule gauss_legendre(int points);

}  // namespace barwall::verify
