#include "verify/force_end_effect.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <optional>

#include "solver/cycle.hpp"
#include "verify/bar_pair.hpp"
#include "verify/finite_filament.hpp"

namespace barwall::verify {
namespace {

using mesh::Part;
using mesh::Point;

/// Forces that all other bars together exert on one, up to the factor mu_0 / 2 pi.
struct BarForces {
  std::string bar;
  double endless = 0.0;
  double lost = 0.0;  ///< magnitude of the difference to the mean over the run
};

/// The pull between two bars per ampere squared, up to mu_0 / 2 pi.
struct Pull {
  std::complex<double> by;  ///< the other's current
  Point endless;
  Point lost;
};

/// None where one of the two reaches round the other.
std::optional<Pull> pull_between(const Part& on, const Part& by, double run_length) {
  Pull pull;
  for (const mesh::Shape& piece : on.pieces) {
    for (const mesh::Shape& other : by.pieces) {
      const Point from = centroid(piece);
      const Point to = centroid(other);
      if (reaches_round(piece, to) || reaches_round(other, from)) return {};
      const double share = (area(piece) / area(on)) * (area(other) / area(by));
      const double d = distance(from, to);
      const Point endless = (share / (d * d)) * (to - from);
      pull.endless += endless;
      pull.lost += force_deficit(run_length, d) * endless;
    }
  }
  return pull;
}

std::optional<BarForces> forces_on(const mesh::Section& section,
                                   const solver::Excitation& excitation, std::size_t bar,
                                   double run_length) {
  std::vector<Pull> pulls;
  for (std::size_t k = 0; k < section.parts.size(); ++k) {
    if (k == bar || excitation.current[k] == 0.0) continue;
    auto pull = pull_between(section.parts[bar], section.parts[k], run_length);
    if (!pull) return {};
    pull->by = excitation.current[k];
    pulls.push_back(*pull);
  }
  const auto part_of = [](std::complex<double> phasor, int pattern) {
    return pattern == 0 ? phasor.real() : phasor.imag();
  };
  const auto largest = [&](Point Pull::*which) {
    const auto force =
        solver::over_cycle(excitation.alternating() ? 2 : 1, [&](int self, int other) {
          Point sum;
          for (const Pull& pull : pulls) sum += part_of(pull.by, other) * (pull.*which);
          return part_of(excitation.current[bar], self) * sum;
        });
    return peak_of(force).magnitude;
  };
  return BarForces{section.parts[bar].name, largest(&Pull::endless), largest(&Pull::lost)};
}

}  // namespace

std::vector<solver::Notice> force_end_effect(const mesh::Section& section,
                                             const solver::Excitation& excitation,
                                             double run_length) {
  std::vector<BarForces> bars;
  for (std::size_t k = 0; k < section.parts.size(); ++k) {
    if (excitation.current[k] == 0.0) continue;
    if (auto forces = forces_on(section, excitation, k, run_length)) bars.push_back(*forces);
  }
  double largest = 0.0;
  for (const BarForces& forces : bars) largest = std::max(largest, forces.endless);
  std::erase_if(bars, [&](const BarForces& f) { return f.endless <= 1e-3 * largest; });
  if (bars.empty()) return {};
  const auto worst =
      std::max_element(bars.begin(), bars.end(), [](const BarForces& a, const BarForces& b) {
        return a.lost / a.endless < b.lost / b.endless * (1.0 - 1e-9);
      });
  const double share = worst->lost / worst->endless;
  const bool indicative = share > 0.05;
  return {{"end effect",
           fmt::format("averaged over a straight run of {:g} m, the free currents' force on every "
                       "bar lies within {:.2g} % of the endless one; worst on \"{}\"{}",
                       run_length, 100.0 * share, worst->bar,
                       indicative ? ": more than 5 %, forces are only indicative" : ""),
           indicative}};
}

}  // namespace barwall::verify
