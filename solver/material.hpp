#pragma once

#include <memory>
#include <optional>
#include <string>
#include <utility>

#include "solver/bh_curve.hpp"
#include "solver/constants.hpp"

namespace barwall::solver {

/// Magnetic behaviour of a bar's or a wall's substance.
struct Material {
  std::string name = "air";
  /// Constant, >= 1; of saturable steel the initial one, at B = 0, for tables and legends only.
  double relative_permeability = 1.0;
  /// The magnetising curve of saturable steel, null where the permeability is constant.
  std::shared_ptr<const BhCurve> curve = nullptr;
  /// As the case gives it [ohm m]; none where it does not (see resistivity_of).
  std::optional<double> resistivity = {};

  bool saturable() const { return curve != nullptr; }
  bool magnetic() const { return saturable() || relative_permeability != 1.0; }
};

/// Steel with a magnetising curve.
inline Material saturable_material(std::string name, std::shared_ptr<const BhCurve> curve) {
  const double initial = curve->differential_permeability(0.0) / mu_0;
  return {std::move(name), initial, std::move(curve)};
}

}  // namespace barwall::solver
