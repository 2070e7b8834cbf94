#include "verify/force_balance.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "solver/constants.hpp"

namespace barwall::verify {
namespace {

using solver::PulsatingVector;

double size_of(const PulsatingVector& force) {
  return peak_of(force).magnitude;
}

double gap_between(const PulsatingVector& a, const PulsatingVector& b) {
  return size_of(sum_of(a, b, -1.0));
}

/// The largest relative difference, and whose it is.
struct Worst {
  double error = 0.0;
  std::string name;

  void take(double value, const std::string& of) {
    if (!name.empty() && !worse(value, error)) return;
    error = value;
    name = of;
  }
};

}  // namespace

std::vector<Check> check_forces(const solver::Problem& problem,
                                const std::vector<std::vector<int>>& bodies,
                                const std::vector<BodyForce>& account) {
  PulsatingVector total;
  double largest = 0.0;
  for (const BodyForce& body : account) {
    total = sum_of(total, body.force);
    largest = std::max(largest, size_of(body.force));
  }
  // Where symmetry leaves no force at all, what the currents could do to each other is the scale.
  double currents = 0.0;
  for (const auto& current : problem.excitation.current) currents += std::abs(current);
  const double floor = 0.01 * solver::mu_0 / (2.0 * std::numbers::pi) * currents * currents /
                       (2.0 * half_size(problem.section));
  const double measure = std::max(largest, floor);
  const auto relative = [](double difference, double to) {
    return to > 0.0 ? difference / to : difference;
  };
  Worst agreement;
  Worst bands;
  for (std::size_t b = 0; b < account.size(); ++b) {
    const std::string& name =
        problem.section.parts[static_cast<std::size_t>(bodies[b].front())].name;
    const double own = size_of(account[b].force);
    const double scale = own > 0.1 * measure ? own : measure;
    if (account[b].lorentz) {
      agreement.take(relative(gap_between(account[b].force, account[b].stress), scale), name);
    }
    bands.take(relative(gap_between(account[b].inner, account[b].outer), scale), name);
  }
  const std::string scale =
      largest >= floor
          ? fmt::format("of the largest force, {:.4g} N/m", largest)
          : fmt::format(
                "no force to speak of ({:.2g} N/m): of {:.4g} N/m, 1 % of what all the "
                "currents would do to each other across the section",
                largest, floor);
  return {make_check("force-balance", relative(size_of(total), measure), 0.005, scale),
          make_check("force-agreement", agreement.error, 0.005,
                     agreement.name.empty() ? "no bar alone" : "worst: " + agreement.name),
          make_check("stress-bands", bands.error, 0.005, "worst: " + bands.name)};
}

}  // namespace barwall::verify
