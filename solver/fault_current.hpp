#pragma once

#include <complex>
#include <cstddef>
#include <limits>
#include <optional>
#include <variant>
#include <vector>

#include "solver/excitation.hpp"

namespace barwall::solver {

// The currents of a short circuit. At every instant all of them together are one number times
// the sustained currents - the phasors that remain when the fault's beginning has died away, or
// the steady direct currents - at one phase angle:
//
//   i_k = scale sqrt(2) Re(I_k exp(j angle)),      direct current:  i_k = scale I_k.
//
// For i(t) = sqrt(2) I [cos(wt + a - phi) - cos(a - phi) exp(-wt R/X)] in every phase, a its own
// driving voltage's angle, scale and angle are those of
//
//   exp(j (a - phi)) [exp(j wt) - exp(-wt R/X)],
//
// so that scale depends on time alone and turning the closing angle turns the angle.

/// An alternating fault from its closing on; tan phi = X/R, equal in all phases.
struct AlternatingFault {
  double frequency_hz = 0.0;
  double symmetrical = 0.0;  ///< initial symmetrical short-circuit current, r.m.s. [A]
  double r_over_x = 0.0;     ///< 0 or more; 0: the offset never decays
  /// The driving voltage of the first bar is sqrt(2) U cos(wt + closing), closed at t = 0 [rad];
  /// absent: the worst angle for each figure.
  std::optional<double> closing;
};

/// A direct current that rises to its prospective value: steady (1 - exp(-t / time_constant)).
struct DirectRise {
  double steady = 0.0;         ///< [A]
  double time_constant = 0.0;  ///< [s]
};

/// A direct current of which the peak is known but not when it comes.
struct DirectPeak {
  double steady = 0.0;  ///< [A]
  double peak = 0.0;    ///< [A], at the worst instant
};

/// The fault's currents. Of three bars the driving voltages are 0, -120 and +120 degrees in the
/// order named; of two, the second carries minus the first's current. No other bar carries any.
struct FaultCurrent {
  std::vector<int> bars;  ///< indices of parts, two or three
  std::variant<AlternatingFault, DirectRise, DirectPeak> course;

  bool alternating() const { return std::holds_alternative<AlternatingFault>(course); }
};

/// The sustained currents of the bars named [A]: r.m.s. phasors, the first one's angle 0, or
/// steady currents.
std::vector<std::complex<double>> sustained_currents(const FaultCurrent& fault);

/// The same as the currents of a section with `parts` parts.
Excitation sustained_excitation(const FaultCurrent& fault, std::size_t parts);

/// What the sustained currents are scaled and turned by at an instant.
struct FaultInstant {
  double scale = 0.0;  ///< 0 or more
  double angle = 0.0;  ///< [rad]; 0 for direct current
};

/// \param wt time since closing as an angle, 0 or more [rad]
/// \param closing the angle of the first bar's driving voltage at closing [rad]
FaultInstant fault_instant(const AlternatingFault& fault, double wt, double closing);

/// The same of any fault at the time t [s]; `closing` [rad] counts for alternating current alone. A
/// DirectPeak has no known course: its peak stands for every time.
FaultInstant fault_instant(const FaultCurrent& fault, double t, double closing);

/// Currents of the bars named [A] at an instant.
std::vector<double> fault_currents(const FaultCurrent& fault, const FaultInstant& instant);

/// Currents of the bars named [A] at the time t [s].
std::vector<double> fault_currents(const FaultCurrent& fault, double t, double closing = 0.0);

/// The largest scale that the course reaches, and when.
struct LargestScale {
  double scale = 0.0;
  double wt = 0.0;                ///< alternating: from pi / 2 to pi [rad]
  std::optional<double> seconds;  ///< absent: direct current, approached or at an unknown instant
};

/// Exact to rounding. No closing angle enters: it decides only which current is at its crest then.
LargestScale largest_scale(const FaultCurrent& fault);

/// The largest current that a bar can carry, over time and closing angle.
struct FaultCrest {
  double current = 0.0;           ///< [A]
  std::optional<double> seconds;  ///< after closing; absent: approached, or unknown
  std::optional<double> closing;  ///< 0 <= closing < pi, for the first bar's crest [rad]
};

/// Whatever closing angle the fault was given, the worst is taken. The crest of the waveform
/// itself, not of the factor kappa.
FaultCrest crest_of(const FaultCurrent& fault);

/// The closing angle, 0 <= closing < pi, with which the currents are at `angle` at `wt` [rad]. The
/// angle and its opposite reverse all currents and leave forces as they are.
double closing_for(const AlternatingFault& fault, double wt, double angle);

// One ratio in its several guises.

/// Factor kappa of the peak current in kappa sqrt(2) I: 1.02 + 0.98 exp(-3 R/X). Source:
/// IEC 60909-0 (from memory). Near the crest of the waveform itself, not equal to it.
double kappa_of(double r_over_x);

inline constexpr double least_kappa = 1.02;
inline constexpr double largest_kappa = 2.0;

/// R/X of a kappa, least_kappa < kappa <= largest_kappa; infinite at least_kappa.
double r_over_x_of_kappa(double kappa);

/// R/X of a power factor cos phi, 0 <= power_factor < 1.
double r_over_x_of_power_factor(double power_factor);

/// The same short circuit as different papers put it.
struct FaultEquivalents {
  double r_over_x = 0.0;
  double x_over_r = std::numeric_limits<double>::infinity();  ///< infinite for R/X = 0
  double power_factor = 0.0;
  double kappa = 0.0;
  double peak_over_rms = 0.0;   ///< kappa sqrt(2)
  double crest_over_rms = 0.0;  ///< of the waveform itself
};

FaultEquivalents equivalents_of(double r_over_x);

}  // namespace barwall::solver
