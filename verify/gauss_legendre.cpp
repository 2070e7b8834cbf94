#include "verify/gauss_legendre.hpp"

#include <algorithm>
#include <boost/math/special_functions/legendre.hpp>
#include <stdexcept>

namespace barwall::verify {

QuadratureRule gauss_legendre(int points) {
  if (points < 1) throw std::invalid_argument("a quadrature rule needs at least one point");
  QuadratureRule rule;
  for (const double zero : boost::math::legendre_p_zeros<double>(points)) {
    rule.nodes.push_back(zero);  // the zeros come from 0 upwards
    if (zero > 0.0) rule.nodes.push_back(-zero);
  }
  std::sort(rule.nodes.begin(), rule.nodes.end());
  for (const double x : rule.nodes) {
    const double slope = boost::math::legendre_p_prime(points, x);
    rule.weights.push_back(2.0 / ((1.0 - x * x) * slope * slope));
  }
  return rule;
}

}  // namespace barwall::verify
