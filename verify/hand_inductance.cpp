#include "verify/hand_inductance.hpp"

#include <cassert>
#include <cmath>
#include <cstddef>

#include "verify/complex_field.hpp"
#include "verify/shape_distance.hpp"

namespace barwall::verify {

namespace {

/// The pieces of one side with their shares of its area.
struct Side {
  std::vector<const mesh::Shape*> pieces;
  std::vector<double> share;
};

Side side_of(const mesh::Section& section, const std::vector<int>& bars) {
  Side side;
  double whole = 0.0;
  for (const int bar : bars) {
    const mesh::Part& part = section.parts[static_cast<std::size_t>(bar)];
    assert(part.kind == mesh::Part::Kind::bar);
    for (const mesh::Shape& piece : part.pieces) {
      side.pieces.push_back(&piece);
      side.share.push_back(area(piece));
      whole += side.share.back();
    }
  }
  for (double& share : side.share) share /= whole;
  return side;
}

/// Logarithm of the mean distance of two sides, or of one from itself.
std::optional<double> log_distance(const Side& first, const Side& second) {
  double sum = 0.0;
  for (std::size_t i = 0; i < first.pieces.size(); ++i) {
    for (std::size_t j = 0; j < second.pieces.size(); ++j) {
      const mesh::Shape& a = *first.pieces[i];
      const mesh::Shape& b = *second.pieces[j];
      const auto distance = &a == &b ? own_distance(a) : mutual_distance(a, b);
      if (!distance) return {};
      sum += first.share[i] * second.share[j] * std::log(*distance);
    }
  }
  return sum;
}

}  // namespace

std::optional<HandValue> hand_inductance(const mesh::Section& section, const std::vector<int>& go,
                                         const std::vector<int>& back) {
  if (go.empty() || back.empty()) return {};
  const Side out = side_of(section, go);
  const Side home = side_of(section, back);
  const auto mutual = log_distance(out, home);
  const auto own_out = log_distance(out, out);
  const auto own_home = log_distance(home, home);
  if (!mutual || !own_out || !own_home) return {};
  return HandValue{mu_0_over_2pi * (2.0 * *mutual - *own_out - *own_home),
                   "geometric mean distances",
                   "J. C. Maxwell, A Treatise on Electricity and Magnetism, arts. 691-693; "
                   "F. W. Grover, Inductance Calculations, chapter 3"};
}

}  // namespace barwall::verify
