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

}  // namespace

FaultSeries fault_series(const FaultCurrent& fault, double closing,
                         const PartForces<PulsatingVector>& sustained) {
  FaultSeries series;
  std::function<FaultInstant(double)> instant;
  if (const auto* alternating = std::get_if<AlternatingFault>(&fault.course)) {
    series = times_of(fault, closing, cycles / alternating->frequency_hz, cycles * times_per_cycle);
    instant = [=](double t) {
      return fault_instant(*alternating, turn * alternating->frequency_hz * t, closing);
    };
  } else if (const auto* rise = std::get_if<DirectRise>(&fault.course)) {
    series = times_of(fault, closing, time_constants * rise->time_constant,
                      time_constants * times_per_cycle / 2);
    instant = [=](double t) { return FaultInstant{-std::expm1(-t / rise->time_constant), 0.0}; };
  } else {
    return series;
  }
  series.force = combined(std::span(&sustained, 1), [&](const std::vector<PulsatingVector>& force) {
    std::vector<mesh::Point> values;
    for (const double t : series.seconds) {
      const FaultInstant now = instant(t);
      values.push_back(now.scale * now.scale * force.front().at(now.angle));
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
  course.end = fault.alternating() ? turn : time_constants;
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
  const double end = seconds_per_unit(fault) * (fault.alternating() ? turn : 1.0 * time_constants);
  FaultSeries series = times_of(fault, closing, end, times_per_cycle);
  const double step = end / static_cast<double>(instants.size() - 1);
  series.force = combined(instants, [&](const std::vector<PulsatingVector>& force) {
    std::vector<double> x;
    std::vector<double> y;
    for (const PulsatingVector& value : force) {
      x.push_back(value.x.mean);
      y.push_back(value.y.mean);
    }
    const CurveSinceClosing along_x = curve_since_closing(x, step);
    const CurveSinceClosing along_y = curve_since_closing(y, step);
    std::vector<mesh::Point> values;
    for (const double t : series.seconds) values.push_back({along_x(t), along_y(t)});
    return values;
  });
  return series;
}

}  // namespace barwall::solver
