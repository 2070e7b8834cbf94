#include "solver/fault_extremes.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>

#include "solver/largest_value.hpp"

namespace barwall::solver {

namespace {

constexpr double pi = std::numbers::pi;
constexpr int steps_per_cycle = 360;
/// Below this share of the largest a force is nothing but rounding, and so is its pulsation.
constexpr double rounding = 1e-12;

Pulsation minus(const Pulsation& p) {
  return {-p.mean, -p.cosine, -p.sine};
}

/// Largest magnitude that a vector's components can have together.
double size_of(const PulsatingVector& vector) {
  const auto bound = [](const Pulsation& p) {
    return std::abs(p.mean) + std::hypot(p.cosine, p.sine);
  };
  return std::hypot(bound(vector.x), bound(vector.y));
}

double swing_of(const Pulsation& p) {
  return std::hypot(p.cosine, p.sine);
}

FaultExtreme turned_over(FaultExtreme extreme) {
  extreme.value = 0.0 - extreme.value;
  return extreme;
}

/// The five extremes from two searches: of a component's largest value and of the magnitude's.
template <class OfComponent, class OfMagnitude>
FaultExtremes collected(const PulsatingVector& sustained, OfComponent largest, OfMagnitude peak) {
  return {largest(sustained.x), turned_over(largest(minus(sustained.x))), largest(sustained.y),
          turned_over(largest(minus(sustained.y))), peak()};
}

/// Every angle can be had at every instant: a direct current, or the worst closing angle.
FaultExtremes at_largest_scale(const FaultCurrent& fault, const PulsatingVector& sustained) {
  const auto* alternating = std::get_if<AlternatingFault>(&fault.course);
  const LargestScale largest = largest_scale(fault);
  const double square = largest.scale * largest.scale;
  const double size = size_of(sustained);
  const auto closing = [&](double swing, double angle) -> std::optional<double> {
    if (alternating == nullptr || swing <= rounding * size) return {};
    return closing_for(*alternating, largest.wt, angle);
  };
  const auto component = [&](const Pulsation& p) -> FaultExtreme {
    if (p.largest() <= rounding * size) return {0.0, 0.0, {}};
    return {square * p.largest(), largest.seconds,
            closing(swing_of(p), 0.5 * std::atan2(p.sine, p.cosine))};
  };
  const auto peak = [&]() -> FaultPeak {
    if (size == 0.0) return {0.0, {}, 0.0, {}};
    const LargestValue worst = largest_value(
        [&](double angle) { return norm(sustained.at(angle)); }, 0.0, pi, steps_per_cycle / 2);
    const mesh::Point value = square * sustained.at(worst.at);
    return {norm(value), value, largest.seconds,
            closing(std::hypot(swing_of(sustained.x), swing_of(sustained.y)), worst.at)};
  };
  return collected(sustained, component, peak);
}

/// A closing angle is given: time is searched.
FaultExtremes over_time(const AlternatingFault& fault, const PulsatingVector& sustained) {
  constexpr double decayed = 0.01;
  constexpr double least_cycles = 10.0;
  constexpr double most_cycles = 150.0;
  double cycles = 1.0;
  if (fault.r_over_x > 0.0) {
    cycles = std::ceil(-std::log(decayed) / (2.0 * pi * fault.r_over_x));
    cycles = std::clamp(cycles, least_cycles, most_cycles);
  }
  const double end = 2.0 * pi * cycles;
  const bool approached = std::exp(-end * fault.r_over_x) <= decayed;
  const int steps = static_cast<int>(cycles) * steps_per_cycle;
  const double size = size_of(sustained);

  const auto seconds = [&](double wt) { return wt / (2.0 * pi * fault.frequency_hz); };
  const auto instant = [&](double wt) { return fault_instant(fault, wt, *fault.closing); };
  const auto component = [&](const Pulsation& p) -> FaultExtreme {
    const LargestValue found = largest_value(
        [&](double wt) {
          const FaultInstant now = instant(wt);
          return now.scale * now.scale * p.at(now.angle);
        },
        0.0, end, steps);
    const double value = found.value;
    if (approached && p.largest() > value + rounding * size) {
      return {p.largest(), {}, fault.closing};
    }
    if (value <= rounding * size) return {0.0, 0.0, fault.closing};
    return {value, seconds(found.at), fault.closing};
  };
  const auto peak = [&]() -> FaultPeak {
    const auto force = [&](double wt) {
      const FaultInstant now = instant(wt);
      return now.scale * now.scale * sustained.at(now.angle);
    };
    const LargestValue found =
        largest_value([&](double wt) { return norm(force(wt)); }, 0.0, end, steps);
    if (approached) {
      const LargestValue later = largest_value(
          [&](double angle) { return norm(sustained.at(angle)); }, 0.0, pi, steps_per_cycle / 2);
      if (later.value > found.value + rounding * size) {
        return {later.value, sustained.at(later.at), {}, fault.closing};
      }
    }
    return {found.value, force(found.at), seconds(found.at), fault.closing};
  };
  return collected(sustained, component, peak);
}

}  // namespace

PulsatingVector sustained_force(const FaultCurrent& fault, const QuadraticForce& force) {
  const auto currents = sustained_currents(fault);
  const auto n = static_cast<Eigen::Index>(currents.size());
  assert(force.x.rows() == n && force.x.cols() == n && force.y.rows() == n && force.y.cols() == n);
  Eigen::VectorXd in_phase(n);
  Eigen::VectorXd quadrature(n);
  for (Eigen::Index k = 0; k < n; ++k) {
    in_phase(k) = currents[static_cast<std::size_t>(k)].real();
    quadrature(k) = currents[static_cast<std::size_t>(k)].imag();
  }
  const auto pulsation = [&](const Eigen::MatrixXd& f) -> Pulsation {
    if (!fault.alternating()) return {in_phase.dot(f * in_phase), 0.0, 0.0};
    return pulsation_of(in_phase.dot(f * in_phase), quadrature.dot(f * quadrature),
                        in_phase.dot(f * quadrature));
  };
  return {pulsation(force.x), pulsation(force.y)};
}

FaultExtremes extremes_of(const FaultCurrent& fault, const PulsatingVector& sustained) {
  if (const auto* alternating = std::get_if<AlternatingFault>(&fault.course)) {
    if (alternating->closing) return over_time(*alternating, sustained);
  }
  return at_largest_scale(fault, sustained);
}

FaultExtremes extremes_of(const FaultCurrent& fault, const QuadraticForce& force) {
  return extremes_of(fault, sustained_force(fault, force));
}

}  // namespace barwall::solver
