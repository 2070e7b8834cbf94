#include "verify/gauss_legendre.hpp"

#include <catch2/catch.hpp>
#include <cmath>

using namespace barwall::verify;

TEST_CASE("a rule of n points integrates every power below 2 n exactly and the next one not") {
  for (const int points : {1, 2, 5, 12, 31}) {
    const QuadratureRule rule = gauss_legendre(points);
    const auto integral = [&](int power) {
      double sum = 0.0;
      for (std::size_t i = 0; i < rule.nodes.size(); ++i) {
        sum += rule.weights[i] * std::pow(rule.nodes[i], power);
      }
      return sum;
    };
    for (int power = 0; power < 2 * points; ++power) {
      CHECK(integral(power) == Approx(power % 2 ? 0.0 : 2.0 / (power + 1)).margin(1e-14));
    }
    if (points <= 5) CHECK(std::abs(integral(2 * points) - 2.0 / (2 * points + 1)) > 1e-4);
  }
  CHECK_THROWS_AS(gauss_legendre(0), std::invalid_argument);
}
