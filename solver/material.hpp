#pragma once

#include <string>

namespace barwall::solver {

/// Magnetic behaviour of a bar's or a wall's substance.
struct Material {
  std::string name = "air";
  double relative_permeability = 1.0;  ///< constant, >= 1

  bool magnetic() const { return relative_permeability != 1.0; }
};

}  // namespace barwall::solver
