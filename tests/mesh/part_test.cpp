#include <catch2/catch.hpp>

#include "mesh/section.hpp"

namespace barwall::mesh {

TEST_CASE("A part's pieces count by their areas in its area and its centroid") {
  const Part part{"N", Part::Kind::bar, {Rectangle{{1, 2}, 2, 3}, Rectangle{{9, 6}, 1, 2}}};
  CHECK(area(part) == Approx(8.0));
  CHECK(centroid(part).x == Approx((6.0 * 1.0 + 2.0 * 9.0) / 8.0));
  CHECK(centroid(part).y == Approx((6.0 * 2.0 + 2.0 * 6.0) / 8.0));
}

}  // namespace barwall::mesh
