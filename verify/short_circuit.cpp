#include "verify/short_circuit.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <utility>
#include <variant>
#include <vector>

#include "verify/bar_force.hpp"
#include "verify/bar_pair.hpp"

namespace barwall::verify {

using mesh::Point;
using mesh::Rectangle;
using mesh::Round;
using mesh::Shape;
using mesh::Tube;

namespace {

/// Distances that differ by less than this share are even.
constexpr double even = 1e-4;

bool about_equal(double a, double b) {
  return std::abs(a - b) <= even * std::max(std::abs(a), std::abs(b));
}

/// A main conductor as the standard sees it: one rectangle, round or tube.
std::optional<Shape> conductor_of(const mesh::Part& bar) {
  if (const auto rectangle = hull_of_rectangles(bar)) return *rectangle;
  const Shape& piece = bar.pieces.front();
  const bool round = std::holds_alternative<Round>(piece) || std::holds_alternative<Tube>(piece);
  if (bar.pieces.size() != 1 || !round) return {};
  return piece;
}

/// a_m of two main conductors.
std::optional<double> between_conductors(const Shape& first, const Shape& second) {
  if (const auto pair = bar_pair(first, second)) {
    return effective_distance(pair->along, pair->across, pair->distance);
  }
  if (std::holds_alternative<Rectangle>(first) || std::holds_alternative<Rectangle>(second)) {
    return {};
  }
  if (reaches_round(first, centroid(second)) || reaches_round(second, centroid(first))) return {};
  return mesh::distance(centroid(first), centroid(second));
}

HandValue named(double value, std::string formula) {
  return {value, std::move(formula), "IEC 60865-1"};
}

HandValue derived(double value, std::string formula) {
  return {value, std::move(formula), "derived as F_m3 of IEC 60865-1"};
}

/// The one in the middle of three in one line at even distances, or none.
std::optional<std::size_t> middle_of(const std::array<Point, 3>& at) {
  for (std::size_t k = 0; k < 3; ++k) {
    const Point one = at[(k + 1) % 3] - at[k];
    const Point other = at[(k + 2) % 3] - at[k];
    if (norm(one + other) <= even * norm(one)) return k;
  }
  return {};
}

std::optional<HandValue> force_on_phase(const std::array<Shape, 3>& conductors, double peak,
                                        std::size_t bar) {
  std::array<Point, 3> at;
  std::transform(conductors.begin(), conductors.end(), at.begin(),
                 [](const Shape& shape) { return centroid(shape); });
  if (const auto middle = middle_of(at)) {
    const auto distance = between_conductors(conductors[*middle], conductors[(*middle + 1) % 3]);
    const auto other = between_conductors(conductors[*middle], conductors[(*middle + 2) % 3]);
    if (!distance || !other || !about_equal(*distance, *other)) return {};
    if (*middle == bar) {
      return named(peak_force_centre_phase(peak, *distance), "F_m3 on the centre conductor");
    }
    return derived(peak_force_outer_phase(peak, *distance), "outer conductor, (3 + 2 sqrt(3))/8");
  }
  const auto side = [&](std::size_t k) { return mesh::distance(at[k], at[(k + 1) % 3]); };
  const bool flat = std::any_of(conductors.begin(), conductors.end(), [](const Shape& shape) {
    return std::holds_alternative<Rectangle>(shape);
  });
  if (flat || !about_equal(side(0), side(1)) || !about_equal(side(1), side(2))) return {};
  return derived(peak_force_centre_phase(peak, side(0)), "equilateral triangle, sqrt(3)/2");
}

}  // namespace

double effective_distance(double along, double across, double distance) {
  return distance / bar_force_factor(along, across, distance);
}

double effective_distance_of_pieces(double along, double across,
                                    std::span<const double> distances) {
  double inverse = 0.0;
  for (const double distance : distances) {
    inverse += 1.0 / effective_distance(along, across, distance);
  }
  return 1.0 / inverse;
}

double peak_force_between_pieces(double peak, int pieces, double effective_distance) {
  return force_between_filaments(peak / pieces, peak / pieces, effective_distance);
}

std::optional<HandValue> standard_fault_force(const mesh::Section& section,
                                              const solver::FaultCurrent& fault, double peak,
                                              int bar) {
  const auto found = std::find(fault.bars.begin(), fault.bars.end(), bar);
  if (found == fault.bars.end()) return {};
  std::vector<Shape> conductors;
  for (const int part : fault.bars) {
    const auto conductor = conductor_of(section.parts[static_cast<std::size_t>(part)]);
    if (!conductor) return {};
    conductors.push_back(*conductor);
  }
  if (conductors.size() == 2) {
    const auto distance = between_conductors(conductors[0], conductors[1]);
    if (!distance) return {};
    return named(peak_force_two_phase(peak, *distance), "F_m2 between two conductors");
  }
  return force_on_phase({conductors[0], conductors[1], conductors[2]}, peak,
                        static_cast<std::size_t>(found - fault.bars.begin()));
}

double standard_peak(const solver::FaultCurrent& fault) {
  if (const auto* alternating = std::get_if<solver::AlternatingFault>(&fault.course)) {
    return peak_factor(alternating->r_over_x) * std::numbers::sqrt2 * alternating->symmetrical;
  }
  return solver::crest_of(fault).current;
}

std::optional<HandValue> standard_piece_force(const mesh::Part& bar, double peak) {
  const std::size_t n = bar.pieces.size();
  if (n < 2) return {};
  // The outer piece is the one farthest from all others together.
  std::vector<double> distances;
  std::optional<BarPair> last;
  double farthest = 0.0;
  for (const Shape& piece : bar.pieces) {
    std::vector<double> from_here;
    double sum = 0.0;
    for (const Shape& other : bar.pieces) {
      if (&other == &piece) continue;
      const auto pair = bar_pair(piece, other);
      // One line: always the same side lies along it.
      if (!pair || (last && !about_equal(pair->along, last->along))) return {};
      last = pair;
      from_here.push_back(pair->distance);
      sum += pair->distance;
    }
    if (sum > farthest * (1.0 + even)) {
      farthest = sum;
      distances = from_here;
    }
  }
  const double effective = effective_distance_of_pieces(last->along, last->across, distances);
  return named(peak_force_between_pieces(peak, static_cast<int>(n), effective),
               "F_s between the pieces");
}

}  // namespace barwall::verify
