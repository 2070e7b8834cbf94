#pragma once

namespace barwall::verify {

// Forces [N/m], per metre of run, positive where they attract (currents of like sign). Currents
// are instantaneous values [A].

/// Between two parallel filaments `distance` [m] apart: mu_0 I_1 I_2 / 2 pi d.
double force_between_filaments(double current, double other_current, double distance);

/// Between a filament and a thin strip of `width` [m] in one plane with it, `gap` [m] from the
/// filament to the strip's nearer edge. Source: I. E. Irodov, Problems in General Physics, 3.258.
double force_between_filament_and_strip(double current, double strip_current, double gap,
                                        double width);

/// The factor k by which two equal rectangular bars of uniform current density attract or repel
/// more or less than filaments in their centres; k12 of IEC 60865-1. `along` is a bar's size
/// along the line of centres, `across` its size across it, `distance` that of the centres [m]; a
/// size may be 0. Exact: a fourth difference, taken with a hundred digits so that thin and far
/// bars keep full accuracy. Throws std::invalid_argument if along > distance or a size is
/// negative. Source: H. B. Dwight, Electrical World 70, 1917 (from memory); derived anew.
double bar_force_factor(double along, double across, double distance);

/// Between two equal rectangular bars: the filaments' force times bar_force_factor.
double force_between_bars(double current, double other_current, double along, double across,
                          double distance);

// IEC 60865-1 and IEC 60909-0 (from memory). A line-to-line or three-phase fault, `peak` the peak
// short-circuit current [A] of the fault in question, `distance` the effective distance of
// neighbouring phases in one plane, which is distance / k12.

/// Between two phases in a line-to-line fault.
double peak_force_two_phase(double peak, double distance);
/// On the centre phase in a three-phase fault: sqrt(3)/2 of the two-phase form.
double peak_force_centre_phase(double peak, double distance);
/// On an outer phase in a three-phase fault: (3 + 2 sqrt(3))/8 of the two-phase form.
double peak_force_outer_phase(double peak, double distance);

/// Factor kappa of the peak short-circuit current: 1.02 + 0.98 e^(-3 R/X).
double peak_factor(double resistance_over_reactance);

}  // namespace barwall::verify
