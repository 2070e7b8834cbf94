#pragma once

#include <complex>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "solver/flux_density.hpp"
#include "solver/part_forces.hpp"
#include "solver/probe.hpp"
#include "solver/wall_field.hpp"

namespace barwall::solver {

/// B at a point [T]. With a frequency the fundamental's r.m.s. phasor; r.m.s. and peak are of all
/// that the field does in the cycle.
struct FieldReading {
  mesh::Point in_phase;    ///< steady: B itself
  mesh::Point quadrature;  ///< steady: zero
  double rms = 0.0;        ///< root of the summed squares of the components' r.m.s.
  double peak = 0.0;       ///< largest magnitude in the cycle
};

/// Inductance of a loop per metre of run [H/m].
struct LoopInductance {
  double value = 0.0;                       ///< with saturable steel secant
  std::optional<double> differential = {};  ///< with saturable steel
};

/// All that the figures are made of, before it has names and units: what is read off a solution.
struct Readings {
  PartForces<PulsatingVector> forces;         ///< [N/m]
  std::vector<std::complex<double>> linkage;  ///< per part, bars' alone are set [Wb/m]
  std::vector<FieldLevel> levels;             ///< per part
  Pulsation energy;                           ///< [J/m]
  std::optional<Pulsation> coenergy;          ///< with saturable steel [J/m]
  std::vector<LoopInductance> loops;          ///< per loop of the problem
  std::optional<double> loops_at;             ///< the instant that they belong to, if to one alone
  std::vector<std::vector<FieldReading>> probes;  ///< per probe, per point
};

/// The readings of steady currents, or of alternating ones where fields can be added.
Readings readings_of(const PartIntegrals& integrals, const RecoveredField& field,
                     const ForceGeometry& geometry, const std::vector<Probe>& probes);

/// The same without levels and loops, which over a cycle come from all instants or from one.
Readings readings_at_instant(const PartIntegrals& integrals, const RecoveredField& field,
                             const ForceGeometry& geometry, const std::vector<Probe>& probes);

/// Inductances of all loops of a solution's problem.
std::vector<LoopInductance> loop_inductances(const PartIntegrals& integrals);

/// The readings over the cycle, without levels and loops, from those at the instants k pi / n of
/// its half, k = 0 to n - 1.
Readings over_half_cycle(std::span<const Readings> instants);

}  // namespace barwall::solver
