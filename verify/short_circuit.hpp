#pragma once

#include <optional>
#include <span>

#include "mesh/section.hpp"
#include "solver/fault_current.hpp"
#include "verify/hand_value.hpp"

namespace barwall::verify {

// Forces [N/m] of a short circuit by the formulas of IEC 60865-1 (from memory): on the main
// conductors peak_force_two_phase and peak_force_centre_phase (bar_force.hpp) with the effective
// distances below, on the pieces of one conductor the formula below.

/// Effective distance of two main conductors [m]: distance / k12. Sizes along and across the line
/// of centres, as of bar_force_factor.
double effective_distance(double along, double across, double distance);

/// Effective distance of a piece from the other pieces of its conductor [m], all equal flat bars:
/// 1 / a_s is the sum of k_1s / a_1s. \param distances a_12, a_13, ... from the outer piece [m]
double effective_distance_of_pieces(double along, double across, std::span<const double> distances);

/// Between the pieces of one conductor, on the outer one: mu_0 (i_p / n)^2 / 2 pi a_s. `peak` is
/// the whole conductor's current [A].
double peak_force_between_pieces(double peak, int pieces, double effective_distance);

/// The standard's force on a bar of a fault, its magnitude; `peak` is the peak short-circuit
/// current [A], with a frequency kappa sqrt(2) times the symmetrical current. Conductors are rounds
/// and tubes of one piece, with a_m their distance, or equal flat bars in one line, of several
/// pieces the rectangle round them, with k12.
///
///   two bars                           F_m2
///   three in one line, even distances  F_m3 on the centre one; (3 + 2 sqrt(3))/8 instead of
///                                      sqrt(3)/2 on an outer one (derived)
///   three rounds or tubes in an equilateral triangle: sqrt(3)/2 on each (derived)
///
/// None for other arrangements and shapes, and for bars outside the fault.
std::optional<HandValue> standard_fault_force(const mesh::Section& section,
                                              const solver::FaultCurrent& fault, double peak,
                                              int bar);

/// The peak current [A] for the standard's formulas: kappa sqrt(2) I with the kappa of the fault's
/// R/X (IEC 60909-0, from memory), or the steady or given peak of direct current.
double standard_peak(const solver::FaultCurrent& fault);

/// The standard's force on an outer piece of a bar of several, all equal flat bars in one line.
/// `peak` is the bar's current [A]. None for other bars.
std::optional<HandValue> standard_piece_force(const mesh::Part& bar, double peak);

}  // namespace barwall::verify
