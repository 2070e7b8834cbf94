#pragma once

#include <vector>

#include "mesh/point.hpp"
#include "solver/fault_current.hpp"
#include "solver/instants.hpp"
#include "solver/part_forces.hpp"

namespace barwall::solver {

/// The currents and forces of a fault from closing on.
struct FaultSeries {
  std::optional<double> closing;               ///< of an alternating fault [rad]
  std::vector<double> seconds;                 ///< since closing, ascending
  std::vector<std::vector<double>> current;    ///< per bar of the fault, per time [A]
  PartForces<std::vector<mesh::Point>> force;  ///< per time [N/m]
};

/// Where forces are quadratic in the currents: five cycles, or five time constants of a direct
/// current. Empty for a direct current whose course is not known.
/// \param closing of an alternating fault [rad]
/// \param sustained the forces of the sustained currents
FaultSeries fault_series(const FaultCurrent& fault, double closing,
                         const PartForces<PulsatingVector>& sustained);

/// With saturable steel, which is solved instant by instant: how the currents of a section with
/// `parts` parts go in the first cycle after closing, wt from 0 to 2 pi, or in five time constants
/// of a direct current, one of them for every unit of wt. The course must be known.
Course fault_course(const FaultCurrent& fault, double closing, std::size_t parts);

/// Seconds that a unit of that course's wt stands for.
double seconds_per_unit(const FaultCurrent& fault);

/// The series along that course: a smooth curve through the instants that were solved.
/// \param instants forces of steady currents at five or more evenly spaced instants, both ends
/// among them
FaultSeries fault_series(const FaultCurrent& fault, double closing,
                         std::span<const PartForces<PulsatingVector>> instants);

}  // namespace barwall::solver
