#include "solver/fault_current.hpp"

#include <algorithm>
#include <boost/math/tools/toms748_solve.hpp>
#include <cassert>
#include <cmath>
#include <cstdint>
#include <numbers>

namespace barwall::solver {

namespace {

constexpr double pi = std::numbers::pi;
using std::numbers::sqrt2;

template <class... Cases>
struct Overloaded : Cases... {
  using Cases::operator()...;
};
template <class... Cases>
Overloaded(Cases...) -> Overloaded<Cases...>;

/// The circuit's angle phi, tan phi = X/R [rad].
double circuit_angle(double r_over_x) {
  return std::atan2(1.0, r_over_x);
}

/// exp(j wt) - exp(-wt R/X), without cancellation near wt = 0.
std::complex<double> turned_less_offset(double wt, double r_over_x) {
  const double half = std::sin(0.5 * wt);
  return {-2.0 * half * half - std::expm1(-wt * r_over_x), std::sin(wt)};
}

double angle_of(std::complex<double> turned, double r_over_x) {
  // At wt = 0 the limit: wt (R/X + j).
  return turned == 0.0 ? circuit_angle(r_over_x) : std::arg(turned);
}

/// wt at which |exp(j wt) - exp(-wt R/X)| is largest: sin wt + (R/X) cos wt = (R/X) exp(-wt R/X).
/// The left side less the right falls from above 0 at pi / 2 to below 0 at pi - atan(R/X); beyond,
/// no magnitude comes back to what it was at that place with a smaller offset.
double crest_wt(double r_over_x) {
  if (r_over_x == 0.0) return pi;
  const auto slope = [r_over_x](double wt) {
    return std::sin(wt) + r_over_x * (std::cos(wt) - std::exp(-wt * r_over_x));
  };
  const double low = 0.5 * pi;
  const double high = low + std::atan2(1.0, r_over_x);
  const double at_low = slope(low);
  const double at_high = slope(high);
  // A circuit almost without reactance: the offset has gone within rounding by then.
  if (!(at_low > 0.0 && at_high < 0.0)) return high;
  std::uintmax_t most_steps = 200;
  const auto bracket = boost::math::tools::toms748_solve(
      slope, low, high, at_low, at_high, boost::math::tools::eps_tolerance<double>(), most_steps);
  return 0.5 * (bracket.first + bracket.second);
}

double within_half_turn(double angle) {
  const double folded = angle - pi * std::floor(angle / pi);
  return folded < pi ? folded : 0.0;
}

}  // namespace

std::vector<std::complex<double>> sustained_currents(const FaultCurrent& fault) {
  assert(fault.bars.size() == 2 || (fault.bars.size() == 3 && fault.alternating()));
  const double size = std::visit(
      Overloaded{[](const AlternatingFault& alternating) { return alternating.symmetrical; },
                 [](const auto& direct) { return direct.steady; }},
      fault.course);
  if (fault.bars.size() == 2) return {size, -size};
  const double height = 0.5 * std::numbers::sqrt3 * size;
  return {size, {-0.5 * size, -height}, {-0.5 * size, height}};
}

Excitation sustained_excitation(const FaultCurrent& fault, std::size_t parts) {
  Excitation excitation;
  if (const auto* alternating = std::get_if<AlternatingFault>(&fault.course)) {
    excitation.frequency_hz = alternating->frequency_hz;
  }
  excitation.current.resize(parts);
  const auto currents = sustained_currents(fault);
  for (std::size_t k = 0; k < currents.size(); ++k) {
    excitation.current[static_cast<std::size_t>(fault.bars[k])] = currents[k];
  }
  return excitation;
}

FaultInstant fault_instant(const AlternatingFault& fault, double wt, double closing) {
  const std::complex<double> turned = turned_less_offset(wt, fault.r_over_x);
  return {std::abs(turned),
          closing - circuit_angle(fault.r_over_x) + angle_of(turned, fault.r_over_x)};
}

std::vector<double> fault_currents(const FaultCurrent& fault, const FaultInstant& instant) {
  const bool alternating = fault.alternating();
  const std::complex<double> turn = alternating ? std::polar(sqrt2, instant.angle) : 1.0;
  std::vector<double> currents;
  for (const std::complex<double> sustained : sustained_currents(fault)) {
    currents.push_back(instant.scale * (sustained * turn).real());
  }
  return currents;
}

FaultInstant fault_instant(const FaultCurrent& fault, double t, double closing) {
  return std::visit(Overloaded{[&](const AlternatingFault& alternating) {
                                 return fault_instant(
                                     alternating, 2.0 * pi * alternating.frequency_hz * t, closing);
                               },
                               [&](const DirectRise& rise) {
                                 return FaultInstant{-std::expm1(-t / rise.time_constant), 0.0};
                               },
                               [](const DirectPeak& peak) {
                                 return FaultInstant{peak.peak / peak.steady, 0.0};
                               }},
                    fault.course);
}

std::vector<double> fault_currents(const FaultCurrent& fault, double t, double closing) {
  return fault_currents(fault, fault_instant(fault, t, closing));
}

LargestScale largest_scale(const FaultCurrent& fault) {
  return std::visit(Overloaded{[](const AlternatingFault& alternating) {
                                 const double wt = crest_wt(alternating.r_over_x);
                                 return LargestScale{
                                     std::abs(turned_less_offset(wt, alternating.r_over_x)), wt,
                                     wt / (2.0 * pi * alternating.frequency_hz)};
                               },
                               [](const DirectRise&) {
                                 return LargestScale{1.0, 0.0, {}};
                               },
                               [](const DirectPeak& peak) {
                                 return LargestScale{peak.peak / peak.steady, 0.0, {}};
                               }},
                    fault.course);
}

FaultCrest crest_of(const FaultCurrent& fault) {
  const LargestScale largest = largest_scale(fault);
  const double sustained = std::abs(sustained_currents(fault).front());
  const auto* alternating = std::get_if<AlternatingFault>(&fault.course);
  if (alternating == nullptr) return {largest.scale * sustained, {}, {}};
  return {largest.scale * sqrt2 * sustained, largest.seconds,
          closing_for(*alternating, largest.wt, 0.0)};
}

double closing_for(const AlternatingFault& fault, double wt, double angle) {
  return within_half_turn(angle - fault_instant(fault, wt, 0.0).angle);
}

double kappa_of(double r_over_x) {
  return 1.02 + 0.98 * std::exp(-3.0 * r_over_x);
}

double r_over_x_of_kappa(double kappa) {
  return std::max(0.0, -std::log((kappa - least_kappa) / 0.98) / 3.0);
}

double r_over_x_of_power_factor(double power_factor) {
  return power_factor / std::sqrt((1.0 - power_factor) * (1.0 + power_factor));
}

FaultEquivalents equivalents_of(double r_over_x) {
  FaultEquivalents same;
  same.r_over_x = r_over_x;
  if (r_over_x > 0.0) same.x_over_r = 1.0 / r_over_x;
  same.power_factor = r_over_x / std::hypot(1.0, r_over_x);
  same.kappa = kappa_of(r_over_x);
  same.peak_over_rms = same.kappa * sqrt2;
  same.crest_over_rms = sqrt2 * std::abs(turned_less_offset(crest_wt(r_over_x), r_over_x));
  return same;
}

}  // namespace barwall::solver
