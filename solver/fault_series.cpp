#include "solver/fault_series.hpp"

#include <numbers>

#include "solver/curve_since_closing.hpp"

namespace barwall::solver {
namespace {

constexpr double turn = 2.0 * std::numbers::pi;
constexpr int times_per_cycle = 120;
constexpr int cycles = 5;
constexpr int time_constants = 5;

FaultSeries times_of(const FaultCurrent& fault, double closing, double end, int count) {
  FaultSeries series;
  if (fault.alternating()) series.closing = closing;
  series.current.resize(fault.bars.size());
  for (int k = 0; k <= count; ++k) {
    series.seconds.push_back(end * k / count);
    const auto now = fault_currents(fault, series.seconds.back(), closing);
    for (std::size_t b = 0; b < now.size(); ++b) series.current[b].push_back(now[b]);
  }
  return series;
}

/// Where a course ends, in wt.
double end_of_course(const FaultCurrent& fault) {
  return fault.alternating() ? turn : time_constants;
}

}  // namespace

FaultSeries fault_series(const FaultCurrent& fault, double closing,
                         const PartForces<PulsatingVector>& sustained) {
  FaultSeries series;
  if (const auto* alternating = std::get_if<AlternatingFault>(&fault.course)) {
    series = times_of(fault, closing, cycles / alternating->frequency_hz, cycles * times_per_cycle);
  } else if (const auto* rise = std::get_if<DirectRise>(&fault.course)) {
    series = times_of(fault, closing, time_constants * rise->time_constant,
                      time_constants * times_per_cycle / 2);
  } else {
    return series;
  }
  series.force = transformed(sustained, [&](const PulsatingVector& force) {
    std::vector<mesh::Point> values;
    for (const double t : series.seconds) {
      const FaultInstant now = fault_instant(fault, t, closing);
      values.push_back(now.scale * now.scale * force.at(now.angle));
    }
    return values;
  });
  return series;
}

double seconds_per_unit(const FaultCurrent& fault) {
  const auto* alternating = std::get_if<AlternatingFault>(&fault.course);
  return alternating != nullptr ? 1.0 / (turn * alternating->frequency_hz)
                                : std::get<DirectRise>(fault.course).time_constant;
}

Course fault_course(const FaultCurrent& fault, double closing, std::size_t parts) {
  Course course;
  course.end = end_of_course(fault);
  course.half_cycle = false;
  course.currents = [=, unit = seconds_per_unit(fault)](double wt) {
    std::vector<double> all(parts, 0.0);
    const auto now = fault_currents(fault, unit * wt, closing);
    for (std::size_t b = 0; b < now.size(); ++b) {
      all[static_cast<std::size_t>(fault.bars[b])] = now[b];
    }
    return all;
  };
  return course;
}

FaultSeries fault_series(const FaultCurrent& fault, double closing,
                         std::span<const PartForces<PulsatingVector>> instants) {
  const double end = seconds_per_unit(fault) * end_of_course(fault);
  FaultSeries series = times_of(fault, closing, end, times_per_cycle);
  const double step = end / static_cast<double>(instants.size() - 1);
  series.force = combined(instants, [&](const std::vector<PulsatingVector>& force) {
    const ForceSinceClosing along = force_since_closing(means_of(force), step);
    std::vector<mesh::Point> values;
    for (const double t : series.seconds) values.push_back(along(t));
    return values;
  });
  return series;
}

}  // namespace barwall::solver
