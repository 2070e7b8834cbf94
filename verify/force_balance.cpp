#include "verify/force_balance.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "solver/constants.hpp"

namespace barwall::verify {
namespace {

using solver::PulsatingVector;

PulsatingVector sum_of(const PulsatingVector& a, const PulsatingVector& b, double sign) {
  const auto add = [sign](const solver::Pulsation& p, const solver::Pulsation& q) {
    return solver::Pulsation{p.mean + sign * q.mean, p.cosine + sign * q.cosine,
                             p.sine + sign * q.sine};
  };
  return {add(a.x, b.x), add(a.y, b.y)};
}

/// Size of a pulsating vector: the longest of its three constant vectors.
double size_of(const PulsatingVector& v) {
  return std::max({std::hypot(v.x.mean, v.y.mean), std::hypot(v.x.cosine, v.y.cosine),
                   std::hypot(v.x.sine, v.y.sine)});
}

}  // namespace

std::vector<Check> check_forces(const solver::PartIntegrals& integrals,
                                const solver::StressBands& bands) {
  const solver::Solution& solution = integrals.solution();
  const auto& section = solution.problem->section;
  const auto& bodies = bands.bodies();
  double largest = 0.0;
  double agreement = 0.0;
  double two_bands = 0.0;
  std::string worst_agreement = "no bar alone";
  std::string worst_bands = "none";
  PulsatingVector total;
  const auto worse = [](double value, double than) { return !(value <= than); };  // NaN is worse
  for (std::size_t b = 0; b < bodies.size(); ++b) {
    const int first = bodies[b].front();
    const auto k = static_cast<std::size_t>(first);
    const PulsatingVector stress = bands.force(solution, static_cast<int>(b), solver::whole_band);
    PulsatingVector force = stress;
    const bool lorentz = bodies[b].size() == 1 && section.parts[k].kind == mesh::Part::Kind::bar &&
                         !solution.problem->materials[k].magnetic();
    if (lorentz) {
      force = lorentz_force(integrals, first);
      const double difference = size_of(sum_of(force, stress, -1.0));
      if (worse(difference, agreement) || worst_agreement == "no bar alone") {
        agreement = difference;
        worst_agreement = section.parts[k].name;
      }
    }
    const double difference =
        size_of(sum_of(bands.force(solution, static_cast<int>(b), solver::inner_band),
                       bands.force(solution, static_cast<int>(b), solver::outer_band), -1.0));
    if (worse(difference, two_bands) || worst_bands == "none") {
      two_bands = difference;
      worst_bands = section.parts[k].name;
    }
    total = sum_of(total, force, 1.0);
    largest = std::max(largest, size_of(force));
  }
  // Where symmetry leaves no force at all, what the currents could do to each other is the scale.
  double currents = 0.0;
  for (const auto& current : solution.problem->excitation.current) currents += std::abs(current);
  const double floor = 0.01 * solver::mu_0 / (2.0 * std::numbers::pi) * currents * currents /
                       (2.0 * half_size(section));
  const double measure = std::max(largest, floor);
  const auto relative = [measure](double force) { return measure > 0.0 ? force / measure : force; };
  const std::string scale =
      largest >= floor
          ? fmt::format("of the largest force, {:.4g} N/m", largest)
          : fmt::format(
                "no force to speak of ({:.2g} N/m): of {:.4g} N/m, 1 % of what all the "
                "currents would do to each other across the section",
                largest, floor);
  return {make_check("force-balance", relative(size_of(total)), 0.005, scale),
          make_check("force-agreement", relative(agreement), 0.005, "worst: " + worst_agreement),
          make_check("stress-bands", relative(two_bands), 0.005, "worst: " + worst_bands)};
}

}  // namespace barwall::verify
