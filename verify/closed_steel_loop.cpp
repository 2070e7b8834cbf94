#include "verify/closed_steel_loop.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <complex>
#include <map>
#include <string>

#include "mesh/hollows.hpp"
#include "verify/notice_text.hpp"

namespace barwall::verify {
namespace {

/// Bars within a loop and their net current [A].
struct Enclosed {
  std::vector<std::string> bars;
  double net = 0.0;
};

/// What a hollow's ring encloses; no net current where the currents cancel.
Enclosed enclosed_by(const mesh::Hollow& hollow, const solver::Problem& problem) {
  Enclosed result;
  std::complex<double> sum;
  double magnitude = 0.0;
  for (const mesh::Occupant occupant : hollow.within) {
    const auto k = static_cast<std::size_t>(occupant.part);
    const mesh::Part& part = problem.section.parts[k];
    if (part.kind != mesh::Part::Kind::bar) continue;
    const double share = area(part.pieces[static_cast<std::size_t>(occupant.piece)]) / area(part);
    sum += share * problem.excitation.current[k];
    magnitude += share * std::abs(problem.excitation.current[k]);
    if (result.bars.empty() || result.bars.back() != part.name) result.bars.push_back(part.name);
  }
  if (std::abs(sum) > 1e-6 * magnitude) result.net = std::abs(sum);
  return result;
}

}  // namespace

std::vector<solver::Notice> closed_steel_loops(const solver::Problem& problem) {
  std::vector<bool> steel;
  for (std::size_t k = 0; k < problem.section.parts.size(); ++k) {
    steel.push_back(problem.section.parts[k].kind == mesh::Part::Kind::wall &&
                    problem.materials[k].magnetic());
  }
  std::map<std::vector<int>, std::vector<Enclosed>> by_ring;
  for (const mesh::Hollow& hollow : hollows(*problem.grid, steel)) {
    Enclosed enclosed = enclosed_by(hollow, problem);
    if (enclosed.net > 0.0) by_ring[hollow.ring].push_back(std::move(enclosed));
  }
  const bool alternating = problem.excitation.alternating();
  std::vector<solver::Notice> notices;
  for (auto& [ring, loops] : by_ring) {
    std::stable_sort(loops.begin(), loops.end(),
                     [](const Enclosed& a, const Enclosed& b) { return a.net > b.net; });
    std::vector<std::string> walls;
    for (const int part : ring) {
      walls.push_back(problem.section.parts[static_cast<std::size_t>(part)].name);
    }
    constexpr std::size_t most = 3;
    std::string text =
        fmt::format("{} {} round", quoted(walls), walls.size() == 1 ? "closes" : "together close");
    for (std::size_t k = 0; k < std::min(most, loops.size()); ++k) {
      text += fmt::format("{} {} (net {:.6g} A{})", k == 0 ? "" : ", round", quoted(loops[k].bars),
                          loops[k].net, alternating ? " r.m.s." : "");
    }
    if (loops.size() > most) text += fmt::format(" and {} more", loops.size() - most);
    text += alternating ? ": the alternating flux all round heats the steel, by how much static "
                          "figures do not say"
                        : ": the whole loop is magnetised, all the way round";
    notices.push_back({"closed steel loop", text, alternating});
  }
  return notices;
}

}  // namespace barwall::verify
