#pragma once

#include <cstddef>
#include <optional>
#include <span>
#include <type_traits>
#include <vector>

#include "solver/force.hpp"
#include "solver/wall_faces.hpp"

namespace barwall::solver {

/// Where the forces of a problem are read: made once for its grid, used for every solution on it.
struct ForceGeometry {
  StressBands bands;
  WallFaces faces;

  explicit ForceGeometry(const Problem& problem)
      : bands(problem, mesh::bodies(problem.outline)), faces(problem) {}
};

/// Something known of the force on every part, every piece and every body of a section: the force
/// over the cycle, its extremes in a fault.
template <class T>
struct PartForces {
  /// Per part; none for one that does not show or touches another, whose own share of the stress
  /// nobody can tell.
  std::vector<std::optional<T>> part;
  /// Per part, per piece of a bar of several and of mu_r = 1; else empty.
  std::vector<std::vector<T>> piece;
  std::vector<T> body;  ///< per body of the stress bands with more than one part, in order
  /// Per face of the walls its push, as the x component of a force whose y is zero.
  std::vector<T> push;
};

/// The forces of a solution over the cycle, per metre of run [N/m]; steady currents have means
/// alone. On a bar of mu_r = 1 J x B, where that is exact, on any other part the stress in the
/// whole band round it.
/// \param field of the solution, for the faces of walls; null: without these
PartForces<PulsatingVector> forces_of(const PartIntegrals& integrals, const ForceGeometry& geometry,
                                      const RecoveredField* field);

/// For every part, piece and body something made from what several sets know of it.
/// \param sets of one section, at least one
/// \param make from a std::vector<T>, one entry per set
template <class T, class Make>
auto combined(std::span<const PartForces<T>> sets, Make make) {
  PartForces<std::decay_t<decltype(make(std::vector<T>{}))>> result;
  const PartForces<T>& first = sets.front();
  const auto each = [&](auto pick) {
    std::vector<T> values;
    for (const PartForces<T>& set : sets) values.push_back(pick(set));
    return make(values);
  };
  for (std::size_t k = 0; k < first.part.size(); ++k) {
    result.part.emplace_back();
    if (first.part[k]) {
      result.part.back() = each([&](const PartForces<T>& set) { return *set.part[k]; });
    }
  }
  for (std::size_t k = 0; k < first.piece.size(); ++k) {
    result.piece.emplace_back();
    for (std::size_t p = 0; p < first.piece[k].size(); ++p) {
      result.piece.back().push_back(
          each([&](const PartForces<T>& set) { return set.piece[k][p]; }));
    }
  }
  for (std::size_t b = 0; b < first.body.size(); ++b) {
    result.body.push_back(each([&](const PartForces<T>& set) { return set.body[b]; }));
  }
  for (std::size_t k = 0; k < first.push.size(); ++k) {
    result.push.push_back(each([&](const PartForces<T>& set) { return set.push[k]; }));
  }
  return result;
}

/// The same made from what a single set knows.
/// \param make from a T
template <class T, class Make>
auto transformed(const PartForces<T>& forces, Make make) {
  return combined(std::span(&forces, 1),
                  [&](const std::vector<T>& only) { return make(only.front()); });
}

/// The forces over the cycle from those at the instants k pi / n of its half, k = 0 to n - 1.
PartForces<PulsatingVector> over_half_cycle(std::span<const PartForces<PulsatingVector>> instants);

}  // namespace barwall::solver
