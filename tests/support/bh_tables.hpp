#pragma once

#include <cmath>
#include <iterator>
#include <vector>

#include "solver/bh_curve.hpp"

namespace barwall::support {

/// A ring of cast iron (2 % Si, 2.85 % C, 0.5 % Mn): J. A. Fleming, "Electromagnetism",
/// Encyclopaedia Britannica, 11th edition, 1910-11, volume 9, table IV, a first row 0, 0 added.
/// Printed in oersted and gauss; `printed_permeability` stands beside them.
inline std::vector<solver::BhPoint> cast_iron() {
  const double oersted[] = {0.19,  0.41,  1.11,  2.53,  3.41,   4.45,   5.67,   7.16,
                            8.84,  10.60, 12.33, 13.95, 15.61,  18.21,  26.37,  36.54,
                            44.65, 56.57, 71.98, 88.99, 106.35, 120.60, 140.37, 152.73};
  const double gauss[] = {27,   62,   206,  768,  1251,  1898,  2589,  3350,
                          4030, 4491, 4884, 5276, 5504,  5829,  6814,  7580,
                          8071, 8548, 9097, 9600, 10066, 10375, 10725, 10985};
  std::vector<solver::BhPoint> rows = {{0.0, 0.0}};
  for (std::size_t k = 0; k < std::size(oersted); ++k) {
    rows.push_back({oersted[k] * 79.5774715459, gauss[k] * 1e-4});
  }
  return rows;
}

/// The largest relative permeability of the same table, as printed in its row of 3350 gauss.
inline constexpr double cast_iron_permeability = 468.0;

/// The steel of the TEAM workshop's problems 10 and 13 (T. Nakata, N. Takahashi and K. Fujiwara),
/// from memory.
inline std::vector<solver::BhPoint> workshop_steel() {
  return {{0, 0},      {16, 0.0025}, {30, 0.005}, {54, 0.0125}, {93, 0.025}, {143, 0.05},
          {191, 0.1},  {210, 0.2},   {222, 0.3},  {233, 0.4},   {247, 0.5},  {258, 0.6},
          {272, 0.7},  {289, 0.8},   {313, 0.9},  {342, 1.0},   {377, 1.1},  {433, 1.2},
          {509, 1.3},  {648, 1.4},   {933, 1.5},  {1228, 1.55}, {1934, 1.6}, {2913, 1.65},
          {4993, 1.7}, {7189, 1.75}, {9423, 1.8}};
}

/// H = (k1 exp(k2 B^2) + k3) B: J. R. Brauer, IEEE Transactions on Magnetics 11, 1975; the
/// constants are those of cold-rolled steel, from memory.
struct BrauerSteel {
  double k1 = 3.8;
  double k2 = 2.17;
  double k3 = 396.2;

  double reluctivity(double b) const { return k1 * std::exp(k2 * b * b) + k3; }
  double field(double b) const { return reluctivity(b) * b; }
  double reluctivity_slope(double b) const { return k1 * k2 * std::exp(k2 * b * b); }
  double slope(double b) const { return reluctivity(b) + 2.0 * b * b * reluctivity_slope(b); }
  double energy(double b) const { return 0.5 * (k1 / k2 * std::expm1(k2 * b * b) + k3 * b * b); }

  /// Rows at equal steps of B from 0 to `end`.
  std::vector<solver::BhPoint> rows(int steps, double end) const {
    std::vector<solver::BhPoint> points;
    for (int k = 0; k <= steps; ++k) {
      const double b = end * k / steps;
      points.push_back({field(b), b});
    }
    return points;
  }
};

}  // namespace barwall::support
