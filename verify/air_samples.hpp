#pragma once

#include <string>
#include <vector>

#include "mesh/sampling.hpp"
#include "solver/problem.hpp"

namespace barwall::verify {

/// A place in air where two ways of computing the field are compared.
struct AirSample {
  mesh::Point at;
  mesh::Location location;
};

/// Samples of one stretch of air.
struct AirGroup {
  std::string name;  ///< "pocket round (x, y) mm" or "open air, a to b half-sizes"
  std::vector<AirSample> samples;
};

/// Fixed low-discrepancy samples of the air: each closed pocket, and the open air in shells of
/// doubling distance out to three section sizes from the centre; at least three local spacings
/// from any outline; 200 or more in all and at least 20 in a group that has room for them
/// (groups without room are left out and named in `left_out`).
struct AirSamples {
  std::vector<AirGroup> groups;
  std::vector<std::string> left_out;
};
AirSamples air_samples(const solver::Problem& problem);

}  // namespace barwall::verify
