#include "verify/round_bar.hpp"

#include <cassert>

#include "verify/round_conductor.hpp"

namespace barwall::verify {

using mesh::Point;

Point field_of_bars(std::span<const RoundBar> bars, Point at) {
  Point sum;
  for (const RoundBar& bar : bars) sum += field_of_disc(bar.centre, bar.radius, bar.current, at);
  return sum;
}

double potential_of_bars(std::span<const RoundBar> bars, Point at) {
  double sum = 0.0;
  for (const RoundBar& bar : bars) {
    sum += potential_of_disc(bar.centre, bar.radius, bar.current, at);
  }
  return sum;
}

Point field_of_other_bars(std::span<const RoundBar> bars, std::size_t index) {
  assert(index < bars.size());
  const Point at = bars[index].centre;
  return field_of_bars(bars.first(index), at) + field_of_bars(bars.subspan(index + 1), at);
}

}  // namespace barwall::verify
