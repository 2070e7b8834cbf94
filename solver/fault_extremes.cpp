#include "solver/fault_extremes.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numbers>

#include "solver/curve_since_closing.hpp"
#include "solver/largest_value.hpp"

namespace barwall::solver {

namespace {

constexpr double pi = std::numbers::pi;
constexpr int steps_per_cycle = 360;
/// Below this share of the largest a force is nothing but rounding, and so is its pulsation.
constexpr double rounding = 1e-12;

/// Largest magnitude that a vector's components can have together.
double size_of(const PulsatingVector& vector) {
  const auto bound = [](const Pulsation& p) { return std::abs(p.mean) + p.swing(); };
  return std::hypot(bound(vector.x), bound(vector.y));
}

FaultExtreme turned_over(FaultExtreme extreme) {
  extreme.value = 0.0 - extreme.value;
  return extreme;
}

/// The five extremes from two searches: of a component's largest value and of the magnitude's.
template <class OfComponent, class OfMagnitude>
FaultExtremes collected(const PulsatingVector& sustained, OfComponent largest, OfMagnitude peak) {
  return {largest(sustained.x), turned_over(largest(sum_of({}, sustained.x, -1.0))),
          largest(sustained.y), turned_over(largest(sum_of({}, sustained.y, -1.0))), peak()};
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

PulsatingVector scaled(const PulsatingVector& force, double factor) {
  return sum_of({}, force, factor);
}

}  // namespace

FaultExtremes extremes_at_largest_scale(const FaultCurrent& fault,
                                        const PulsatingVector& at_largest) {
  const auto* alternating = std::get_if<AlternatingFault>(&fault.course);
  const LargestScale largest = largest_scale(fault);
  const double size = size_of(at_largest);
  const auto closing = [&](double swing, double angle) -> std::optional<double> {
    if (alternating == nullptr || swing <= rounding * size) return {};
    return closing_for(*alternating, largest.wt, angle);
  };
  const auto component = [&](const Pulsation& p) -> FaultExtreme {
    const Pulsation::Crest crest = p.largest_at();
    if (crest.value <= rounding * size) return {0.0, 0.0, {}};
    return {crest.value, largest.seconds, closing(p.swing(), crest.wt)};
  };
  const auto peak = [&]() -> FaultPeak {
    if (size == 0.0) return {0.0, {}, 0.0, {}};
    const solver::Peak worst = peak_of(at_largest);
    return {worst.magnitude, worst.value, largest.seconds,
            closing(std::hypot(at_largest.x.swing(), at_largest.y.swing()), worst.wt)};
  };
  return collected(at_largest, component, peak);
}

FaultExtremes extremes_over_first_cycle(const AlternatingFault& fault,
                                        const std::vector<mesh::Point>& first_cycle,
                                        const PulsatingVector& sustained) {
  const int intervals = static_cast<int>(first_cycle.size()) - 1;
  const double step = 2.0 * pi / intervals;
  double size = size_of(sustained);
  for (const mesh::Point value : first_cycle) size = std::max(size, norm(value));
  const ForceSinceClosing force = force_since_closing(first_cycle, step);
  const int steps = 8 * intervals;
  const auto seconds = [&](double wt) { return wt / (2.0 * pi * fault.frequency_hz); };
  const bool approached = fault.r_over_x > 0.0;
  const auto component = [&](const CurveSinceClosing& curve, double sign,
                             const Pulsation& later) -> FaultExtreme {
    const LargestValue found =
        largest_value([&](double wt) { return sign * curve(wt); }, 0.0, 2.0 * pi, steps);
    const double approach = later.largest();
    if (approached && approach > found.value + rounding * size) {
      return {sign * approach, {}, fault.closing};
    }
    if (found.value <= rounding * size) return {0.0, 0.0, fault.closing};
    return {sign * found.value, seconds(found.at), fault.closing};
  };
  const LargestValue found =
      largest_value([&](double wt) { return norm(force(wt)); }, 0.0, 2.0 * pi, steps);
  FaultPeak peak{found.value, force(found.at), seconds(found.at), fault.closing};
  const solver::Peak later = peak_of(sustained);
  if (approached && later.magnitude > found.value + rounding * size) {
    peak = {later.magnitude, later.value, {}, fault.closing};
  }
  const PulsatingVector reversed = scaled(sustained, -1.0);
  return {component(force.x, 1.0, sustained.x), component(force.x, -1.0, reversed.x),
          component(force.y, 1.0, sustained.y), component(force.y, -1.0, reversed.y), peak};
}

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
  const double scale = largest_scale(fault).scale;
  return extremes_at_largest_scale(fault, scaled(sustained, scale * scale));
}

FaultExtremes extremes_of(const FaultCurrent& fault, const QuadraticForce& force) {
  return extremes_of(fault, sustained_force(fault, force));
}

}  // namespace barwall::solver
