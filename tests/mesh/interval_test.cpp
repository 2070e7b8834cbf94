#include <catch2/catch.hpp>

#include "mesh/spacing.hpp"

namespace barwall::mesh {

TEST_CASE("A place lies in the interval that begins at or before it, beyond all lines in an end") {
  const std::vector<double> lines{-1.0, 0.0, 2.0, 5.0};
  CHECK(interval_of(lines, -7.0) == 0);
  CHECK(interval_of(lines, -0.5) == 0);
  CHECK(interval_of(lines, 0.0) == 1);
  CHECK(interval_of(lines, 4.9) == 2);
  CHECK(interval_of(lines, 5.0) == 2);
  CHECK(interval_of(lines, 8.0) == 2);
}

}  // namespace barwall::mesh
