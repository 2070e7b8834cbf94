#include "verify/half_space.hpp"

#include <cassert>
#include <cmath>
#include <stdexcept>
#include <vector>

#include "verify/complex_field.hpp"

namespace barwall::verify {

using mesh::Point;

namespace {

double height(const HalfSpace& steel, Point at) {
  return dot(steel.into_air, at - steel.on_surface);
}

void require_bars_in_air(const HalfSpace& steel, std::span<const RoundBar> bars) {
  if (std::abs(norm(steel.into_air) - 1.0) > 1e-12 || !(steel.relative_permeability > 0.0)) {
    throw std::invalid_argument("a half-space needs a unit normal and mu_r > 0");
  }
  for (const RoundBar& bar : bars) {
    if (!(height(steel, bar.centre) > bar.radius)) {
      throw std::invalid_argument("a bar does not lie wholly in the air before the steel");
    }
  }
}

double image_share(const HalfSpace& steel) {
  return (steel.relative_permeability - 1.0) / (steel.relative_permeability + 1.0);
}

/// What stands for the steel when seen from the air.
std::vector<RoundBar> images(const HalfSpace& steel, std::span<const RoundBar> bars) {
  std::vector<RoundBar> result;
  for (const RoundBar& bar : bars) {
    result.push_back({bar.centre - 2.0 * height(steel, bar.centre) * steel.into_air,
                      image_share(steel) * bar.current, bar.radius});
  }
  return result;
}

}  // namespace

Point field_of(const HalfSpace& steel, std::span<const RoundBar> bars, Point at) {
  require_bars_in_air(steel, bars);
  if (height(steel, at) < 0.0) return (1.0 + image_share(steel)) * field_of_bars(bars, at);
  return field_of_bars(bars, at) + field_of_bars(images(steel, bars), at);
}

double potential_of(const HalfSpace& steel, std::span<const RoundBar> bars, Point at) {
  require_bars_in_air(steel, bars);
  if (height(steel, at) < 0.0) return (1.0 + image_share(steel)) * potential_of_bars(bars, at);
  return potential_of_bars(bars, at) + potential_of_bars(images(steel, bars), at);
}

Point force_on_bar(const HalfSpace& steel, std::span<const RoundBar> bars, std::size_t index) {
  assert(index < bars.size());
  require_bars_in_air(steel, bars);
  const Point others = field_of_other_bars(bars, index);
  const Point reflected = field_of_bars(images(steel, bars), bars[index].centre);
  return force_on(bars[index].current, others + reflected);
}

}  // namespace barwall::verify
