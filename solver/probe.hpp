#pragma once

#include <optional>
#include <string>
#include <vector>

#include "mesh/point.hpp"

namespace barwall::solver {

/// A place where the field is wanted: one point, or the points of a line.
struct Probe {
  std::string name;
  std::vector<mesh::Point> points;  ///< [m]
  bool line = false;
  std::optional<double> limit;  ///< on |B| [T]; r.m.s. with a frequency
  std::string limit_from;
};

}  // namespace barwall::solver
