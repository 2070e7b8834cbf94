#include "solver/readings.hpp"

#include <cmath>

#include "solver/energy.hpp"
#include "solver/field_peak.hpp"
#include "solver/flux_linkage.hpp"

namespace barwall::solver {
namespace {

FieldReading reading_at(const RecoveredField& field, const Solution& solution, mesh::Point point) {
  const mesh::Location at = locate(solution.grid(), solution.problem->section, point);
  const mesh::Point b = field.flux_density(at, point, 0);
  if (solution.pattern_count() == 1) return {b, {}, norm(b), norm(b)};
  const mesh::Point q = field.flux_density(at, point, 1);
  return {b, q, std::hypot(norm(b), norm(q)), peak_magnitude(b, q)};
}

/// The i-th value of every instant.
template <class Value, class Pick>
std::vector<Value> series(std::span<const Readings> instants, Pick pick) {
  std::vector<Value> values;
  for (const Readings& readings : instants) values.push_back(pick(readings));
  return values;
}

Pulsation energy_over(std::span<const Readings> instants, bool coenergy) {
  return pulsation_through(series<double>(instants, [&](const Readings& readings) {
    return coenergy ? readings.coenergy->mean : readings.energy.mean;
  }));
}

FieldReading reading_over(std::span<const Readings> instants, const PeakFinder& peaks,
                          std::size_t probe, std::size_t point) {
  const auto b = series<mesh::Point>(
      instants, [&](const Readings& readings) { return readings.probes[probe][point].in_phase; });
  double square = 0.0;
  for (const mesh::Point value : b) square += dot(value, value);
  const auto [x, y] = mesh::components(b);
  const auto fundamental_x = fundamental_through(x);
  const auto fundamental_y = fundamental_through(y);
  return {{fundamental_x.real(), fundamental_y.real()},
          {fundamental_x.imag(), fundamental_y.imag()},
          std::sqrt(square / static_cast<double>(b.size())),
          peaks.peak(b)};
}

}  // namespace

std::vector<LoopInductance> loop_inductances(const PartIntegrals& integrals) {
  const Problem& problem = *integrals.solution().problem;
  std::vector<LoopInductance> result;
  for (const Loop& loop : problem.loops) {
    result.push_back({loop_inductance(integrals, loop), {}});
    if (saturable(problem)) {
      result.back().differential = differential_inductance(integrals, loop);
    }
  }
  return result;
}

Readings readings_at_instant(const PartIntegrals& integrals, const RecoveredField& field,
                             const ForceGeometry& geometry, const std::vector<Probe>& probes) {
  const Solution& solution = integrals.solution();
  const Problem& problem = *solution.problem;
  Readings result;
  result.forces = forces_of(integrals, geometry, &field);
  result.linkage.resize(problem.section.parts.size());
  for (std::size_t k = 0; k < result.linkage.size(); ++k) {
    if (problem.section.parts[k].kind != mesh::Part::Kind::bar) continue;
    const int part = static_cast<int>(k);
    result.linkage[k] = {integrals.mean_potential(part, 0),
                         solution.pattern_count() == 2 ? integrals.mean_potential(part, 1) : 0.0};
  }
  if (saturable(problem)) {
    const SaturableEnergy energy = saturable_energy(solution);
    result.energy.mean = energy.energy;
    result.coenergy = Pulsation{energy.coenergy};
  } else {
    result.energy = field_energy(solution);
  }
  for (const Probe& probe : probes) {
    result.probes.emplace_back();
    for (const mesh::Point point : probe.points) {
      result.probes.back().push_back(reading_at(field, solution, point));
    }
  }
  return result;
}

Readings readings_of(const PartIntegrals& integrals, const RecoveredField& field,
                     const ForceGeometry& geometry, const std::vector<Probe>& probes) {
  Readings result = readings_at_instant(integrals, field, geometry, probes);
  result.levels = field_levels(integrals.solution());
  result.loops = loop_inductances(integrals);
  return result;
}

Readings over_half_cycle(std::span<const Readings> instants) {
  const Readings& first = instants.front();
  Readings result;
  const auto forces = series<PartForces<PulsatingVector>>(
      instants, [](const Readings& readings) { return readings.forces; });
  result.forces = over_half_cycle(std::span<const PartForces<PulsatingVector>>(forces));
  for (std::size_t k = 0; k < first.linkage.size(); ++k) {
    result.linkage.push_back(fundamental_through(series<double>(
        instants, [&](const Readings& readings) { return readings.linkage[k].real(); })));
  }
  result.energy = energy_over(instants, false);
  if (first.coenergy) result.coenergy = energy_over(instants, true);
  const PeakFinder peaks;
  for (std::size_t probe = 0; probe < first.probes.size(); ++probe) {
    result.probes.emplace_back();
    for (std::size_t point = 0; point < first.probes[probe].size(); ++point) {
      result.probes.back().push_back(reading_over(instants, peaks, probe, point));
    }
  }
  return result;
}

}  // namespace barwall::solver
