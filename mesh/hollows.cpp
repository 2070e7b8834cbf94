#include "mesh/hollows.hpp"

#include <algorithm>
#include <map>
#include <set>
#include <tuple>
#include <utility>

#include "mesh/components.hpp"
#include "mesh/triangle_edges.hpp"

namespace barwall::mesh {
namespace {

/// Joins chosen triangles that share a node, and others that share an edge: of the two only one
/// can pass through a point, as it must be for "within" to have a meaning.
Components components_of(const FittedGrid& grid, const std::vector<bool>& solid) {
  Components components(grid.triangle_count());
  std::vector<int> at_node(static_cast<std::size_t>(grid.node_count()), -1);
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (!solid[static_cast<std::size_t>(t)]) continue;
    for (const int node : grid.triangle(t)) {
      int& known = at_node[static_cast<std::size_t>(node)];
      if (known >= 0) components.join(known, t);
      known = t;
    }
  }
  each_inner_edge(grid, [&](int, int, int left, int right) {
    if (solid[static_cast<std::size_t>(left)] || solid[static_cast<std::size_t>(right)]) return;
    components.join(left, right);
  });
  return components;
}

}  // namespace

std::vector<Hollow> hollows(const FittedGrid& grid, const std::vector<bool>& chosen) {
  std::vector<bool> solid;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    const int part = grid.occupant(t).part;
    solid.push_back(part >= 0 && chosen[static_cast<std::size_t>(part)]);
  }
  Components components = components_of(grid, solid);

  std::map<int, std::set<int>> neighbours;
  std::set<std::tuple<int, int, int>> borders;  // a component, the solid one beside it, its part
  each_inner_edge(grid, [&](int, int, int left, int right) {
    if (solid[static_cast<std::size_t>(left)] == solid[static_cast<std::size_t>(right)]) return;
    if (solid[static_cast<std::size_t>(left)]) std::swap(left, right);
    const int open = components.of(left);
    const int closed = components.of(right);
    neighbours[open].insert(closed);
    neighbours[closed].insert(open);
    borders.emplace(open, closed, grid.occupant(right).part);
  });

  // Inwards from the open air at the grid's corner: each component lies within the one it is
  // reached from.
  std::map<int, int> within = {{components.of(0), -1}};
  std::map<int, std::size_t> number;
  std::vector<Hollow> result;
  std::vector<int> reached = {components.of(0)};
  for (std::size_t k = 0; k < reached.size(); ++k) {
    const int from = reached[k];
    for (const int next : neighbours[from]) {
      if (!within.try_emplace(next, from).second) continue;
      reached.push_back(next);
      if (solid[static_cast<std::size_t>(next)]) continue;
      number[next] = result.size();
      result.emplace_back();
    }
  }
  for (const auto& [open, closed, part] : borders) {
    if (within[open] == closed) result[number[open]].ring.push_back(part);
  }
  std::set<std::pair<Occupant, int>> contents;
  for (int t = 0; t < grid.triangle_count(); ++t) {
    if (grid.occupant(t).part < 0 || solid[static_cast<std::size_t>(t)]) continue;
    contents.emplace(grid.occupant(t), components.of(t));
  }
  for (const auto& [occupant, where] : contents) {
    for (int place = where; place >= 0; place = within[place]) {
      const auto hollow = number.find(place);
      if (hollow != number.end()) result[hollow->second].within.push_back(occupant);
    }
  }
  for (Hollow& hollow : result) {
    const auto twice = std::unique(hollow.within.begin(), hollow.within.end());
    hollow.within.erase(twice, hollow.within.end());
  }
  return result;
}

}  // namespace barwall::mesh
