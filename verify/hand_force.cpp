#include "verify/hand_force.hpp"

#include <cassert>
#include <complex>
#include <cstddef>

#include "verify/bar_force.hpp"
#include "verify/bar_pair.hpp"

namespace barwall::verify {

using mesh::Part;
using mesh::Point;
using mesh::Shape;

namespace {

/// Which of the two formulas a sum is made of.
struct Used {
  bool flat_bars = false;
  bool long_wires = false;
};

/// Force on the first piece per ampere squared [N/m per A^2]; none where one reaches round the
/// other.
std::optional<Point> force_per_square(const Shape& on, const Shape& by, Used& used) {
  const Point from = centroid(on);
  const Point to = centroid(by);
  if (reaches_round(on, to) || reaches_round(by, from)) return {};
  const double distance = mesh::distance(from, to);
  double attraction = 0.0;
  if (const auto pair = bar_pair(on, by)) {
    attraction = force_between_bars(1.0, 1.0, pair->along, pair->across, pair->distance);
    used.flat_bars = true;
  } else {
    attraction = force_between_filaments(1.0, 1.0, distance);
    used.long_wires = true;
  }
  return (attraction / distance) * (to - from);
}

/// The force between two whole bars, spread over their pieces by area.
std::optional<Point> force_per_square(const Part& on, const Part& by, Used& used) {
  Point sum;
  for (const Shape& piece : on.pieces) {
    for (const Shape& other : by.pieces) {
      const auto force = force_per_square(piece, other, used);
      if (!force) return {};
      sum += (area(piece) / area(on)) * (area(other) / area(by)) * *force;
    }
  }
  return sum;
}

solver::Pulsation product(std::complex<double> a, std::complex<double> b, bool alternating) {
  if (!alternating) return {a.real() * b.real(), 0.0, 0.0};
  return solver::pulsation_of(a.real() * b.real(), a.imag() * b.imag(),
                              0.5 * (a.real() * b.imag() + a.imag() * b.real()));
}

void add(solver::Pulsation& sum, double factor, const solver::Pulsation& more) {
  sum.mean += factor * more.mean;
  sum.cosine += factor * more.cosine;
  sum.sine += factor * more.sine;
}

}  // namespace

std::optional<HandForce> hand_force(const mesh::Section& section,
                                    const solver::Excitation& excitation, int bar) {
  const auto self = static_cast<std::size_t>(bar);
  assert(section.parts[self].kind == Part::Kind::bar);
  if (excitation.current[self] == 0.0) return {};
  HandForce force;
  Used used;
  for (std::size_t k = 0; k < section.parts.size(); ++k) {
    const bool counts = section.parts[k].kind == Part::Kind::bar && excitation.current[k] != 0.0;
    if (k == self || !counts) continue;
    const auto pair = force_per_square(section.parts[self], section.parts[k], used);
    if (!pair) return {};
    const solver::Pulsation current =
        product(excitation.current[self], excitation.current[k], excitation.alternating());
    add(force.value.x, pair->x, current);
    add(force.value.y, pair->y, current);
  }
  if (!used.flat_bars && !used.long_wires) return {};
  force.formula = !used.flat_bars    ? "long wires"
                  : !used.long_wires ? "flat bars (k12)"
                                     : "flat bars (k12) and long wires";
  force.source = !used.flat_bars ? "mu_0 I I / 2 pi d"
                                 : "H. B. Dwight, Electrical World 70, 1917; IEC 60865-1, k12";
  return force;
}

}  // namespace barwall::verify
