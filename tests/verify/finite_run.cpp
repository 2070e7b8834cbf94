#include "verify/finite_run.hpp"

#include <array>
#include <catch2/catch.hpp>

#include "verify/filled_bar.hpp"
#include "verify/finite_filament.hpp"

using namespace barwall::mesh;
using namespace barwall::verify;

TEST_CASE("at mid-span of a run the field is that of finite wires spread over the bars") {
  const std::array bars{BarCurrent{Rectangle{{-0.05, 0.0}, 0.01, 0.1, 0.0}, 1000.0},
                        BarCurrent{Round{{0.05, 0.0}, 0.03}, -800.0}};
  const double length = 1.5;
  for (const Point at : {Point{0.0, 0.0}, Point{0.3, 0.4}, Point{2.0, 0.5}}) {
    const RunField field = field_of_run(bars, length, at);
    Point endless;
    Point finite;
    for (const BarCurrent& bar : bars) {
      for (const Filament& filament : filaments_of(bar.shape, bar.current, 24)) {
        const Point foot = filament.at;
        const Point3 b = field_of_finite_filament({foot.x, foot.y, -0.5 * length},
                                                  {foot.x, foot.y, 0.5 * length}, filament.current,
                                                  {at.x, at.y, 0.0});
        finite += {b.x, b.y};
        endless += field_of_filament(filament, at);
      }
    }
    CHECK(distance(field.endless, endless) < 1e-9 * norm(endless));
    CHECK(distance(field.mid_span, finite) < 1e-9 * norm(finite));
  }
}

TEST_CASE("inside a bar a finite run lacks little and a long one nothing") {
  const std::array bars{BarCurrent{Rectangle{{0.0, 0.0}, 0.01, 0.1, 0.0}, 1000.0}};
  const Point at{0.003, 0.04};
  const RunField short_run = field_of_run(bars, 1.0, at);
  const double lack = distance(short_run.mid_span, short_run.endless) / norm(short_run.endless);
  CHECK(lack > 1e-4);
  CHECK(lack < 1e-2);
  const RunField long_run = field_of_run(bars, 1e6, at);
  CHECK(distance(long_run.mid_span, long_run.endless) < 1e-12 * norm(long_run.endless));
  CHECK_THROWS_AS(field_of_run(bars, 0.0, at), std::invalid_argument);
}
