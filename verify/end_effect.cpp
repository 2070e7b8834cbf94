#include "verify/end_effect.hpp"

#include <fmt/format.h>

#include <cmath>

#include "verify/finite_run.hpp"

namespace barwall::verify {
namespace {

/// The free currents of one phasor part, spread over every piece by area.
std::vector<BarCurrent> bar_currents(const solver::Problem& problem, bool quadrature) {
  std::vector<BarCurrent> bars;
  for (std::size_t k = 0; k < problem.section.parts.size(); ++k) {
    const auto phasor = problem.excitation.current[k];
    const double current = quadrature ? phasor.imag() : phasor.real();
    if (current == 0.0) continue;
    const mesh::Part& part = problem.section.parts[k];
    const double whole = area(part);
    for (const mesh::Shape& piece : part.pieces) {
      bars.push_back({piece, current * area(piece) / whole});
    }
  }
  return bars;
}

}  // namespace

std::vector<solver::Notice> end_effect(const solver::Problem& problem,
                                       const solver::Figures& figures, double run_length) {
  const auto in_phase = bar_currents(problem, false);
  const auto quadrature = bar_currents(problem, true);
  struct Worst {
    double share = -1.0;
    std::string probe;
    mesh::Point at;
  } worst;
  for (const solver::ProbeFigures& probe : figures.probes) {
    for (const mesh::Point point : probe.probe.points) {
      const RunField a = field_of_run(in_phase, run_length, point);
      const RunField b = field_of_run(quadrature, run_length, point);
      const double endless = std::hypot(norm(a.endless), norm(b.endless));
      const double lost = std::hypot(norm(a.endless - a.mid_span), norm(b.endless - b.mid_span));
      const double share = endless > 0.0 ? lost / endless : 0.0;
      if (share > worst.share) worst = {share, probe.probe.name, point};
    }
  }
  if (worst.share < 0.0) return {};
  const bool indicative = worst.share > 0.05;
  return {
      {"end effect",
       fmt::format("a straight run of {:g} m gives the free currents' field at mid-span within "
                   "{:.2g} % of the endless one at every probe; worst at \"{}\", ({:.4g}, {:.4g}) "
                   "mm{}",
                   run_length, 100.0 * worst.share, worst.probe, 1e3 * worst.at.x, 1e3 * worst.at.y,
                   indicative ? ": more than 5 %, the plane model is only indicative there" : ""),
       indicative}};
}

}  // namespace barwall::verify
