#include "verify/conducting_shell.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "solver/constants.hpp"
#include "solver/resistivity.hpp"
#include "verify/notice_text.hpp"
#include "verify/skin_depth.hpp"

namespace barwall::verify {

double share_held_back(double radius, double thickness, double resistivity, double frequency_hz) {
  const double x =
      std::numbers::pi * frequency_hz * solver::mu_0 * radius * thickness / resistivity;
  return 1.0 - 1.0 / std::sqrt(1.0 + x * x);
}

std::vector<solver::Notice> conducting_shells(const solver::Problem& problem) {
  constexpr double little = 0.05;
  if (!problem.excitation.alternating()) return {};
  const double frequency = problem.excitation.frequency_hz;
  std::vector<std::string> names;
  double most = 0.0;
  std::string worst;
  for (const int index : visible_parts(problem.outline)) {
    const auto k = static_cast<std::size_t>(index);
    const mesh::Part& part = problem.section.parts[k];
    const auto resistivity = resistivity_of(problem.materials[k]);
    if (part.kind == mesh::Part::Kind::bar || problem.materials[k].magnetic() || !resistivity) {
      continue;
    }
    const double thickest = conductor_thickness(part);
    double share = 0.0;
    for (const mesh::Shape& piece : part.pieces) {
      const mesh::Box box = bounds(piece);
      const double thickness = conductor_thickness(piece);
      const double radius = 0.5 * (std::max(box.width(), box.height()) - thickness);
      share = std::max(share, share_held_back(radius, thickness, *resistivity, frequency));
    }
    if (share <= little || thickest > skin_depth(*resistivity, 1.0, frequency)) continue;
    names.push_back(part.name);
    if (share > most * (1.0 + 1e-6)) {
      most = share;
      worst = fmt::format("{:.3g} mm of {}", 1e3 * thickest, problem.materials[k].name);
    }
  }
  if (names.empty()) return {};
  return {{"conducting shell",
           fmt::format("{} at {:g} Hz: eddy currents, which a static field leaves out, would hold "
                       "back {:.2g} % of a field across a tube of its size, {}; the field outside "
                       "is usually smaller than given, and their forces on the wall are missing",
                       quoted(names), frequency, 100.0 * most, worst),
           true}};
}

}  // namespace barwall::verify
