#pragma once

#include <complex>
#include <span>
#include <vector>

#include "solver/instants.hpp"
#include "solver/magnetostatics.hpp"

namespace barwall::solver {

/// |B| within a part; with a frequency the largest magnitude in the cycle at each place.
struct FieldLevel {
  double mean = 0.0;  ///< averaged over the part's area [T]
  double high = 0.0;  ///< exceeded on 1 % of the part's area [T]
  /// Of saturable steel, the share of the area whose differential permeability dB/dH is below
  /// `saturated_below` mu_0, and the share beyond the end of the B-H table [1].
  double saturated_share = 0.0;
  double share_beyond_table = 0.0;
};

inline constexpr double saturated_below = 10.0;

/// Above this |B| [T] no constant permeability describes structural steel (common practice, no
/// source).
inline constexpr double steel_saturates_at = 1.5;

/// The level in every part of the section, by index; zeros for one that does not show.
std::vector<FieldLevel> field_levels(const Solution& solution);

/// The same of a field that is at every instant the solution's, r.m.s. phasors, times a factor:
/// sqrt(2) Re(factor B), over the instants given.
std::vector<FieldLevel> field_levels(const Solution& solution,
                                     std::span<const std::complex<double>> factors);

/// The same of the largest magnitude that each place sees: over half a cycle between the instants
/// too, over another course at them. The saturated share is that of places which saturate at some
/// instant.
std::vector<FieldLevel> field_levels(const Instants& instants);

}  // namespace barwall::solver
